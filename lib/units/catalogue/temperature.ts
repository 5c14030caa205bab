import { downward, none } from "./prefixes";
import { unitRows, type UnitRow } from "./row";
import { NIST, SI } from "./sources";

/** Zeros are in the unit itself: 0 °C is −(−273.15) steps above 0 K, 0 °F is 459.67 steps. */
export const temperatureUnits: readonly UnitRow[] = unitRows({ temperature: 1 }, [
  // symbol  signs                        names                    definition  prefixes  UCUM      source
  ["K",   "°K degK deg_K",               "kelvin",                "1",       downward, "K",      SI],
  ["°C",  "degC deg_C Cel",              "celsius Celsius",       "1",       none,     "Cel",    SI,   { shift: 273.15 }],
  ["°F",  "degF deg_F",                  "fahrenheit Fahrenheit", "5/9",     none,     "[degF]", NIST, { shift: 459.67 }],
  ["°R",  "degR deg_R °Ra degRa",        "rankine Rankine",       "5/9",     none,     "[degR]", NIST],
  ["ΔK",  "delta_K deltaK",              "",                      "1",       none,     null,     SI,   { differenceOnly: true }],
  ["Δ°C", "delta_degC deltadegC ΔC ΔdegC", "",                    "1",       none,     null,     SI,   { differenceOnly: true }],
  ["Δ°F", "delta_degF deltadegF ΔF ΔdegF", "",                    "5/9",     none,     null,     NIST, { differenceOnly: true }],
  ["Δ°R", "delta_degR deltadegR ΔdegR",  "",                      "5/9",     none,     null,     NIST, { differenceOnly: true }],
]);
