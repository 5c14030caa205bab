import { input, type CaseRuns } from "../reference-case";
import { given, ownWorking, run, stated, template } from "../shelf";

/** Facts that no calculation gives: what the templates must say to people, read from their texts. */

const celsius = (value: number) => value + 273.15;

export const textRuns: CaseRuns = {
  "BU-01": {
    through: "touch-limit-thickness, text",
    answers: () => {
      const [industrial = NaN, consumer = NaN] = stated(
        "touch-limit-thickness",
        /ASTM C1055 designs for a contact of (\d+) s in industrial use and (\d+) s in consumer use/,
      );
      return { t_industrial: industrial, t_consumer: consumer };
    },
  },
  "BU-02": {
    through: "touch-limit-thickness, text",
    answers: () => {
      const [minute = NaN, ten = NaN, shift = NaN] = stated(
        "touch-limit-thickness",
        /about (\d+) °C for 1 min, (\d+) °C for 10 min and (\d+) °C for 8 h and longer/,
      );
      return { T_1min: celsius(minute), T_10min: celsius(ten), T_8h: celsius(shift) };
    },
  },
  "BU-03": {
    through: "touch-limit-thickness, text",
    answers: (c) => {
      const [limit = NaN, fahrenheit = NaN, seconds = NaN] = stated(
        "touch-limit-thickness",
        /limit of (\d+) °C \((\d+) °F\) at (\d+) s on metal jackets is common practice without a source/,
      );
      if (seconds !== input(c, "t")) throw new Error(`The text speaks of ${seconds} s.`);
      return { T_F: ownWorking(`T = "${fahrenheit} °F"`).number("T"), limit: celsius(limit) };
    },
  },
  "BU-04": {
    through: "touch-limit-thickness, text",
    answers: () => {
      const [long = NaN, short = NaN] = stated(
        "touch-limit-thickness",
        /injury at (\d+) °C after 6 h and near (\d+) °C after about 1 s/,
      );
      return { T_6h: celsius(long), T_1s_order: celsius(short) };
    },
  },
  "BU-05": {
    through: "own working",
    answers: (c) => {
      const contact = (surface: "steel" | "plastic") =>
        ownWorking(`
e_skin = ${input(c, "e_skin")}
e_jacket = ${input(c, `e_${surface}`)}
T_skin = "${input(c, "T_skin")} K"
T_c = T_skin + e_jacket/(e_skin + e_jacket)*("${input(c, "T_surface")} K" - T_skin)`).number("T_c");
      return { T_c_steel: contact("steel"), T_c_plastic: contact("plastic") };
    },
  },
  "RT-03": {
    through: "straight-fin, text",
    answers: () => {
      const [effectiveness = NaN, mL = NaN] = stated(
        "straight-fin",
        /effectiveness exceeds (\d+), .* at m·L = ([\d.]+) the fin gives 99 %/,
      );
      const bar = { t: 4, w: 4, k: 100, h: 10, tip: "adiabatic" }; // m = 10 1/m
      const share =
        run("straight-fin", { ...bar, L: given(mL / 10, "m") }).number("Q") /
        run("straight-fin", { ...bar, L: given(5, "m") }).number("Q");
      if (Math.abs(share - 0.99) > 0.0005) throw new Error(`m·L = ${mL} gives ${share} of the long fin.`);
      return { eff_min: effectiveness, mL_99: mL };
    },
  },
  "RT-04": {
    through: "insulated-pipe, text",
    answers: () => {
      const [low = NaN, high = NaN] = stated("insulated-pipe", /non-metallic surface (\d+) to (\d+), bright/);
      return { h_low: low, h_high: high };
    },
  },
  "RT-05": {
    through: "furnace-lining, text",
    answers: () => ({
      weight: stated("furnace-lining", /arithmetic mean of its two faces \(weight ([\d.]+) each\)/)[0] ?? NaN,
    }),
  },
  "RT-06": {
    through: "generating-wall, text",
    answers: () => {
      const [gas = NaN, forced = NaN, liquid = NaN, boiling = NaN] = stated(
        "generating-wall",
        /gases 2 to (\d+), forced gases 25 to (\d+), forced liquids 100 to ([\d ]+), boiling and condensing 2500 to ([\d ]+) W/,
      );
      const field = template("generating-wall").inputs.find(({ symbol }) => symbol === "h");
      if (field?.kind !== "number" || field.usualMax !== boiling)
        throw new Error("The usual range says less.");
      return {
        free_gas_max: gas,
        forced_gas_max: forced,
        forced_liquid_max: liquid,
        phase_change_max: boiling,
      };
    },
  },
  "RT-08": {
    through: "plane-wall, bolted-joint, text",
    answers: () => {
      const [low = NaN, high = NaN] = stated("plane-wall", /insulations carry (\d+) to (\d+) %/);
      const words: Readonly<Record<string, number>> = { two: 2, three: 3 };
      const factor = /hold within a factor of (\w+) \(common practice/.exec(
        template("bolted-joint").notices.join("\n"),
      );
      return { k_rel_low: low / 100, k_rel_high: high / 100, R_c_factor: words[factor?.[1] ?? ""] ?? NaN };
    },
  },
};
