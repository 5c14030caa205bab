import { count } from "drizzle-orm";
import { prepareConnections, reader } from "@/db/client";
import { people } from "@/db/schema/people";
import { settings } from "@/db/schema/system";
import { templates } from "@/db/schema/templates";
import { write } from "@/db/tx";
import { seededWith } from "@/lib/access/installation";
import { appendAudit } from "@/lib/audit/append";
import { env } from "@/lib/core/env";
import { faultsOf } from "./seed/check-template";
import { demoPasswordHashes, demoSeniors, insertDemoPeople } from "./seed/demo-people";
import { compiledShelf, readMaterials, readTemplates, type SuppliedTemplate } from "./seed/read-shelf";
import { seeding } from "./seed/seeding";
import { supplyMaterial, supplyTemplate, type Outcome, type Supplied } from "./seed/supply";
import { runCommand, say } from "./terminal";

type Kind = "demo" | "starter";

/** A database stays what it was begun as: demo people never join real ones, and a demo never loses its mark. */
async function kindOf(wanted: Kind): Promise<Kind> {
  const [row] = await reader().select({ n: count() }).from(people);
  const kind = (await seededWith()) ?? (row?.n ? "starter" : wanted);
  if (kind !== wanted) {
    say(
      `This database was begun with SEED=${kind} and stays so. For SEED=${wanted} give a new DATABASE_URL.`,
    );
  }
  return kind;
}

/** Templates that the database does not have yet: only they are checked and run. */
async function freshTemplates(shelf: readonly SuppliedTemplate[]): Promise<SuppliedTemplate[]> {
  const rows = await reader().select({ slug: templates.slug }).from(templates);
  const known = new Set(rows.map((row) => row.slug));
  return shelf.filter((template) => !known.has(template.slug));
}

function tell(noun: string, outcomes: readonly (readonly [Supplied, Outcome])[]): void {
  const added = outcomes.filter(([, outcome]) => outcome === "added").length;
  const different = outcomes.filter(([, outcome]) => outcome === "different").map(([item]) => item.slug);
  if (added > 0) say(`Supplied ${added} ${noun}.`);
  if (different.length > 0) {
    say(`Of the ${noun}, ${different.join(", ")} differ from what is supplied now; what is issued was kept.`);
  }
}

await runCommand(async () => {
  await prepareConnections();
  const kind = await kindOf(env().SEED);
  const [materials, shelf] = [readMaterials(), readTemplates()];
  const fresh = await freshTemplates(shelf);
  const snapshots = fresh.length > 0 ? compiledShelf(materials) : {};
  const faults = new Map(fresh.map((template) => [template.slug, faultsOf(template, snapshots)]));
  const sound = shelf.filter((template) => (faults.get(template.slug) ?? []).length === 0);
  const hashes = kind === "demo" && (await seededWith()) === null ? await demoPasswordHashes() : [];

  const [ofMaterials, ofTemplates] = await write(async (tx) => {
    const first = (await seededWith(tx)) === null;
    if (first && kind === "demo") await insertDemoPeople(tx, hashes);
    const adoptedBy = kind === "demo" ? await demoSeniors(tx) : null;
    const done: [(readonly [Supplied, Outcome])[], (readonly [Supplied, Outcome])[]] = [[], []];
    for (const item of materials) done[0].push([item, await supplyMaterial(tx, item, adoptedBy)]);
    for (const item of sound) done[1].push([item, await supplyTemplate(tx, item, adoptedBy)]);
    if (first) {
      await tx.insert(settings).values({ key: "seed", value: kind });
      await appendAudit(tx, seeding, {
        action: "database.seeded",
        object: "database",
        details: { seed: kind },
      });
    }
    return done;
  });
  tell("materials", ofMaterials);
  tell("templates", ofTemplates);

  const unsound = [...faults].filter(([, found]) => found.length > 0);
  if (unsound.length > 0) {
    const lines = unsound.flatMap(([slug, found]) => [`  ${slug}`, ...found.map((fault) => `    ${fault}`)]);
    throw new Error(
      `These supplied templates were not issued, because they fail their own checks:\n${lines.join("\n")}`,
    );
  }
});
