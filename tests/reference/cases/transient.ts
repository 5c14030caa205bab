import { input, inputs, type CaseRun, type CaseRuns } from "../reference-case";
import { given, ownWorking, run, stated, type Outcome } from "../shelf";

type Shape = "wall-step" | "cylinder-step" | "sphere-step";
const members = {
  "wall-step": { extent: "L", place: "x" },
  "cylinder-step": { extent: "r_o", place: "r" },
  "sphere-step": { extent: "r_o", place: "r" },
} as const;

/** Body of 0.1 m with k = 1 W/(m·K) and ρc = 1 MJ/(m³·K): Bi = h/10, Fo = time/10⁴ s. `at` is the place over the extent. */
function step(shape: Shape, Bi: number, Fo: number, at = 0): Outcome {
  const { extent, place } = members[shape];
  return run(shape, {
    [extent]: given(0.1, "m"),
    [place]: given(at * 0.1, "m"),
    k: 1,
    rho: 1000,
    c: 1000,
    h: 10 * Bi,
    T_0: 1,
    T_inf: 0,
    time: given(1e4 * Fo, "s"),
  });
}
const theta = (shape: Shape, Bi: number, Fo: number, at = 0) => step(shape, Bi, Fo, at).number("theta");

/** First root and coefficient of the series, from two late times at which one term is left. */
function firstTerm(shape: Shape, Bi: number) {
  const squared = Math.log(theta(shape, Bi, 2) / theta(shape, Bi, 3));
  return { zeta: Math.sqrt(squared), C: theta(shape, Bi, 2) * Math.exp(2 * squared) };
}

const oneTermTable = (shape: Shape): CaseRun => ({
  through: shape,
  answers: (c) =>
    Object.fromEntries(
      inputs(c, "Bi").flatMap((Bi) => {
        const { zeta, C } = firstTerm(shape, Bi);
        const name = String(Bi).replace(".", "p");
        return [
          [`zeta1_${name}`, zeta],
          [`C1_${name}`, C],
        ];
      }),
    ),
});

const fullSeries = (shape: Shape): CaseRun => ({
  through: shape,
  answers: (c) => {
    const Bi = input(c, "Bi");
    const { zeta, C } = firstTerm(shape, Bi);
    const names: Readonly<Record<string, string>> = { "0.05": "0p05", "0.1": "0p1", "1": "1p0" };
    return {
      ...Object.fromEntries(
        inputs(c, "Fo").flatMap((Fo) => {
          const name = names[String(Fo)];
          const centre = step(shape, Bi, Fo);
          return [
            [`theta0_${name}`, centre.number("theta")],
            [`thetas_${name}`, theta(shape, Bi, Fo, 1)],
            [`Q_Q0_${name}`, centre.number("fraction")],
          ];
        }),
      ),
      oneterm_theta0_0p05: C * Math.exp(-(zeta ** 2) * 0.05),
    };
  },
});

/** Thick body with ρ = 1000 kg/m³ and the specific heat that gives the wanted diffusivity. */
function thick(a: number, k: number, x: number, time: number, surface: Record<string, number | string>) {
  const kelvin = Object.fromEntries(
    Object.entries(surface).map(([name, value]) => [
      name,
      name.startsWith("T_") && typeof value === "number" ? given(value, "K") : value,
    ]),
  );
  return run("thick-body-step", {
    k,
    rho: 1000,
    c: k / (a * 1000),
    x: given(x, "m"),
    time: given(time, "s"),
    b: given(100, "m"),
    ...kelvin,
  });
}

export const transientRuns: CaseRuns = {
  "TR-01": {
    through: "lumped-cooldown",
    answers: (c) => {
      const [h, rho, specific, tau] = ["h", "rho", "c", "tau"].map((name) => input(c, name));
      const length = ((h ?? NaN) * (tau ?? NaN)) / ((rho ?? NaN) * (specific ?? NaN));
      const junction = (time: number) =>
        run("lumped-cooldown", {
          rho: rho ?? NaN,
          c: specific ?? NaN,
          k: input(c, "k"),
          V: given(length, "m³"),
          A_s: given(1, "m²"),
          h: h ?? NaN,
          T_0: given(input(c, "T_i"), "K"),
          T_inf: given(input(c, "T_inf"), "K"),
          time: given(time, "s"),
        });
      const time = bisect(0, 60, (t) => junction(t).number("T") - input(c, "T"));
      // V/A of a sphere is a sixth of its diameter
      return { D: (6 * length) / junction(1).number("tau"), t: time, Bi: junction(1).number("Bi") };
    },
  },
  "TR-02": {
    through: "thick-body-step",
    answers: (c) => {
      const [a, time] = [input(c, "alpha"), input(c, "t")];
      const at = (x: number) =>
        thick(a, 0.5, x, time, {
          T_0: input(c, "T_i"),
          case: "surface_temperature",
          T_s: input(c, "T_s"),
        }).number("T");
      const x = bisect(0.1, 2, (depth) => at(depth) - input(c, "T"));
      return { x, eta: x / (2 * Math.sqrt(a * time)) };
    },
  },
  "TR-03": {
    through: "thick-body-step",
    answers: (c) => {
      const body = thick(input(c, "alpha"), input(c, "k"), input(c, "x"), input(c, "t"), {
        T_0: input(c, "T_i"),
        case: "surface_temperature",
        T_s: input(c, "T_s"),
      });
      return { T: body.number("T"), q_s: body.number("q_surface") };
    },
  },
  "TR-04": {
    through: "thick-body-step",
    answers: (c) => {
      const at = (x: number) =>
        thick(input(c, "alpha"), input(c, "k"), x, input(c, "t"), {
          T_0: input(c, "T_i"),
          case: "surface_flux",
          q_s: input(c, "q"),
        }).number("T");
      return { T_s: at(0), T: at(input(c, "x")) };
    },
  },
  "TR-05": {
    through: "thick-body-step",
    answers: (c) => {
      const at = (x: number) =>
        thick(input(c, "alpha"), input(c, "k"), x, input(c, "t"), {
          T_0: input(c, "T_i"),
          case: "convection",
          T_s: input(c, "T_inf"),
          h: input(c, "h"),
        }).number("T");
      return { T_s: at(0), T: at(input(c, "x")) };
    },
  },
  "TR-07": oneTermTable("wall-step"),
  "TR-08": oneTermTable("cylinder-step"),
  "TR-09": oneTermTable("sphere-step"),
  "TR-10": fullSeries("wall-step"),
  "TR-11": fullSeries("cylinder-step"),
  "TR-12": fullSeries("sphere-step"),
  "TR-15": {
    through: "wall-step",
    answers: (c) => {
      const [L, k, rho, alpha, h] = ["L", "k", "rho", "alpha", "h"].map((name) => input(c, name));
      const specific = (k ?? NaN) / ((rho ?? NaN) * (alpha ?? NaN));
      const at = (x: number) =>
        run("wall-step", {
          L: given(L ?? NaN, "m"),
          x: given(x, "m"),
          k: k ?? NaN,
          rho: rho ?? NaN,
          c: specific,
          h: h ?? NaN,
          T_0: given(input(c, "T_i"), "K"),
          T_inf: given(input(c, "T_inf"), "K"),
          time: given(input(c, "t"), "s"),
        });
      const [middle, face] = [at(0), at(L ?? NaN)];
      const stored = (rho ?? NaN) * input(c, "c") * Math.PI * input(c, "D") * (L ?? NaN);
      return {
        Bi: middle.number("Bi"),
        Fo: middle.number("Fo"),
        T_0: middle.number("T"),
        T_L: face.number("T"),
        q: (h ?? NaN) * (face.number("T") - input(c, "T_inf")),
        Q_per_m: middle.number("fraction") * stored * (input(c, "T_i") - input(c, "T_inf")),
        T_0_exact: middle.number("T"),
        T_L_exact: face.number("T"),
      };
    },
  },
  "TR-17": {
    through: "wall-step, cylinder-step",
    answers: (c) => ({
      theta:
        theta("wall-step", input(c, "Bi_wall"), input(c, "Fo_wall")) *
        theta("cylinder-step", input(c, "Bi_cyl"), input(c, "Fo_cyl")),
    }),
  },
  "TR-19": {
    through: "own working",
    answers: (c) => {
      const ground = ownWorking(`
a = "${input(c, "alpha")} m²/s"
depth(period) = sqrt(a*period/pi)
delta_day = depth("1 d")
delta_year = depth("365 d")
z = "${input(c, "z")} m"
amplitude = "${input(c, "amplitude")} ΔK"*exp(-z/delta_year)
lag = z/delta_year*"365 d"/(2*pi)`);
      return {
        delta_day: ground.number("delta_day"),
        delta_year: ground.number("delta_year"),
        amp_year_2m: ground.number("amplitude"),
        lag_year_2m: ground.number("lag"),
      };
    },
  },
  "TR-20": {
    through: "lumped-cooldown, sphere-step",
    answers: (c) => {
      const [Bi, Fo] = [input(c, "Bi_r"), input(c, "Fo")];
      const lumped = run("lumped-cooldown", {
        rho: 1000,
        c: 1000,
        k: 1,
        V: given((4 / 3) * Math.PI * 1e-3, "m³"),
        A_s: given(4 * Math.PI * 1e-2, "m²"),
        h: 10 * Bi,
        T_0: given(301, "K"),
        T_inf: given(300, "K"),
        time: given(1e4 * Fo, "s"),
      });
      return {
        theta_lumped: lumped.number("T") - 300,
        theta0_exact: theta("sphere-step", Bi, Fo),
        Bi_char: lumped.number("Bi"),
      };
    },
  },
  "RT-01": {
    through: "lumped-cooldown, text",
    answers: () => ({ Bi_limit: stated("lumped-cooldown", /Bi > ([\d.]+)/)[0] ?? NaN }),
  },
  "RT-02": {
    through: "wall-step, text",
    answers: () => {
      const [limit = NaN] = stated("wall-step", /less than about 2 % above Fo = ([\d.]+)/);
      // the rule holds for the series itself, at any Biot number
      for (const Bi of [0.1, 1, 10, 100]) {
        const { zeta, C } = firstTerm("wall-step", Bi);
        const error = (C * Math.exp(-(zeta ** 2) * limit)) / theta("wall-step", Bi, limit) - 1;
        if (Math.abs(error) > 0.02) throw new Error(`One term errs by ${error} at Bi = ${Bi}.`);
      }
      return { Fo_limit: limit };
    },
  },
  "RT-07": {
    through: "thick-body-step, text",
    answers: () => ({ Fo_limit: stated("thick-body-step", /stays below about ([\d.]+)/)[0] ?? NaN }),
  },
};

function bisect(low: number, high: number, f: (x: number) => number): number {
  const rises = f(low) < 0;
  let [a, b] = [low, high];
  for (let i = 0; i < 60; i += 1) {
    const middle = (a + b) / 2;
    if (f(middle) < 0 === rises) a = middle;
    else b = middle;
  }
  return (a + b) / 2;
}
