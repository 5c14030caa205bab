import "server-only";
import { hmac, secretVersion } from "@/lib/core/crypto";
import { env } from "@/lib/core/env";

/** What is stored of a new key. */
export function keyLookup(key: string): { lookup: string; secretVersion: string } {
  const secret = env().KEY_SECRET;
  return { lookup: hmac(secret, key), secretVersion: secretVersion(secret) };
}

/** What a presented key may be stored as: under the present secret, or under former ones that are still kept. */
export function possibleLookups(key: string): string[] {
  return [env().KEY_SECRET, ...env().KEY_SECRET_OLDER].map((secret) => hmac(secret, key));
}
