import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { simpson } from "../numerical";
import { input, inputs, type CaseRuns } from "../reference-case";
import { given, ownWorking, refuses, run, stated } from "../shelf";

interface AirLayers {
  readonly "air-layers": {
    readonly values: Readonly<Record<"t_mm" | "up" | "horizontal" | "down", number[]>>;
  };
}
const tables = JSON.parse(
  readFileSync(fileURLToPath(new URL("../data/tables.json", import.meta.url)), "utf8"),
) as AirLayers;

/** Resistance of an unventilated air layer, read with the language's own interpolation. */
function airLayer(direction: "up" | "horizontal" | "down", thickness: number): number {
  const { t_mm, [direction]: resistance } = tables["air-layers"].values;
  return ownWorking(`R = interpolate("${thickness} mm", air.t, air.R)`, {
    symbol: "air",
    columns: { t: ["mm", t_mm], R: ["m²·K/W", resistance] },
  }).number("R");
}

const layer = (t: number, k: number) => ({ t: given(t, "m"), k: given(k, "W/(m·K)") });
const insulance = (value: number) => given(value, "m²·K/W");

export const wallRuns: CaseRuns = {
  "PW-01": {
    through: "plane-wall",
    answers: (c) => {
      const wall = run("plane-wall", {
        A: input(c, "A"),
        t: given(input(c, "L"), "m"),
        k: input(c, "k"),
        T_hot: given(input(c, "T1"), "K"),
        T_cold: given(input(c, "T2"), "K"),
      });
      return { q_flux: wall.number("q"), q: wall.number("Q") };
    },
  },
  "PW-02": {
    through: "plane-wall",
    answers: (c) => {
      const wall = run("plane-wall", {
        A: input(c, "H") * input(c, "W"),
        t: given(input(c, "L"), "m"),
        k: input(c, "k"),
        T_hot: given(input(c, "T1"), "K"),
        T_cold: given(input(c, "T2"), "K"),
      });
      return { q: wall.number("Q") };
    },
  },
  "PW-03": {
    through: "composite-wall",
    answers: (c) => {
      const wall = run("composite-wall", {
        A: input(c, "A"),
        T_i: given(input(c, "T_i"), "K"),
        T_e: given(input(c, "T_o"), "K"),
        R_si: insulance(1 / input(c, "h_i")),
        R_se: insulance(1 / input(c, "h_o")),
        layers: [layer(input(c, "L"), input(c, "k"))],
      });
      return { q: wall.number("Q"), T_s_in: wall.list("T_face")[0] ?? NaN };
    },
  },
  "PW-04": {
    through: "composite-wall",
    answers: (c) => {
      const glass = layer(input(c, "L_glass"), input(c, "k_glass"));
      const wall = run("composite-wall", {
        A: input(c, "A"),
        T_i: given(input(c, "T_i"), "K"),
        T_e: given(input(c, "T_o"), "K"),
        R_si: insulance(1 / input(c, "h_i")),
        R_se: insulance(1 / input(c, "h_o")),
        layers: [glass, layer(input(c, "L_gap"), input(c, "k_gap")), glass],
      });
      return { q: wall.number("Q"), T_s_in: wall.list("T_face")[0] ?? NaN };
    },
  },
  "PW-05": {
    through: "stud-wall",
    answers: (c) => {
      const joints = input(c, "n_joint") * input(c, "joint_height") * input(c, "depth");
      const area = input(c, "module");
      const row = (t: number, k: number, frame = k) => ({ t: given(t, "m"), k_field: k, k_frame: frame });
      const plaster = row(input(c, "plaster_L"), input(c, "plaster_k"));
      const wall = run("stud-wall", {
        R_si: 1 / input(c, "h_i"),
        R_se: 1 / input(c, "h_o"),
        f: joints / area,
        layers: [
          row(input(c, "foam_L"), input(c, "foam_k")),
          plaster,
          row(input(c, "core_L"), input(c, "brick_k"), input(c, "joint_k")),
          plaster,
        ],
      });
      const R_total = wall.number("R_lower") / area;
      return { R_total, q_module: (input(c, "T_i") - input(c, "T_o")) / R_total };
    },
  },
  "PW-06": {
    through: "composite-wall, text",
    answers: () => {
      const [up, horizontal, down, outside] = stated(
        "composite-wall",
        /inside ([\d.]+) upwards, ([\d.]+) horizontal, ([\d.]+) downwards; outside ([\d.]+) m²/,
      );
      return {
        Rsi_up: up ?? NaN,
        Rsi_horizontal: horizontal ?? NaN,
        Rsi_down: down ?? NaN,
        Rse: outside ?? NaN,
      };
    },
  },
  "PW-07": {
    through: "own working",
    answers: () => ({
      R_horizontal_25: airLayer("horizontal", 25),
      R_horizontal_300: airLayer("horizontal", 300),
      R_up_25: airLayer("up", 25),
      R_up_300: airLayer("up", 300),
      R_down_25: airLayer("down", 25),
      R_down_50: airLayer("down", 50),
      R_down_100: airLayer("down", 100),
      R_down_300: airLayer("down", 300),
      R_any_5: airLayer("horizontal", 5),
      R_any_7: airLayer("up", 7),
      R_any_10: airLayer("down", 10),
      R_horizontal_20: airLayer("horizontal", 20),
    }),
  },
  "PW-08": {
    through: "composite-wall",
    answers: (c) => {
      const k = inputs(c, "k");
      const solid = inputs(c, "L").map((t, i) => layer(t, k[i] ?? NaN));
      const wall = run("composite-wall", {
        R_si: input(c, "Rsi"),
        R_se: input(c, "Rse"),
        layers: [...solid, layer(0.05, 0.05 / input(c, "R_air"))],
      });
      const U = wall.number("U");
      return { R_tot: wall.number("R_T"), U, U_2dp: Math.round(U * 100) / 100 };
    },
  },
  "PW-10": {
    through: "composite-wall",
    answers: (c) => {
      // area mean of the transmittance over the wedge, by Simpson's rule
      const U = (share: number) =>
        run("composite-wall", {
          R_si: input(c, "R0"),
          R_se: 0,
          layers: [layer(Math.max(share, 1e-12) * input(c, "d1"), input(c, "k1"))],
        }).number("U");
      return { U: simpson(U, 0, 1, 400) };
    },
  },
  "PW-13": {
    through: "own working",
    answers: (c) => ({
      dU_f: ownWorking(`
R_1 = "${input(c, "R1")} m²·K/W"
R_tot = "${input(c, "R_tot")} m²·K/W"
dU_f = ${input(c, "alpha")}*"${input(c, "k_f")} W/(m·K)"*"${input(c, "n_f")} 1/m²"*"${input(c, "A_f")} m²"/"${input(c, "d0")} m"*(R_1/R_tot)^2`).number(
        "dU_f",
      ),
    }),
  },
  "PW-14": {
    through: "own working",
    answers: (c) => {
      const level = (dU: number) =>
        ownWorking(
          `dU = "${dU} W/(m²·K)"*("${input(c, "R1")} m²·K/W"/"${input(c, "R_tot")} m²·K/W")^2`,
        ).number("dU");
      return { dU_level0: level(0), dU_level1: level(0.01), dU_level2: level(0.04) };
    },
  },
  "PW-17": {
    through: "plane-wall",
    answers: (c) => {
      const flux = (part: string) =>
        run("plane-wall", {
          t: given(input(c, `L_${part}`), "m"),
          k: input(c, `k_${part}`),
          T_hot: given(300 + input(c, `dT_${part}`), "K"),
          T_cold: given(300, "K"),
        }).number("q");
      return { q_film: flux("film"), q_soil: flux("soil") };
    },
  },
  "PW-18": {
    through: "composite-wall",
    answers: (c) => {
      const [Rsi = NaN, plaster = NaN, insulation = NaN, render = NaN, Rse = NaN] = inputs(c, "R");
      const [Ti, Te] = [input(c, "T_i"), input(c, "T_e")];
      const wall = run("composite-wall", {
        T_i: given(Ti, "K"),
        T_e: given(Te, "K"),
        R_si: Rsi,
        R_se: Rse,
        layers: [plaster, insulation / 2, insulation / 2, render].map((R) => layer(0.02, 0.02 / R)),
      });
      const [T_si = NaN, , T_mid = NaN] = wall.list("T_face");
      return { f_Rsi: (T_si - Te) / (Ti - Te), T_si, T_mid };
    },
  },
  "KT-01": {
    through: "linear-k-wall",
    answers: (c) => {
      const wall = run("linear-k-wall", {
        A: input(c, "A"),
        t: given(input(c, "L"), "m"),
        k_ref: input(c, "k0"),
        T_ref: given(0, "K"),
        b: input(c, "b"),
        T_hot: given(input(c, "T1"), "K"),
        T_cold: given(input(c, "T2"), "K"),
      });
      return { k_mean: wall.number("k_mean"), q: wall.number("Q") };
    },
  },
  "ED-01": {
    through: "plane-wall",
    answers: (c) => ({
      rejected:
        refuses(() => run("plane-wall", { k: input(c, "k"), t: given(input(c, "L"), "m") })) &&
        refuses(() => run("plane-wall", { k: -1, t: given(input(c, "L"), "m") })),
    }),
  },
  "ED-04": {
    through: "plane-wall",
    answers: () => ({
      rejected:
        refuses(() => run("plane-wall", { T_cold: given(-300, "°C") })) &&
        refuses(() => run("plane-wall", { T_cold: given(-460, "°F") })) &&
        !refuses(() => run("plane-wall", { T_cold: given(0, "K") })),
    }),
  },
  "IS-04": {
    through: "own working",
    answers: (c) => {
      const corner = ownWorking(`
L_2D = "${input(c, "L2D")} W/(m·K)"
U = "${input(c, "U")} W/(m²·K)"
Psi_int = L_2D - U*"${input(c, "l_int")} m"
Psi_ext = L_2D - U*"${input(c, "l_ext")} m"`);
      return { Psi_int: corner.number("Psi_int"), Psi_ext: corner.number("Psi_ext") };
    },
  },
};
