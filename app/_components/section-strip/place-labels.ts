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

/** What is on the paper already. */
interface Drawn {
  readonly points: readonly { x: number; y: number }[];
  readonly line: readonly { x: number; y: number }[];
  readonly taken: readonly Box[];
}

const character = 7.8;
const captionCharacter = 6.3;
const lineHeight = 16;

function overlaps(a: Box, b: Box): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
}

/** Room that a small caption takes. */
export function captionBox({ text, x, y, anchor }: PlacedLabel): Box {
  const width = text.length * captionCharacter;
  return {
    left: anchor === "start" ? x : x - width,
    right: anchor === "start" ? x + width : x,
    top: y - 12,
    bottom: y + 4,
  };
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
  drawn: Drawn,
): PlacedLabel[] {
  const { points, line, taken } = drawn;
  const rising = (points.at(-1)?.y ?? 0) < (points[0]?.y ?? 0);
  const placed: { label: PlacedLabel; box: Box }[] = [];
  const candidates = [
    [1, -8],
    [-1, -8],
    [1, -14],
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
      // Beside the edge of the paper a text moves inward, over its point.
      const x = toRight
        ? Math.min(label.x + 7, frame.right - width)
        : Math.max(label.x - 7, frame.left + width);
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
        taken.every((other) => !overlaps(box, other)) &&
        points.every(
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
