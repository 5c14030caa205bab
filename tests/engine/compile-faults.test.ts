import { describe, expect, it } from "vitest";
import { material, number, sourceOf, table } from "./language-inputs";
import { constantReader, reader, TestProgram, type Given } from "./program-of";
import { RunFault } from "@/lib/language/types";

const inputs = [
  number("a", "ratio", "1"),
  number("L", "length", "m"),
  number("h_1", "heat transfer coefficient", "W/(m²·K)"),
  number("h_2", "heat transfer coefficient", "W/(m²·K)"),
  number("T", "temperature", "K"),
  material("wall", ["k"]),
  table("rows", [number("n", "ratio", "1")]),
];
const given: Given = { a: 3, L: 0.5, h_1: 10, h_2: 0, T: 300, wall: constantReader(2), "rows.n": [3, 0, 2] };

const program = (working: string): TestProgram => new TestProgram(sourceOf({ inputs, working }));
const fault = (working: string, more: Given = {}): RunFault => program(working).fault({ ...given, ...more });

describe("a value that is not finite", () => {
  it("stops the run with line, operation and operands", () => {
    expect(fault("x = a\nR = L/(2*h_2)")).toMatchObject({
      code: "not-finite",
      symbol: "R",
      line: 2,
      message: "Line 2 (R): L/(2*h_2) is infinite, with L = 0.5 m, 2*h_2 = 0 W/(m²·K).",
      details: { L: 0.5, "2*h_2": 0 },
    });
  });

  it("may vanish inside one expression, but not in a line or a function", () => {
    expect(program("U = 1/(1/h_1 + 1/h_2)").run(given).U).toBe(0);
    expect(fault("R = 1/h_2\nU = 1/(1/h_1 + R)").symbol).toBe("R");
    expect(fault("R(h) = 1/h\nU = 1/(R(h_1) + R(h_2))")).toMatchObject({
      symbol: "U",
      message: "Line 2 (U): 1/h is infinite, with h = 0 W/(m²·K).",
    });
    expect(fault("y = 1/exp(1000*a)").message).toMatch(/exp\(1,?000\*a\) is infinite/);
  });

  it("is traced to where it began", () => {
    expect(fault("y = a + 3*sqrt(2 - a)*L/L").message).toBe(
      "Line 1 (y): sqrt(2 - a) is not a number, with 2 - a = −1.",
    );
    expect(fault("f(x) = ln(x - 3)\ny = 2*f(a)").message).toMatch(/ln\(x - 3\) is infinite, with x - 3 = 0/);
    expect(fault("y = 1/rows.n").message).toBe(
      "Line 1 (y): 1/rows.n is infinite (element 2), with rows.n = 0.",
    );
    expect(fault("y = series(n, 0, 4, 1/(n - 2))").message).toMatch(
      /1\/\(n - 2\) is infinite, with n - 2 = 0/,
    );
  });

  it("cannot hide in a comparison, under an exponent 0 or in an unread argument", () => {
    expect(fault("y = (a - 3)/(a - 3) > 1 ? 1 : 2").message).toMatch(/\(a - 3\)\/\(a - 3\) is not a number/);
    expect(fault("f(x) = sqrt(x) > 0 ? 1 : 2\ny = f(2 - a)").code).toBe("not-finite");
    expect(fault("y = ((a - 3)/(a - 3))^0").code).toBe("not-finite");
    expect(fault("f(x, z) = z\ny = f(sqrt(2 - a), 1)").code).toBe("not-finite");
  });

  it("is named at its own line, whatever later line stumbles over it", () => {
    expect(fault("x = ln(-a)\ny = x > 0 ? 1 : 2")).toMatchObject({ symbol: "x", line: 1 });
    expect(fault("x = ln(-a)\ny = at(rows.n, x)")).toMatchObject({ code: "not-finite", symbol: "x" });
    expect(fault("x = ln(-a)\ny = series(n, 1, x, n)")).toMatchObject({ code: "not-finite", symbol: "x" });
    expect(fault("x = ln(-a)\ny = balance(u, 0, 1, u - x)")).toMatchObject({
      code: "not-finite",
      symbol: "x",
    });
  });

  it("is not reported when a sum of large values merely overflows the check", () => {
    expect(program("x = 1e308*a\ny = 1e308*a\nz = x").run({ ...given, a: 1 })).toEqual({
      x: 1e308,
      y: 1e308,
      z: 1e308,
    });
  });
});

describe("special forms", () => {
  it("say why a balance has no solution", () => {
    expect(fault("y = a\nx = balance(u, 0, L, u + L)")).toMatchObject({
      code: "no-solution",
      symbol: "x",
      line: 2,
      details: { lower: 0, upper: 0.5, atLower: 0.5, atUpper: 1 },
    });
    expect(fault("x = balance(u, 0, L, u + L)").message).toMatch(/0\.5 m at 0 m and 1 m at 0\.5 m/);
    expect(fault("x = balance(u, 1, 2, 1/(u - 1.5))").message).toMatch(/through a pole/);
    expect(fault("x = balance(u, 1, 0, u)")).toMatchObject({ code: "crossed-bounds", symbol: "x" });
    expect(fault("x = argmin(u, 1, 0, u)").code).toBe("crossed-bounds");
  });

  it("take an end that is exactly zero", () => {
    expect(program("x = balance(u, 0, 2, u*(u + 1))").run(given).x).toBe(0);
    expect(program("x = balance(u, 1, 3, u - a)").run(given).x).toBe(3);
    expect(program("x = balance(u, a, a, u - a)").run(given).x).toBe(3);
  });

  it("find the smallest of equal minima, ends included", () => {
    expect(program("x = argmin(u, 1, 2, u)").run(given).x).toBe(1);
    expect(program("x = argmin(u, -2, 2, 1 - u^2)").run(given).x).toBe(-2);
    expect(program("x = argmin(u, 0, 4*pi, cos(u))").run(given).x).toBeCloseTo(Math.PI, 6);
  });

  it("integrate either way and sum nothing for nothing", () => {
    expect(program("y = integral(x, 0, pi, sin(x))").run(given).y).toBeCloseTo(2, 12);
    expect(program("y = integral(x, pi, 0, sin(x))").run(given).y).toBeCloseTo(-2, 12);
    expect(program("y = integral(x, 1, 1, 1/(x - 1))").run(given).y).toBe(0);
    expect(program("y = series(n, 5, 4, n)").run(given).y).toBe(0);
    expect(program("y = series(n, -1, 3, n^2)").run(given).y).toBe(15);
    expect(fault("y = series(n, 0, a/2, n)")).toMatchObject({ code: "out-of-range", symbol: "y" });
  });

  it("say when an integral or a fixed point does not converge", () => {
    expect(fault("y = integral(x, 0, 1, 1/x)").code).toMatch(/not-converged|not-finite/);
    expect(fault("y = fixed_point(x, 1, 2*x + 1)")).toMatchObject({ code: "not-converged", symbol: "y" });
    expect(fault("y = fixed_point(x, rows.n, -2*x)").code).toBe("not-converged");
  });

  it("damp a fixed point whose plain steps diverge", () => {
    // x = 6 − 3x has the solution 1.5 and a slope of −3.
    expect(program("y = fixed_point(x, a, 6 - 3*x)").run(given).y).toBeCloseTo(1.5, 11);
    expect(program("y = fixed_point(x, a, cos(x))").run(given).y).toBeCloseTo(0.7390851332151607, 11);
  });

  it("judge properties only at the solution", () => {
    const calls: boolean[] = [];
    const wall = reader(
      (t) => t / 100,
      () => 0,
      calls,
    );
    const solved = program('x = balance(T_s, "0 K", T, wall.k(T_s) - "1.5 W/(m·K)")');
    expect(solved.run({ ...given, wall }).x).toBeCloseTo(150, 9);
    expect(calls.filter(Boolean)).toHaveLength(1);
    expect(calls.at(-1)).toBe(true);
  });

  it("judge properties in integral and series always", () => {
    const calls: boolean[] = [];
    const wall = constantReader(2, calls);
    program('y = series(n, 1, 3, wall.k(T + n*"1 ΔK")/"1 W/(m·K)")').run({ ...given, wall });
    expect(calls).toEqual([true, true, true]);
    calls.length = 0;
    program('y = argmin(x, 0, 1, x*series(n, 1, 2, wall.k(T + n*x*"1 ΔK")/"1 W/(m·K)"))').run({
      ...given,
      wall,
    });
    expect(calls.slice(0, 4)).toEqual([false, false, false, false]);
    expect(calls.slice(-2)).toEqual([true, true]);
  });

  it("pass on what a property refuses, with the line", () => {
    const wall = reader(
      (t) => {
        throw new RunFault("outside-validity", `k is known up to 250 K, asked at ${t} K.`, {}, { at: t });
      },
      () => 0,
    );
    expect(fault("x = a\ny = wall.k(T)", { wall })).toMatchObject({
      code: "outside-validity",
      symbol: "y",
      line: 2,
      message: "Line 2 (y): k is known up to 250 K, asked at 300 K.",
      details: { at: 300 },
    });
  });

  it("judge the functions called at the solution, not on the way", () => {
    // ln is −∞ at the lower end of the interval only.
    expect(program("x = balance(u, 0, 3, ln(u) + 1)").run(given).x).toBeCloseTo(Math.exp(-1), 12);
    expect(fault("x = balance(u, 0, 3, u*(1 + 1/exp(1000 + u)))").code).toBe("not-finite");
  });
});

describe("places in lists", () => {
  it("are counted from 1 and whole", () => {
    expect(fault("y = at(rows.n, 4)")).toMatchObject({ code: "out-of-range", symbol: "y" });
    expect(fault("y = at(rows.n, 0)").code).toBe("out-of-range");
    expect(fault("y = at(rows.n, 1.5)").message).toMatch(/whole number/);
  });

  it("of interpolate must rise and hold x", () => {
    expect(fault("y = interpolate(9, cumsum(rows.n + 1), rows.n)")).toMatchObject({ code: "out-of-range" });
    expect(fault("y = interpolate(1, rows.n, rows.n)").message).toMatch(/must rise/);
  });
});

describe("fuel", () => {
  const endless =
    "s(n) = series(i, 1, 1000, sin(i*n))\nx = a\ny = series(n, 1, 1000, series(m, 1, 1000, s(n*m)))";

  it("ends a run that takes too long and names line and limit", () => {
    expect(fault(endless)).toMatchObject({ code: "budget-exceeded", symbol: "y", line: 3 });
  });

  it("is charged per node, length, function and property", () => {
    const cost = (working: string): number => {
      const metered = program(working);
      metered.run(given);
      return 20_000_000 - metered.frame.fuel;
    };
    expect(cost("y = a*2")).toBe(0);
    // n*2: three nodes.
    expect(cost("y = series(n, 1, 10, n*2)")).toBe(30);
    // sum 3, product 3 × 3 nodes: twelve for three rows.
    expect(cost("y = series(n, 1, 10, sum(rows.n*n))")).toBe(10 * (3 + 3 + 3 + 1));
    expect(cost("y = series(n, 1, 10, erf(n))")).toBe(10 * (10 + 1));
    expect(cost('y = series(n, 1, 1, wall.k_integral(T, T + n*"1 ΔK"))')).toBeGreaterThan(200);
  });

  it("is full again for the next run", () => {
    const short = new TestProgram(sourceOf({ inputs, working: "y = series(n, 1, a, n*2)" }), { fuel: 100 });
    expect(short.run({ ...given, a: 30 }).y).toBe(930);
    expect(short.fault({ ...given, a: 40 }).code).toBe("budget-exceeded");
    expect(short.run({ ...given, a: 30 }).y).toBe(930);
  });
});
