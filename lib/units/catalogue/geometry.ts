import { downward, kiloMega, metric, none, type PrefixSymbol } from "./prefixes";
import { unitRows, type UnitRow } from "./row";
import { COMMON, IAU, ISO, NIST, SI, YARD } from "./sources";

const inchPrefixes: readonly PrefixSymbol[] = ["µ"];
const litrePrefixes: readonly PrefixSymbol[] = ["M", "k", "h", "d", "c", "m", "µ", "n"];
const US_GALLON = "gal, qt, pt, fl_oz are the US liquid ones; the imperial ones are gal_uk, qt_uk, pt_uk, fl_oz_uk.";

const length = unitRows({ length: 1 }, [
  // symbol     signs             names                       definition         prefixes      UCUM        source
  ["m",        "",               "metre meter",              "1",               metric,       "m",        SI],
  ["micron",   "",               "",                         "1e-6",            none,         null,       ISO],
  ["Å",        "",               "angstrom ångström",        "1e-10",           none,         "Ao",       NIST],
  ["in",       "",               "inch",                     "0.0254",          inchPrefixes, "[in_i]",   YARD],
  ["ft",       "",               "foot feet",                "0.3048",          none,         "[ft_i]",   YARD],
  ["yd",       "",               "yard",                     "0.9144",          none,         "[yd_i]",   YARD],
  ["mi",       "",               "mile",                     "1609.344",        none,         "[mi_i]",   YARD],
  ["mil",      "thou",           "",                         "0.0000254",       none,         "[mil_i]",  YARD],
  ["fathom",   "",               "",                         "1.8288",          none,         "[fth_i]",  YARD],
  ["nmi",      "",               "nauticalmile",             "1852",            none,         "[nmi_i]",  SI],
  ["au",       "",               "",                         "149597870700",    none,         null,       IAU],
]);

const area = unitRows({ length: 2 }, [
  ["ha",       "",               "hectare",                  "10000",           none,         "har",      SI],
  ["are",      "",               "",                         "100",             none,         "ar",       NIST],
  ["sqin",     "",               "",                         "0.00064516",      none,         "[sin_i]",  YARD],
  ["sqft",     "",               "",                         "0.09290304",      none,         "[sft_i]",  YARD],
  ["sqyd",     "",               "",                         "0.83612736",      none,         "[syd_i]",  YARD],
  ["acre",     "",               "",                         "4046.8564224",    none,         null,       YARD],
  ["cmil",     "circ_mil",       "circularmil circular_mil", "0.0000254*0.0000254*pi/4",      none, "[cml_i]", NIST],
  ["kcmil",    "MCM",            "",                         "0.0000254*0.0000254*pi/0.004",  none, null,      NIST],
  ["b",        "",               "barn",                     "1e-28",           none,         "b",        NIST],
]);

const volume = unitRows({ length: 3 }, [
  ["L",        "l ℓ",            "litre liter",              "0.001",           litrePrefixes, "L",       SI, { codes: ["l"] }],
  ["cc",       "ccm",            "",                         "1e-6",            none,         null,       COMMON],
  ["cuin",     "",               "",                         "0.000016387064",  none,         "[cin_i]",  YARD],
  ["cuft",     "",               "",                         "0.028316846592",  none,         "[cft_i]",  YARD],
  ["cuyd",     "",               "",                         "0.764554857984",  none,         "[cyd_i]",  YARD],
  ["gal",      "gal_us USgal",   "gallon",                   "0.003785411784",  none,         "[gal_us]", NIST, { notice: US_GALLON }],
  ["qt",       "qt_us",          "quart",                    "0.000946352946",  none,         "[qt_us]",  NIST, { notice: US_GALLON }],
  ["pt",       "pt_us",          "pint",                     "0.000473176473",  none,         "[pt_us]",  NIST, { notice: US_GALLON }],
  ["fl_oz",    "floz fl_oz_us",  "",                         "0.0000295735295625", none,      "[foz_us]", NIST, { notice: US_GALLON }],
  ["gal_uk",   "gal_imp UKgal",  "",                         "0.00454609",      none,         "[gal_br]", NIST],
  ["qt_uk",    "qt_imp",         "",                         "0.0011365225",    none,         "[qt_br]",  NIST],
  ["pt_uk",    "pt_imp",         "",                         "0.00056826125",   none,         "[pt_br]",  NIST],
  ["fl_oz_uk", "floz_uk",        "",                         "0.0000284130625", none,         "[foz_br]", NIST],
  ["bbl",      "",               "barrel",                   "0.158987294928",  none,         "[bbl_us]", NIST, { notice: "bbl is the oil barrel of 42 US gallons." }],
]);

const time = unitRows({ time: 1 }, [
  ["s",        "sec",            "second",                   "1",    ["M", "k", ...downward], "s",        SI],
  ["min",      "",               "minute",                   "60",              none,         "min",      SI],
  ["h",        "hr hrs",         "hour",                     "3600",            none,         "h",        SI, { notice: "h is the hour." }],
  ["d",        "",               "day",                      "86400",           none,         "d",        SI],
  ["wk",       "",               "week",                     "604800",          none,         "wk",       NIST],
  ["a",        "yr",             "year",                     "31557600",        none,         "a",        ISO, { codes: ["a_j"], notice: "a is a year of 365.25 d." }],
]);

const frequency = unitRows({ time: -1 }, [
  ["Hz",       "",               "hertz",                    "1",    [...kiloMega, "G", "T", "m"], "Hz",  SI],
  ["rpm",      "RPM",            "",                         "1/60",            none,         null,       COMMON, { notice: "rpm is a frequency, 1/min; an angular velocity is written rad/s." }],
]);

const velocity = unitRows({ length: 1, time: -1 }, [
  ["mph",      "MPH",            "",                         "0.44704",         none,         null,       YARD],
  ["kph",      "kmh",            "",                         "1/3.6",           none,         null,       COMMON],
  ["fps",      "",               "",                         "0.3048",          none,         null,       YARD],
  ["fpm",      "FPM",            "",                         "0.3048/60",       none,         null,       YARD],
  ["kn",       "",               "knot",                     "1852/3600",       none,         "[kn_i]",   SI],
]);

const acceleration = unitRows({ length: 1, time: -2 }, [
  ["g_n",      "",               "",                         "9.80665",         none,         "[g]",      SI],
  ["Gal",      "",               "",                         "0.01",         ["m", "µ"],      "Gal",      NIST],
]);

const flow = unitRows({ length: 3, time: -1 }, [
  ["cfm",      "CFM",            "",                         "0.028316846592/60", none,       null,       YARD],
  ["cfs",      "",               "",                         "0.028316846592",  none,         null,       YARD],
  ["gpm",      "GPM",            "",                         "0.003785411784/60", none,       null,       NIST, { notice: "gpm is US gallons per minute." }],
  ["lpm",      "LPM",            "",                         "0.001/60",        none,         null,       COMMON],
]);

export const geometryUnits: readonly UnitRow[] = [
  ...length,
  ...area,
  ...volume,
  ...time,
  ...frequency,
  ...velocity,
  ...acceleration,
  ...flow,
];
