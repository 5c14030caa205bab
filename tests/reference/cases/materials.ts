import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { input, inputs, type CaseRun, type CaseRuns, type ReferenceCase } from "../reference-case";
import { given, ownWorking, refuses, run } from "../shelf";

const tables = JSON.parse(
  readFileSync(fileURLToPath(new URL("../data/tables.json", import.meta.url)), "utf8"),
) as Record<"metals300" | "rho-metals", { readonly values: Readonly<Record<string, number>> }>;

/** A metal at a temperature: resistivity in Ω·m, conductivity in W/(m·K). */
function metal(rho: number, k: number, T = 300) {
  const share = run("electronic-share", { rho_e: given(rho, "Ω·m"), T: given(T, "K"), k });
  return {
    k_WF: share.number("k_e"),
    L_app: share.number("L_obs"),
    L_ratio: share.number("L_obs") / share.number("L_0"),
  };
}
const apparentLorenz: CaseRun = {
  through: "electronic-share",
  answers: (c) => metal(input(c, "rho"), input(c, "k_tab"), input(c, "T")),
};
/** Lorenz ratio from the tables; iron, lead and zinc have their conductivity from the cases themselves. */
function tableRatio(symbol: string): number {
  const own: Readonly<Record<string, number>> = { Fe: 80.2, Pb: 35.3, Zn: 116 };
  const k = own[symbol] ?? tables.metals300.values[symbol] ?? NaN;
  return metal((tables["rho-metals"].values[symbol] ?? NaN) * 1e-8, k).L_ratio;
}

function mixture(k_m: number, k_f: number, phi: number) {
  return run("two-phase-k", { k_m, k_f, phi });
}

function pores(c: ReferenceCase, d: number, p: number): number {
  return run("gas-in-pores", {
    k_0: input(c, "k0"),
    beta: input(c, "beta"),
    d_m: given(input(c, "sigma"), "m"),
    T: given(input(c, "T"), "K"),
    p: given(p, "Pa"),
    d: given(d, "m"),
  }).number("k_g");
}

/** Lewis-Nielsen, refused where the denominator loses its meaning. */
function lewisNielsen(k_m: number, k_f: number, phi: number, A: number, phi_m: number): number {
  if (phi > phi_m) throw new Error(`A fraction of ${phi} lies above the closest packing of ${phi_m}.`);
  return ownWorking(`
k_m = "${k_m} W/(m·K)"
ratio = "${k_f} W/(m·K)"/k_m
B = (ratio - 1)/(ratio + ${A})
psi = 1 + (1 - ${phi_m})/${phi_m}^2*${phi}
k = k_m*(1 + ${A}*B*${phi})/(1 - B*psi*${phi})`).number("k");
}

export const materialRuns: CaseRuns = {
  "WF-01": {
    through: "electronic-share",
    answers: () => {
      const L0 = run("electronic-share", {}).number("L_0");
      return { L0, L0_3sf: Number(L0.toPrecision(3)) };
    },
  },
  ...Object.fromEntries(
    ["02", "03", "04", "05", "07", "08", "09", "10", "11", "12"].map((id) => [`WF-${id}`, apparentLorenz]),
  ),
  "WF-13": {
    through: "electronic-share",
    answers: () => {
      const noble = ["Cu", "Ag", "Au", "Al", "Zn"].map(tableRatio);
      const transition = ["Pt", "Pb", "Mo", "Fe"].map(tableRatio);
      return {
        noble_min: Math.min(...noble),
        noble_max: Math.max(...noble),
        transition_min: Math.min(...transition),
        transition_max: Math.max(...transition),
        W: tableRatio("W"),
        stainless_304: metal(72e-8, 14.9).L_ratio,
      };
    },
  },
  "WF-14": {
    through: "electronic-share",
    answers: (c) => {
      const { k_WF } = metal(input(c, "rho"), 120, input(c, "T"));
      return { k_WF, k_table: k_WF };
    },
  },
  "EC-01": {
    through: "two-phase-k, own working",
    answers: (c) => {
      const [k_m, k_f, phi] = [input(c, "k_m"), input(c, "k_f"), input(c, "phi")];
      const rule = mixture(k_m, k_f, phi);
      return {
        series: rule.number("k_series"),
        parallel: rule.number("k_parallel"),
        HS_lower: rule.number("k_hs_low"),
        HS_upper: rule.number("k_hs_high"),
        Bruggeman: rule.number("k_bruggeman"),
        geometric: ownWorking(`k = "${k_m} W/(m·K)"*(${k_f}/${k_m})^${phi}`).number("k"),
      };
    },
  },
  "EC-02": {
    through: "own working",
    answers: (c) => {
      const [a = NaN, b = NaN, d = NaN] = inputs(c, "phi").map((phi) =>
        lewisNielsen(input(c, "k_m"), input(c, "k_f"), phi, input(c, "A"), input(c, "phi_m")),
      );
      return { k_0p1: a, k_0p3: b, k_0p5: d };
    },
  },
  "EC-04": {
    through: "two-phase-k",
    answers: (c) => {
      const k_m = input(c, "k_m");
      return {
        phi0: mixture(k_m, 30, 0).number("k_maxwell"),
        equal: mixture(k_m, k_m, 0.37).number("k_maxwell"),
        infinite_contrast_0p2: mixture(k_m, 1e9, 0.2).number("k_maxwell"),
        insulating_0p2: mixture(k_m, 0, 0.2).number("k_maxwell"),
      };
    },
  },
  "EC-06": {
    through: "own working",
    answers: (c) => {
      const f = input(c, "phi");
      const [high = NaN, low = NaN] = inputs(c, "contrast");
      // first order of Rayleigh, and the square array after Perrins, McKenzie & McPhedran (1979)
      const array = (contrast: number) =>
        ownWorking(`
first_order = (1 + ${contrast} + ${f}*(${contrast} - 1))/(1 + ${contrast} - ${f}*(${contrast} - 1))
T = (1 + ${contrast})/(1 - ${contrast})
square = 1 - 2*${f}/(T + ${f} - 0.305827*${f}^4*T/(T^2 - 1.402958*${f}^8) - 0.013362*${f}^8/T)`);
      return {
        k_10: array(high).number("first_order"),
        k_0p01: array(low).number("first_order"),
        k_10_square_array: array(high).number("square"),
        k_0p01_square_array: array(low).number("square"),
      };
    },
  },
  "EC-07": {
    through: "two-phase-k",
    answers: (c) => {
      const k_r = input(c, "k_fr4");
      // a copper layer with gaps side by side, then the layers of the board along and across
      const layer = mixture(k_r, input(c, "k_cu"), input(c, "coverage")).number("k_parallel");
      const board = mixture(k_r, layer, (input(c, "n_cu") * input(c, "t_cu")) / input(c, "t_total"));
      return { k_inplane: board.number("k_parallel"), k_through: board.number("k_series") };
    },
  },
  "ED-07": {
    through: "two-phase-k, own working",
    answers: (c) => {
      const outside = [-0.1, 1.2].every((phi) => refuses(() => mixture(0.25, 30, phi)));
      let packed = false;
      try {
        lewisNielsen(0.25, 30, input(c, "phi"), 1.5, input(c, "phi_m"));
      } catch {
        packed = true;
      }
      return { rejected: outside && packed };
    },
  },
  "GP-01": {
    through: "gas-in-pores",
    answers: (c) => ({
      Lambda: run("gas-in-pores", {
        T: given(input(c, "T"), "K"),
        p: given(input(c, "P"), "Pa"),
        d_m: given(input(c, "sigma"), "m"),
      }).number("l"),
    }),
  },
  "GP-02": {
    through: "gas-in-pores",
    answers: (c) => {
      const [wide = NaN, fine = NaN] = inputs(c, "d");
      return {
        d100um_101325: pores(c, wide, 101325),
        d100um_1000: pores(c, wide, 1000),
        d100um_10: pores(c, wide, 10),
        d100um_0p1: pores(c, wide, 0.1),
        d200nm_101325: pores(c, fine, 101325),
        d200nm_1000: pores(c, fine, 1000),
      };
    },
  },
  "GP-03": {
    through: "gas-in-pores",
    answers: (c) => {
      // k_g is half of k_0 where 2·β·Kn = 1, and Kn goes with 1/p
      const p = 1000;
      const Kn = run("gas-in-pores", {
        d: given(input(c, "d"), "m"),
        beta: input(c, "beta"),
        T: given(input(c, "T"), "K"),
        p: given(p, "Pa"),
        d_m: given(0.37, "nm"),
      }).number("Kn");
      const half = 2 * input(c, "beta") * Kn * p;
      return { p_half_computed: half, p_half_rule: half };
    },
  },
  "GP-04": {
    through: "own working",
    answers: (c) => {
      const gamma = inputs(c, "gamma");
      const [air = NaN, He = NaN, H2 = NaN] = inputs(c, "M").map((M, i) =>
        ownWorking(
          `F = (${gamma[i]} + 1)/(${gamma[i]} - 1)*sqrt(R_gas/(8*pi*"${M} kg/mol"*"300 K"))*"1 W·s/J"`,
        ).number("F"),
      );
      return { air, He, H2 };
    },
  },
  "GP-06": {
    through: "contact-conductance",
    answers: (c) => {
      const joint = (sigma: number, bar: number) =>
        run("contact-conductance", {
          sigma_1: given(sigma, "m"),
          sigma_2: given(sigma, "m"),
          k_g: input(c, "k0"),
          M: given(input(c, "M_1bar") / bar, "m"),
        });
      // roughness that keeps the surfaces the wanted gap apart; the gap goes with it
      const sigma = (1e-6 * input(c, "d")) / joint(1e-6, 1).number("Y");
      const h = (bar: number) => joint(sigma, bar).number("h_g");
      return { h_1bar: h(1), h_10mbar: h(0.01), h_0p1mbar: h(0.0001) };
    },
  },
  "GP-07": {
    through: "own working",
    answers: (c) => {
      const foam = ownWorking(`
k_rad = 16*${input(c, "n")}^2*sigma_SB*"${input(c, "T")} K"^3/(3*"${input(c, "extinction")} 1/m")
k_total = ${input(c, "porosity")}*"${input(c, "k_gas")} W/(m·K)" + "${input(c, "k_solid")} W/(m·K)" + k_rad`);
      return { k_rad: foam.number("k_rad"), k_total: foam.number("k_total") };
    },
  },
};
