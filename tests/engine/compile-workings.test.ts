import { describe, expect, it } from "vitest";
import { workings } from "./language-workings";
import * as own from "./oracle/numerics";
import { constantReader, linearReader, TestProgram, type Given } from "./program-of";

/** Values by hand: the same formulas written in TypeScript with the plain numerics of the oracle. */

const compiled = (slug: string): TestProgram => {
  const source = workings[slug];
  if (!source) throw new Error(`The working ${slug} is missing.`);
  return new TestProgram(source);
};

function near(got: unknown, wanted: number, relative = 1e-12): void {
  if (typeof got !== "number") throw new Error("A number was expected.");
  expect(Math.abs(got - wanted), `${got} against ${wanted}`).toBeLessThanOrEqual(relative * Math.abs(wanted));
}

const sigma = 5.670374419184429e-8;
const body: Given = { k: 45, rho: 7800, c: 470, T_0: 873.15, T_inf: 293.15 };

describe("values of the eight workings by hand", () => {
  it.each([1e-6, 0.02, 1, 50, 1e6])("meets the series of the plane wall at Bi %d", (Bi) => {
    const [L, x, time] = [0.05, 0.02, 300];
    const h = (Bi * 45) / L;
    const Fo = (45 / (7800 * 470)) * (time / L ** 2);
    let theta = 0;
    let rest = 0;
    for (let n = 1; n <= 24; n++) {
      const z = own.bisect(
        (u) => u * Math.sin(u) - Bi * Math.cos(u),
        (n - 1) * Math.PI,
        (n - 0.5) * Math.PI,
      )!;
      theta +=
        ((4 * Math.sin(z)) / (2 * z + Math.sin(2 * z))) * Math.exp(-z * z * Fo) * Math.cos((z * x) / L);
      rest += ((2 * Bi ** 2) / (z ** 2 * (z ** 2 + Bi + Bi ** 2))) * Math.exp(-z * z * Fo);
    }
    const values = compiled("wall-step").run({ ...body, L, x, h, time });
    near(values.theta, theta, 1e-10);
    near(values.T, 293.15 + theta * 580, 1e-10);
    expect(values.fraction).toBeCloseTo(1 - rest, 9);
  });

  it("does not evaluate the series of the plane wall at time 0", () => {
    const program = compiled("wall-step");
    const values = program.run({ ...body, L: 0.05, x: 0.02, h: 500, time: 0 });
    expect(values).toMatchObject({ theta: 1, fraction: 0 });
    const fuelAfter = program.frame.fuel;
    program.run({ ...body, L: 0.05, x: 0.02, h: 500, time: 300 });
    expect(program.frame.fuel).toBeLessThan(fuelAfter);
  });

  it("meets the series of the long cylinder", () => {
    const [r_o, r, h, time] = [0.04, 0.01, 800, 60];
    const Bi = (h * r_o) / 45;
    const Fo = (45 / (7800 * 470)) * (time / r_o ** 2);
    let theta = 0;
    for (let n = 1; n <= 24; n++) {
      const from = n === 1 ? 0 : own.besselJZero(1, n - 1);
      const z = own.bisect(
        (u) => u * own.besselJ(1, u) - Bi * own.besselJ(0, u),
        from,
        own.besselJZero(0, n),
      )!;
      const [j0, j1] = [own.besselJ(0, z), own.besselJ(1, z)];
      theta += ((2 * j1) / (z * (j0 ** 2 + j1 ** 2))) * Math.exp(-z * z * Fo) * own.besselJ(0, (z * r) / r_o);
    }
    near(compiled("cylinder-step").run({ ...body, r_o, r, h, time }).theta, theta, 1e-9);
  });

  it("settles the faces of a furnace lining whose conductivities vary", () => {
    const [T_hot, T_amb, h_c, eps] = [1473.15, 298.15, 8, 0.9];
    const layers = [
      { t: 0.23, at0: 0.9, slope: 5e-4 },
      { t: 0.114, at0: 0.15, slope: 1.2e-4 },
      { t: 0.05, at0: 0.03, slope: 1e-4 },
    ];
    // The shell temperature fixes the flux; the integral of k over each layer then gives the hot face.
    const hotFace = (shell: number): number => {
      const h_r = eps * sigma * (shell ** 2 + T_amb ** 2) * (shell + T_amb);
      const q = (shell - T_amb) * (h_c + h_r);
      return [...layers].reverse().reduce((cold, { t, at0, slope }) => {
        const needed = q * t + at0 * cold + (slope * cold ** 2) / 2;
        return (-at0 + Math.sqrt(at0 ** 2 + 2 * slope * needed)) / slope;
      }, shell);
    };
    const shell = own.bisect((s) => hotFace(s) - T_hot, T_amb, 900)!;
    const values = compiled("furnace-lining").run({
      A: 12,
      T_allow: 333.15,
      T_hot,
      T_amb,
      h_c,
      eps,
      "layers.t": layers.map(({ t }) => t),
      "layers.material": layers.map(({ at0, slope }) => linearReader(at0, slope)),
    });
    near(values.T_shell, shell, 1e-10);
    near(values.q, (shell - T_amb) * (h_c + eps * sigma * (shell ** 2 + T_amb ** 2) * (shell + T_amb)), 1e-9);
    near(values.Q, 12 * (values.q as number));
    expect(values.T_face).toHaveLength(4);
    expect((values.T_face as number[])[0]).toBe(T_hot);
  });

  it("balances the surface of an insulated pipe", () => {
    const [D, t, T_pipe, T_amb, v, eps] = [0.1143, 0.05, 473.15, 293.15, 2, 0.3];
    const air = {
      k: (T: number) => 0.0263 * (T / 300) ** 0.8,
      mu: (T: number) => 1.85e-5 * (T / 300) ** 0.7,
      c: (T: number) => 1006 + 0.02 * (T - 300),
    };
    const D_o = D + 2 * t;
    const through = (s: number): number =>
      (2 * Math.PI * (T_pipe - s) * (0.02 + 1e-4 * ((T_pipe + s) / 2))) / Math.log(D_o / D);
    const coefficients = (s: number): { h_c: number; h_r: number } => {
      const film = (s + T_amb) / 2;
      const nu = (air.mu(film) * 8.31446261815324 * film) / (101325 * 28.9644e-3);
      const pr = (air.mu(film) * air.c(film)) / air.k(film);
      const ra = (9.80665 * Math.abs(s - T_amb) * D_o ** 3 * pr) / (film * nu ** 2);
      const re = (v * D_o) / nu;
      const natural = (0.6 + (0.387 * ra ** (1 / 6)) / (1 + (0.559 / pr) ** (9 / 16)) ** (8 / 27)) ** 2;
      const forced =
        0.3 +
        ((0.62 * Math.sqrt(re) * pr ** (1 / 3)) / (1 + (0.4 / pr) ** (2 / 3)) ** (1 / 4)) *
          (1 + (re / 282000) ** (5 / 8)) ** (4 / 5);
      return {
        h_c: (air.k(film) / D_o) * Math.max(natural, forced),
        h_r: eps * sigma * (s ** 2 + T_amb ** 2) * (s + T_amb),
      };
    };
    const given = (s: number): number => {
      const { h_c, h_r } = coefficients(s);
      return Math.PI * D_o * (h_c + h_r) * (s - T_amb);
    };
    const surface = own.bisect((s) => through(s) - given(s), T_amb, T_pipe)!;
    const airReader = {
      value: (property: string, T: number) => air[property as keyof typeof air](T),
      mean: () => NaN,
      integral: () => NaN,
    };
    const values = compiled("pipe-surface-balance").run({
      ...{ D, t, T_pipe, T_amb, v, eps, T_allow: 333.15 },
      air: airReader,
      insulation: linearReader(0.02, 1e-4),
    });
    near(values.T_surface, surface, 1e-11);
    near(values.q_l, through(surface), 1e-9);
    near(values.h_c, coefficients(surface).h_c, 1e-10);
    near(values.h_r, coefficients(surface).h_r, 1e-10);
    near(values.k_mean, 0.02 + 1e-4 * ((T_pipe + surface) / 2), 1e-11);
  });

  it("finds the insulation thickness of least cost", () => {
    const [D, k, T_pipe, T_amb, h_out, hours, eta] = [0.1143, 0.045, 473.15, 293.15, 10, 8000 * 3600, 0.9];
    const [price, c_vol, c_area, annuity, t_max] = [60 / 3.6e9, 900, 25, 0.12, 0.3];
    const loss = (s: number): number =>
      (T_pipe - T_amb) /
      (Math.log((D + 2 * s) / D) / (2 * Math.PI * k) + 1 / (Math.PI * (D + 2 * s) * h_out));
    const cost = (s: number): number =>
      (loss(s) * hours * price) / eta +
      ((annuity * c_vol * Math.PI) / 4) * ((D + 2 * s) ** 2 - D ** 2) +
      (s > 0 ? annuity * c_area * Math.PI * (D + 2 * s) : 0);
    const thickness = own.scanMinimum(cost, 0, t_max);
    const values = compiled("economic-thickness").run({
      ...{ D, k, T_pipe, T_amb, h_out, hours, eta, price, c_vol, c_area, annuity, t_max },
    });
    near(values.t, thickness, 1e-6);
    near(values.cost_total, cost(thickness), 1e-12);
    near(values.q_l, loss(values.t as number));
  });

  it("gives the annular fin of the catalogue's defaults", () => {
    const fin = { r_1: 0.0125, r_2: 0.0325, t: 0.001, k: 200, h: 25, T_b: 373.15, T_inf: 293.15 };
    const values = compiled("annular-fin").run({ ...fin, tip: 1 });
    // An independent evaluation of the same method (tip at r_2 + t/2), to its six digits.
    near(values.eta, 0.946326, 1e-6);
    near(values.Q, 11.0922, 1e-5);
    near((values.T_tip as number) - 273.15, 94.4506, 1e-6);
    const m = Math.sqrt((2 * 25) / (200 * 0.001));
    const [a, b] = [m * 0.0125, m * 0.033];
    const { besselI: I, besselK: K } = own;
    const eta =
      ((2 * 0.0125) / (m * (0.033 ** 2 - 0.0125 ** 2))) *
      ((K(1, a) * I(1, b) - I(1, a) * K(1, b)) / (K(0, a) * I(1, b) + I(0, a) * K(1, b)));
    near(values.eta, eta, 1e-11);
  });

  it("stays finite for an annular fin with m·r near 1e4", () => {
    const values = compiled("annular-fin").run({
      ...{ r_1: 0.5, r_2: 1, t: 1e-6, k: 0.2, h: 40, T_b: 373.15, T_inf: 293.15, tip: 0 },
    });
    expect(Object.values(values).every((value) => Number.isFinite(value))).toBe(true);
  });

  it("adds the resistances of the device stack of the catalogue's defaults", () => {
    const values = compiled("device-stack").run({
      ...{ P: 50, T_amb: 308.15, R_sink: 0.4 },
      ...{
        "layers.t": [0.5e-3, 3e-3],
        "layers.k": [120, 390],
        "layers.A": [1e-4, 9e-4],
        "layers.R_c": [10e-6, 20e-6],
      },
    });
    const R = [0.5e-3 / (120 * 1e-4) + 10e-6 / 1e-4, 3e-3 / (390 * 9e-4) + 20e-6 / 9e-4] as const;
    near(values.R_total, R[0] + R[1] + 0.4);
    // An independent evaluation: 63.6218 °C.
    near(values.T_device, 63.6218 + 273.15, 1e-7);
    const [device, between, sink] = values.T_node as number[];
    near(device, 308.15 + 50 * (R[0] + R[1] + 0.4));
    near(between, 308.15 + 50 * (R[1] + 0.4));
    near(sink, 308.15 + 50 * 0.4);
  });

  it.each([
    ["surface_temperature", 0],
    ["surface_flux", 1],
    ["convection", 2],
  ])("follows the case %s of the thick body", (_, option) => {
    const [k, rho, c, x, time, T_0, T_s, q_s, h] = [1.4, 2300, 880, 0.05, 7200, 283.15, 273.15, 300, 15];
    const d = Math.sqrt((k / (rho * c)) * time);
    const xi = x / (2 * d);
    const H = (h * d) / k;
    const T = [
      T_0 + (T_s - T_0) * own.erfc(xi),
      T_0 + ((2 * q_s * d) / k) * (Math.exp(-xi * xi) / Math.sqrt(Math.PI) - xi * own.erfc(xi)),
      T_0 + (T_s - T_0) * (own.erfc(xi) - Math.exp(-xi * xi) * own.erfcx(xi + H)),
    ];
    const values = compiled("thick-body-step").run({
      k,
      rho,
      c,
      x,
      time,
      T_0,
      T_s,
      q_s,
      h,
      b: 0.3,
      case: option,
    });
    near(values.T, T[option]!, 1e-13);
    near(values.reach, 4 * d);
  });

  it("asks a constant property as it asks any other", () => {
    const values = compiled("furnace-lining").run({
      ...{ A: 1, T_hot: 900, T_amb: 300, T_allow: 400, h_c: 10, eps: 0 },
      "layers.t": [0.2],
      "layers.material": [constantReader(0.5)],
    });
    near(values.q, 600 / (0.2 / 0.5 + 1 / 10), 1e-11);
  });
});
