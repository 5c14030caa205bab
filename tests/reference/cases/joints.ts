import { input, inputs, type CaseRuns } from "../reference-case";
import { given, ownWorking, run, stated } from "../shelf";

/** Three bars in series: the first or second joint as the joint of the template, the rest as one bar. */
function bars(L: readonly number[], k: readonly number[], h: readonly number[], joint: 0 | 1) {
  const own = L.map((length, i) => length / (k[i] ?? NaN));
  const [a = NaN, b = NaN, d = NaN] = own;
  const [h1 = NaN, h2 = NaN] = h;
  const before = joint === 0 ? a : a + 1 / h1 + b;
  const after = joint === 0 ? b + 1 / h2 + d : d;
  return {
    A: 1,
    L_1: given(before, "m"),
    k_1: 1,
    L_2: given(after, "m"),
    k_2: 1,
    R_c: 1 / (h[joint] ?? NaN),
  };
}

function contact(P: number, sigma: readonly number[], m: readonly number[], k: readonly number[], H: number) {
  return run("contact-conductance", {
    k_1: k[0] ?? NaN,
    k_2: k[1] ?? NaN,
    sigma_1: given(sigma[0] ?? NaN, "m"),
    sigma_2: given(sigma[1] ?? NaN, "m"),
    m_1: m[0] ?? NaN,
    m_2: m[1] ?? NaN,
    P: given(P, "Pa"),
    H: given(H, "Pa"),
    k_g: 0,
    M: 0,
  });
}

export const jointRuns: CaseRuns = {
  "TC-01": {
    through: "own working",
    answers: (c) => {
      const joint = ownWorking(`
R_c = 1/"${input(c, "h_c")} W/(m²·K)"
L_eq = R_c*"${input(c, "k")} W/(m·K)"`);
      return { R_c: joint.number("R_c"), L_eq: joint.number("L_eq") };
    },
  },
  "TC-02": {
    through: "contact-conductance, text",
    answers: () => {
      const said = stated(
        "contact-conductance",
        /air ([\d.]+), helium ([\d.]+), hydrogen ([\d.]+), silicone oil ([\d.]+), glycerine ([\d.]+)\./,
      );
      // the same data as conductances in the second table (Çengel, Table 3-2): the text must agree with it
      [3640, 9520, 13900, 19000, 37700].forEach((h, i) => {
        const R = ownWorking(`R = 1/"${h} W/(m²·K)"`).number("R");
        if (Math.abs((said[i] ?? NaN) * 1e-4 - R) > 0.003 * R) throw new Error(`Fluid ${i + 1} disagrees.`);
      });
      const [R_air, R_helium, R_hydrogen, R_silicone_oil, R_glycerine] = said.map((value) => value * 1e-4);
      return {
        R_air: R_air ?? NaN,
        R_helium: R_helium ?? NaN,
        R_hydrogen: R_hydrogen ?? NaN,
        R_silicone_oil: R_silicone_oil ?? NaN,
        R_glycerine: R_glycerine ?? NaN,
      };
    },
  },
  "TC-03": {
    through: "bolted-joint, text",
    answers: () =>
      Object.fromEntries(
        [
          ["stainless_steel", "stainless steel"],
          ["copper", "copper"],
          ["magnesium", "magnesium"],
          ["aluminium", "aluminium"],
        ].flatMap(([key, name]) => {
          const [low = NaN, high = NaN, lowPressed = NaN, highPressed = NaN] = stated(
            "bolted-joint",
            new RegExp(`${name} ([\\d.]+) to ([\\d.]+) and ([\\d.]+) to ([\\d]+\\.?\\d*)`),
          ).map((value) => value * 1e-4);
          return [
            [`R_${key}_100kPa_min`, low],
            [`R_${key}_100kPa_max`, high],
            [`R_${key}_10MPa_min`, lowPressed],
            [`R_${key}_10MPa_max`, highPressed],
          ];
        }),
      ),
  },
  "TC-04": {
    through: "device-stack",
    answers: (c) => {
      const h = input(c, "h");
      // below the chip: joint and substrate to the air, for one square metre; above it the film alone
      const down = run("device-stack", {
        R_sink: 1 / h,
        layers: [
          {
            t: given(input(c, "L"), "m"),
            k: input(c, "k"),
            A: given(1, "m²"),
            R_c: given(input(c, "R_c"), "m²·K/W"),
          },
        ],
      }).number("R_total");
      return { T_c: input(c, "T_inf") + input(c, "q") / (h + 1 / down) };
    },
  },
  "TC-05": {
    through: "contact-conductance",
    answers: (c) => {
      const joint = contact(input(c, "P"), inputs(c, "sigma"), inputs(c, "m"), inputs(c, "k"), input(c, "H"));
      return {
        sigma_eff: joint.number("sigma"),
        m_eff: joint.number("m"),
        k_s: joint.number("k_s"),
        h_c: joint.number("h_c"),
      };
    },
  },
  "TC-08": {
    through: "contact-conductance",
    // surfaces of TC-05
    answers: (c) => {
      const h = (P: number) => contact(P, [1.2e-6, 0.8e-6], [0.12, 0.08], [167, 16.2], 3.8e9).number("h_c");
      const low = h(input(c, "P2"));
      return { ratio: h(input(c, "P1")) / low, h_c_low: low };
    },
  },
  "TC-09": {
    through: "bolted-joint",
    answers: (c) => {
      const joint = (which: 0 | 1) =>
        run("bolted-joint", {
          ...bars(inputs(c, "L"), inputs(c, "k"), inputs(c, "h_j"), which),
          T_1: given(input(c, "T_hot"), "K"),
          T_2: given(input(c, "T_cold"), "K"),
        });
      return { q: joint(0).number("Q"), jump1: joint(0).number("dT_c"), jump2: joint(1).number("dT_c") };
    },
  },
  "SR-01": {
    through: "half-space-source",
    answers: (c) => ({
      R: run("half-space-source", { a: given(input(c, "a"), "m"), k: input(c, "k") }).number("R_isothermal"),
    }),
  },
  "SR-02": {
    through: "half-space-source",
    answers: (c) => {
      const spot = run("half-space-source", { a: given(input(c, "a"), "m"), k: input(c, "k") });
      const R_avg = spot.number("R_isoflux");
      return {
        R_avg,
        R_max: spot.number("R_isoflux_peak"),
        ratio_to_isothermal: R_avg / spot.number("R_isothermal"),
      };
    },
  },
  "SR-04": {
    through: "disc-spreading, own working",
    answers: (c) => {
      const [a, b, t] = ["a", "b", "t"].map((name) => input(c, name));
      const [k, h] = [input(c, "k"), input(c, "h")];
      const plate = run("disc-spreading", {
        a: given(a ?? NaN, "m"),
        b: given(b ?? NaN, "m"),
        t: given(t ?? NaN, "m"),
        k,
        h,
      });
      const series = ownWorking(`
a = "${a} m"
b = "${b} m"
tau = "${t} m"/b
k = "${k} W/(m·K)"
Bi = "${h} W/(m²·K)"*b/k
phi(z) = (tanh(z*tau) + z/Bi)/(1 + z/Bi*tanh(z*tau))
mean_term(z) = bessel_j(1, z*a/b)^2/(z^3*bessel_j(0, z)^2)*phi(z)
peak_term(z) = bessel_j(1, z*a/b)/(z^2*bessel_j(0, z)^2)*phi(z)
R_mean = 4*b/(pi*k*a^2)*series(n, 1, 400, mean_term(bessel_j_zero(1, n)))
R_peak = 2/(pi*k*a)*series(n, 1, 400, peak_term(bessel_j_zero(1, n)))`);
      return {
        R_1D: plate.number("R_1d"),
        R_s_avg_lee: plate.number("R_spread"),
        R_s_max_lee: plate.number("R_spread_max"),
        R_s_avg_exact: series.number("R_mean"),
        R_s_max_exact: series.number("R_peak"),
      };
    },
  },
  "SR-06": {
    through: "own working",
    answers: (c) => {
      const square = ownWorking(`
W = "${input(c, "W")} m"
k = "${input(c, "k")} W/(m·K)"
psi_max = 2*ln(1 + sqrt(2))/pi
psi_mean = 2/pi*(ln(1 + sqrt(2)) + (1 - sqrt(2))/3)
R_avg = psi_mean/(k*W)
R_max = psi_max/(k*W)`);
      return {
        Rk_sqrtA_avg: square.number("psi_mean"),
        Rk_sqrtA_max: square.number("psi_max"),
        R_avg: square.number("R_avg"),
        R_max: square.number("R_max"),
      };
    },
  },
};
