/**
 * `npm run up`: from a bare checkout to a served application, in one command. Each step is skipped when there is
 * nothing to do, so that a second start takes a few seconds.
 */
import { spawn } from "node:child_process";
import path from "node:path";
import {
  build,
  checkNode,
  command,
  dataFolder,
  install,
  loadSettings,
  root,
  say,
  secrets,
  stop,
} from "./steps.mjs";

process.env.NEXT_TELEMETRY_DISABLED = "1";
process.chdir(root);
checkNode();
install();
secrets();
loadSettings();
process.env.NODE_ENV = "production";
dataFolder();
build();
say("Bringing the database up to date …");
command("migrate");
command("seed");

const host = process.env.HOST ?? "127.0.0.1";
const port = process.env.PORT ?? "3000";
process.env.PORT = port;
process.env.HOST = host;
process.env.PUBLIC_URL ??= `http://${host === "127.0.0.1" ? "localhost" : host}:${port}`;
process.env.NEXTAUTH_URL ??= process.env.PUBLIC_URL;
process.env.NEXTAUTH_SECRET ??= process.env.AUTH_SECRET;

const next = path.join(root, "node_modules", "next", "dist", "bin", "next");
const server = spawn(process.execPath, [next, "start", "--hostname", host, "--port", port], {
  cwd: root,
  stdio: ["ignore", "inherit", "inherit"],
  env: process.env,
});
server.on("error", (error) => stop(`The server could not be started: ${error.message}`));
server.on("exit", (code, signal) =>
  process.exit(code ?? (signal === "SIGTERM" || signal === "SIGINT" ? 0 : 1)),
);

const end = () => server.kill("SIGTERM");
process.on("SIGINT", end);
process.on("SIGTERM", end);
// A process manager that closes the terminal ends the server too, instead of leaving it on the port.
const parent = process.ppid;
setInterval(() => {
  if (process.ppid !== parent) end();
}, 1000).unref();

for (let attempt = 0; attempt < 600; attempt += 1) {
  const ready = await fetch(`http://${host.includes(":") ? `[${host}]` : host}:${port}/api/ready`).then(
    (reply) => reply.ok,
    () => false,
  );
  if (ready) {
    say(`\nColdface is served on ${process.env.PUBLIC_URL}`);
    command("accounts");
    say("\nStop with Ctrl+C.");
    break;
  }
  await new Promise((resolve) => setTimeout(resolve, 200));
}
