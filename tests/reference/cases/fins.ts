import { input, inputs, type CaseRuns } from "../reference-case";
import { given, ownWorking, run, type Outcome } from "../shelf";

/** A rod so long that its tip has the temperature of the surroundings. */
const longRod: CaseRuns[string] = {
  through: "pin-fin",
  answers: (c) => {
    const rod = run("pin-fin", {
      L: given(3, "m"),
      D: given(input(c, "D"), "m"),
      k: input(c, "k"),
      h: input(c, "h"),
      T_b: given(input(c, "T_b"), "K"),
      T_inf: given(input(c, "T_inf"), "K"),
      tip: "adiabatic",
    });
    return { q: rod.number("Q"), L_inf: 2.65 / rod.number("m") };
  },
};

/** A square bar with m = 10 1/m, so that m·L is ten times its length. */
const barWith = (mL: number): Outcome =>
  run("straight-fin", { L: given(mL / 10, "m"), t: 4, w: 4, k: 100, h: 10, tip: "adiabatic" });

export const finRuns: CaseRuns = {
  "FN-01": longRod,
  "FN-02": longRod,
  "FN-03": longRod,
  "FN-04": {
    through: "straight-fin",
    answers: (c) => {
      const [t, w, L] = [input(c, "t"), input(c, "w"), input(c, "L")];
      const fin = (length: number, tip: string) =>
        run("straight-fin", {
          L: given(length, "m"),
          t: given(t, "m"),
          w: given(w, "m"),
          k: input(c, "k"),
          h: input(c, "h"),
          T_b: given(300 + input(c, "theta_b"), "K"),
          T_inf: given(300, "K"),
          tip,
        });
      const corrected = L + (w * t) / (2 * (w + t));
      return {
        m: fin(L, "adiabatic").number("m"),
        q_adiabatic: fin(L, "adiabatic").number("Q"),
        q_convective: fin(L, "convecting").number("Q"),
        q_corrected: fin(corrected, "adiabatic").number("Q"),
        q_infinite: fin(3, "adiabatic").number("Q"),
        theta_tip_adiabatic: fin(L, "adiabatic").number("T_tip") - 300,
      };
    },
  },
  "FN-06": {
    through: "straight-fin",
    answers: (c) => {
      const [tiny = NaN, half = NaN, one = NaN, two = NaN, ten = NaN] = inputs(c, "mL").map((mL) =>
        barWith(mL).number("eta"),
      );
      return { eta_1em4: tiny, eta_0p5: half, eta_1: one, eta_2: two, eta_10: ten };
    },
  },
  "FN-07": {
    through: "triangular-fin, own working",
    answers: (c) => {
      const mL = inputs(c, "mL");
      const [tri_0p5 = NaN, tri_1 = NaN, tri_2 = NaN] = mL.map((value) =>
        run("triangular-fin", { L: given(value / 10, "m"), t: 2, k: 100, h: 10 }).number("eta"),
      );
      const [par_0p5 = NaN, par_1 = NaN, par_2 = NaN] = mL.map((value) =>
        ownWorking(`eta = 2/(sqrt(4*${value}^2 + 1) + 1)`).number("eta"),
      );
      return { tri_0p5, tri_1, tri_2, par_0p5, par_1, par_2 };
    },
  },
  "FN-08": {
    through: "pin-fin",
    answers: (c) => {
      const pin = run("pin-fin", {
        L: given(input(c, "L") + input(c, "D") / 4, "m"),
        D: given(input(c, "D"), "m"),
        k: input(c, "k"),
        h: input(c, "h"),
        T_b: given(300 + input(c, "theta_b"), "K"),
        T_inf: given(300, "K"),
        tip: "adiabatic",
      });
      const q = pin.number("Q");
      return {
        eta: pin.number("eta"),
        q,
        effectiveness: pin.number("eps_f"),
        R_fin: input(c, "theta_b") / q,
      };
    },
  },
  "FN-11": {
    through: "annular-fin",
    answers: (c) => {
      const [r1, r2, t, N] = [input(c, "r1"), input(c, "r2"), input(c, "t"), input(c, "N")];
      const rise = input(c, "T_b") - input(c, "T_inf");
      const fin = run("annular-fin", {
        r_1: given(r1, "m"),
        r_2: given(r2, "m"),
        t: given(t, "m"),
        k: input(c, "k"),
        h: input(c, "h"),
        T_b: given(input(c, "T_b"), "K"),
        T_inf: given(input(c, "T_inf"), "K"),
        tip: "corrected",
      });
      const between = 2 * Math.PI * r1 * (input(c, "H") - N * t);
      const total = N * fin.number("Q") + input(c, "h") * between * rise;
      return {
        A_t: N * fin.number("A_f") + between,
        q_bare: input(c, "h") * 2 * Math.PI * r1 * input(c, "H") * rise,
        q_exact: total,
        q_published_chart: total,
      };
    },
  },
  "FN-13": {
    through: "straight-fin",
    answers: () => {
      // one profile area L·t, a fin so wide that its edges do not count; Q is largest at the best length
      const profile = 1e-5;
      const fin = (L: number) =>
        run("straight-fin", {
          L: given(L, "m"),
          t: given(profile / L, "m"),
          w: given(1e6, "m"),
          k: 200,
          h: 25,
          tip: "adiabatic",
        });
      const golden = (Math.sqrt(5) - 1) / 2;
      let [low, high] = [0.005, 0.2];
      for (let round = 0; round < 80; round += 1) {
        const [a, b] = [high - golden * (high - low), low + golden * (high - low)];
        if (fin(a).number("Q") > fin(b).number("Q")) high = b;
        else low = a;
      }
      const best = (low + high) / 2;
      return { mL_opt: fin(best).number("m") * best, eta_opt: fin(best).number("eta") };
    },
  },
};
