import { input, inputs, type CaseRuns } from "../reference-case";
import { given, ownWorking, run } from "../shelf";

/**
 * First-order propagation (JCGM 100) by central differences over whole runs. The product's own derivatives are
 * checked elsewhere; here the model values and the combined uncertainty must come out.
 */
function contributions(f: (x: readonly number[]) => number, x: readonly number[], u: readonly number[]) {
  return x.map((value, i) => {
    const step = 1e-4 * Math.abs(value);
    const at = (shift: number) => f(x.map((other, j) => (j === i ? other + shift : other)));
    return ((at(step) - at(-step)) / (2 * step)) * (u[i] ?? 0);
  });
}
const combined = (parts: readonly number[]) => Math.hypot(...parts);

export const uncertaintyRuns: CaseRuns = {
  "GU-03": {
    through: "uncertainty, own working",
    answers: (c) => {
      const u = inputs(c, "u");
      // four equal rectangles: density of the sum by repeated convolution on a fine grid
      const half = Math.sqrt(3) * (u[0] ?? NaN);
      const cells = 2000;
      const width = (2 * half) / cells;
      let density = new Float64Array(cells).fill(1 / (2 * half));
      for (let fold = 1; fold < u.length; fold += 1) {
        const next = new Float64Array(density.length + cells - 1);
        let window = 0;
        for (let i = 0; i < next.length; i += 1) {
          window += (density[i] ?? 0) - (density[i - cells] ?? 0);
          next[i] = (window * width) / (2 * half);
        }
        density = next;
      }
      let tail = 0;
      let i = 0;
      while (tail + (density[i] ?? 0) * width < 0.025) {
        tail += (density[i] ?? 0) * width;
        i += 1;
      }
      const within = (0.025 - tail) / ((density[i] ?? NaN) * width);
      const middle = density.length / 2;
      const u_y = ownWorking(`u = sqrt(${u.map((value) => `${value}^2`).join(" + ")})`).number("u");
      const quantile = ownWorking(`z = balance(z, 1, 3, erf(z/sqrt(2)) - 0.95)`.replace("z = ", "k_95 = "));
      return {
        u_y,
        half_exact: (middle - i - within) * width,
        half_gauss: quantile.number("k_95") * u_y,
      };
    },
  },
  "GU-05": {
    through: "uncertainty, own working",
    answers: (c) => {
      const x = [input(c, "Q"), input(c, "d"), input(c, "A"), 300 + input(c, "dT"), 300];
      const k = ([Q, d, A, T_hot, T_cold]: readonly number[]) =>
        ownWorking(`k = "${Q} W"*"${d} m"/(2*"${A} m²"*("${T_hot} K" - "${T_cold} K"))`).number("k");
      const u_T = input(c, "u_T_each_of_two");
      const u = [
        input(c, "u_rel_Q") * (x[0] ?? NaN),
        input(c, "u_d"),
        input(c, "u_rel_A") * (x[2] ?? NaN),
        u_T,
        u_T,
      ];
      const u_k = combined(contributions(k, x, u));
      return { k: k(x), u_rel: u_k / k(x), U95: 2 * u_k };
    },
  },
  "GU-06": {
    through: "composite-wall, uncertainty",
    answers: (c) => {
      const [R_si = NaN, ...rest] = inputs(c, "R");
      const R_se = rest.pop() ?? NaN;
      const t = 0.1;
      const k = rest.map((R) => t / R);
      const U = (conductivities: readonly number[]) =>
        run("composite-wall", {
          R_si,
          R_se,
          layers: conductivities.map((value) => ({ t: given(t, "m"), k: given(value, "W/(m·K)") })),
        }).number("U");
      const relative = inputs(c, "u_rel").slice(1, -1);
      const parts = contributions(
        U,
        k,
        k.map((value, i) => value * (relative[i] ?? 0)),
      );
      const u_U = combined(parts);
      return { U: U(k), u_U, share_insulation: ((parts[1] ?? NaN) / u_U) ** 2 };
    },
  },
};
