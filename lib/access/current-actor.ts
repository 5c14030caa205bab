import "server-only";
import { cookies } from "next/headers";
import { cache } from "react";
import { CodedError } from "@/lib/core/errors";
import { env } from "@/lib/core/env";
import type { Actor, PersonActor } from "./actor";
import { clientAddress } from "./client-address";
import { refuseCrossSite } from "./cross-site";
import { cookieName, readCookie, sessionIdFromCookie } from "./session-cookie";
import { findSession } from "./sessions";
import { invalidTokenChallenge, verifyKey } from "./verify-key";

/**
 * Who sends this request: a key in Authorization, else the session of the cookie, else nobody (null). Throws CodedError
 * `unauthenticated` for a bad key (it never falls back to the cookie), and for changes by cookie that another site may
 * have caused `forbidden` or `unsupported-type`.
 */
export async function actorFromRequest(request: Request): Promise<Actor | null> {
  const authorization = request.headers.get("authorization");
  if (authorization !== null) {
    const token = /^Bearer +([^\s]+) *$/i.exec(authorization)?.[1];
    if (token === undefined) {
      throw new CodedError("unauthenticated", "Send the key as `Authorization: Bearer cfk_…`.", [], {
        challenge: invalidTokenChallenge,
      });
    }
    return verifyKey(token, clientAddress(request.headers, env().TRUSTED_PROXIES));
  }
  const actor = await actorFromCookie(readCookie(request.headers.get("cookie"), cookieName("session")));
  if (actor !== null) refuseCrossSite(request, env().PUBLIC_URL);
  return actor;
}

/** Who looks at this page; asked once per request however often it is called. */
export const currentActor = cache(async (): Promise<PersonActor | null> => {
  const store = await cookies();
  return actorFromCookie(store.get(cookieName("session"))?.value);
});

async function actorFromCookie(cookie: string | undefined): Promise<PersonActor | null> {
  const sessionId = await sessionIdFromCookie(cookie);
  return sessionId === null ? null : findSession(sessionId);
}
