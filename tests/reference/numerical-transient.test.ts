import { describe, expect, it } from "vitest";
import { besselJ, bisect, tridiagonal } from "./numerical";
import { given, run } from "./shelf";

/** Transient templates against finite volumes in time and against long series written here. */

const shapes = { "wall-step": 0, "cylinder-step": 1, "sphere-step": 2 } as const;
type Shape = keyof typeof shapes;

/** Body of 0.1 m with k = 1 W/(m·K) and ρc = 1 MJ/(m³·K): Bi = h/10, Fo = time/10⁴ s. */
function product(shape: Shape, Bi: number, Fo: number, at: number) {
  const [extent, place] = shape === "wall-step" ? ["L", "x"] : ["r_o", "r"];
  return run(shape, {
    [extent!]: given(0.1, "m"),
    [place!]: given(at * 0.1, "m"),
    k: 1,
    rho: 1000,
    c: 1000,
    h: 10 * Bi,
    T_0: given(1, "K"),
    T_inf: given(0, "K"),
    time: given(1e4 * Fo, "s"),
  });
}

/** Crank-Nicolson on finite volumes, dimensionless; starts with implicit steps to damp the jump at the surface. */
function finiteVolumes(shape: Shape, Bi: number, Fo: number) {
  const m = shapes[shape];
  const n = 400;
  const dx = 1 / n;
  const cells = Array.from({ length: n }, (_, i) => i);
  const volume = cells.map((i) => (((i + 1) * dx) ** (m + 1) - (i * dx) ** (m + 1)) / (m + 1));
  const inside = cells.map((i) => (i === 0 ? 0 : (i * dx) ** m / dx));
  const surface = 1 / (dx / 2 + 1 / Bi);
  const outside = cells.map((i) => (i === n - 1 ? surface : inside[i + 1]!));
  let theta = cells.map(() => 1);
  const advance = (dt: number, implicit: number) => {
    const flow = cells.map(
      (i) => inside[i]! * ((theta[i - 1] ?? 0) - theta[i]!) - outside[i]! * (theta[i]! - (theta[i + 1] ?? 0)),
    );
    theta = tridiagonal(
      inside.map((g) => -implicit * dt * g),
      cells.map((i) => volume[i]! + implicit * dt * (inside[i]! + outside[i]!)),
      outside.map((g, i) => (i === n - 1 ? 0 : -implicit * dt * g)),
      cells.map((i) => volume[i]! * theta[i]! + (1 - implicit) * dt * flow[i]!),
    );
  };
  const steps = 2000;
  const dt = Fo / steps;
  for (let i = 0; i < 8; i += 1) advance(dt / 4, 1);
  for (let i = 2; i < steps; i += 1) advance(dt, 0.5);
  const kept = cells.reduce((sum, i) => sum + theta[i]! * volume[i]!, 0) * (m + 1);
  const face = (theta.at(-1)! * (2 / dx)) / (2 / dx + Bi);
  return { centre: theta[0]!, face, fraction: 1 - kept };
}

describe("bodies suddenly exposed", () => {
  for (const shape of Object.keys(shapes) as Shape[]) {
    it.each([
      [0.1, 1],
      [1, 0.2],
      [10, 0.05],
      [100, 0.3],
    ])(`${shape} at Bi = %f, Fo = %f agrees with finite volumes`, (Bi, Fo) => {
      const found = finiteVolumes(shape, Bi, Fo);
      const centre = product(shape, Bi, Fo, 0);
      expect(Math.abs(centre.number("theta") - found.centre)).toBeLessThan(5e-5);
      expect(Math.abs(product(shape, Bi, Fo, 1).number("theta") - found.face)).toBeLessThan(5e-5);
      expect(Math.abs(centre.number("fraction") - found.fraction)).toBeLessThan(5e-5);
    });

    it(`${shape} is exact to 10⁻⁹ from Fo = 0.005 on for Biot numbers from 10⁻⁶ to 10⁶`, () => {
      for (const Bi of [1e-6, 1e-3, 0.5, 1, 7, 1e3, 1e6]) {
        for (const Fo of [0.005, 0.02, 0.2, 2]) {
          for (const at of [0, 0.37, 1]) {
            const wanted = longSeries(shape, Bi, Fo, at);
            const found = product(shape, Bi, Fo, at).number("theta");
            expect(Math.abs(found - wanted), `Bi ${Bi}, Fo ${Fo}, place ${at}`).toBeLessThan(1e-9);
          }
        }
      }
    });

    it(`${shape} at time zero is as it was`, () => {
      const start = product(shape, 1, 0, 0.5);
      expect(start.number("theta")).toBe(1);
      expect(start.number("fraction")).toBe(0);
    });
  }
});

/** Series of up to 60 terms with roots by bisection; Bessel functions by quadrature. */
function longSeries(shape: Shape, Bi: number, Fo: number, at: number): number {
  let sum = 0;
  for (let n = 1; n <= 60; n += 1) {
    const z = root(shape, Bi, n);
    const decay = Math.exp(-z * z * Fo);
    if (decay < 1e-18) break;
    if (shape === "wall-step") {
      sum += ((4 * Math.sin(z)) / (2 * z + Math.sin(2 * z))) * decay * Math.cos(z * at);
    } else if (shape === "sphere-step") {
      const place = at === 0 ? 1 : Math.sin(z * at) / (z * at);
      sum += ((4 * (Math.sin(z) - z * Math.cos(z))) / (2 * z - Math.sin(2 * z))) * decay * place;
    } else {
      const [a, b] = [besselJ(0, z), besselJ(1, z)];
      sum += ((2 * b) / (z * (a * a + b * b))) * decay * besselJ(0, z * at);
    }
  }
  return sum;
}

function root(shape: Shape, Bi: number, n: number): number {
  const tiny = 1e-9;
  if (shape === "wall-step") {
    const equation = (u: number) => u * Math.sin(u) - Bi * Math.cos(u);
    return alternating((n - 1) * Math.PI + tiny, (n - 0.5) * Math.PI, equation);
  }
  if (shape === "sphere-step") {
    const equation = (u: number) => (1 - Bi) * Math.sin(u) - u * Math.cos(u);
    return alternating((n - 1) * Math.PI + (n === 1 ? 1e-6 : tiny), n * Math.PI, equation);
  }
  const zero = (order: 0 | 1, index: number) =>
    bisect(
      (index + order / 2 - 0.25) * Math.PI - 0.6,
      (index + order / 2 - 0.25) * Math.PI + 0.6,
      (x) => besselJ(order, x),
      60,
    );
  const equation = (u: number) => u * besselJ(1, u) - Bi * besselJ(0, u);
  return alternating(n === 1 ? 0 : zero(1, n - 1), zero(0, n), equation, 70);
}
const alternating = (low: number, high: number, f: (u: number) => number, steps = 100) =>
  bisect(low, high, f, steps);

describe("semi-infinite body", () => {
  it("agrees with finite volumes for all three surface conditions", () => {
    const [k, rc, h, qs, depth] = [1.5, 2000 * 900, 10, 200, 0.1];
    const n = 1500;
    const dx = 2e-3;
    const time = 6 * 3600;
    const steps = 2000;
    const dt = time / steps;
    const g = k / dx;
    const finite = (surface: number, T_surface: number, flux: number) => {
      let T = new Array<number>(n).fill(10);
      const conductance = surface === 0 ? 0 : 1 / (dx / 2 / k + (surface === Infinity ? 0 : 1 / surface));
      const cells = T.map((_, i) => i);
      for (let s = 0; s < steps; s += 1) {
        const before = T;
        T = tridiagonal(
          cells.map((i) => (i === 0 ? 0 : -g)),
          cells.map((i) => (rc * dx) / dt + (i === 0 ? conductance : g) + (i === n - 1 ? 0 : g)),
          cells.map((i) => (i === n - 1 ? 0 : -g)),
          cells.map((i) => (rc * dx * before[i]!) / dt + (i === 0 ? conductance * T_surface + flux : 0)),
        );
      }
      const at = depth / dx - 0.5;
      const left = Math.floor(at);
      return T[left]! + (at - left) * (T[left + 1]! - T[left]!);
    };
    const body = (extra: Record<string, number | string>) =>
      run("thick-body-step", extra).number("T") - 273.15;
    expect(body({ case: "surface_temperature", T_s: -10 })).toBeCloseTo(finite(Infinity, -10, 0), 1);
    expect(body({ case: "surface_flux", q_s: qs })).toBeCloseTo(finite(0, 0, qs), 1);
    expect(body({ case: "convection", T_s: -10, h })).toBeCloseTo(finite(h, -10, 0), 1);
  });

  it("does not overflow after very long times", () => {
    const old = run("thick-body-step", {
      case: "convection",
      h: 1000,
      time: given(1e9, "s"),
      b: given(1e6, "m"),
    });
    expect(old.number("T")).toBeGreaterThan(263.15);
    expect(old.number("T")).toBeLessThan(283.15);
  });
});

describe("freezing front", () => {
  it("moves as an explicit enthalpy method lets it move", () => {
    const [k, rho, c, fusion, face] = [2.2, 917, 2050, 333500, -10];
    const n = 160;
    const dx = 1e-3;
    const dt = (0.45 * dx * dx * rho * c) / k;
    const enthalpy = new Float64Array(n).fill(fusion);
    const temperature = (H: number) => (H < 0 ? H / c : 0);
    let time = 0;
    while (time < 86400) {
      const step = Math.min(dt, 86400 - time);
      let before = face;
      let distance = dx / 2;
      let here = temperature(enthalpy[0]!);
      let inflow = (k * (before - here)) / distance;
      for (let i = 0; i < n; i += 1) {
        const next = i === n - 1 ? here : temperature(enthalpy[i + 1]!);
        const out = i === n - 1 ? 0 : (k * (here - next)) / dx;
        enthalpy[i] = enthalpy[i]! + (step * (inflow - out)) / (rho * dx);
        inflow = out;
        before = here;
        distance = dx;
        here = next;
      }
      time += step;
    }
    const frozen = enthalpy.reduce(
      (sum, H) => sum + (H <= 0 ? dx : dx * (1 - Math.min(H, fusion) / fusion)),
      0,
    );
    expect(Math.abs(run("freezing-front", {}).number("s") / frozen - 1)).toBeLessThan(0.01);
  });

  it("satisfies the heat balance of the moving front", () => {
    const front = run("freezing-front", {});
    const [s, lambda] = [front.number("s"), front.number("lambda")];
    const a = 2.2 / (917 * 2050);
    const speed = lambda * Math.sqrt(a / 86400);
    // gradient on the frozen side of the front, by a difference quotient of the similarity profile
    const profile = (x: number) => -10 + (10 * erf(x / (2 * Math.sqrt(a * 86400)))) / erf(lambda);
    const gradient = (profile(s) - profile(s * (1 - 1e-6))) / (s * 1e-6);
    expect((2.2 * gradient) / (917 * 333500 * speed)).toBeCloseTo(1, 4);
  });
});

function erf(x: number): number {
  let [term, sum] = [x, x];
  for (let n = 1; n < 60; n += 1) {
    term *= -(x * x) / n;
    sum += term / (2 * n + 1);
  }
  return (2 / Math.sqrt(Math.PI)) * sum;
}
