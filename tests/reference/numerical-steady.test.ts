import { describe, expect, it } from "vitest";
import { besselJ, besselJ1Zeros, bisect, simpson, superposition, tridiagonal } from "./numerical";
import { given, run } from "./shelf";

/** Walls, discs and pipes against solutions by other means, written here and sharing no closed form with them. */

const sigma = 5.670374419e-8;

describe("walls by finite differences and shooting", () => {
  it("gives the flux and the middle temperature of a wall with k linear in T as relaxed finite differences do", () => {
    const [t, kRef, TRef, b, hot, cold] = [0.1, 1, 293.15, 0.001, 673.15, 323.15];
    const n = 400;
    const dx = t / n;
    const k = (T: number) => kRef * (1 + b * (T - TRef));
    let T = Array.from({ length: n + 1 }, (_, i) => hot + ((cold - hot) * i) / n);
    for (let sweep = 0; sweep < 60; sweep += 1) {
      const face = T.slice(1).map((right, i) => k((right + T[i]!) / 2));
      const inner = Array.from({ length: n - 1 }, (_, i) => i);
      T = [
        hot,
        ...tridiagonal(
          inner.map((i) => -face[i]!),
          inner.map((i) => face[i]! + face[i + 1]!),
          inner.map((i) => -face[i + 1]!),
          inner.map((i) => (i === 0 ? face[0]! * hot : 0) + (i === n - 2 ? face[n - 1]! * cold : 0)),
        ),
        cold,
      ];
    }
    const q = (k((T[0]! + T[1]!) / 2) * (T[0]! - T[1]!)) / dx;
    const wall = run("linear-k-wall", {});
    expect(wall.number("q")).toBeCloseTo(q, 1);
    expect(wall.number("T_mid")).toBeCloseTo(T[n / 2]!, 3);
  });

  it("finds flux and faces of the lining by shooting from the hot face", () => {
    const fireclay = (T: number) => (T < 922 ? 1 + ((T - 478) / 444) * 0.5 : 1.5 + ((T - 922) / 556) * 0.3);
    const insulating = (T: number) =>
      T < 673.15
        ? 0.1 + ((T - 300) / 373.15) * 0.04
        : T < 1273.15
          ? 0.14 + ((T - 673.15) / 600) * 0.06
          : 0.2 + ((T - 1273.15) / 260) * 0.04;
    const layers = [
      { t: 0.114, k: fireclay },
      { t: 0.114, k: insulating },
    ];
    const steps = 20_000;
    const march = (q: number): number[] => {
      let T = 1373.15;
      return layers.map(({ t, k }) => {
        const dx = t / steps;
        for (let i = 0; i < steps; i += 1) {
          const half = T - (q / k(T)) * (dx / 2);
          T -= (q / k(half)) * dx;
          if (T < 200) return 200;
        }
        return T;
      });
    };
    const shellLoss = (s: number) => 5.5 * (s - 298.15) + 0.8 * sigma * (s ** 4 - 298.15 ** 4);
    const q = bisect(100, 3000, (flux) => flux - shellLoss(march(flux).at(-1)!), 60);
    const lining = run("furnace-lining", {
      layers: [
        { t: 114, material: "fireclay-brick" },
        { t: 114, material: "insulating-brick-23" },
      ],
    });
    expect(lining.number("q")).toBeCloseTo(q, 2);
    const faces = lining.list("T_face");
    march(q).forEach((T, i) => expect(faces[i + 1]).toBeCloseTo(T, 2));
  });

  it("closes the heat balance of the three-layer default lining, each layer by Simpson's rule over its material", () => {
    const lining = run("furnace-lining", {});
    const q = lining.number("q");
    const faces = lining.list("T_face");
    const materials = ["fireclay-brick", "insulating-brick-23", "stone-wool-mat"];
    [0.114, 0.114, 0.025].forEach((t, i) => {
      const at = (T: number) =>
        run("cold-strut", { material: materials[i]!, T_hot: given(T, "K"), T_cold: given(T, "K") }).number(
          "k_mean",
        );
      const [warm, cool] = [faces[i]!, faces[i + 1]!];
      expect(simpson(at, cool, warm, 200) / t / q).toBeCloseTo(1, 4);
    });
    const shell = faces.at(-1)!;
    expect(5.5 * (shell - 298.15) + 0.8 * sigma * (shell ** 4 - 298.15 ** 4)).toBeCloseTo(q, 6);
  });

  it("gives the same limits for a wall with framing as a network cut apart or short-circuited sideways", () => {
    const layers = [
      [0.0125, 0.25, 0.25],
      [0.14, 0.037, 0.13],
      [0.009, 0.13, 0.13],
    ] as const;
    const f = 0.15;
    const column = (side: 1 | 2) => 0.17 + layers.reduce((sum, row) => sum + row[0] / row[side], 0);
    const apart = 1 / ((1 - f) / column(1) + f / column(2));
    let short = 0.17;
    for (const [t, field, frame] of layers) {
      const slices = 50;
      for (let i = 0; i < slices; i += 1) {
        short += 1 / ((1 - f) / (t / slices / field) + f / (t / slices / frame));
      }
    }
    const wall = run("stud-wall", {});
    expect(wall.number("R_upper")).toBeCloseTo(apart, 10);
    expect(wall.number("R_lower")).toBeCloseTo(short, 10);
  });
});

describe("spreading by the exact series", () => {
  it.each([
    [0.005, 0.025, 0.01, 200, 500, 0.03],
    [0.005, 0.05, 0.02, 200, 500, 0.03],
    [0.01, 0.04, 0.003, 200, 250, 0.07],
    [0.01, 0.02, 0.02, 400, 2000, 0.1],
  ])("disc of a = %f, b = %f, t = %f m, k = %f, h = %f lies within %f", (a, b, t, k, h, share) => {
    const Bi = (h * b) / k;
    let [mean, peak] = [0, 0];
    for (const z of besselJ1Zeros(200)) {
      const th = Math.tanh((z * t) / b);
      const phi = (th + z / Bi) / (1 + (z / Bi) * th);
      const j = besselJ(1, (z * a) / b);
      const norm = besselJ(0, z) ** 2;
      mean += (j * j * phi) / (z ** 3 * norm);
      peak += (j * phi) / (z ** 2 * norm);
    }
    const disc = run("disc-spreading", { a: given(a, "m"), b: given(b, "m"), t: given(t, "m"), k, h });
    expect(Math.abs((disc.number("R_spread") * Math.PI * k * a * a) / (4 * b * mean) - 1)).toBeLessThan(
      share,
    );
    expect(Math.abs((disc.number("R_spread_max") * Math.PI * k * a) / (2 * peak) - 1)).toBeLessThan(share);
  });
});

describe("pipes in the ground by superposition of line sources", () => {
  it.each([
    [0.2, 1.2],
    [0.6, 0.5],
    [1, 0.6],
  ])("buried pipe of %f m, axis %f m deep", (D, z) => {
    const [S] = superposition([{ x: 0, y: z, radius: D / 2, potential: 1, sources: 0.5 }], true, 60);
    const pipe = run("buried-pipe", { D: given(D, "m"), z, L: 1 });
    expect(pipe.number("S") / S!).toBeCloseTo(1, 5);
  });

  it.each([
    [0.2, 0.2, 0.4],
    [0.3, 0.16, 0.35],
  ])("twin pipes of %f and %f m, %f m apart", (D1, D2, w) => {
    const [S] = superposition(
      [
        { x: 0, y: 0, radius: D1 / 2, potential: 1, sources: 0.5 },
        { x: w, y: 0, radius: D2 / 2, potential: 0, sources: 0.5 },
      ],
      false,
      60,
    );
    const pipes = run("twin-pipes", { D_1: given(D1, "m"), D_2: given(D2, "m"), w: given(w, "m"), L: 1 });
    expect(pipes.number("S") / S!).toBeCloseTo(1, 5);
  });

  it.each([
    [0.05, 0.15, 0.02],
    [0.4, 1, 0.2],
    [0.1, 0.3, 0],
  ])("pipe of %f m in %f m, off-centre by %f m", (d, D, z) => {
    const [S] = superposition(
      [
        { x: z, y: 0, radius: d / 2, potential: 1, sources: 0.5 },
        { x: 0, y: 0, radius: D / 2, potential: 0, sources: 1.8 },
      ],
      false,
      60,
    );
    const pipe = run("eccentric-pipe", { d: given(d, "m"), D: given(D, "m"), z: given(z, "m"), L: 1 });
    expect(pipe.number("S") / S!).toBeCloseTo(1, 5);
  });
});

describe("pipe surface by bisection", () => {
  it.each([
    [0.1143, 0.05, 473.15, 293.15, 0, 0.13],
    [0.2191, 0.08, 573.15, 283.15, 5, 0.26],
    [0.0603, 0.03, 213.15, 293.15, 2, 0.94],
  ])("D = %f m, t = %f m, pipe %f K, air %f K, wind %f m/s, emissivity %f", (D, t, hot, amb, v, eps) => {
    const k = 0.05;
    const coefficient = (s: number) => {
      const T = (s + amb) / 2;
      const y = T / 132.52;
      const c = [33.9729025, -164.702679, 262.108546, -21.5346955, -443.455815, 607.339582];
      const more = [-368.790121, 111.296674, -13.4122465];
      const k_air = 4.358e-3 * [...c, ...more].reduce((sum, C, i) => sum + C * y ** ((i - 3) / 3), 0);
      const mu = (1.458e-6 * T ** 1.5) / (T + 110.4);
      // heat capacity of air from handbook tables (Incropera, Table A.4, from memory), linear
      const cp = 1006 + Math.max(0, ((T - 300) / 100) * 7);
      const nu = (mu * 8.31446261815324 * T) / (101325 * 0.0289644);
      const Pr = (mu * cp) / k_air;
      const Do = D + 2 * t;
      const Ra = (9.80665 * Math.abs(s - amb) * Do ** 3 * Pr) / (T * nu ** 2);
      let Nu = (0.6 + (0.387 * Ra ** (1 / 6)) / (1 + (0.559 / Pr) ** (9 / 16)) ** (8 / 27)) ** 2;
      if (v > 0) {
        const Re = (v * Do) / nu;
        const forced =
          0.3 +
          ((0.62 * Math.sqrt(Re) * Math.cbrt(Pr)) / (1 + (0.4 / Pr) ** (2 / 3)) ** 0.25) *
            (1 + (Re / 282000) ** 0.625) ** 0.8;
        Nu = Math.max(Nu, forced);
      }
      return (Nu * k_air) / Do;
    };
    const Do = D + 2 * t;
    const off = (s: number) =>
      Math.PI * Do * (coefficient(s) * (s - amb) + eps * sigma * (s ** 4 - amb ** 4));
    const residual = (s: number) => (2 * Math.PI * k * (hot - s)) / Math.log(Do / D) - off(s);
    const surface = bisect(Math.min(hot, amb), Math.max(hot, amb), (s) => residual(s));
    const pipe = run("pipe-surface-balance", {
      D: given(D, "m"),
      t: given(t, "m"),
      insulation: given(k, "W/(m·K)"),
      T_pipe: given(hot, "K"),
      T_amb: given(amb, "K"),
      v,
      eps,
    });
    expect(pipe.number("T_surface")).toBeCloseTo(surface, 1);
    expect(Math.abs(pipe.number("q_l") / off(surface) - 1)).toBeLessThan(0.002);
  });
});
