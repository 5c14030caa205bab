import { Parser } from "expr-eval";
import type { Unit } from "mathjs";
import { besselIScaled, besselKScaled } from "@/lib/numeric/bessel";
import { brent } from "@/lib/numeric/root";
import { choice, number, sourceOf, table } from "@/tests/engine/language-inputs";
import { workings } from "@/tests/engine/language-workings";
import * as hand from "./engine-by-hand";
import {
  byHand,
  compiledRun,
  exprEvalRun,
  math,
  mathjsRun,
  unitsRun,
  type Contestant,
  type Lines,
} from "./engine-contestants";

const finLines: Lines = [
  ["P", "2*(w + t)"],
  ["A_c", "w*t"],
  ["m", "sqrt(h*P/(k*A_c))"],
  ["r", "h/(m*k)"],
  ["G", "sqrt(h*P*k*A_c)*(tanh(m*L) + r)/(1 + r*tanh(m*L))"],
  ["Q", "G*(T_b - T_inf)"],
  ["eta", "G/(h*(P*L + A_c))"],
  ["eps_f", "G/(h*A_c)"],
  ["T_tip", "T_inf + (T_b - T_inf)/(cosh(m*L) + r*sinh(m*L))"],
];
const fin = { L: 0.04, t: 0.002, w: 0.1, k: 200, h: 25, T_b: 373.15, T_inf: 293.15 };

const pipeLines: Lines = [
  ["r_1", "D_in/2 + t_1"],
  ["r_2", "r_1 + t_2"],
  ["r_3", "r_2 + t_3"],
  ["R_i", "1/(pi*D_in*h_in)"],
  ["R_1", "log(2*r_1/D_in)/(2*pi*k_1)"],
  ["R_2", "log(r_2/r_1)/(2*pi*k_2)"],
  ["R_3", "log(r_3/r_2)/(2*pi*k_3)"],
  ["R_o", "1/(2*pi*r_3*h_out)"],
  ["R_l", "R_i + R_1 + R_2 + R_3 + R_o"],
  ["q_l", "(T_fluid - T_amb)/R_l"],
  ["Q", "q_l*L"],
  ["U_out", "1/(R_l*2*pi*r_3)"],
  ["T_0", "T_fluid - q_l*R_i"],
  ["T_1", "T_0 - q_l*R_1"],
  ["T_2", "T_1 - q_l*R_2"],
  ["T_3", "T_2 - q_l*R_3"],
];
const pipe = { T_fluid: 453.15, T_amb: 293.15, D_in: 0.05, h_in: 1000, h_out: 10, L: 12 };
const layers = { t: [0.005, 0.05, 0.001], k: [45, 0.045, 200] };
const pipeScope = {
  ...pipe,
  ...{ t_1: 0.005, t_2: 0.05, t_3: 0.001, k_1: 45, k_2: 0.045, k_3: 200, pi: Math.PI },
};

const touchLines: Lines = [["q_l", "2*pi*k*(T_pipe - T_limit)/log((D + 2*s)/D)"]];
const touch = { D: 0.1143, k: 0.045, T_pipe: 473.15, T_amb: 298.15, h_out: 5, T_limit: 323.15, t_max: 1 };
const touchBody = "(D + 2*s)/2*log((D + 2*s)/D) - k/h_out*(T_pipe - T_limit)/(T_limit - T_amb)";

const annularLines: Lines = [
  ["r_2c", "r_2 + t/2"],
  ["m", "sqrt(2*h/(k*t))"],
  ["a", "m*r_1"],
  ["b", "m*r_2c"],
  ["s", "exp(-2*(b - a))"],
  ["up", "bessel_ke(1, a)*bessel_ie(1, b) - bessel_ie(1, a)*bessel_ke(1, b)*s"],
  ["down", "bessel_ke(0, a)*bessel_ie(1, b) + bessel_ie(0, a)*bessel_ke(1, b)*s"],
  ["eta", "2*r_1/(m*(r_2c^2 - r_1^2))*up/down"],
  ["Q", "eta*h*2*pi*(r_2c^2 - r_1^2)*(T_b - T_inf)"],
  ["T_tip", "T_inf + (T_b - T_inf)*exp(a - b)/(b*down)"],
  ["Bi_t", "h*(t/2)/k"],
];
const annular = { r_1: 0.0125, r_2: 0.0325, t: 0.001, k: 200, h: 25, T_b: 373.15, T_inf: 293.15 };
const bessel = { bessel_ie: besselIScaled, bessel_ke: besselKScaled, pi: Math.PI };

/** SI values as mathjs Units. */
function asUnits(values: Record<string, number>, units: Record<string, string>): Record<string, unknown> {
  return Object.fromEntries(
    Object.entries(values).map(([name, value]) => [
      name,
      units[name] ? math.unit(value, units[name]) : value,
    ]),
  );
}

const finUnits = { L: "m", t: "m", w: "m", k: "W/(m K)", h: "W/(m^2 K)", T_b: "K", T_inf: "K" };
const pipeUnits = {
  ...{ T_fluid: "K", T_amb: "K", D_in: "m", h_in: "W/(m^2 K)", h_out: "W/(m^2 K)", L: "m" },
  ...{ t_1: "m", t_2: "m", t_3: "m", k_1: "W/(m K)", k_2: "W/(m K)", k_3: "W/(m K)" },
};
const annularUnits = { ...finUnits, r_1: "m", r_2: "m" };
const finInputs = [
  ...[number("L", "length", "mm"), number("t", "length", "mm"), number("w", "length", "mm")],
  ...[number("k", "thermal conductivity", "W/(m·K)"), number("h", "heat transfer coefficient", "W/(m²·K)")],
  ...[
    number("T_b", "temperature", "°C"),
    number("T_inf", "temperature", "°C"),
    choice("tip", ["adiabatic", "convecting"]),
  ],
];

export const finSource = sourceOf({
  inputs: finInputs,
  working: `P = 2*(w + t)
A_c = w*t
m = sqrt(h*P/(k*A_c))
r = h/(m*k)
G = sqrt(h*P*k*A_c)*(tip == "convecting" ? (tanh(m*L) + r)/(1 + r*tanh(m*L)) : tanh(m*L))
Q = G*(T_b - T_inf)
eta = G/(h*(tip == "convecting" ? P*L + A_c : P*L))
eps_f = G/(h*A_c)
T_tip = T_inf + (T_b - T_inf)/(tip == "convecting" ? cosh(m*L) + r*sinh(m*L) : cosh(m*L))`,
});

const pipeSource = sourceOf({
  inputs: [
    ...[
      number("T_fluid", "temperature", "°C"),
      number("T_amb", "temperature", "°C"),
      number("D_in", "length", "mm"),
    ],
    ...[
      number("h_in", "heat transfer coefficient", "W/(m²·K)"),
      number("h_out", "heat transfer coefficient", "W/(m²·K)"),
    ],
    number("L", "length", "m"),
    table("layers", [number("t", "length", "mm"), number("k", "thermal conductivity", "W/(m·K)")]),
  ],
  working: `r = prepend(D_in/2 + cumsum(layers.t), D_in/2)
R_i = 1/(pi*D_in*h_in)
R = ln(drop_first(r)/drop_last(r))/(2*pi*layers.k)
D_out = 2*last(r)
R_l = R_i + sum(R) + 1/(pi*D_out*h_out)
q_l = (T_fluid - T_amb)/R_l
Q = q_l*L
U_out = 1/(R_l*pi*D_out)
T_face = T_fluid - q_l*prepend(R_i + cumsum(R), R_i)
T_surface = last(T_face)`,
});

const touchSource = sourceOf({
  inputs: [
    ...[
      number("D", "length", "mm"),
      number("k", "thermal conductivity", "W/(m·K)"),
      number("T_pipe", "temperature", "°C"),
    ],
    ...[number("T_amb", "temperature", "°C"), number("h_out", "heat transfer coefficient", "W/(m²·K)")],
    ...[number("T_limit", "temperature", "°C"), number("t_max", "length", "mm")],
  ],
  working: `t = balance(s, 0, t_max, (D + 2*s)/2*ln((D + 2*s)/D) - k/h_out*(T_pipe - T_limit)/(T_limit - T_amb))
q_l = 2*pi*k*(T_pipe - T_limit)/ln((D + 2*t)/D)`,
});

function touchInterpreted(
  name: string,
  evaluate: (text: string) => (scope: Record<string, number>) => number,
): Contestant {
  const [body, loss] = [evaluate(touchBody), evaluate(touchLines[0]![1])];
  const scope: Record<string, number> = { ...touch, pi: Math.PI, s: 0 };
  return {
    name,
    run(i) {
      scope.h_out = 5 * (1 + (i & 63) * 1e-3);
      scope.s = brent((s) => ((scope.s = s), body(scope)), 0, touch.t_max).x;
      return loss(scope);
    },
  };
}

const unscaled = (f: (n: number, x: number) => number) => (n: number, x: number | Unit) =>
  f(n, typeof x === "number" ? x : x.toNumber("1"));

export interface Template {
  readonly name: string;
  readonly contestants: readonly Contestant[];
  readonly aims: Readonly<Record<string, string>>;
}

const closed = { "by hand": "≤ 1.2", "mathjs numbers": "≥ 40", "mathjs Units": "≥ 500", "expr-eval": "≥ 50" };
const exprEvalText = (lines: Lines): Lines =>
  lines.map(([name, text]) => [name, text.replace(/\bpi\b/g, "PI")] as const);

export const templates: readonly Template[] = [
  {
    name: "straight fin, convecting tip",
    aims: closed,
    contestants: [
      compiledRun(finSource, { ...fin, tip: 1 }, "h", "Q"),
      byHand(hand.straightFin, { ...fin, tip: "convecting" as const }, "h", "Q"),
      mathjsRun(finLines, { ...fin }, "h", 25, "Q"),
      unitsRun(finLines, asUnits(fin, finUnits), "h", 25, "W/(m^2 K)", "eta"),
      exprEvalRun(exprEvalText(finLines), { ...fin }, "h", 25, "Q"),
    ],
  },
  {
    name: "pipe with three layers",
    aims: closed,
    contestants: [
      compiledRun(pipeSource, { ...pipe, "layers.t": layers.t, "layers.k": layers.k }, "h_out", "Q"),
      byHand(hand.insulatedPipe, { ...pipe, layers }, "h_out", "Q"),
      mathjsRun(pipeLines, { ...pipeScope }, "h_out", 10, "Q"),
      unitsRun(pipeLines, asUnits(pipeScope, pipeUnits), "h_out", 10, "W/(m^2 K)", "Q"),
      exprEvalRun(
        exprEvalText(pipeLines).map(([n, text]) => [n, text.replaceAll("log(", "ln(")] as const),
        { ...pipeScope, PI: Math.PI },
        "h_out",
        10,
        "Q",
      ),
    ],
  },
  {
    name: "touch temperature by balance",
    aims: { "by hand": "≤ 1.1" },
    contestants: [
      compiledRun(touchSource, touch, "h_out", "q_l"),
      byHand(hand.touchThickness, touch, "h_out", "q_l"),
      touchInterpreted("mathjs numbers", (text) => {
        const code = math.parse(text).compile();
        return (scope) => code.evaluate(scope) as number;
      }),
      touchInterpreted("expr-eval", (text) => {
        const expression = new Parser().parse(text.replaceAll("log(", "ln(").replace(/\bpi\b/g, "PI"));
        return (scope) => expression.evaluate(scope) as number;
      }),
    ],
  },
  {
    name: "annular fin",
    aims: closed,
    contestants: [
      compiledRun(workings["annular-fin"]!, { ...annular, tip: 1 }, "h", "Q"),
      byHand(hand.annularFin, { ...annular, tip: "corrected" as const }, "h", "Q"),
      mathjsRun(annularLines, { ...annular, ...bessel }, "h", 25, "Q"),
      unitsRun(
        annularLines,
        {
          ...asUnits(annular, annularUnits),
          bessel_ie: unscaled(besselIScaled),
          bessel_ke: unscaled(besselKScaled),
          pi: Math.PI,
        },
        "h",
        25,
        "W/(m^2 K)",
        "eta",
      ),
      exprEvalRun(annularLines, { ...annular, ...bessel }, "h", 25, "Q"),
    ],
  },
];
