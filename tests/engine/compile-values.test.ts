import { describe, expect, it } from "vitest";
import { choice, material, number, sourceOf, table } from "./language-inputs";
import { constantReader, linearReader, TestProgram, type Given } from "./program-of";

const inputs = [
  number("a", "ratio", "1"),
  number("b", "ratio", "1"),
  number("L", "length", "m"),
  choice("mode", { plain: { eps: [0.9, "1"] }, rough: { eps: [0.4, "1"] } }),
  material("wall", ["k"]),
  table("rows", [
    number("t", "length", "m"),
    number("n", "ratio", "1"),
    choice("finish", { plain: { eps: [0.9, "1"] }, rough: { eps: [0.4, "1"] } }),
    material("m", ["k"]),
  ]),
];

const given: Given = {
  ...{ a: 3, b: -2.5, L: 0.5, mode: 0, wall: constantReader(2) },
  "rows.t": [0.1, 0.2, 0.4],
  "rows.n": [3, 1, 2],
  "rows.finish": [1, 0, 1],
  "rows.m": [constantReader(1), constantReader(5), linearReader(0, 1)],
};

const program = (working: string): TestProgram => new TestProgram(sourceOf({ inputs, working }));
const value = (expression: string, more: Given = {}): number | number[] | undefined =>
  program(`y = ${expression}`).run({ ...given, ...more }).y;

describe("numbers", () => {
  it.each([
    ["-a^2", -9],
    ["2^3^2", 512],
    ["a^7", 2187],
    ["a^(-3)", 1 / 27],
    ["a^2.5", 3 ** 2 * Math.sqrt(3)],
    ["a^0.3", 3 ** 0.3],
    ["a^9", 19683],
    ["b^3", -15.625],
    ["round(b)", -3],
    ["round(-b)", 3],
    ["round(0.49999999999999994)", 0],
    ["clamp(a, -1, 1)", 1],
    ["min(a, b, 1)", -2.5],
    ["mean(a, b, 1)", 0.5],
    ["sign(b) + floor(b) + ceil(b)", -6],
    ["atan2(1, a)", Math.atan2(1, 3)],
    ["mode.eps", 0.9],
    ['mode == "plain" ? 1 : 2', 1],
    ['(mode != "plain" or a > 2) and not (b > 0) ? 1 : 2', 1],
    ['wall.k("300 K")/"1 W/(m·K)"', 2],
    ['number_in(L, "mm")', 500],
  ])("%s", (expression, wanted) => {
    expect(value(expression)).toBe(wanted);
  });
});

describe("lists", () => {
  it.each([
    ["rows.n*2 + a", [9, 5, 7]],
    ["cumsum(rows.n)", [3, 4, 6]],
    ["prepend(rows.n, a)", [3, 3, 1, 2]],
    ["append(rows.n, a)", [3, 1, 2, 3]],
    ["drop_first(rows.n) - drop_last(rows.n)", [-2, 1]],
    ["reverse(cumsum(rows.n))", [6, 4, 3]],
    ["max(rows.n, 2)", [3, 2, 2]],
    ["rows.finish.eps*10", [4, 9, 4]],
    ["a > 1 ? rows.n : rows.n*0", [3, 1, 2]],
    ['rows.m.k("300 K" + rows.n*"1 ΔK")/"1 W/(m·K)"', [1, 5, 302]],
    ["fixed_point(x, rows.n, (x + 8/x)/2)", [Math.sqrt(8), Math.sqrt(8), Math.sqrt(8)]],
  ])("%s", (expression, wanted) => {
    const got = value(expression) as number[];
    expect(got).toHaveLength(wanted.length);
    got.forEach((x, i) => expect(x).toBeCloseTo(wanted[i]!, 12));
  });

  it.each([
    ["sum(rows.n)", 6],
    ["product(rows.n)", 6],
    ["min(rows.n)", 1],
    ["max(rows.n)", 3],
    ["mean(rows.n)", 2],
    ["first(rows.n)", 3],
    ["last(rows.n)", 2],
    ["at(rows.n, 2)", 1],
    ["count(prepend(rows.n, 1))", 4],
    ["weighted_mean(rows.n, rows.t)", (0.3 + 0.2 + 0.8) / 0.7],
    ["interpolate(3.25, cumsum(rows.n), rows.n)", 2.5],
    ["interpolate(6, cumsum(rows.n), rows.n)", 2],
    ["sum(interpolate(rows.n/2 + 3, cumsum(rows.n), rows.n))", 1.25 + 2 + 1],
  ])("%s", (expression, wanted) => {
    expect(value(expression)).toBeCloseTo(wanted, 12);
  });

  it("follow the number of rows from run to run, and belong to the frame", () => {
    const lists = program("y = cumsum(rows.n)\nz = sum(drop_first(prepend(y, 1))) + last(y)");
    expect(lists.run(given)).toMatchObject({ y: [3, 4, 6], z: 19 });
    const first = lists.frame.values[0] as Float64Array;
    const other = lists.compiled.newFrame();
    lists.fill(
      { ...given, "rows.n": [5], "rows.t": [1], "rows.finish": [0], "rows.m": [constantReader(1)] },
      other,
    );
    lists.compiled.run(other);
    expect(lists.values(other)).toMatchObject({ y: [5], z: 10 });
    expect([...first]).toEqual([3, 4, 6]);
    lists.run({ ...given, "rows.n": [1, 1, 1] });
    expect(lists.frame.values[0]).toBe(first);
    expect([...first]).toEqual([1, 2, 3]);
  });

  it("of different lengths in one table are refused", () => {
    const sum = program("x = a\ny = sum(rows.n)");
    expect(sum.fault({ ...given, "rows.t": [1, 2] })).toMatchObject({
      code: "out-of-range",
      details: { left: 2, right: 3 },
    });
  });
});

describe("what is computed", () => {
  it("is computed once when it is equal, also through functions and across lines", () => {
    const calls: boolean[] = [];
    const counted = program(
      `f(x) = wall.k("300 K" + x*"1 ΔK")
p = f(a) + f(a)
q = f(a)*2 + wall.k("300 K" + a*"1 ΔK")`,
    );
    counted.run({ ...given, wall: constantReader(2, calls) });
    expect(calls).toHaveLength(1);
  });

  it("is only the branch that is taken", () => {
    const calls: boolean[] = [];
    const lazy = program('y = (a > 5 ? wall.k("300 K")/"1 W/(m·K)" : a) + (a < 5 or 1/(a - 3) > 0 ? 1 : 2)');
    expect(lazy.run({ ...given, wall: constantReader(2, calls) }).y).toBe(4);
    expect(calls).toHaveLength(0);
    const guarded = program("y = a == 3 ? 0 : balance(x, 5, 6, x)");
    expect(guarded.run(given).y).toBe(0);
    expect(guarded.fault({ ...given, a: 4 }).code).toBe("no-solution");
  });

  it("is not taken from a branch that was left out", () => {
    const shared = program('p = mode == "plain" ? 1 : exp(a*2)*exp(b)\nq = exp(a*2)*exp(b)');
    expect(shared.run(given)).toEqual({ p: 1, q: Math.exp(6) * Math.exp(-2.5) });
    expect(shared.run({ ...given, mode: 1 }).p).toBe(shared.run({ ...given, mode: 1 }).q);
  });

  it("keeps the variables of special forms apart, however deep a function with one is called", () => {
    const nested = program(
      `root(x) = balance(u, 0, 10, u*u - x)
p = a > 5 ? root(4) : 0
q = series(n, 1, 3, n*n + root(4))
r = series(n, 1, 3, n*n + root(n*n) + series(m, 1, 2, m*m + root(n*n)))`,
    );
    const values = nested.run(given);
    expect(values.p).toBe(0);
    expect(values.q).toBeCloseTo(14 + 6, 12);
    expect(values.r).toBeCloseTo(14 + 6 + 3 * 5 + 2 * 6, 12);
  });

  it("includes arguments that a function's branch does not read", () => {
    const strict = program("f(x, y) = a > 0 ? x : y\nz = f(1, at(rows.n, 7))");
    expect(strict.fault(given)).toMatchObject({ code: "out-of-range", symbol: "z" });
  });

  it("is the same in a program so long that each line becomes a function", () => {
    const lines = ["f0(x) = x*1.01 + sin(x)/7", "y0 = a"];
    for (let i = 1; i <= 8; i++) lines.push(`f${i}(x) = f${i - 1}(f${i - 1}(x))`);
    lines.push("y1 = f8(y0) + f7(y0)", "y2 = sum(rows.n*y1)", "y3 = cumsum(rows.n)*y2");
    const long = program(lines.join("\n"));
    expect(long.typed.size).toBeGreaterThan(3000);
    const f = (x: number, times: number): number =>
      times === 0 ? x : f(x * 1.01 + Math.sin(x) / 7, times - 1);
    const y1 = f(3, 256) + f(3, 128);
    const values = long.run(given);
    expect(values.y1).toBeCloseTo(y1, 9);
    expect((values.y3 as number[])[2]).toBeCloseTo(36 * y1, 7);
  });
});

describe("conditions", () => {
  const limits = ["a >= b", "a > b", "a == b", "a <= b", "a < b", "a != b", "y > L"];
  const conditions = new TestProgram(sourceOf({ inputs, working: "y = L*a", limits }));

  it("count values within 1e-9 of the larger as equal", () => {
    const filled = conditions.fill({ ...given, a: 1 + 9e-10, b: 1 });
    const holds = limits.slice(0, 6).map((_, i) => filled.compiled.holds(filled.frame, i));
    expect(holds).toEqual([true, false, true, true, false, false]);
    const apart = conditions.fill({ ...given, a: 1 + 2e-9, b: 1 });
    expect(limits.slice(0, 6).map((_, i) => apart.compiled.holds(apart.frame, i))).toEqual([
      ...[true, true, false],
      ...[false, false, true],
    ]);
  });

  it("are exact in the working", () => {
    expect(value("a > b ? 1 : 0", { a: 1 + 1e-12, b: 1 })).toBe(1);
    expect(value("a == b ? 1 : 0", { a: 1 + 1e-12, b: 1 })).toBe(0);
  });

  it("show both sides after the run", () => {
    conditions.run(given);
    expect(conditions.compiled.compared(conditions.frame, 6)).toEqual({ value: 1.5, bound: 0.5 });
    expect(conditions.compiled.holds(conditions.frame, 6)).toBe(true);
  });

  it("refuse what is not a number", () => {
    const hidden = new TestProgram(sourceOf({ inputs, working: "y = a", limits: ["sqrt(b) > 0"] }));
    hidden.run(given);
    expect(() => hidden.compiled.holds(hidden.frame, 0)).toThrow(/sqrt\(b\) is not a number, with b = −2.5/);
  });
});
