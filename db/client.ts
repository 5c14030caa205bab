import "server-only";
import { createClient, type Client } from "@libsql/client";
import { drizzle, type LibSQLDatabase } from "drizzle-orm/libsql";
import { env } from "@/lib/core/env";
import { retryWhileBusy } from "./retry";
import * as materials from "./schema/materials";
import * as people from "./schema/people";
import * as records from "./schema/records";
import * as system from "./schema/system";
import * as templates from "./schema/templates";

const schema = { ...people, ...templates, ...materials, ...records, ...system };

export type Database = LibSQLDatabase<typeof schema>;
/** What a transaction callback receives: reads and writes, everything or nothing. */
export type Tx = Parameters<Parameters<Database["transaction"]>[0]>[0];
/** For functions that only read, inside or outside a transaction. */
export type Readable = Database | Tx;

interface Connections {
  url: string;
  readClient: Client;
  writeClient: Client;
  reader: Database;
  writer: Database;
}

// A development server loads modules anew; the connections stay.
const shared = globalThis as typeof globalThis & { coldfaceConnections?: Connections };

/**
 * The native client waits for a lock by stopping the whole event loop, so it waits 50 ms at most; the longer wait is
 * an asynchronous retry in tx.ts. The writer has one connection because SQLite has one writer.
 */
function connect(): Connections {
  const { DATABASE_URL: url, DATABASE_AUTH_TOKEN: authToken } = env();
  const readClient = createClient({ url, authToken, timeout: 50, concurrency: 8 });
  const writeClient = createClient({ url, authToken, timeout: 50, concurrency: 1 });
  return {
    url,
    readClient,
    writeClient,
    reader: drizzle(readClient, { schema }),
    writer: drizzle(writeClient, { schema }),
  };
}

function connections(): Connections {
  shared.coldfaceConnections ??= connect();
  return shared.coldfaceConnections;
}

/** Database for reading outside of transactions. Never write through it. */
export function reader(): Database {
  return connections().reader;
}

/** Database with the single writing connection. Go through `write` in tx.ts instead, which queues. */
export function writer(): Database {
  return connections().writer;
}

/** Writing client without Drizzle, for migrations and settings of the connection. */
export function writeClient(): Client {
  return connections().writeClient;
}

/**
 * Once per process, before the first write: write-ahead log, so that readers never wait for the writer. `synchronous`
 * is FULL by the library's own default on each connection (NORMAL may lose acknowledged records at a power cut), and
 * so are foreign keys; both are checked here rather than believed.
 */
export async function prepareConnections(): Promise<void> {
  const { url, writeClient: client } = connections();
  if (!url.startsWith("file:")) return;
  await retryWhileBusy(client, () => client.execute("PRAGMA journal_mode = WAL"));
  for (const [pragma, wanted] of [
    ["journal_mode", "wal"],
    ["synchronous", 2],
    ["foreign_keys", 1],
  ] as const) {
    const found = (await client.execute(`PRAGMA ${pragma}`)).rows[0]?.[0];
    if (found !== wanted)
      throw new Error(`The database gives ${pragma} = ${String(found)}; Coldface needs ${wanted}.`);
  }
}

/** Ends all connections; the next use opens new ones. */
export function closeDatabase(): void {
  shared.coldfaceConnections?.readClient.close();
  shared.coldfaceConnections?.writeClient.close();
  delete shared.coldfaceConnections;
}
