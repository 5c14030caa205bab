import { CodedError } from "@/lib/core/errors";
import { pointerTo } from "@/lib/core/problem";

/**
 * JSON as I-JSON (RFC 7493) wants it: no duplicate members, no lone surrogates, no number beyond a double.
 * `JSON.parse` keeps the last of two members and turns 1e999 into Infinity without a word.
 */

const deepest = 64;
const loneSurrogate = /\p{Surrogate}/u;

interface Walk {
  members: number;
  checkStrings: boolean;
}

function refuse(detail: string): never {
  throw new CodedError("malformed-json", detail);
}

/** Counts members and refuses what a parsed value must not hold. */
function walk(value: unknown, path: PropertyKey[], seen: Walk): void {
  if (typeof value === "number") {
    if (!Number.isFinite(value)) refuse(`The number at ${pointerTo(...path)} is too large for a double.`);
  } else if (typeof value === "string") {
    if (seen.checkStrings && loneSurrogate.test(value)) {
      refuse(`The text at ${pointerTo(...path)} holds half of a surrogate pair.`);
    }
  } else if (typeof value === "object" && value !== null) {
    if (path.length >= deepest) refuse(`The body is nested deeper than ${deepest} levels.`);
    if (Array.isArray(value)) {
      for (let index = 0; index < value.length; index++) {
        path.push(index);
        walk(value[index], path, seen);
        path.pop();
      }
      return;
    }
    for (const name of Object.keys(value)) {
      seen.members++;
      path.push(name);
      if (name === "__proto__") {
        const message = `${name} is not the name of a member.`;
        throw CodedError.from([{ pointer: pointerTo(...path), code: "unknown-member", message }]);
      }
      if (seen.checkStrings && loneSurrogate.test(name))
        refuse("A member's name holds half of a surrogate pair.");
      walk((value as Record<string, unknown>)[name], path, seen);
      path.pop();
    }
  }
}

/** Calls back for every member name of a text that is known to be valid JSON. */
function eachMember(
  text: string,
  visit: (name: string, depth: number) => void,
  close: (depth: number) => void,
) {
  let depth = 0;
  for (let index = 0; index < text.length; index++) {
    const char = text[index];
    if (char === "{" || char === "[") depth++;
    else if (char === "}" || char === "]") close(depth--);
    else if (char === '"') {
      const start = index;
      for (index++; text[index] !== '"'; index++) if (text[index] === "\\") index++;
      let after = index + 1;
      while (/\s/.test(text[after] ?? "")) after++;
      if (text[after] === ":") visit(JSON.parse(text.slice(start, index + 1)) as string, depth);
    }
  }
}

/** Only called when a count says that a duplicate is there. */
function firstDuplicate(text: string): string {
  const open = new Map<number, Set<string>>();
  let found: string | null = null;
  eachMember(
    text,
    (name, depth) => {
      const names = open.get(depth) ?? new Set<string>();
      if (names.has(name)) found ??= name;
      open.set(depth, names.add(name));
    },
    (depth) => open.delete(depth),
  );
  return found ?? "?";
}

function countMembers(text: string): number {
  let members = 0;
  for (let index = 0; index < text.length; index++) {
    const code = text.charCodeAt(index);
    if (code === 58) members++;
    else if (code === 34) {
      do {
        index = text.indexOf('"', index + 1);
      } while (backslashesBefore(text, index) % 2 === 1);
    }
  }
  return members;
}

function backslashesBefore(text: string, index: number): number {
  let count = 0;
  while (text.charCodeAt(index - 1 - count) === 92) count++;
  return count;
}

function whereBroken(error: unknown, text: string): string {
  const position = /position (\d+)/.exec(error instanceof Error ? error.message : "")?.[1];
  if (position === undefined) return "The body ends before the JSON does.";
  const before = text.slice(0, Number(position)).split("\n");
  return `The body is not JSON: it breaks off at line ${before.length}, column ${(before.at(-1)?.length ?? 0) + 1}.`;
}

/** Parses a body; throws `malformed-json` with a sentence that says where. */
export function parseStrictJson(text: string): unknown {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (error) {
    refuse(whereBroken(error, text));
  }
  const seen: Walk = { members: 0, checkStrings: text.includes("\\u") };
  walk(value, [], seen);
  // A parsed object has each name once, so a surplus of colons outside strings means that a name came twice.
  if (countMembers(text) !== seen.members) {
    refuse(`The member “${firstDuplicate(text)}” stands twice in the same object.`);
  }
  return value;
}
