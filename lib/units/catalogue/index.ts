import { electricalUnits } from "./electrical";
import { geometryUnits } from "./geometry";
import { heatUnits } from "./heat";
import { mechanicsUnits } from "./mechanics";
import { otherUnits } from "./other";
import type { UnitRow } from "./row";
import { temperatureUnits } from "./temperature";
import { ucumOnlyUnits } from "./ucum-only";

/** Every unit of the catalogue. */
export const units: readonly UnitRow[] = [
  ...geometryUnits,
  ...temperatureUnits,
  ...mechanicsUnits,
  ...heatUnits,
  ...electricalUnits,
  ...otherUnits,
  ...ucumOnlyUnits,
];
