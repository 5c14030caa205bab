import "server-only";
import { decode } from "next-auth/jwt";
import { env } from "@/lib/core/env";

/** On https the browser itself keeps a `__Host-` cookie to this host, path / and a secure connection. */
export function isHttps(): boolean {
  return env().PUBLIC_URL.startsWith("https:");
}

export function cookieName(purpose: "session" | "csrf" | "callback"): string {
  return `${isHttps() ? "__Host-" : ""}coldface.${purpose}`;
}

/** The session id inside the encrypted cookie; null for anything that this installation did not write. */
export async function sessionIdFromCookie(cookie: string | undefined): Promise<string | null> {
  if (cookie === undefined || cookie.length > 4096) return null;
  try {
    const token = await decode({ token: cookie, secret: env().AUTH_SECRET });
    return typeof token?.sid === "string" ? token.sid : null;
  } catch {
    // A cookie that does not decrypt is nobody's: forged, or older than the present AUTH_SECRET.
    return null;
  }
}

/** One cookie's value from a Cookie header. */
export function readCookie(header: string | null, name: string): string | undefined {
  for (const part of (header ?? "").split(";")) {
    const at = part.indexOf("=");
    if (at > 0 && part.slice(0, at).trim() === name) return part.slice(at + 1).trim();
  }
  return undefined;
}
