import { isBusy, isStorageFault } from "@/db/faults";
import { CodedError, errorCodes, type ErrorCode } from "@/lib/core/errors";
import { env } from "@/lib/core/env";
import { log } from "@/lib/core/log";
import { paths } from "@/lib/core/paths";
import type { Problem } from "@/lib/core/problem";
import type { RequestMark } from "./call";

/** Turns what was thrown into the reply of RFC 9457. No stack, SQL or driver message leaves here. */

/** The same words for what does not exist and for what the caller may not see. */
const nothingHere = "Nothing is here for you. Check the address, and that you may see what it names.";
const ours = "Something failed on our side. Nothing was kept. Give the request id to your administrator.";

/** Any thrown value as an error with a code; what nobody expected is logged with the request id. */
export function codedFrom(error: unknown, mark: RequestMark): CodedError {
  if (error instanceof CodedError) return error;
  if (isBusy(error) || isStorageFault(error)) {
    log.warn("database-unavailable", { ...mark, error });
    return new CodedError("busy", "The database is busy or cannot be written. Try again shortly.");
  }
  log.error("request-failed", { ...mark, error });
  return new CodedError("internal", ours);
}

/** The problem document of an error. */
export function problemDocument(error: CodedError, mark: RequestMark): Problem {
  const code: ErrorCode = error.code;
  // Meant for headers, not for the document.
  const { headers: _headers, retryAfter: _retryAfter, challenge: _challenge, ...extra } = error.extra;
  return {
    type: `${env().PUBLIC_URL}${paths.problem(code)}`,
    title: errorCodes[code].title,
    status: errorCodes[code].status,
    detail: code === "not-found" ? nothingHere : error.message,
    instance: mark.requestId,
    ...(mark.traceId === undefined ? {} : { traceId: mark.traceId }),
    ...(error.problems.length > 0 ? { errors: error.problems } : {}),
    ...extra,
  };
}

/** Headers that go with a code, beside the ones of every answer. */
export function problemHeaders(error: CodedError, tokenSent: boolean): Record<string, string> {
  switch (error.code) {
    case "unauthenticated":
      return {
        "WWW-Authenticate": tokenSent ? 'Bearer realm="api", error="invalid_token"' : 'Bearer realm="api"',
      };
    case "insufficient-scope": {
      const scope = typeof error.extra.scope === "string" ? `, scope="${error.extra.scope}"` : "";
      return { "WWW-Authenticate": `Bearer realm="api", error="insufficient_scope"${scope}` };
    }
    case "too-many-requests":
    case "busy":
    case "still-running": {
      const seconds = error.extra.retryAfter;
      return { "Retry-After": String(typeof seconds === "number" ? Math.max(1, Math.ceil(seconds)) : 1) };
    }
    default:
      return {};
  }
}
