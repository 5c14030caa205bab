import { kiloMega, micro, none } from "./prefixes";
import { unitRows, type UnitRow } from "./row";
import { COMMON, ISO, NIST, SI } from "./sources";

const fractions = unitRows({}, [
  // symbol   signs            names             definition       prefixes  UCUM      source
  ["%",      "pct",           "percent",        "0.01",          none,     "%",      ISO],
  ["‰",      "",              "permille",       "0.001",         none,     "[ppth]", ISO],
  ["ppm",    "",              "",               "1e-6",          none,     "[ppm]",  NIST],
  ["ppb",    "",              "",               "1e-9",          none,     "[ppb]",  NIST],
  ["ε",      "strain",        "strain",         "1",             micro,    null,     COMMON],
  ["rad",    "",              "radian",         "1",             micro,    "rad",    SI],
  ["sr",     "",              "steradian",      "1",             none,     "sr",     SI],
  ["°",      "deg",           "degree",         "pi/180",        none,     "deg",    SI],
  ["arcmin", "",              "arcminute",      "pi/10800",      none,     "'",      SI],
  ["arcsec", "",              "arcsecond",      "pi/648000",     none,     "''",     SI],
  ["gon",    "grad",          "gradian",        "pi/200",        none,     "gon",    NIST],
  ["rev",    "turn",          "revolution",     "2*pi",          none,     "circ",   COMMON, { notice: "rev is an angle of 2π; a frequency in turns is written 1/min or rpm." }],
]);

const luminous = unitRows({ "luminous intensity": 1 }, [
  ["cd",     "",              "candela",        "1",             ["k", "m"], "cd",   SI],
  ["lm",     "",              "lumen",          "1",             ["k", "m"], "lm",   SI],
]);

const illuminance = unitRows({ "luminous intensity": 1, length: -2 }, [
  ["lx",     "",              "lux",            "1",             ["k", "m"], "lx",   SI],
  ["fc",     "",              "footcandle",     "1/0.09290304",  none,     null,     NIST],
]);

const activity = unitRows({ time: -1 }, [
  ["Bq",     "",              "becquerel",      "1",             [...kiloMega, "G", "T"], "Bq", SI],
  ["Ci",     "",              "curie",          "3.7e10",        ["k", "m", "µ"], "Ci", NIST],
]);

const dose = unitRows({ length: 2, time: -2 }, [
  ["Gy",     "",              "gray",           "1",             ["k", "m", "µ"], "Gy", SI],
  ["Sv",     "",              "sievert",        "1",             ["m", "µ"], "Sv",   SI],
]);

const money = unitRows({ money: 1 }, [
  ["EUR",    "€",             "euro",           "1",             kiloMega, null,     "ISO 4217"],
]);

export const otherUnits: readonly UnitRow[] = [
  ...fractions,
  ...luminous,
  ...illuminance,
  ...activity,
  ...dose,
  ...money,
];
