/** Text as stored: LF line ends, Unicode NFC, no blanks at the ends of lines. */
export function normalisedText(text: string): string {
  return text
    .replace(/\r\n?/g, "\n")
    .normalize("NFC")
    .replace(/[ \t\u00a0]+$/gm, "");
}

const loneSurrogate = /[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/;

function checkedText(text: string): string {
  const normal = normalisedText(text);
  if (loneSurrogate.test(normal)) throw new TypeError("A text holds half a surrogate pair.");
  return normal;
}

function objectText(value: object): string {
  const members = new Map<string, unknown>();
  for (const [name, member] of Object.entries(value)) {
    if (member === undefined) continue;
    const normal = checkedText(name);
    if (members.has(normal)) throw new TypeError(`Two members are named ${JSON.stringify(normal)}.`);
    members.set(normal, member);
  }
  const ordered = [...members].sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0));
  return `{${ordered.map(([name, member]) => `${JSON.stringify(name)}:${canonicalText(member)}`).join(",")}}`;
}

/**
 * Canonical JSON after RFC 8785 (members in UTF-16 order, shortest numbers, no blanks) of the value with its texts
 * normalised. Members that are undefined are left out, as in JSON. Throws `TypeError` for what JSON cannot hold.
 */
export function canonicalText(value: unknown): string {
  if (value === null || value === true || value === false) return String(value);
  if (typeof value === "number") {
    if (!Number.isFinite(value)) throw new TypeError("JSON holds no NaN or infinity.");
    return JSON.stringify(value);
  }
  if (typeof value === "string") return JSON.stringify(checkedText(value));
  if (Array.isArray(value)) return `[${value.map((item) => canonicalText(item)).join(",")}]`;
  if (typeof value === "object") return objectText(value);
  throw new TypeError(`JSON holds no ${typeof value}.`);
}
