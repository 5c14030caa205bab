import { spawn, type ChildProcess } from "node:child_process";
import { existsSync, mkdtempSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import path from "node:path";
import type { ValidateFunction } from "ajv";
import Ajv2020 from "ajv/dist/2020";
import addFormats from "ajv-formats";
import { encode } from "next-auth/jwt";
import { afterAll, beforeAll } from "vitest";
import { closeDatabase } from "@/db/client";
import type { Operation } from "@/lib/http/operation";
import { openApiDocument } from "@/openapi/document";
import { operations } from "@/openapi/index";
import { runCommandFile } from "../factories/command";
import { testSettings } from "../factories/database";

/** The built application on a free port over a seeded temporary database, and calls whose answers are all checked. */

export interface CallOptions {
  readonly key?: string;
  readonly cookie?: string;
  /** Written as JSON, unless it is a text already. */
  readonly body?: unknown;
  readonly headers?: Readonly<Record<string, string>>;
}

export interface Reply {
  readonly status: number;
  readonly headers: Headers;
  readonly text: string;
  /** The parsed content. */
  readonly json: JsonObject;
}
export type JsonObject = Record<string, unknown> & {
  errors?: { pointer: string; code: string; message: string }[];
};

export class ApiServer {
  readonly folder = mkdtempSync(path.join(tmpdir(), "coldface-api-"));
  readonly file = path.join(this.folder, "test.db");
  private port = 0;
  private process: ChildProcess | null = null;
  private output = "";

  get url(): string {
    return `http://127.0.0.1:${this.port}`;
  }

  async prepare(): Promise<void> {
    this.port = await freePort();
    Object.assign(process.env, testSettings(this.file), { PUBLIC_URL: `http://localhost:${this.port}` });
    for (const command of ["migrate", "seed"]) {
      const outcome = await runCommandFile(command, [], { SEED: "demo" });
      if (outcome.code !== 0) throw new Error(`${command} failed:\n${outcome.stdout}${outcome.stderr}`);
    }
  }

  async start(): Promise<void> {
    if (!existsSync(".next/BUILD_ID"))
      throw new Error("The application is not built. Run the tests with npm test.");
    const next = path.join("node_modules", "next", "dist", "bin", "next");
    const env = {
      ...process.env,
      NODE_ENV: "production",
      PORT: String(this.port),
      COLDFACE_CHECK_REPLIES: "1",
    } as const;
    this.process = spawn(
      process.execPath,
      [next, "start", "--hostname", "127.0.0.1", "--port", String(this.port)],
      {
        env,
        stdio: ["ignore", "pipe", "pipe"],
      },
    );
    for (const stream of [this.process.stdout, this.process.stderr]) {
      stream?.on("data", (chunk: Buffer) => (this.output = (this.output + chunk.toString()).slice(-20_000)));
    }
    for (let attempt = 0; attempt < 300; attempt++) {
      const ready = await fetch(`${this.url}/api/ready`).then(
        (reply) => reply.ok,
        () => false,
      );
      if (ready) return;
      if (this.process.exitCode !== null) break;
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    throw new Error(`The application did not start:\n${this.output}`);
  }

  /** What the application wrote last. */
  get log(): string {
    return this.output;
  }

  async stop(signal: NodeJS.Signals = "SIGTERM"): Promise<void> {
    const running = this.process;
    this.process = null;
    if (!running || running.exitCode !== null || running.signalCode !== null) return;
    const ended = new Promise((resolve) => running.once("exit", resolve));
    running.kill(signal);
    await ended;
  }

  /** One call; the answer must be one that the document declares for the operation of this address. */
  async call(method: string, address: string, options: CallOptions = {}): Promise<Reply> {
    const { key, cookie, body, headers } = options;
    const reply = await fetch(`${this.url}/api/v1${address}`, {
      method,
      headers: {
        ...(key === undefined ? {} : { authorization: `Bearer ${key}` }),
        ...(cookie === undefined ? {} : { cookie }),
        ...(body === undefined ? {} : { "content-type": "application/json" }),
        ...headers,
      },
      ...(body === undefined ? {} : { body: typeof body === "string" ? body : JSON.stringify(body) }),
    });
    const text = await reply.text();
    const json = (text === "" ? {} : JSON.parse(text)) as JsonObject;
    const faults = undocumented(method, address, reply, json);
    if (faults.length > 0) {
      throw new Error(
        `${method} ${address} answered ${reply.status}:\n${faults.join("\n")}\n${text.slice(0, 2000)}`,
      );
    }
    return { status: reply.status, headers: reply.headers, text, json };
  }
}

/** A server for a test file: prepared and started before its tests, ended after them. */
export function apiServer(): ApiServer {
  const server = new ApiServer();
  beforeAll(async () => {
    await server.prepare();
    await server.start();
  }, 240_000);
  afterAll(async () => {
    await server.stop();
    closeDatabase();
    rmSync(server.folder, { recursive: true, force: true });
  });
  return server;
}

/** The cookie of a session, as signing in sets it. */
export async function sessionCookie(sessionId: string): Promise<string> {
  const token = await encode({ token: { sid: sessionId }, secret: process.env.AUTH_SECRET ?? "" });
  return `coldface.session=${token}`;
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen(0, "127.0.0.1", () => {
      const address = server.address();
      server.close(() => resolve(typeof address === "object" && address ? address.port : 0));
    });
  });
}

// ───────────────────────────── answers against the document

const ajv = addFormats(new Ajv2020({ strict: false, allErrors: true }));
ajv.addSchema(JSON.parse(JSON.stringify(openApiDocument("http://localhost:3000"))) as object, "document");

const pointerPart = (text: string) => encodeURIComponent(text.replace(/~/g, "~0").replace(/\//g, "~1"));

/** The operation of an address, the most exact one first. */
export function operationAt(method: string, address: string): Operation | undefined {
  const parts = (address.split("?")[0] ?? "").split("/");
  const wanted = method === "HEAD" ? "GET" : method;
  return operations
    .filter((operation) => {
      const own = operation.path.split("/");
      const fits = own.every((part, index) => part.startsWith("{") || part === parts[index]);
      return operation.method === wanted && own.length === parts.length && fits;
    })
    .sort((a, b) => a.path.split("{").length - b.path.split("{").length)[0];
}

const checkers = new Map<string, ValidateFunction>();

function checkerOf(reference: string): ValidateFunction {
  const check = checkers.get(reference) ?? ajv.compile({ $ref: reference });
  checkers.set(reference, check);
  return check;
}

function undocumented(method: string, address: string, reply: Response, json: unknown): string[] {
  const operation = operationAt(method, address);
  if (!operation || reply.status === 304 || reply.status === 405 || method === "HEAD") return [];
  const type = reply.headers.get("content-type") ?? "";
  const at = `/paths/${pointerPart(operation.path)}/${operation.method.toLowerCase()}/responses/${reply.status}`;
  try {
    const check = checkerOf(`document#${at}/content/${pointerPart(type)}/schema`);
    if (check(json)) return [];
    return (check.errors ?? []).map(({ instancePath, message }) => `${instancePath} ${message ?? ""}`);
  } catch {
    return [`${operation.id} declares no answer ${reply.status} of type ${type}.`];
  }
}
