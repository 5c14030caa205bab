"use client";

import type { FieldProblem } from "@/lib/core/errors";

/** A refusal of the API as the interface shows it. `status` 0 means that no answer came. */
export class ApiProblem extends Error {
  readonly status: number;
  readonly code: string;
  readonly problems: readonly FieldProblem[];
  readonly requestId: string | null;

  constructor(
    status: number,
    code: string,
    detail: string,
    problems: readonly FieldProblem[],
    requestId: string | null,
  ) {
    super(detail);
    this.name = "ApiProblem";
    this.status = status;
    this.code = code;
    this.problems = problems;
    this.requestId = requestId;
  }
}

/** Whether asking the same again may help: no answer came, or the server is busy. */
export function isPassing(error: unknown): boolean {
  return error instanceof ApiProblem && (error.status === 0 || error.status === 503);
}

interface ProblemDocument {
  type?: string;
  title?: string;
  detail?: string;
  instance?: string;
  errors?: FieldProblem[];
}

interface CallOptions {
  method?: "GET" | "POST" | "PUT" | "DELETE";
  body?: unknown;
  signal?: AbortSignal;
  idempotencyKey?: string;
}

/** One call of the public API with the session of this page. Throws `ApiProblem`. */
export async function callApi<Reply>(path: string, options: CallOptions = {}): Promise<Reply> {
  const headers: Record<string, string> = { accept: "application/json" };
  if (options.body !== undefined) headers["content-type"] = "application/json";
  if (options.idempotencyKey) headers["idempotency-key"] = options.idempotencyKey;
  let reply: Response;
  try {
    reply = await fetch(`/api/v1${path}`, {
      method: options.method ?? (options.body === undefined ? "GET" : "POST"),
      headers,
      body: options.body === undefined ? undefined : JSON.stringify(options.body),
      signal: options.signal,
    });
  } catch (cause) {
    if (options.signal?.aborted) throw cause;
    throw new ApiProblem(
      0,
      "no-connection",
      "The server did not answer. Check the connection; what you typed is still here.",
      [],
      null,
    );
  }
  if (reply.ok) return (await reply.json()) as Reply;
  const problem = (await reply.json().catch(() => ({}))) as ProblemDocument;
  const code = problem.type?.split("/").at(-1) ?? "internal";
  throw new ApiProblem(
    reply.status,
    code,
    problem.detail ?? problem.title ?? `The server answered ${reply.status}.`,
    problem.errors ?? [],
    problem.instance ?? null,
  );
}
