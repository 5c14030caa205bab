/**
 * Bundles the calculation worker into dist/workers/calc.mjs, and only when one of its sources has changed since. Run
 * directly it says so; tests and the development server call `buildWorker`.
 */
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";

const root = fileURLToPath(new URL("../../", import.meta.url));
const folder = path.join(root, "dist", "workers");
const file = path.join(folder, "calc.mjs");
const stamp = path.join(folder, "calc.sources.json");

function hashOf(relative) {
  const full = path.join(root, relative);
  return existsSync(full) ? createHash("sha256").update(readFileSync(full)).digest("hex") : "";
}

function isFresh() {
  if (!existsSync(file) || !existsSync(stamp)) return false;
  const sources = Object.entries(JSON.parse(readFileSync(stamp, "utf8")));
  return sources.length > 0 && sources.every(([source, hash]) => hashOf(source) === hash);
}

/** Answers the path of the bundle; builds it when it is missing or stale. */
export async function buildWorker() {
  if (isFresh()) return file;
  const { build } = await import("esbuild");
  mkdirSync(folder, { recursive: true });
  // Built aside and moved, so that a reader never meets half a file; several test processes may build at once.
  const aside = path.join(folder, `calc.${process.pid}.mjs`);
  try {
    const { metafile } = await build({
      absWorkingDir: root,
      entryPoints: ["lib/compute/worker.ts"],
      outfile: aside,
      bundle: true,
      platform: "node",
      target: "node20",
      format: "esm",
      metafile: true,
      logLevel: "warning",
    });
    const sources = Object.fromEntries(
      Object.keys(metafile.inputs)
        .sort()
        .map((source) => [source, hashOf(source)]),
    );
    const stampAside = `${aside}.json`;
    writeFileSync(stampAside, JSON.stringify(sources));
    renameSync(aside, file);
    renameSync(stampAside, stamp);
  } finally {
    rmSync(aside, { force: true });
  }
  return file;
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  await buildWorker();
}
