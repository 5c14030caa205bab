import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { tickTexts } from "@/app/_components/plot/axes";
import { niceTicks } from "@/app/_components/plot/ticks";
import { placeLabels } from "@/app/_components/section-strip/place-labels";

describe("round ticks", () => {
  it("span the range in steps of 1, 2, 2.5 or 5", () => {
    expect(niceTicks(0, 250, 6)).toEqual([0, 50, 100, 150, 200, 250]);
    expect(niceTicks(28.66, 179.7, 6)).toEqual([0, 50, 100, 150, 200]);
    expect(niceTicks(-196, 20, 4)).toEqual([-200, -100, 0, 100]);
  });

  it("span every range, also one of no width", () => {
    const value = fc.double({ min: -1e6, max: 1e6, noNaN: true });
    fc.assert(
      fc.property(value, value, fc.integer({ min: 2, max: 9 }), (a, b, count) => {
        const [low, high] = [Math.min(a, b), Math.max(a, b)];
        const ticks = niceTicks(low, high, count);
        const slack = 1e-6 * Math.max(1, Math.abs(low), Math.abs(high));
        expect(ticks.length).toBeGreaterThanOrEqual(2);
        expect(ticks.length).toBeLessThanOrEqual(count + 2);
        expect(ticks[0]).toBeLessThanOrEqual(low + slack);
        expect(ticks.at(-1)).toBeGreaterThanOrEqual(high - slack);
      }),
    );
  });
});

describe("texts of an axis", () => {
  const texts = (ticks: number[]) => ticks.map(tickTexts(ticks));

  it("have the same decimals", () => {
    expect(texts(niceTicks(0.04, 0.22, 6))).toEqual(["0.00", "0.05", "0.10", "0.15", "0.20", "0.25"]);
    expect(texts([0, 2.5, 5])).toEqual(["0.0", "2.5", "5.0"]);
    expect(texts([-10, 0, 10])).toEqual(["\u221210", "0", "10"]);
  });

  it("leave the very large and the very small to the power of ten", () => {
    expect(texts([0, 2e6])[1]).toBe("2·10⁶");
    expect(texts([0, 0.00002])[1]).toBe("2·10⁻⁵");
  });
});

describe("labels of the faces", () => {
  const frame = { left: 0, right: 400, top: 0, bottom: 200 };
  const width = (text: string) => text.length * 7.8;
  const boxOf = ({ text, x, y, anchor }: ReturnType<typeof placeLabels>[number]) => {
    const left = anchor === "start" ? x : x - width(text);
    return { left, right: left + width(text), top: y - 13, bottom: y + 4 };
  };

  it("never cover one another, a point, a caption or the line, wherever the faces lie", () => {
    const point = fc.record({ x: fc.integer({ min: 40, max: 360 }), y: fc.integer({ min: 20, max: 180 }) });
    fc.assert(
      fc.property(fc.array(point, { minLength: 2, maxLength: 7 }), (given) => {
        const points = [...given].sort((a, b) => a.x - b.x);
        const taken = [{ left: 300, right: 360, top: 150, bottom: 170 }];
        const labels = placeLabels(
          points.map((at) => ({ ...at, text: "123.4 °C" })),
          frame,
          { points, line: points, taken },
        );
        const boxes = labels.map(boxOf);
        const meets = (a: (typeof boxes)[number], b: (typeof boxes)[number]) =>
          a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
        boxes.forEach((box, index) => {
          expect(boxes.slice(index + 1).some((other) => meets(box, other))).toBe(false);
          expect(taken.some((other) => meets(box, other))).toBe(false);
          expect(
            points.some(({ x, y }) => x > box.left && x < box.right && y > box.top && y < box.bottom),
          ).toBe(false);
          expect(box.left >= frame.left && box.right <= frame.right && box.top >= frame.top).toBe(true);
        });
      }),
    );
  });

  it("stand above right of falling temperatures and above left of rising ones", () => {
    const falling = [
      { x: 100, y: 40 },
      { x: 300, y: 150 },
    ];
    const rising = falling.map(({ x, y }) => ({ x, y: 190 - y }));
    const sides = (points: typeof falling) =>
      placeLabels(
        points.map((at) => ({ ...at, text: "20.0 °C" })),
        frame,
        { points, line: points, taken: [] },
      ).map(({ anchor }) => anchor);
    expect(sides(falling)).toEqual(["start", "start"]);
    expect(sides(rising)).toEqual(["end", "end"]);
  });
});
