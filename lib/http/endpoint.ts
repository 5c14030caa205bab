import "server-only";
import type { z } from "zod";
import type { Tx } from "@/db/client";
import type { Actor } from "@/lib/access/actor";
import { actorFromRequest } from "@/lib/access/current-actor";
import type { Call } from "@/lib/core/call";
import { CodedError } from "@/lib/core/errors";
import { log } from "@/lib/core/log";
import { markOf, type RequestMark } from "./call";
import { checkReply } from "./check-reply";
import {
  claimKey,
  readIdempotencyKey,
  requestFingerprint,
  type Claim,
  type StoredReply,
} from "./idempotency";
import type { Operation, OperationInput, Presented, RequestParts } from "./operation";
import { parseRequest, type ParsedRequest } from "./parse-request";
import { codedFrom } from "./problem";
import { spendToken } from "./rate-limit";
import { jsonReply, problemReply, type HeaderValues } from "./reply";

/** The hall that every call of the interface passes: who, how often, what; then the verb; then the only way out. */

export interface RouteContext {
  /** Nothing for an address without parameters. */
  params: Promise<Record<string, string | string[] | undefined> | undefined>;
}
export type Handler = (request: Request, context: RouteContext) => Promise<Response>;

type Verb<Request extends RequestParts, Result> = (
  actor: Actor,
  input: OperationInput<Request>,
  call: Call<Tx, Result>,
) => Promise<Result>;

/** Route handler of an operation that needs an actor. */
export function endpoint<Request extends RequestParts, Reply extends z.ZodType, Result>(
  operation: Operation<Request, Reply, Result>,
  verb: Verb<Request, Result>,
): Handler {
  return handler(operation as Operation, async (request) => {
    const actor = await actorFromRequest(request);
    if (actor === null) {
      throw new CodedError("unauthenticated", "Sign in, or send a valid key as Authorization: Bearer …");
    }
    checkScope(actor, operation.scope);
    return { actor, run: (input, call) => verb(actor, input as OperationInput<Request>, call) };
  });
}

/** Route handler of an operation that is open to everybody. */
export function publicEndpoint<Request extends RequestParts, Reply extends z.ZodType, Result>(
  operation: Operation<Request, Reply, Result>,
  answer: (input: OperationInput<Request>) => Promise<Result>,
): Handler {
  return handler(operation as Operation, async () => ({
    actor: null,
    run: (input) => answer(input as OperationInput<Request>),
  }));
}

interface Admitted {
  readonly actor: Actor | null;
  readonly run: (input: unknown, call: Call<Tx>) => Promise<unknown>;
}

/** Before the body is read; the verb's own permit decides on the object. */
function checkScope(actor: Actor, scope: string): void {
  if (actor.kind !== "key") return;
  if (scope === "session") throw new CodedError("forbidden", "No key may do this. Sign in to do it.");
  if (!actor.scopes.some((held) => held === scope)) {
    throw new CodedError("insufficient-scope", `The key needs the scope ${scope}.`, [], { scope });
  }
}

function handler(operation: Operation, admit: (request: Request) => Promise<Admitted>): Handler {
  return async (request, context) => {
    const began = performance.now();
    const mark = markOf(request);
    const url = new URL(request.url);
    let limits: HeaderValues = {};
    let actor: Actor | null = null;
    let response: Response;
    try {
      const admitted = await admit(request);
      actor = admitted.actor;
      if (actor !== null) limits = await spendToken(actor);
      const params = textParams(await context.params);
      const parsed = await parseRequest(operation.request, request, params, url.searchParams);
      const reply = await perform(operation, admitted, request, url.pathname, parsed);
      response = jsonReply(reply.text, {
        request,
        mark,
        status: reply.status,
        headers: { ...limits, ...reply.headers, ...nextLink(url, reply.nextCursor) },
        etag: operation.etag ?? false,
      });
    } catch (thrown) {
      const error = codedFrom(thrown, mark);
      const more = (error.extra.headers as HeaderValues | undefined) ?? {};
      response = problemReply(error, request, mark, { ...limits, ...more });
    }
    logRequest(operation, response.status, mark, actor, performance.now() - began);
    return response;
  };
}

function textParams(params: Awaited<RouteContext["params"]>): Record<string, string> {
  return Object.fromEntries(
    Object.entries(params ?? {}).filter((entry): entry is [string, string] => typeof entry[1] === "string"),
  );
}

interface WrittenReply {
  readonly status: number;
  readonly text: string;
  readonly headers: HeaderValues;
  /** Of a list that goes on. */
  readonly nextCursor: string | null;
}

/** Link to the next page (RFC 8288): the same address and query with the next cursor. */
function nextLink(url: URL, nextCursor: string | null): HeaderValues {
  if (nextCursor === null) return {};
  const query = new URLSearchParams(url.searchParams);
  query.set("cursor", nextCursor);
  return { Link: `<${url.pathname}?${query.toString()}>; rel="next"` };
}

function cursorOf(body: unknown): string | null {
  const page = body as { nextCursor?: unknown } | null;
  return typeof page?.nextCursor === "string" ? page.nextCursor : null;
}

function written(operation: Operation, result: unknown): WrittenReply {
  const presented: Presented = operation.present?.(result) ?? { body: result };
  checkReply(operation, presented.body);
  return {
    status: operation.reply.status,
    text: JSON.stringify(presented.body),
    headers: presented.headers ?? {},
    nextCursor: cursorOf(presented.body),
  };
}

async function perform(
  operation: Operation,
  { actor, run }: Admitted,
  request: Request,
  path: string,
  { input, body, problems }: ParsedRequest,
): Promise<WrittenReply> {
  const key = operation.idempotent ? readIdempotencyKey(request.headers.get("idempotency-key")) : null;
  if (key === null || actor === null) {
    return written(operation, await run(input, { problems, remember: async () => undefined }));
  }
  const claimed = await claimKey(actor, key, requestFingerprint(operation.method, path, body));
  if ("earlier" in claimed) return fromStored(claimed.earlier);
  return performOnce(operation, run, { input, problems }, claimed.claim);
}

function fromStored(reply: StoredReply): WrittenReply {
  const headers: Record<string, string> = reply.location === null ? {} : { Location: reply.location };
  return { status: reply.status, text: reply.text, headers, nextCursor: null };
}

async function performOnce(
  operation: Operation,
  run: Admitted["run"],
  { input, problems }: Pick<ParsedRequest, "input" | "problems">,
  claim: Claim,
): Promise<WrittenReply> {
  try {
    const result = await run(input, {
      problems,
      remember: async (tx, answer) => {
        const { status, text, headers } = written(operation, answer);
        const location = typeof headers.Location === "string" ? headers.Location : null;
        await claim.store(tx, { status, location, text });
      },
    });
    return written(operation, result);
  } catch (error) {
    await claim.release();
    throw error;
  }
}

function logRequest(
  operation: Operation,
  status: number,
  mark: RequestMark,
  actor: Actor | null,
  milliseconds: number,
): void {
  const by =
    actor === null
      ? null
      : actor.kind === "key"
        ? actor.keyId
        : actor.kind === "person"
          ? actor.personId
          : null;
  log.info("request", {
    operation: operation.id,
    status,
    milliseconds: Math.round(milliseconds * 10) / 10,
    by,
    ...mark,
  });
}
