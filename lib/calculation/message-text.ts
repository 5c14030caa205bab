/** Pieces of a message: texts, and symbols whose value is inserted. */
export type MessagePart = { readonly text: string } | { readonly symbol: string };

const placeholder = /\{([A-Za-z][A-Za-z0-9_]*)\}/g;

/** Cuts `The shell reaches {T_shell}.` at its symbols. */
export function messageParts(message: string): MessagePart[] {
  const parts: MessagePart[] = [];
  let end = 0;
  for (const match of message.matchAll(placeholder)) {
    if (match.index > end) parts.push({ text: message.slice(end, match.index) });
    parts.push({ symbol: match[1]! });
    end = match.index + match[0].length;
  }
  if (end < message.length) parts.push({ text: message.slice(end) });
  return parts;
}

export function messageSymbols(message: string): string[] {
  return messageParts(message).flatMap((part) => ("symbol" in part ? [part.symbol] : []));
}
