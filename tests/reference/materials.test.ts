import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { evaluate } from "@/lib/calculation/execute";
import { Material } from "@/lib/calculation/material";
import { checkMaterial } from "@/lib/calculation/check-material";
import { compileMaterial } from "@/lib/calculation/compiled-material";
import type { PropertyName } from "@/lib/language";
import { simpson } from "./numerical";
import {
  given,
  material,
  materials,
  materialSlugs,
  preparedTemplate,
  refuses,
  run,
  template,
  templateSlugs,
} from "./shelf";

const compiled = (slug: string) => compileMaterial(material(slug), slug, 1);
const property = (slug: string, name: PropertyName = "k") => {
  const found = compiled(slug).properties[name];
  if (!found) throw new Error(`${slug} has no ${name}.`);
  return found;
};
/** Mean conductivity between equal ends is the conductivity. */
const k = (slug: string, T: number) =>
  run("cold-strut", { material: slug, T_hot: given(T, "K"), T_cold: given(T, "K") }).number("k_mean");

describe("the materials of the shelf", () => {
  it("holds every material that a template starts with", () => {
    const needed = templateSlugs.flatMap((slug) =>
      template(slug).inputs.flatMap((input) => {
        if (input.kind === "material") return input.default ?? [];
        if (input.kind !== "table") return [];
        const columns = input.columns.filter(({ kind }) => kind === "material");
        return input.default.flatMap((row) => columns.map(({ symbol }) => row[symbol]));
      }),
    );
    for (const slug of needed) expect(materialSlugs).toContain(slug);
  });

  it.each(materialSlugs)(
    "%s states source, basis, status and condition, and marks what is from memory",
    (slug) => {
      const { condition, note, properties, service } = material(slug);
      expect(condition).not.toBe("");
      for (const found of Object.values(properties)) {
        expect(found.source).not.toBe("");
        expect(found.uncertainty, "an uncertainty, if only that none is stated").toBeDefined();
        if (found.basis === "from memory") expect(note).toMatch(/from memory.*confirm|confirm.*from memory/i);
      }
      if (service) expect(service.note).toMatch(/from memory/);
    },
  );

  it.each(materialSlugs)("%s passes the check without an error or a warning", (slug) => {
    expect(checkMaterial(material(slug)).diagnostics).toEqual([]);
  });

  it.each(materialSlugs)(
    "%s is positive over its range, joins without a step, and is refused beyond it",
    (slug) => {
      for (const found of Object.values(compiled(slug).properties)) {
        const at = (T: number) => found.value(T, false);
        for (let i = 0; i <= 200; i += 1) {
          expect(at(found.min + ((found.max - found.min) * i) / 200)).toBeGreaterThan(0);
        }
        for (const { max } of found.pieces.slice(0, -1)) {
          expect(at(max * (1 - 1e-9)) / at(max * (1 + 1e-9))).toBeCloseTo(1, 6);
        }
        expect(found.validity(found.min)).toBe("inside");
        expect(found.validity(found.max)).toBe("inside");
        expect(found.validity(found.min * 0.99)).toBe("below");
        expect(found.validity(found.max * 1.01)).toBe("above");
      }
    },
  );

  it.each(materialSlugs.filter((slug) => material(slug).properties.k))(
    "%s integrates its conductivity as Simpson's rule does",
    (slug) => {
      const found = property(slug);
      const [from, to] = [found.min + 0.1 * (found.max - found.min), found.max];
      const joints = [from, ...found.pieces.map(({ max }) => max).filter((T) => T > from)];
      const wanted = joints
        .slice(1)
        .reduce(
          (sum, end, i) => sum + simpson((T) => found.value(T, false), joints[i]!, end - 1e-9, 4000),
          0,
        );
      const K = run("cold-strut", { material: slug, T_hot: given(to, "K"), T_cold: given(from, "K") }).number(
        "K",
      );
      expect(K / wanted).toBeCloseTo(1, 5);
    },
  );

  it("keeps the members of a material in the order of the schema", () => {
    for (const slug of materialSlugs) {
      const raw = material(slug);
      expect(Object.keys(raw)).toEqual(Object.keys(Material.shape).filter((name) => name in raw));
    }
  });
});

describe("values against tables", () => {
  // Incropera & DeWitt, Table A.4, from memory: T in K, c in kJ/(kg·K), mu in 10⁻⁷ Pa·s, k in 10⁻³ W/(m·K)
  it.each([
    [200, 1.007, 132.5, 18.1],
    [250, 1.006, 159.6, 22.3],
    [300, 1.007, 184.6, 26.3],
    [400, 1.014, 230.1, 33.8],
    [500, 1.03, 270.1, 40.7],
    [600, 1.051, 305.8, 46.9],
    [800, 1.099, 369.8, 57.3],
    [1000, 1.141, 424.4, 66.7],
  ])("air at %f K lies by the handbook table", (T, c, mu, conductivity) => {
    const air = compiled("air").properties;
    expect(Math.abs(air.c!.value(T, false) / (1000 * c) - 1)).toBeLessThan(0.005);
    expect(Math.abs(air.mu!.value(T, false) / (1e-7 * mu) - 1)).toBeLessThan(0.025);
    expect(Math.abs(air.k!.value(T, false) / (1e-3 * conductivity) - 1)).toBeLessThan(0.03);
  });

  it("water of the 2011 formulation has its background value at 298.15 K", () => {
    // cross-check of the collection: 0.60652 W/(m·K) at 298.15 K and 997.05 kg/m³
    expect(k("water-r15-rho997-05", 298.15)).toBeCloseTo(0.60652, 5);
  });

  it("both copper formulations agree within their uncertainties", () => {
    // cross-check of the collection for RRR = 100: 2422.5 at 20 K and 396.3 at 300 K
    expect(k("cu-rrr100", 20)).toBeCloseTo(2422.5, 1);
    expect(k("cu-rrr100", 300)).toBeCloseTo(396.3, 1);
    for (const T of [20, 77, 300]) {
      expect(Math.abs(k("hl-cu-rrr100", T) / k("cu-rrr100", T) - 1)).toBeLessThan(0.05);
    }
  });

  it("tungsten and aluminium lie by the table of pure metals at 300 K", () => {
    const tables = JSON.parse(
      readFileSync(fileURLToPath(new URL("./data/tables.json", import.meta.url)), "utf8"),
    ) as { metals300: { values: Record<string, number> } };
    const { W, Al, Cu } = tables.metals300.values;
    expect(Math.abs(k("hl-w-rrr75", 300) / W! - 1)).toBeLessThan(0.02);
    expect(Math.abs(k("hl-al-rrr100", 300) / Al! - 1)).toBeLessThan(0.02);
    expect(Math.abs(k("hl-cu-rrr300", 300) / Cu! - 1)).toBeLessThan(0.02);
  });

  it("brick, mat and board have the tabulated values", () => {
    expect(k("fireclay-brick", 922)).toBeCloseTo(1.5, 9);
    expect(k("insulating-brick-23", 673.15)).toBeCloseTo(0.14, 9);
    expect(k("insulating-brick-23", 1533.15)).toBeCloseTo(0.24, 9);
    expect(k("stone-wool-mat", 300)).toBeCloseTo(0.04, 9);
    expect(k("stone-wool-mat", 473.15)).toBeCloseTo(0.066, 9);
    expect(k("stone-wool-mat", 900)).toBeCloseTo(0.2, 9);
    expect(k("srm1450c-rho160", 297)).toBeCloseTo(-0.0072661 + 0.000056252 * 160 + 0.00010741 * 297, 12);
  });
});

describe("limits of use", () => {
  const hotMat = {
    layers: [
      { t: 50, material: "fireclay-brick" },
      { t: 50, material: "stone-wool-mat" },
    ],
    T_hot: 700,
  };

  it("refuses a lining whose backing mat is hotter than its data reach", () => {
    expect(refuses(() => run("furnace-lining", hotMat))).toBe(true);
  });

  it("stops the same lining as beyond the service temperature when extrapolation is allowed", () => {
    const { status, limits, cautions } = evaluate(
      preparedTemplate("furnace-lining"),
      { inputs: hotMat, allowExtrapolation: true },
      materials,
    );
    expect(status).toBe("stop");
    expect(limits.filter(({ level, broken }) => level === "stop" && broken)).toHaveLength(1);
    expect(cautions.length).toBeGreaterThan(0);
  });
});
