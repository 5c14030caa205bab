import { Material } from "@/lib/calculation/material";
import { input, inputs, type CaseRun, type CaseRuns } from "../reference-case";
import { given, ownWorking, run } from "../shelf";

const strut = (material: string, T_cold: number, T_hot: number, extra = {}) =>
  run("cold-strut", { material, T_hot: given(T_hot, "K"), T_cold: given(T_cold, "K") }, extra);
/** Conductivity at one temperature: the mean between equal ends. */
const k = (material: string, T: number, extra = {}) => strut(material, T, T, extra).number("k_mean");
const integral = (material: string, from: number, to: number) => strut(material, from, to).number("K");

/** Values and integrals of one fit, by the names that the case expects. */
const fit = (material: string): CaseRun => ({
  through: "cold-strut",
  answers: (c) =>
    Object.fromEntries(
      Object.keys(c.expected).map((name) => {
        const [what, a = "", b = ""] = name.split("_");
        return [name, what === "k" ? k(material, Number(a)) : integral(material, Number(a), Number(b))];
      }),
    ),
});

/** A material of the case itself beside the supplied ones. */
function caseMaterial(piece: object, argumentUnit: string) {
  const material = Material.parse({
    name: "Material of the case",
    class: "other",
    condition: "",
    properties: {
      k: {
        pieces: [piece],
        argumentUnit,
        unit: "W/(m·K)",
        source: "the case",
        basis: "computed independently",
        status: "typical",
      },
    },
  });
  return { "of-the-case": { slug: "of-the-case", revision: 1, material } };
}

export const coldRuns: CaseRuns = {
  "KT-03": {
    through: "cold-strut",
    answers: (c) => {
      const extra = caseMaterial(
        {
          form: "polynomial",
          coefficients: c.inputs["k_poly"]?.value,
          range: { min: 0, max: 700, unit: "°C" },
        },
        "°C",
      );
      const found = strut("of-the-case", input(c, "T2"), input(c, "T1"), extra);
      return {
        integral: found.number("K"),
        k_mean: found.number("k_mean"),
        q: found.number("K") / input(c, "L"),
      };
    },
  },
  "KT-05": {
    through: "cold-strut, own working",
    answers: (c) => {
      const law = `k = "1 W/(m·K)"*0.0123*number_in(T, "K")^${input(c, "n")}`;
      const extra = caseMaterial(
        { form: "working", working: law, range: { min: 4, max: 80, unit: "K" } },
        "K",
      );
      const found = run(
        "cold-strut",
        {
          A: given(input(c, "A"), "m²"),
          L: given(input(c, "L"), "m"),
          material: "of-the-case",
          T_hot: given(input(c, "T1"), "K"),
          T_cold: given(input(c, "T2"), "K"),
        },
        extra,
      );
      const K = found.number("K");
      const round = ownWorking(`q = 2*pi*"${K} W/m"/ln("${input(c, "r2")} m"/"${input(c, "r1")} m")`);
      return { integral: K, q_slab: found.number("Q"), q_cyl_per_m: round.number("q") };
    },
  },
  "KT-07": {
    through: "cold-strut",
    answers: (c) => {
      const values = inputs(c, "k");
      const points = (c.inputs["T"]?.value as readonly number[]).map((T, i) => [T, values[i]]);
      const extra = caseMaterial(
        { form: "table", interpolation: "linear", points, range: { min: 20, max: 600, unit: "°C" } },
        "°C",
      );
      const found = strut("of-the-case", input(c, "T2"), input(c, "T1"), extra);
      return {
        integral: found.number("K"),
        k_mean: found.number("k_mean"),
        k_300: k("of-the-case", 573.15, extra),
      };
    },
  },
  "CK-01": fit("ss304"),
  "CK-02": fit("al6061t6"),
  "CK-05": fit("g10-warp"),
  "CK-06": fit("ptfe"),
  "CK-07": fit("nylon"),
  "CK-08": fit("kapton"),
  "CK-09": fit("cu-rrr50"),
  "CK-10": fit("cu-rrr300"),
  "CK-12": {
    through: "cold-strut",
    answers: () => ({
      ss304: integral("ss304", 4, 300),
      ptfe: integral("ptfe", 4, 300),
      nylon: integral("nylon", 4, 300),
    }),
  },
  "CK-14": {
    through: "cold-strut",
    answers: () => ({
      k20_30: k("hl-cu-rrr30", 20),
      k20_100: k("hl-cu-rrr100", 20),
      k20_300: k("hl-cu-rrr300", 20),
      k300_30: k("hl-cu-rrr30", 300),
      k300_300: k("hl-cu-rrr300", 300),
    }),
  },
  "CK-15": {
    through: "cold-strut",
    answers: () => ({
      Fe: k("hl-fe-rrr23-5", 300),
      W: k("hl-w-rrr75", 300),
      Al: k("hl-al-rrr100", 300),
      W_table: k("hl-w-rrr75", 300),
    }),
  },
  "CK-17": {
    through: "cold-strut, own working",
    answers: () => {
      const earlier = ownWorking(`
x = "298.15 K"/"300 K"
k = "1 W/(m·K)"*(1.6630*x^(-1.15) - 1.7781*x^(-3.4) + 1.1567*x^(-6) - 0.432115*x^(-7.6))`);
      const at298 = k("water-liq", 298.15);
      return {
        k_298_2011: at298,
        k_298_2008: earlier.number("k"),
        k_298_standard: at298,
        k_273: k("water-liq", 273.15),
        k_323: k("water-liq", 323.15),
        k_373: k("water-liq", 373.15),
      };
    },
  },
  "CK-18": {
    through: "cold-strut",
    answers: () => ({
      k_ussa_288: k("air-ussa76", 288.15),
      k_ussa_216: k("air-ussa76", 216.65),
      k_ussa_300: k("air-ussa76", 300),
      k_sl_300: k("air-sl85", 300),
      k_sl_600: k("air-sl85", 600),
      k_sl_1000: k("air-sl85", 1000),
      k_handbook_300: k("air", 300),
    }),
  },
  "CK-19": {
    through: "cold-strut",
    answers: () => ({
      k_m10: k("irmm440", 263.15),
      k_10: k("irmm440", 283.15),
      k_24: k("irmm440", 297.15),
      k_50: k("irmm440", 323.15),
    }),
  },
  "CK-20": {
    through: "cold-strut",
    answers: () => {
      const ratio = (material: string) => k(material, 300) / k(material, 4);
      return {
        ss304: ratio("ss304"),
        al6061: ratio("al6061t6"),
        cu100: ratio("cu-rrr100"),
        ptfe: ratio("ptfe"),
      };
    },
  },
};
