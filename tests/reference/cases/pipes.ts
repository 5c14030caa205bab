import { input, inputs, type CaseRuns } from "../reference-case";
import { given, ownWorking, refuses, run } from "../shelf";

const held = 1e12; // coefficient that holds a face at the fluid's temperature
const layer = (t: number, k: number) => ({ t: given(t, "m"), k });

/** Runs the insulated pipe with radii from the bore outward. */
function pipe(
  radii: readonly number[],
  k: readonly number[],
  [h_in, h_out]: readonly [number, number],
  [T_fluid, T_amb]: readonly [number, number],
) {
  return run("insulated-pipe", {
    D_in: given(2 * (radii[0] ?? NaN), "m"),
    h_in,
    h_out,
    T_fluid: given(T_fluid, "K"),
    T_amb: given(T_amb, "K"),
    layers: k.map((value, i) => layer((radii[i + 1] ?? NaN) - (radii[i] ?? NaN), value)),
  });
}

/** Radiative coefficient of a grey surface among surroundings. */
const radiation = (eps: number, T: number, T_amb: number) =>
  eps * 5.670374419e-8 * (T ** 2 + T_amb ** 2) * (T + T_amb);

export const pipeRuns: CaseRuns = {
  "CY-01": {
    through: "insulated-pipe",
    answers: (c) => {
      const tube = pipe(
        [input(c, "r1"), input(c, "r2"), input(c, "r3")],
        [input(c, "k1"), input(c, "k2")],
        [held, held],
        [input(c, "T1"), input(c, "T3")],
      );
      return { q_per_m: tube.number("q_l"), T2: tube.list("T_face")[1] ?? NaN };
    },
  },
  "CY-02": {
    through: "insulated-pipe",
    answers: (c) => {
      const steam = pipe(
        [input(c, "r1"), input(c, "r2"), input(c, "r3")],
        [input(c, "k_pipe"), input(c, "k_ins")],
        [input(c, "h1"), input(c, "h2")],
        [input(c, "T_i"), input(c, "T_o")],
      );
      const [bore = NaN, between = NaN, outside = NaN] = steam.list("T_face");
      return { q_per_m: steam.number("q_l"), dT_pipe: bore - between, dT_ins: between - outside };
    },
  },
  "CY-03": {
    through: "insulated-pipe",
    answers: (c) => {
      const lagged = pipe(
        [input(c, "r1"), input(c, "r2")],
        [input(c, "k")],
        [held, input(c, "h")],
        [input(c, "T_pipe"), input(c, "T_amb")],
      );
      return { q_per_m: lagged.number("q_l"), T_outer: lagged.number("T_surface") };
    },
  },
  "CY-04": {
    through: "insulated-pipe",
    answers: (c) => {
      const [T_amb, eps] = [input(c, "T_amb"), input(c, "emissivity")];
      const at = (h_rad: number) =>
        pipe(
          [input(c, "r1"), input(c, "r2")],
          [input(c, "k")],
          [held, input(c, "h_conv") + h_rad],
          [input(c, "T_pipe"), T_amb],
        );
      let h_rad = 5;
      for (let round = 0; round < 60; round += 1) {
        h_rad = radiation(eps, at(h_rad).number("T_surface"), T_amb);
      }
      const lagged = at(h_rad);
      return { q_per_m: lagged.number("q_l"), T_outer: lagged.number("T_surface"), h_rad };
    },
  },
  "CY-08": {
    through: "own working",
    // ISO 12241 table, from memory: horizontal pipe C_H, vertical C_V by surface
    answers: (c) => {
      const h = (C: number, slope: number) =>
        ownWorking(`h = "${C} W/(m²·K)" + "${slope} W/(m²·K²)"*"${input(c, "dT")} ΔK"`).number("h");
      const slopeOfRadiation = (eps: number) =>
        ownWorking(`C = ${2.16 + 6.74 * eps}*"1 W/(m²·K)"`).number("C");
      return {
        h_horizontal: h(8.5, 0.05),
        h_vertical: h(8.7, 0.09),
        C_H_bright_aluminium: slopeOfRadiation(0.05),
        C_H_galvanised: h(4, 0),
        C_H_austenitic: slopeOfRadiation(0.15),
      };
    },
  },
  "CY-09": {
    through: "own working",
    answers: (c) => {
      const axial = ownWorking(`
mc = "${input(c, "m_dot")} kg/s"*"${input(c, "c_p")} J/(kg·K)"
T_in = "${input(c, "T_in")} K"
T_amb = "${input(c, "T_amb")} K"
T_out = T_amb + (T_in - T_amb)*exp(-"${input(c, "U_l")} W/(m·K)"*"${input(c, "L")} m"/mc)
Q = mc*(T_in - T_out)`);
      return { T_out: axial.number("T_out"), Q: axial.number("Q") };
    },
  },
  "CY-10": {
    through: "insulated-pipe, lumped-cooldown",
    answers: (c) => {
      const [T0, T1, T_amb] = [input(c, "T0"), input(c, "T1"), input(c, "T_amb")];
      const lagged = pipe(
        [input(c, "r1"), input(c, "r2")],
        [input(c, "k")],
        [held, input(c, "h")],
        [T0, T_amb],
      );
      const U_l = 1 / lagged.number("R_l");
      // one metre as a lumped body: its heat capacity over U_l is the time constant
      const capacity = input(c, "m_w") * input(c, "c_w") + input(c, "m_p") * input(c, "c_p");
      const body = run("lumped-cooldown", {
        rho: 1000,
        c: 1000,
        k: 400,
        V: given(capacity / 1e6, "m³"),
        A_s: given(1, "m²"),
        h: U_l,
        T_0: given(T0, "K"),
        T_inf: given(T_amb, "K"),
      });
      return { t: body.number("tau") * Math.log((T0 - T_amb) / (T1 - T_amb)), U_l };
    },
  },
  "CY-13": {
    through: "insulated-pipe",
    answers: (c) => {
      const r = inputs(c, "r");
      const three = pipe(
        r,
        inputs(c, "k"),
        [input(c, "h_i"), input(c, "h_o")],
        [input(c, "T_i"), input(c, "T_o")],
      );
      const U_outer = three.number("U_out");
      return {
        q_per_m: three.number("q_l"),
        T_ins_out: three.list("T_face")[2] ?? NaN,
        T_surface: three.number("T_surface"),
        U_outer,
        U_inner: (U_outer * (r[3] ?? NaN)) / (r[0] ?? NaN),
      };
    },
  },
  "CY-14": {
    through: "pipe-surface-balance",
    answers: (c) => {
      const [D, T_s, T_amb] = [input(c, "D"), input(c, "T_s"), input(c, "T_amb")];
      const bare = run("pipe-surface-balance", {
        D: given(D, "m"),
        t: 0,
        T_pipe: given(T_s, "K"),
        T_amb: given(T_amb, "K"),
        eps: input(c, "emissivity"),
      });
      const h_rad = bare.number("h_r");
      return { q_per_m: Math.PI * D * (input(c, "h_conv") + h_rad) * (T_s - T_amb), h_rad };
    },
  },
  "CY-15": {
    through: "pipe-surface-balance",
    answers: (c) => {
      const names = ["half", "2", "6", "12"];
      const rises = [
        [50, "50"],
        [157.1, "157p1"],
        [267.9, "267p9"],
      ] as const;
      return Object.fromEntries(
        inputs(c, "OD").flatMap((D, i) =>
          rises.map(([rise, name]) => {
            const bare = run("pipe-surface-balance", {
              D: given(D, "m"),
              t: 0,
              T_pipe: given(70 + rise, "°F"),
              T_amb: given(70, "°F"),
              v: 0,
              eps: input(c, "emissivity"),
            });
            return [`NPS_${names[i]}_dT${name}`, bare.number("q_l") / (rise / 1.8)];
          }),
        ),
      );
    },
  },
  "CR-01": {
    through: "critical-radius",
    answers: (c) => criticalRadius(input(c, "k"), input(c, "h"), input(c, "r_i")),
  },
  "CR-03": {
    through: "critical-radius",
    answers: (c) => {
      const perMetre = input(c, "Q") / input(c, "L");
      const rise = 75;
      const wire = run("critical-radius", {
        D: given(input(c, "D_wire"), "m"),
        t: given(input(c, "t_cover"), "m"),
        k: input(c, "k"),
        h: input(c, "h"),
        T_s: given(input(c, "T_amb") + rise, "K"),
        T_amb: given(input(c, "T_amb"), "K"),
      });
      return {
        T_interface: input(c, "T_amb") + (rise * perMetre) / wire.number("q_ins"),
        r_cr: wire.number("r_crit"),
      };
    },
  },
  "CR-04": {
    through: "critical-radius, own working",
    answers: (c) => {
      const r_cr = run("critical-radius", { k: input(c, "k"), h: input(c, "h") }).number("r_crit_sphere");
      const ball = ownWorking(`
k = "${input(c, "k")} W/(m·K)"
h = "${input(c, "h")} W/(m²·K)"
loss(r) = "${input(c, "dT")} ΔK"/((1/"${input(c, "r_i")} m" - 1/r)/(4*pi*k) + 1/(4*pi*r^2*h))
r_best = argmin(r, "${input(c, "r_i")} m", "0.1 m", -loss(r))
q_best = loss(r_best)`);
      if (Math.abs(ball.number("r_best") / r_cr - 1) > 1e-6)
        throw new Error("The loss is largest elsewhere.");
      return { r_cr, q_at_cr: ball.number("q_best") };
    },
  },
  "CR-06": {
    through: "critical-radius",
    answers: (c) => criticalRadius(input(c, "k"), input(c, "h"), input(c, "r_i")),
  },
  "SP-02": {
    through: "spherical-shell",
    answers: (c) => {
      const [a, k, dT] = [input(c, "a"), input(c, "k"), input(c, "dT")];
      const shell = run("spherical-shell", {
        D_in: given(2 * a, "m"),
        D_out: given(1e16, "m"),
        k,
        T_in: given(300 + dT, "K"),
        T_out: given(300, "K"),
      });
      const q = shell.number("Q");
      return { q, Nu_D: ((q / (4 * Math.PI * a ** 2 * dT)) * 2 * a) / k };
    },
  },
  "SP-03": {
    through: "spherical-shell",
    answers: (c) => {
      const r = inputs(c, "r");
      const shells = inputs(c, "k").map((k, i) =>
        run("spherical-shell", { D_in: given(2 * r[i]!, "m"), D_out: given(2 * r[i + 1]!, "m"), k }).number(
          "R",
        ),
      );
      const film = (radius: number, h: number) => 1 / (4 * Math.PI * radius ** 2 * h);
      const outside = film(r[2]!, input(c, "h_o"));
      const R = film(r[0]!, input(c, "h_i")) + shells[0]! + shells[1]! + outside;
      const q = (input(c, "T_i") - input(c, "T_o")) / R;
      return { q, T_s_out: input(c, "T_o") + q * outside };
    },
  },
  "SP-04": {
    through: "spherical-shell",
    answers: (c) => ({
      q: run("spherical-shell", {
        D_in: given(2 * input(c, "r1"), "m"),
        D_out: given(2 * input(c, "r2"), "m"),
        k: input(c, "k"),
        T_in: given(300 + input(c, "dT"), "K"),
        T_out: given(300, "K"),
      }).number("Q"),
    }),
  },
  "ED-02": {
    through: "pipe-wall",
    answers: (c) => ({
      rejected:
        refuses(() =>
          run("pipe-wall", { D_in: given(2 * input(c, "r1"), "m"), D_out: given(2 * input(c, "r2"), "m") }),
        ) && refuses(() => run("spherical-shell", { D_in: given(600, "mm"), D_out: given(500, "mm") })),
    }),
  },
};

function criticalRadius(k: number, h: number, r_i: number) {
  const thin = run("critical-radius", { D: given(2 * r_i, "m"), t: given(r_i / 1000, "m"), k, h });
  return {
    r_cr: thin.number("r_crit"),
    insulation_helps_from_start: thin.number("q_ins") < thin.number("q_bare"),
  };
}
