/** Text as stored: LF line ends, Unicode NFC, no blanks at the ends of lines. */
export function normalisedText(text: string): string {
  return text
    .replace(/\r\n?/g, "\n")
    .normalize("NFC")
    .replace(/[ \t\u00a0]+$/gm, "");
}

const loneSurrogate = /[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/;

function quoted(text: string): string {
  const normal = normalisedText(text);
  if (loneSurrogate.test(normal)) throw new TypeError("A text holds half a surrogate pair.");
  return JSON.stringify(normal);
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
  if (typeof value === "string") return quoted(value);
  if (Array.isArray(value)) return `[${value.map(canonicalText).join(",")}]`;
  if (typeof value !== "object") throw new TypeError(`JSON holds no ${typeof value}.`);
  const members = Object.entries(value)
    .filter(([, member]) => member !== undefined)
    .sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))
    .map(([name, member]) => `${quoted(name)}:${canonicalText(member)}`);
  return `{${members.join(",")}}`;
}
