/**
 * `npm run bench [-- engine|http|random-programs …]`: prints ratios measured in one run; without names, engine and http.
 * With `--save` the output is written to tests/bench/results.md with date, machine and command.
 */
import { spawnSync } from "node:child_process";
import { writeFileSync } from "node:fs";
import { cpus, totalmem } from "node:os";
import path from "node:path";
import { build, checkNode, install, root, say, stop } from "./steps.mjs";

process.chdir(root);
checkNode();
install();

const asked = process.argv.slice(2).filter((word) => !word.startsWith("--"));
const save = process.argv.includes("--save");
const names = asked.length === 0 ? ["engine", "http"] : asked;
if (names.includes("http")) build();

const parts = names.map((name) => {
  const file = path.join("tests", "bench", `${name}.mts`);
  say(`\n── ${name}`);
  const result = spawnSync(process.execPath, ["--conditions=react-server", "--import", "tsx", file], {
    encoding: "utf8",
    stdio: ["ignore", "pipe", "inherit"],
    env: { ...process.env, NODE_ENV: "production" },
    maxBuffer: 1 << 26,
  });
  process.stdout.write(result.stdout ?? "");
  if (result.status !== 0) stop(`The benchmark "${name}" failed; the lines above say why.`);
  return `## ${name}\n\n\`\`\`\n${result.stdout.trim()}\n\`\`\`\n`;
});

if (save) {
  const machine = `${cpus().length} × ${cpus()[0]?.model ?? "unknown processor"}, ${Math.round(totalmem() / 2 ** 30)} GiB, Node.js ${process.versions.node}`;
  const head = `# Measured\n\n${new Date().toISOString().slice(0, 10)}, ${machine}\nCommand: \`npm run bench -- ${names.join(" ")} --save\`\n\nRatios are medians of measurements taken in turns in one run; absolute numbers depend on the machine and its load.\n\n`;
  writeFileSync(path.join("tests", "bench", "results.md"), head + parts.join("\n"));
  say("\nWritten to tests/bench/results.md.");
}
