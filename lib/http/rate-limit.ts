import "server-only";
import type { Actor } from "@/lib/access/actor";
import { takeToken } from "@/lib/access/rate-limit";
import { CodedError } from "@/lib/core/errors";

const policy = "minute";

/**
 * Takes one request from the actor's minute and answers the fields that tell of it (RateLimit-Policy and RateLimit as
 * structured lists, draft-ietf-httpapi-ratelimit-headers). Throws `too-many-requests`.
 */
export async function spendToken(actor: Actor): Promise<Record<string, string>> {
  const { allowed, limit, remaining, resetSeconds } = await takeToken(actor);
  if (!Number.isFinite(limit)) return {};
  const headers = {
    "RateLimit-Policy": `"${policy}";q=${limit};w=60`,
    RateLimit: `"${policy}";r=${remaining};t=${resetSeconds}`,
  };
  if (allowed) return headers;
  throw new CodedError(
    "too-many-requests",
    `The limit of ${limit} requests a minute is reached. Try again in ${resetSeconds} seconds.`,
    [],
    { retryAfter: resetSeconds, headers },
  );
}
