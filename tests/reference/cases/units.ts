import type { CaseRun, CaseRuns } from "../reference-case";
import { ownWorking, si } from "../shelf";

/** One of a unit, read by the unit parser; a quoted quantity in a working must say the same. */
const factor = (unit: string): CaseRun => ({
  through: "units",
  answers: () => {
    const read = si(1, unit);
    const inWorking = ownWorking(`y = "1 ${unit}"`).number("y");
    if (Math.abs(inWorking / read - 1) > 1e-14)
      throw new Error(`A working reads ${inWorking} for 1 ${unit}.`);
    return { y: read };
  },
});

export const unitRuns: CaseRuns = {
  "UN-01": factor("BTU/(h·ft·°F)"),
  "UN-02": factor("BTU·in/(h·ft²·°F)"),
  "UN-03": factor("h·ft²·°F/BTU"),
  "UN-04": factor("BTU/(h·ft²·°F)"),
  "UN-05": factor("BTU/(h·ft²)"),
  "UN-06": factor("BTU/(lb·°F)"),
  "UN-07": factor("kcal/(h·m·K)"),
  "UN-08": factor("cal/(s·cm·K)"),
  "UN-09": factor("ft²/h"),
  "UN-10": factor("BTU/h"),
  "UN-11": factor("BTU/(h·ft)"),
  "UN-12": factor("µΩ·cm"),
  "UN-13": factor("Ω·cmil/ft"),
  "UN-14": factor("clo"),
  "UN-15": factor("tog"),
  "UN-16": factor("ton_refrigeration"),
  "UN-17": factor("BTU/(h·ft³)"),
  "UN-18": factor("psi"),
};
