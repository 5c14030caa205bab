import { besselIScaled, besselKScaled } from "@/lib/numeric/bessel";
import { brent } from "@/lib/numeric/root";

/** The formulas of four templates as an engineer who programs would write them: SI in, results out. */

export interface FinInputs {
  L: number;
  t: number;
  w: number;
  k: number;
  h: number;
  T_b: number;
  T_inf: number;
  tip: "adiabatic" | "convecting";
}

export function straightFin(i: FinInputs) {
  const P = 2 * (i.w + i.t);
  const A_c = i.w * i.t;
  const m = Math.sqrt((i.h * P) / (i.k * A_c));
  const r = i.h / (m * i.k);
  const mL = m * i.L;
  const tanh = Math.tanh(mL);
  const convecting = i.tip === "convecting";
  const G = Math.sqrt(i.h * P * i.k * A_c) * (convecting ? (tanh + r) / (1 + r * tanh) : tanh);
  const dT = i.T_b - i.T_inf;
  return {
    P,
    A_c,
    m,
    r,
    G,
    Q: G * dT,
    eta: G / (i.h * (convecting ? P * i.L + A_c : P * i.L)),
    eps_f: G / (i.h * A_c),
    T_tip: i.T_inf + dT / (convecting ? Math.cosh(mL) + r * Math.sinh(mL) : Math.cosh(mL)),
  };
}

export interface PipeInputs {
  T_fluid: number;
  T_amb: number;
  D_in: number;
  h_in: number;
  h_out: number;
  L: number;
  layers: { t: number[]; k: number[] };
}

export function insulatedPipe(i: PipeInputs) {
  const { t, k } = i.layers;
  const R_i = 1 / (Math.PI * i.D_in * i.h_in);
  const r = [i.D_in / 2];
  const R: number[] = [];
  let total = 0;
  for (let n = 0; n < t.length; n++) {
    const inner = r[n]!;
    const outer = inner + t[n]!;
    const resistance = Math.log(outer / inner) / (2 * Math.PI * k[n]!);
    r.push(outer);
    R.push(resistance);
    total += resistance;
  }
  const D_out = 2 * r[t.length]!;
  const R_l = R_i + total + 1 / (Math.PI * D_out * i.h_out);
  const q_l = (i.T_fluid - i.T_amb) / R_l;
  let temperature = i.T_fluid - q_l * R_i;
  const T_face = [temperature];
  for (const resistance of R) {
    temperature -= q_l * resistance;
    T_face.push(temperature);
  }
  return {
    r,
    R_i,
    R,
    D_out,
    R_l,
    q_l,
    Q: q_l * i.L,
    U_out: 1 / (R_l * Math.PI * D_out),
    T_face,
    T_surface: temperature,
  };
}

export interface TouchInputs {
  D: number;
  k: number;
  T_pipe: number;
  T_amb: number;
  h_out: number;
  T_limit: number;
  t_max: number;
}

export function touchThickness(i: TouchInputs) {
  const wanted = ((i.k / i.h_out) * (i.T_pipe - i.T_limit)) / (i.T_limit - i.T_amb);
  const { D } = i;
  const t = brent((s) => ((D + 2 * s) / 2) * Math.log((D + 2 * s) / D) - wanted, 0, i.t_max).x;
  return { t, q_l: (2 * Math.PI * i.k * (i.T_pipe - i.T_limit)) / Math.log((D + 2 * t) / D) };
}

export interface AnnularInputs {
  r_1: number;
  r_2: number;
  t: number;
  k: number;
  h: number;
  T_b: number;
  T_inf: number;
  tip: "adiabatic" | "corrected";
}

export function annularFin(i: AnnularInputs) {
  const r_2c = i.tip === "corrected" ? i.r_2 + i.t / 2 : i.r_2;
  const m = Math.sqrt((2 * i.h) / (i.k * i.t));
  const a = m * i.r_1;
  const b = m * r_2c;
  const s = Math.exp(-2 * (b - a));
  const I1b = besselIScaled(1, b);
  const K1b = besselKScaled(1, b);
  const up = besselKScaled(1, a) * I1b - besselIScaled(1, a) * K1b * s;
  const down = besselKScaled(0, a) * I1b + besselIScaled(0, a) * K1b * s;
  const area = r_2c ** 2 - i.r_1 ** 2;
  const eta = (((2 * i.r_1) / (m * area)) * up) / down;
  const dT = i.T_b - i.T_inf;
  return {
    r_2c,
    m,
    a,
    b,
    s,
    up,
    down,
    eta,
    Q: eta * i.h * 2 * Math.PI * area * dT,
    T_tip: i.T_inf + (dT * Math.exp(a - b)) / (b * down),
    Bi_t: (i.h * (i.t / 2)) / i.k,
  };
}
