export interface PlacedLabel {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly anchor: "start" | "end";
}

interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

const character = 7.8;
const lineHeight = 16;

function overlaps(a: Box, b: Box): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
}

/** Does the straight piece between two points pass through the box? Sampled; pieces are short. */
function crosses(box: Box, from: { x: number; y: number }, to: { x: number; y: number }): boolean {
  for (let i = 0; i <= 24; i += 1) {
    const x = from.x + ((to.x - from.x) * i) / 24;
    const y = from.y + ((to.y - from.y) * i) / 24;
    if (x > box.left && x < box.right && y > box.top && y < box.bottom) return true;
  }
  return false;
}

/**
 * Places a text beside each point: on the upper side first, wherever neither another text, a point nor the line between
 * the points is covered. Falling temperatures leave room above right, rising ones above left. A text that fits
 * nowhere is left out; the list of results still has its value.
 */
export function placeLabels(
  labels: readonly { text: string; x: number; y: number }[],
  frame: Box,
  line: readonly { x: number; y: number }[],
): PlacedLabel[] {
  const rising = (line.at(-1)?.y ?? 0) < (line[0]?.y ?? 0);
  const placed: { label: PlacedLabel; box: Box }[] = [];
  const candidates = [
    [1, -8],
    [-1, -8],
    [-1, 18],
    [1, 18],
    [1, -24],
    [-1, -24],
    [-1, 34],
    [1, 34],
  ] as const;

  for (const label of labels) {
    const width = label.text.length * character;
    for (const [side, dy] of candidates) {
      const toRight = rising ? side < 0 : side > 0;
      const x = label.x + (toRight ? 7 : -7);
      const y = label.y + dy;
      const box: Box = {
        left: toRight ? x : x - width,
        right: toRight ? x + width : x,
        top: y - lineHeight + 3,
        bottom: y + 4,
      };
      const inside =
        box.left >= frame.left &&
        box.right <= frame.right &&
        box.top >= frame.top &&
        box.bottom <= frame.bottom;
      const free =
        placed.every((other) => !overlaps(box, other.box)) &&
        line.every(
          (point) =>
            !overlaps(box, { left: point.x - 5, right: point.x + 5, top: point.y - 5, bottom: point.y + 5 }),
        ) &&
        line.slice(1).every((point, index) => !crosses(box, line[index] ?? point, point));
      if (!inside || !free) continue;
      placed.push({ label: { text: label.text, x, y, anchor: toRight ? "start" : "end" }, box });
      break;
    }
  }
  return placed.map(({ label }) => label);
}
