/**
 * Speed over HTTP: the product against a bare route handler of the same framework that answers the same JSON, both
 * built, each in a process of its own, measured in turns in one run. `npm run bench -- http`
 */
import autocannon from "autocannon";
import { execFileSync, spawn, type ChildProcess } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import path from "node:path";

const seconds = Number(process.env.BENCH_SECONDS ?? 6);
const turns = 3;
const connections = 16;
const next = path.join("node_modules", "next", "dist", "bin", "next");
const folder = mkdtempSync(path.join(tmpdir(), "coldface-bench-"));
const servers: ChildProcess[] = [];

function freePort(): Promise<number> {
  return new Promise((resolve) => {
    const probe = createServer().listen(0, "127.0.0.1", () => {
      const address = probe.address();
      probe.close(() => resolve(typeof address === "object" && address ? address.port : 0));
    });
  });
}

const secrets = {
  AUTH_SECRET: "auth-secret-of-the-bench-012345678",
  KEY_SECRET: "key-secret-of-the-bench-0123456789",
  AUDIT_SECRET: "audit-secret-of-the-bench-01234567",
};
const settings: NodeJS.ProcessEnv = {
  ...process.env,
  ...secrets,
  DATABASE_URL: `file:${folder}/bench.db`,
  SEED: "demo",
  NODE_ENV: "production",
  NEXT_TELEMETRY_DISABLED: "1",
};

function command(name: string, args: string[] = []): string {
  return execFileSync(
    process.execPath,
    ["--conditions=react-server", "--import", "tsx", `lib/commands/${name}.ts`, ...args],
    { env: settings, encoding: "utf8" },
  );
}

async function serve(where: string, port: number, ready: string): Promise<string> {
  const server = spawn(
    process.execPath,
    [path.resolve(next), "start", "--hostname", "127.0.0.1", "--port", String(port)],
    {
      cwd: where,
      env: {
        ...settings,
        PORT: String(port),
        HOST: "127.0.0.1",
        PUBLIC_URL: `http://127.0.0.1:${port}`,
        BENCH_ANSWERS: folder,
      },
      stdio: ["ignore", "ignore", "inherit"],
    },
  );
  servers.push(server);
  const address = `http://127.0.0.1:${port}`;
  for (let attempt = 0; attempt < 150; attempt += 1) {
    if (
      await fetch(address + ready).then(
        () => true,
        () => false,
      )
    )
      return address;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Error(`The server of ${where} did not start.`);
}

interface Load {
  url: string;
  body: string;
  headers: Record<string, string>;
  /** A changing Idempotency-Key is not needed: a record without one is kept anew each time. */
  duration?: number;
}

async function load({ url, body, headers, duration = seconds }: Load) {
  const result = await autocannon({ url, method: "POST", body, headers, connections, duration });
  if (result.non2xx > 0 || result.errors > 0)
    throw new Error(`${url}: ${result.non2xx} refusals, ${result.errors} errors`);
  return { perSecond: result.requests.average, median: result.latency.p50, p99: result.latency.p99 };
}

function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[values.length >> 1] ?? Number.NaN;
}

try {
  command("migrate");
  command("seed");
  const key =
    command("key", [
      "--owner",
      "engineer@tarnbridge.example",
      "--scopes",
      "all",
      "--days",
      "1",
      "--rate",
      "100000",
    ])
      .trim()
      .split("\n")
      .at(-1) ?? "";
  const product = await serve(".", await freePort(), "/api/ready");
  const headers = { "content-type": "application/json", authorization: `Bearer ${key}` };

  const inputs = { D_in: { value: 3, unit: "in" }, T_fluid: { value: 480, unit: "°F" } };
  const evaluateBody = JSON.stringify({ inputs });
  const rowsBody = JSON.stringify({
    rows: Array.from({ length: 1000 }, (_, index) => ({
      D_in: 20 + index / 10,
      T_fluid: 150 + index / 5,
      h_out: 8,
      L: 2,
    })),
    common: { T_amb: 18 },
  });
  const wall = `${product}/api/v1/templates/insulated-pipe`;
  const post = async (url: string, body: string) => {
    const reply = await fetch(url, { method: "POST", headers, body });
    const text = await reply.text();
    if (!reply.ok) throw new Error(`${url}: ${reply.status} ${text.slice(0, 300)}`);
    return text;
  };
  writeFileSync(`${folder}/evaluate.json`, await post(`${wall}/evaluate`, evaluateBody));
  writeFileSync(`${folder}/rows.json`, await post(`${wall}/evaluate-rows`, rowsBody));
  writeFileSync(`${folder}/record.json`, await post(`${wall}/records`, evaluateBody));

  // Webpack, because the other bundler looks for proxy and instrumentation at the root of the repository: the product's.
  execFileSync(process.execPath, [path.resolve(next), "build", "--webpack"], {
    cwd: "tests/bench/bare",
    env: settings,
    stdio: ["ignore", "ignore", "inherit"],
  });
  const bare = await serve("tests/bench/bare", await freePort(), "/evaluate");

  const pairs = [
    {
      name: "evaluate, requests a second",
      ours: `${wall}/evaluate`,
      theirs: `${bare}/evaluate`,
      body: evaluateBody,
      aim: "≥ 0.6 ×",
    },
    {
      name: "evaluate-rows of 1,000 rows, requests a second",
      ours: `${wall}/evaluate-rows`,
      theirs: `${bare}/rows`,
      body: rowsBody,
      aim: "≥ 0.33 × (at most 3 × the time of JSON alone)",
    },
    {
      name: "records, durable, requests a second",
      ours: `${wall}/records`,
      theirs: `${bare}/insert`,
      body: evaluateBody,
      aim: "≥ 0.6 ×",
    },
  ];
  for (const { name, ours, theirs, body, aim } of pairs) {
    await load({ url: ours, body, headers, duration: 2 });
    await load({ url: theirs, body, headers, duration: 2 });
    const ratios: number[] = [];
    let last = { ours: 0, theirs: 0, p99: 0 };
    for (let turn = 0; turn < turns; turn += 1) {
      const a = await load({ url: ours, body, headers });
      const b = await load({ url: theirs, body, headers });
      ratios.push(a.perSecond / b.perSecond);
      last = { ours: a.perSecond, theirs: b.perSecond, p99: a.p99 };
    }
    console.log(`\n${name}`);
    console.log(
      `  product ${last.ours.toFixed(0)}, bare handler ${last.theirs.toFixed(0)}, ratio ${median(ratios).toFixed(2)} (aim ${aim}); p99 ${last.p99} ms at ${connections} connections`,
    );
  }
} finally {
  for (const server of servers) server.kill("SIGKILL");
  rmSync(folder, { recursive: true, force: true });
}
