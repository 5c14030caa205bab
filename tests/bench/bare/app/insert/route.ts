import { createClient, type Client } from "@libsql/client";
import { answer } from "../answers";

let client: Promise<Client> | null = null;

async function open(): Promise<Client> {
  const made = createClient({ url: `file:${process.env.BENCH_ANSWERS ?? "."}/bare.db`, concurrency: 1 });
  await made.execute("pragma journal_mode = wal");
  await made.execute("pragma synchronous = full");
  await made.execute("create table if not exists kept (id integer primary key, content text not null)");
  return made;
}

/** One plain, durable insert of a record of the same size. */
export async function POST(request: Request): Promise<Response> {
  await request.json();
  client ??= open();
  await (
    await client
  ).execute({ sql: "insert into kept (content) values (?)", args: [JSON.stringify(answer("record"))] });
  return Response.json(answer("record"), { status: 201 });
}
