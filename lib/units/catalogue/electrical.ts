import { downward, kiloMega, none, upward, wide } from "./prefixes";
import { unitRows, type UnitRow } from "./row";
import { NIST, SI } from "./sources";

const current = "electric current";

export const electricalUnits: readonly UnitRow[] = [
  ...unitRows({ [current]: 1 }, [
    // symbol signs      names             definition   prefixes                    UCUM   source
    ["A",    "",        "ampere amp",     "1",         [...kiloMega, ...downward], "A",   SI],
    ["Bi",   "abamp",   "biot",           "10",        none,                       "Bi",  NIST],
  ]),
  ...unitRows({ [current]: 1, time: 1 }, [
    ["C",    "",        "coulomb",        "1",         [...kiloMega, ...downward], "C",   SI],
    ["Ah",   "",        "amperehour",     "3600",      ["k", "m", "µ"],            "A.h", NIST],
  ]),
  ...unitRows({ mass: 1, length: 2, time: -3, [current]: -1 }, [
    ["V",    "",        "volt",           "1",         wide,                       "V",   SI],
  ]),
  ...unitRows({ mass: 1, length: 2, time: -3, [current]: -2 }, [
    ["Ω",    "Ohm ohm", "ohm",            "1",         [...upward, ...downward],   "Ohm", SI],
  ]),
  ...unitRows({ mass: -1, length: -2, time: 3, [current]: 2 }, [
    ["S",    "mho ℧",   "siemens mho",    "1",         [...kiloMega, ...downward], "S",   SI],
  ]),
  ...unitRows({ mass: -1, length: -2, time: 4, [current]: 2 }, [
    ["F",    "",        "farad",          "1",         downward,                   "F",   SI],
  ]),
  ...unitRows({ mass: 1, length: 2, time: -2, [current]: -2 }, [
    ["H",    "",        "henry",          "1",         downward,                   "H",   SI],
  ]),
  ...unitRows({ mass: 1, length: 2, time: -2, [current]: -1 }, [
    ["Wb",   "",        "weber",          "1",         ["m", "µ"],                 "Wb",  SI],
    ["Mx",   "",        "maxwell",        "1e-8",      none,                       "Mx",  NIST],
  ]),
  ...unitRows({ mass: 1, time: -2, [current]: -1 }, [
    ["T",    "",        "tesla",          "1",         downward,                   "T",   SI],
    ["G",    "",        "gauss",          "1e-4",      ["m", "µ"],            "G",   NIST],
  ]),
  ...unitRows({ [current]: 1, length: -1 }, [
    ["Oe",   "",        "oersted",        "1000/4/pi", ["k", "m"],                 "Oe",  NIST],
  ]),
];
