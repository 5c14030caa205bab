import { randomUUID } from "node:crypto";

/** What identifies one request in replies and logs. */
export interface RequestMark {
  /** Echoed X-Request-Id, or made here. */
  readonly requestId: string;
  /** Trace id of a W3C traceparent, when one was sent. */
  readonly traceId?: string;
}

const acceptedId = /^[\x21-\x7e]{1,128}$/;
const traceparent = /^(?!ff)[0-9a-f]{2}-(?!0{32})([0-9a-f]{32})-(?!0{16})[0-9a-f]{16}-[0-9a-f]{2}(?:-.*)?$/;

/** Reads X-Request-Id and traceparent; an unusable one is replaced, never refused. */
export function markOf(request: Request): RequestMark {
  const given = request.headers.get("x-request-id");
  const requestId = given !== null && acceptedId.test(given) ? given : randomUUID();
  const traceId = traceparent.exec(request.headers.get("traceparent") ?? "")?.[1];
  return traceId === undefined ? { requestId } : { requestId, traceId };
}
