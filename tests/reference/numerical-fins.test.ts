import { describe, expect, it } from "vitest";
import { tridiagonal } from "./numerical";
import { given, run } from "./shelf";

/** Fins against finite differences of the fin equation, written here. */

describe("fins by finite differences", () => {
  /** Heat from the base and temperature ratio at the tip; area and convecting perimeter by place. */
  function fin(
    from: number,
    to: number,
    k: number,
    h: number,
    area: (x: number) => number,
    perimeter: (x: number) => number,
    tip: number,
  ) {
    const solveWith = (n: number) => {
      const dx = (to - from) / n;
      const conductance = (x: number) => (k * area(x)) / dx;
      const nodes = Array.from({ length: n }, (_, i) => from + (i + 1) * dx);
      const loss = nodes.map((x, i) =>
        i < n - 1 ? h * perimeter(x) * dx : h * perimeter(x - dx / 4) * (dx / 2) + tip * area(to),
      );
      const left = nodes.map((x) => conductance(x - dx / 2));
      const theta = tridiagonal(
        left.map((g) => -g),
        left.map((g, i) => g + (left[i + 1] ?? 0) + loss[i]!),
        left.map((_, i) => -(left[i + 1] ?? 0)),
        left.map((g, i) => (i === 0 ? g : 0)),
      );
      return { q: left[0]! * (1 - theta[0]!) + h * perimeter(from + dx / 4) * (dx / 2), tip: theta.at(-1)! };
    };
    // second order: two grids give the limit
    const [coarse, fine] = [solveWith(1000), solveWith(2000)];
    return { q: (4 * fine.q - coarse.q) / 3, tip: (4 * fine.tip - coarse.tip) / 3 };
  }

  it.each([
    ["adiabatic", 0],
    ["convecting", 25],
  ])("straight fin, %s tip", (tip, h) => {
    const found = fin(
      0,
      0.04,
      200,
      25,
      () => 0.1 * 0.002,
      () => 2 * 0.102,
      h,
    );
    const product = run("straight-fin", { tip });
    expect(product.number("Q")).toBeCloseTo(80 * found.q, 6);
    expect(product.number("T_tip")).toBeCloseTo(293.15 + 80 * found.tip, 6);
  });

  it("pin with a tip that loses heat", () => {
    const D = 0.005;
    const found = fin(
      0,
      0.04,
      200,
      25,
      () => (Math.PI * D * D) / 4,
      () => Math.PI * D,
      25,
    );
    const product = run("pin-fin", { tip: "convecting" });
    expect(product.number("Q")).toBeCloseTo(80 * found.q, 6);
  });

  it.each([
    ["adiabatic", 32.5],
    ["corrected", 33],
  ])("annular fin, %s tip", (tip, edge) => {
    const found = fin(
      0.0125,
      edge / 1000,
      200,
      25,
      (r) => 2 * Math.PI * r * 0.001,
      (r) => 4 * Math.PI * r,
      0,
    );
    const product = run("annular-fin", { tip });
    expect(product.number("Q")).toBeCloseTo(80 * found.q, 5);
    expect(product.number("T_tip")).toBeCloseTo(293.15 + 80 * found.tip, 5);
  });

  it("triangular fin, with the sharp tip left out", () => {
    const [L, t, w] = [0.04, 0.003, 0.1];
    const sharp = 1e-7;
    const found = fin(
      0,
      L - sharp,
      200,
      25,
      (x) => (w * t * (L - x)) / L,
      () => 2 * w,
      0,
    );
    // the fin equation counts the projected faces; the template's area is the slanting one
    const product = run("triangular-fin", {});
    expect(product.number("eta")).toBeCloseTo(found.q / (25 * 2 * w * L), 4);
  });

  it("stays finite for very long fins", () => {
    for (const L of [10, 100, 1000]) {
      expect(run("straight-fin", { L: given(L, "m") }).number("T_tip")).toBeCloseTo(293.15, 9);
      expect(run("triangular-fin", { L: given(L, "m") }).number("eta")).toBeGreaterThan(0);
    }
    expect(run("annular-fin", { r_2: given(100, "m") }).number("Q")).toBeGreaterThan(0);
  });
});
