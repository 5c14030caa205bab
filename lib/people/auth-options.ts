import "server-only";
import type { AuthOptions } from "next-auth";
import CredentialsProvider from "next-auth/providers/credentials";
import { sameOriginUrl } from "@/lib/access/same-origin-url";
import { cookieName, isHttps } from "@/lib/access/session-cookie";
import { findSession, sessionLength } from "@/lib/access/sessions";
import { env } from "@/lib/core/env";
import { CodedError } from "@/lib/core/errors";
import { log } from "@/lib/core/log";
import { signIn } from "./sign-in";
import { signOut } from "./sign-out";

/**
 * next-auth carries the session id in its encrypted cookie; whether the session stands is decided by its row on every
 * request. The sign-in page reads the query member `error`: `CredentialsSignin`, or `TooManyAttempts`.
 */
export function authOptions(): AuthOptions {
  const cookie = (purpose: "session" | "csrf" | "callback") => ({
    name: cookieName(purpose),
    options: { httpOnly: true, sameSite: "lax" as const, path: "/", secure: isHttps() },
  });
  return {
    secret: env().AUTH_SECRET,
    session: { strategy: "jwt", maxAge: sessionLength / 1000 },
    pages: { signIn: "/sign-in", signOut: "/sign-in", error: "/sign-in" },
    useSecureCookies: isHttps(),
    cookies: {
      sessionToken: cookie("session"),
      csrfToken: cookie("csrf"),
      callbackUrl: cookie("callback"),
    },
    providers: [
      CredentialsProvider({
        name: "Password",
        credentials: { email: { type: "email" }, password: { type: "password" } },
        authorize: async (given) => {
          try {
            const actor = await signIn({ email: given?.email ?? "", password: given?.password ?? "" });
            return { id: actor.personId, sessionId: actor.sessionId };
          } catch (error) {
            if (!(error instanceof CodedError)) throw new Error("Unavailable", { cause: error });
            if (error.code === "too-many-requests") throw new Error("TooManyAttempts");
            if (error.code === "busy") throw new Error("Unavailable");
            return null;
          }
        },
      }),
    ],
    callbacks: {
      jwt: ({ token, user }) => (user ? { sid: user.sessionId } : { sid: token.sid }),
      session: async ({ session, token }) => {
        const person = typeof token.sid === "string" ? await findSession(token.sid) : null;
        return {
          expires: session.expires,
          user: person ? { name: person.name, email: person.email } : undefined,
        };
      },
      redirect: ({ url, baseUrl }) => sameOriginUrl(url, baseUrl),
    },
    events: {
      signOut: async ({ token }) => {
        const person = typeof token?.sid === "string" ? await findSession(token.sid) : null;
        if (person) await signOut(person);
      },
    },
    logger: {
      error: (code, metadata) => log.error("next-auth", { code, error: metadata }),
      warn: (code) => log.warn("next-auth", { code }),
      debug: () => {},
    },
  };
}

declare module "next-auth" {
  interface User {
    sessionId: string;
  }
}

declare module "next-auth/jwt" {
  interface JWT {
    sid?: string;
  }
}
