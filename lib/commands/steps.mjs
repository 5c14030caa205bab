/**
 * Steps shared by `npm run up` and `npm test`, with Node.js built-ins only, because nothing is installed yet when
 * they begin: install when the lock file changed, secrets when missing, build when sources are newer.
 */
import { execFileSync, spawnSync } from "node:child_process";
import { createHash, randomBytes } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, readdirSync, statSync, writeFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

export const root = fileURLToPath(new URL("../../", import.meta.url));
const at = (...parts) => path.join(root, ...parts);

export function say(text) {
  process.stdout.write(`${text}\n`);
}

/** Ends the command with a sentence that says what is missing and how to mend it. */
export function stop(text) {
  process.stderr.write(`\n${text}\n`);
  process.exit(1);
}

export function checkNode() {
  const [major, minor] = process.versions.node.split(".").map(Number);
  if (major < 20 || (major === 20 && minor < 12))
    stop(`Coldface needs Node.js 20.12 or newer; this is ${process.versions.node}.`);
}

function sha256(file) {
  return createHash("sha256").update(readFileSync(file)).digest("hex");
}

function npm(args) {
  const cli = process.env.npm_execpath;
  const command = cli ? process.execPath : "npm";
  const result = spawnSync(command, cli ? [cli, ...args] : args, {
    cwd: root,
    stdio: ["ignore", "inherit", "inherit"],
    env: { ...process.env, NODE_ENV: "development" },
  });
  if (result.error) stop(`npm could not be started: ${result.error.message}`);
  return result.status === 0;
}

export function install() {
  const lock = at("package-lock.json");
  const stamp = at("node_modules", ".coldface-lock");
  const wanted = sha256(lock);
  if (existsSync(stamp) && readFileSync(stamp, "utf8") === wanted) return;
  say("Installing packages …");
  if (!npm(["ci", "--include=dev", "--no-audit", "--no-fund"])) {
    stop(
      "The packages could not be installed. Is the npm registry reachable? The lines above say what npm missed.",
    );
  }
  writeFileSync(stamp, wanted);
}

/** Secrets of this installation; never overwritten. */
export function secrets() {
  const file = at(".env.local");
  const present = existsSync(file) ? readFileSync(file, "utf8") : "";
  const missing = ["AUTH_SECRET", "KEY_SECRET", "AUDIT_SECRET"].filter(
    (name) => !new RegExp(`^${name}=`, "m").test(present),
  );
  if (missing.length === 0) return;
  const lines = missing.map((name) => `${name}=${randomBytes(32).toString("base64url")}`);
  const glue = present === "" || present.endsWith("\n") ? "" : "\n";
  writeFileSync(file, `${present}${glue}${lines.join("\n")}\n`, { mode: 0o600 });
  say(`Wrote ${missing.length} new secrets to .env.local.`);
}

/** Settings of .env.local under those already given. */
export function loadSettings() {
  const file = at(".env.local");
  if (!existsSync(file)) return;
  for (const line of readFileSync(file, "utf8").split("\n")) {
    const match = /^([A-Z_]+)=(.*)$/.exec(line);
    if (match && process.env[match[1]] === undefined) process.env[match[1]] = match[2];
  }
}

const sources = [
  "app",
  "db",
  "lib",
  "openapi",
  "public",
  "next.config.ts",
  "proxy.ts",
  "instrumentation.ts",
  "instrumentation-node.ts",
  "tailwind.config.ts",
  "postcss.config.mjs",
  "tsconfig.json",
  "package-lock.json",
];

function fingerprint() {
  const hash = createHash("sha256");
  const visit = (relative) => {
    const full = at(relative);
    if (!existsSync(full)) return;
    if (statSync(full).isDirectory()) {
      for (const name of readdirSync(full).sort()) visit(path.join(relative, name));
    } else {
      hash.update(relative).update("\0").update(readFileSync(full)).update("\0");
    }
  };
  for (const source of sources) visit(source);
  return hash.digest("hex");
}

function run(file, args, failure) {
  const result = spawnSync(process.execPath, [file, ...args], {
    cwd: root,
    stdio: ["ignore", "inherit", "inherit"],
    env: process.env,
  });
  if (result.status !== 0) stop(failure);
}

/** Builds the application and the workers when any source differs from the last build. */
export function build() {
  const stamp = at(".next", ".coldface-sources");
  const wanted = fingerprint();
  if (existsSync(stamp) && readFileSync(stamp, "utf8") === wanted && existsSync(at(".next", "BUILD_ID")))
    return;
  say("Building …");
  run(
    at("lib", "compute", "build-worker.mjs"),
    [],
    "The calculation worker could not be built; the lines above say why.",
  );
  run(
    at("node_modules", "next", "dist", "bin", "next"),
    ["build"],
    "The application could not be built; the lines above say why.",
  );
  writeFileSync(stamp, wanted);
}

/** Runs one of the TypeScript commands of this folder, as server code (`server-only` refuses to load otherwise). */
export function command(name, args = []) {
  run(
    at("node_modules", "tsx", "dist", "cli.mjs"),
    ["--conditions=react-server", at("lib", "commands", `${name}.ts`), ...args],
    `The step "${name}" failed; the lines above say why.`,
  );
}

export function dataFolder() {
  mkdirSync(at("data"), { recursive: true });
}

/** Path of a Chromium for the browser tests, or null. Installs Debian's when this process may. */
export function chromium({ mayInstall }) {
  const known = [
    process.env.CHROMIUM_PATH,
    "/usr/bin/chromium",
    "/usr/bin/chromium-browser",
    "/usr/bin/google-chrome",
  ];
  const found = known.find((file) => file && existsSync(file));
  if (found) return found;
  if (
    !mayInstall ||
    process.platform !== "linux" ||
    process.getuid?.() !== 0 ||
    !existsSync("/usr/bin/apt-get")
  )
    return null;
  say("Installing Chromium from Debian's packages for the browser tests …");
  try {
    const options = {
      stdio: ["ignore", "ignore", "inherit"],
      env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" },
    };
    execFileSync("apt-get", ["update", "-q"], options);
    execFileSync("apt-get", ["install", "-q", "-y", "--no-install-recommends", "chromium"], options);
  } catch (error) {
    say(`Chromium could not be installed (${error.message}).`);
    return null;
  }
  return existsSync("/usr/bin/chromium") ? "/usr/bin/chromium" : null;
}
