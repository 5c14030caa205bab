import { input, type CaseRuns } from "../reference-case";
import { given, ownWorking, refuses, run, stated } from "../shelf";

export const shapeRuns: CaseRuns = {
  "SF-01": {
    through: "buried-pipe",
    answers: (c) => {
      const pipe = run("buried-pipe", {
        D: given(input(c, "D"), "m"),
        z: input(c, "z"),
        L: input(c, "L"),
        k: input(c, "k"),
        T_pipe: given(input(c, "T1"), "K"),
        T_ground: given(input(c, "T2"), "K"),
      });
      return { S: pipe.number("S"), q: pipe.number("Q") };
    },
  },
  "SF-02": {
    through: "box-furnace",
    answers: (c) => {
      const a = input(c, "inside");
      const box = run("box-furnace", {
        a,
        b: a,
        c: a,
        t: given(input(c, "t"), "m"),
        k: input(c, "k"),
        T_in: given(input(c, "T1"), "K"),
        T_out: given(input(c, "T2"), "K"),
      });
      return { S: box.number("S"), q: box.number("Q") };
    },
  },
  "SF-03": {
    through: "box-furnace, half-space-source, own working",
    answers: () => {
      const box = run("box-furnace", { a: 1, b: 1, c: 1, t: given(1, "m"), k: 1 });
      const disc = run("half-space-source", { a: given(0.5, "m"), k: 1 });
      return {
        edge: box.number("S_edges") / 12,
        corner: box.number("S_corners") / 8,
        disc: 1 / disc.number("R_isothermal"),
        circle_in_square: Math.round(squareConstant() * 100) / 100,
      };
    },
  },
  "SF-05": {
    through: "buried-pipe, own working",
    answers: (c) => {
      const pipe = run("buried-pipe", {
        D: given(input(c, "D"), "m"),
        z: input(c, "z_cyl"),
        L: input(c, "L_cyl"),
      });
      const other = ownWorking(`
D = "${input(c, "D")} m"
S_sphere = 2*pi*D/(1 - D/(4*"${input(c, "z_sphere")} m"))
S_far = 2*pi*"${input(c, "L_cyl")} m"/ln(4*"${input(c, "z_cyl")} m"/D)`);
      return {
        S_sphere: other.number("S_sphere"),
        S_cyl: pipe.number("S"),
        S_cyl_approx: other.number("S_far"),
      };
    },
  },
  "SF-06": {
    through: "twin-pipes",
    answers: (c) => ({
      S: run("twin-pipes", {
        D_1: given(input(c, "D1"), "m"),
        D_2: given(input(c, "D2"), "m"),
        w: given(input(c, "w"), "m"),
        L: input(c, "L"),
      }).number("S"),
    }),
  },
  "SF-07": {
    through: "eccentric-pipe",
    answers: (c) => {
      const S = (z: number) =>
        run("eccentric-pipe", {
          d: given(input(c, "d"), "m"),
          D: given(input(c, "D"), "m"),
          z: given(z, "m"),
          L: 1,
        }).number("S");
      return { S_per_m: S(input(c, "z")), S_concentric: S(0) };
    },
  },
  "SF-08": {
    through: "own working",
    answers: (c) => {
      const [w, D] = [input(c, "w"), input(c, "D")];
      const S = (constant: number) => ownWorking(`S = 2*pi/ln(${constant}*"${w} m"/"${D} m")`).number("S");
      return { S_per_m: S(1.08), const_exact: squareConstant(), S_exact_small: S(squareConstant()) };
    },
  },
  "SF-09": {
    through: "half-space-source, own working",
    answers: (c) => ({
      S_disc: 1 / run("half-space-source", { a: given(input(c, "D") / 2, "m"), k: 1 }).number("R_isothermal"),
      S_rod: ownWorking(`
L = "${input(c, "L_rod")} m"
S = 2*pi*L/ln(4*L/"${input(c, "D_rod")} m")`).number("S"),
    }),
  },
  "SF-12": {
    through: "half-space-source, text",
    answers: () => {
      const [sphere = NaN, , square = NaN] = stated(
        "half-space-source",
        /q\* of ([\d.]+) \(sphere\), ([\d.]+) \(thin disc\) and ([\d.]+) \(thin square\)/,
      );
      // both faces of a disc: twice the half-space, made dimensionless with √(A/4π) for the length
      const R = run("half-space-source", { a: given(1, "m"), k: 1 }).number("R_isothermal");
      const area = 2 * Math.PI;
      const disc = (2 / R) * Math.sqrt(area / (4 * Math.PI)) * (1 / area);
      return { sphere, disc, square };
    },
  },
  "ED-03": {
    through: "buried-pipe",
    answers: (c) => ({
      rejected: refuses(() => run("buried-pipe", { D: given(input(c, "D"), "m"), z: input(c, "z") })),
    }),
  },
  "ED-06": {
    through: "eccentric-pipe",
    answers: (c) => ({
      rejected: refuses(() =>
        run("eccentric-pipe", {
          D: given(input(c, "D"), "m"),
          d: given(input(c, "d"), "m"),
          z: given(input(c, "z"), "m"),
        }),
      ),
    }),
  },
};

/** Conformal radius of the square of side 2: 8√π/Γ(1/4)² with Γ(1/4)² = 4√(2π)·∫dθ/√(1 + sin²θ). */
function squareConstant(): number {
  return ownWorking(`
quarter = integral(u, 0, pi/2, 1/sqrt(1 + sin(u)^2))
constant = 8*sqrt(pi)/(4*sqrt(2*pi)*quarter)`).number("constant");
}
