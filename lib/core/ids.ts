import { randomBytes } from "node:crypto";

const alphabet = "0123456789abcdefghjkmnpqrstvwxyz";

/**
 * A new id such as `tpl_01kbd…`: 10 characters of time in milliseconds, then 16 of 80 random bits (base 32 without
 * i, l, o and u), so that ids sort by age and cannot be guessed.
 */
export function newId(prefix: string): string {
  let time = "";
  for (let rest = Date.now(), n = 0; n < 10; n += 1) {
    time = alphabet[rest % 32] + time;
    rest = Math.floor(rest / 32);
  }
  let tail = "";
  for (const byte of randomBytes(16)) tail += alphabet[byte % 32];
  return `${prefix}_${time}${tail}`;
}
