import { randomBytes } from "node:crypto";

/** Form of an API key: `cfk_`, 43 characters base 62 of 256 random bits, 6 characters base 62 of their CRC-32. */

const digits = "0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz";
const pattern = /^cfk_[0-9A-Za-z]{49}$/;

export function makeKey(): string {
  let number = BigInt(`0x${randomBytes(32).toString("hex")}`);
  let body = "";
  for (let n = 0; n < 43; n += 1) {
    body = digits[Number(number % 62n)] + body;
    number /= 62n;
  }
  return `cfk_${body}${checksum(body)}`;
}

/** Whether the text can be a key at all; needs no database. */
export function isWellFormedKey(text: string): boolean {
  return pattern.test(text) && checksum(text.slice(4, 47)) === text.slice(47);
}

function checksum(body: string): string {
  let rest = crc32(body);
  let text = "";
  for (let n = 0; n < 6; n += 1) {
    text = digits[rest % 62] + text;
    rest = Math.floor(rest / 62);
  }
  return text;
}

/** CRC-32 of ISO-HDLC (polynomial EDB88320, reflected) over ASCII. */
export function crc32(text: string): number {
  let crc = 0xffffffff;
  for (let at = 0; at < text.length; at += 1) {
    crc ^= text.charCodeAt(at);
    for (let bit = 0; bit < 8; bit += 1) crc = (crc >>> 1) ^ (crc & 1 ? 0xedb88320 : 0);
  }
  return (crc ^ 0xffffffff) >>> 0;
}
