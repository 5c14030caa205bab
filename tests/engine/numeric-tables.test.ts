import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { chebyshev } from "@/lib/numeric/chebyshev";
import {
  eulerConstant,
  exponential,
  fromRatio,
  logarithm,
  pi,
  toNumber,
} from "@/lib/numeric/tables/fixed-point";
import { tableFiles } from "@/lib/numeric/tables/generate";

describe("Chebyshev tables", () => {
  it.each(Object.entries(tableFiles()))("%s is what the generator writes", (name, text) => {
    const committed = readFileSync(new URL(`../../lib/numeric/tables/${name}`, import.meta.url), "utf8");
    expect(committed).toBe(text);
  });

  it("are made with constants known to more digits than a double has", () => {
    // Digits of π, γ, e and ln 2: DLMF 3.12 and 5.2.3.
    expect((pi * 10n ** 40n) / fromRatio(1)).toBe(31415926535897932384626433832795028841971n);
    expect((eulerConstant() * 10n ** 40n) / fromRatio(1)).toBe(5772156649015328606065120900824024310421n);
    expect((exponential(fromRatio(1)) * 10n ** 40n) / fromRatio(1)).toBe(
      27182818284590452353602874713526624977572n,
    );
    expect((logarithm(fromRatio(2)) * 10n ** 40n) / fromRatio(1)).toBe(
      6931471805599453094172321214581765680755n,
    );
    expect(toNumber(fromRatio(-1, 3))).toBe(-1 / 3);
  });

  it("are summed by Clenshaw's recurrence as T_k(cos φ) = cos kφ", () => {
    const coefficients = Float64Array.of(0.3, -1.2, 0.7, 0.05, -0.4);
    for (const angle of [0, 0.4, 1.3, 2.9, Math.PI]) {
      const sum = coefficients.reduce((total, c, k) => total + c * Math.cos(k * angle), 0);
      expect(chebyshev(coefficients, Math.cos(angle))).toBeCloseTo(sum, 14);
    }
  });
});
