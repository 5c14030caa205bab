import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";

/** Every JSON file of a folder of db/seed, by slug, in the order of the slugs. */
export function readFolder(folder: "materials" | "templates"): { slug: string; content: unknown }[] {
  const place = path.join(process.cwd(), "db", "seed", folder);
  return readdirSync(place)
    .filter((name) => name.endsWith(".json"))
    .sort()
    .map((name) => {
      const text = readFileSync(path.join(place, name), "utf8");
      try {
        return { slug: name.slice(0, -".json".length), content: JSON.parse(text) as unknown };
      } catch (error) {
        throw new Error(`db/seed/${folder}/${name} is not valid JSON.`, { cause: error });
      }
    });
}
