import { createHash, createHmac, timingSafeEqual } from "node:crypto";

/** SHA-256 of a text, hex. */
export function sha256(text: string): string {
  return createHash("sha256").update(text).digest("hex");
}

/** HMAC-SHA-256 of a text, hex. */
export function hmac(secret: string, text: string): string {
  return createHmac("sha256", secret).update(text).digest("hex");
}

/** Names a secret without telling it, so that a row says which one it was made with. */
export function secretVersion(secret: string): string {
  return hmac(secret, "version of this secret").slice(0, 12);
}

/** Compares two texts in a time that depends on their length only. */
export function equalInConstantTime(a: string, b: string): boolean {
  const left = Buffer.from(a);
  const right = Buffer.from(b);
  return left.length === right.length && timingSafeEqual(left, right);
}
