import { createHash } from "node:crypto";
import type { CodedError } from "@/lib/core/errors";
import { errorCodes } from "@/lib/core/errors";
import { paths } from "@/lib/core/paths";
import type { RequestMark } from "./call";
import { problemDocument, problemHeaders } from "./problem";

/** The only way out of the interface: headers that every answer has, tags, and the mirror for HEAD. */

export type HeaderValues = Readonly<Record<string, string | readonly string[]>>;

function commonHeaders(mark: RequestMark): Headers {
  return new Headers({
    "Cache-Control": "no-store",
    "X-Content-Type-Options": "nosniff",
    "X-Request-Id": mark.requestId,
    Link: `<${paths.api("/openapi.json")}>; rel="service-desc"; type="application/json"`,
  });
}

/** A value that names several (`Link`) is added to what stands; any other replaces it. */
export function addHeaders(headers: Headers, more: HeaderValues): void {
  for (const [name, value] of Object.entries(more)) {
    if (typeof value === "string" && name.toLowerCase() !== "link") headers.set(name, value);
    else for (const part of typeof value === "string" ? [value] : value) headers.append(name, part);
  }
}

/** Strong tag of the bytes sent. */
export function entityTag(text: string): string {
  return `"${createHash("sha256").update(text).digest("base64url").slice(0, 27)}"`;
}

function matches(condition: string, tag: string): boolean {
  return (
    condition.trim() === "*" || condition.split(",").some((part) => part.trim().replace(/^W\//, "") === tag)
  );
}

export interface ReplyOptions {
  readonly request: Request;
  readonly mark: RequestMark;
  readonly status: number;
  readonly headers: HeaderValues;
  readonly etag: boolean;
}

/** A successful answer; `text` is JSON already written. */
export function jsonReply(text: string, options: ReplyOptions): Response {
  const headers = commonHeaders(options.mark);
  addHeaders(headers, options.headers);
  headers.set("Content-Type", "application/json");
  if (options.etag) {
    const tag = entityTag(text);
    headers.set("ETag", tag);
    headers.set("Cache-Control", "private, no-cache");
    headers.set("Vary", "Authorization, Cookie");
    const condition = options.request.headers.get("if-none-match");
    if (condition !== null && matches(condition, tag)) {
      headers.delete("Content-Type");
      return new Response(null, { status: 304, headers });
    }
  }
  return finish(text, options.status, headers, options.request);
}

/** A refusal as a problem document. */
export function problemReply(
  error: CodedError,
  request: Request,
  mark: RequestMark,
  more: HeaderValues = {},
): Response {
  const headers = commonHeaders(mark);
  const tokenSent = request.headers.has("authorization");
  addHeaders(headers, { ...more, ...problemHeaders(error, tokenSent) });
  headers.set("Content-Type", "application/problem+json");
  return finish(
    JSON.stringify(problemDocument(error, mark)),
    errorCodes[error.code].status,
    headers,
    request,
  );
}

function finish(text: string, status: number, headers: Headers, request: Request): Response {
  const bytes = Buffer.from(text, "utf8");
  headers.set("Content-Length", String(bytes.byteLength));
  return new Response(request.method === "HEAD" ? null : bytes, { status, headers });
}

/** An answer without content: the methods of an address. */
export function emptyReply(mark: RequestMark, more: HeaderValues): Response {
  const headers = commonHeaders(mark);
  addHeaders(headers, more);
  return new Response(null, { status: 204, headers });
}
