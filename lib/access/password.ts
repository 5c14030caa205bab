import "server-only";
import { hash, verify, type Options } from "@node-rs/argon2";
import { knownPasswords } from "./password-blocklist";

/** argon2id with the parameters of OWASP's password storage cheat sheet (19 MiB, 2 passes, 1 lane). */
const options: Options = { algorithm: 2, memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const shortestPassword = 15;
export const longestPassword = 256;

const normal = (password: string) => password.normalize("NFKC");

export function hashPassword(password: string): Promise<string> {
  return hash(normal(password), options);
}

// Made once per process from nothing that anybody could type, so that unknown accounts take as long as known ones.
let decoy: Promise<string> | undefined;

/** Whether the password is the one of `stored`. Without a stored hash the same work is done and the answer is no. */
export async function verifyPassword(stored: string | null, password: string): Promise<boolean> {
  decoy ??= hashPassword(crypto.randomUUID());
  const matches = await verify(stored ?? (await decoy), normal(password));
  return stored !== null && matches;
}

/**
 * What is wrong with a new password, as a sentence, or null. Length and guessability count; kinds of characters do
 * not (NIST SP 800-63B).
 */
export function passwordProblem(password: string, about: { email: string; name: string }): string | null {
  const text = normal(password);
  const length = [...text].length;
  if (length < shortestPassword) {
    return `The password has ${length} characters. It needs at least ${shortestPassword}; a few unrelated words do well.`;
  }
  if (length > longestPassword)
    return `The password has ${length} characters. At most ${longestPassword} are read.`;
  const plain = text.toLowerCase().replace(/[^\p{L}\p{N}]/gu, "");
  if (knownPasswords.has(plain)) return "This password is on lists that attackers try first. Choose another.";
  if (new Set(plain).size < 5) return "This password repeats very few characters. Choose another.";
  if (repeats(plain)) return "This password repeats one short piece. Choose another.";
  if (isRun(plain)) return "This password is a run along the keyboard or the alphabet. Choose another.";
  const own = [about.email.split("@")[0] ?? "", about.name, "coldface"]
    .map((word) => word.toLowerCase().replace(/[^\p{L}\p{N}]/gu, ""))
    .filter((word) => word.length >= 4);
  const rest = own.reduce((left, word) => left.replaceAll(word, ""), plain);
  if (rest.length < 8 && rest !== plain) {
    return "This password is little more than your name, your address or the name of this product. Choose another.";
  }
  return null;
}

function repeats(text: string): boolean {
  const period = (text + text).indexOf(text, 1);
  return period < text.length && period <= 8;
}

const runs = [
  "abcdefghijklmnopqrstuvwxyz",
  "01234567890123456789",
  "qwertyuiopasdfghjklzxcvbnm",
  "qwertzuiopasdfghjklyxcvbnm",
  "azertyuiopqsdfghjklmwxcvbn",
  "1qaz2wsx3edc4rfv5tgb6yhn7ujm8ik9ol0p",
];

function isRun(text: string): boolean {
  const reversed = [...text].reverse().join("");
  return runs.some((run) => (run + run).includes(text) || (run + run).includes(reversed));
}
