import { input, type CaseRuns } from "../reference-case";
import { given, ownWorking, run } from "../shelf";

function generatingWall(g: number, L: number, k: number, h: number, T_inf: number) {
  return run("generating-wall", {
    g,
    L: given(L, "m"),
    k,
    h,
    T_inf: given(T_inf, "K"),
  });
}

export const generationRuns: CaseRuns = {
  "HG-01": {
    through: "generating-wall",
    answers: (c) => {
      const cover = input(c, "L_B") / input(c, "k_B");
      const h = input(c, "h");
      const wall = generatingWall(
        input(c, "q_dot"),
        input(c, "L_A"),
        input(c, "k_A"),
        1 / (cover + 1 / h),
        input(c, "T_inf"),
      );
      return {
        T_0: wall.number("T_max"),
        T_1: wall.number("T_s"),
        T_2: input(c, "T_inf") + wall.number("q_s") / h,
      };
    },
  },
  "HG-02": {
    through: "generating-cylinder",
    answers: (c) => {
      const q_dot = input(c, "Q") / (((Math.PI * input(c, "D") ** 2) / 4) * input(c, "L"));
      const wire = run("generating-cylinder", {
        D: given(input(c, "D"), "m"),
        k: input(c, "k"),
        g: q_dot,
        h: 1e12,
        T_inf: given(input(c, "T_s"), "K"),
      });
      return { q_dot, T_0: wall0(wire.number("q_l"), q_dot, input(c, "D"), wire.number("T_max")) };
    },
  },
  "HG-03": {
    through: "own working",
    answers: (c) => {
      const ball = ownWorking(`
g = "${input(c, "q_dot")} W/m³"
r = "${input(c, "r")} m"
T_s = "${input(c, "T_inf")} K" + g*r/(3*"${input(c, "h")} W/(m²·K)")
T_0 = T_s + g*r^2/(6*"${input(c, "k")} W/(m·K)")`);
      return { T_s: ball.number("T_s"), T_0: ball.number("T_0") };
    },
  },
  "HG-05": {
    through: "own working",
    answers: (c) => {
      // radial Poisson equation with an insulated bore, integrated numerically in the language
      const tube = ownWorking(`
g = "${input(c, "q_dot")} W/m³"
k = "${input(c, "k")} W/(m·K)"
r_1 = "${input(c, "r1")} m"
r_2 = "${input(c, "r2")} m"
flux(r) = g*(r^2 - r_1^2)/(2*r)
T_1 = "${input(c, "T2")} K" + integral(r, r_1, r_2, flux(r)/k)
q_2 = flux(r_2)`);
      return { T1: tube.number("T_1"), q2: tube.number("q_2") };
    },
  },
  "HG-07": {
    through: "linear-k-wall",
    answers: (c) => {
      if (input(c, "q_dot") !== 0) throw new Error("The plain wall generates nothing.");
      const wall = run("linear-k-wall", {
        t: given(input(c, "L"), "m"),
        k_ref: input(c, "k"),
        b: 0,
        T_hot: given(input(c, "T_left"), "K"),
        T_cold: given(input(c, "T_right"), "K"),
      });
      return { T_mid: wall.number("T_mid"), q: wall.number("q") };
    },
  },
  "HG-08": {
    through: "generating-cylinder",
    answers: (c) => {
      const r = input(c, "r");
      const q_dot = (input(c, "I") ** 2 * input(c, "rho_e")) / (Math.PI * r ** 2) ** 2;
      const wire = run("generating-cylinder", {
        D: given(2 * r, "m"),
        k: input(c, "k"),
        g: q_dot,
        h: input(c, "h"),
        T_inf: given(input(c, "T_inf"), "K"),
      });
      // the small drop inside is read from a wire held cold, free of the rounding at 700 K
      const cold = run("generating-cylinder", {
        D: given(2 * r, "m"),
        k: input(c, "k"),
        g: q_dot,
        h: 1e15,
        T_inf: given(0, "K"),
      });
      return {
        q_dot,
        q_per_m: wire.number("q_l"),
        T_s: wire.number("T_s"),
        dT_centre: cold.number("T_max") - cold.number("T_s"),
      };
    },
  },
};

/** Axis temperature, after making sure that the heat of the wire is what was put in. */
function wall0(q_l: number, q_dot: number, D: number, T_max: number): number {
  const put = (q_dot * Math.PI * D ** 2) / 4;
  if (Math.abs(q_l / put - 1) > 1e-9) throw new Error(`The wire gives off ${q_l} W/m instead of ${put} W/m.`);
  return T_max;
}
