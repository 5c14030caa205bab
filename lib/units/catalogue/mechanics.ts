import { metric, milli, none, type PrefixSymbol } from "./prefixes";
import { unitRows, type UnitRow } from "./row";
import { CODATA, COMMON, NIST, SI, YARD } from "./sources";

const gramPrefixes: readonly PrefixSymbol[] = ["T", "G", "M", "k", "d", "c", "m", "µ", "n", "p", "f"];
const tonnePrefixes: readonly PrefixSymbol[] = ["k", "M", "G"];
const GAUGE = "is above atmospheric pressure, taken as 101 325 Pa.";

const mass = unitRows({ mass: 1 }, [
  // symbol      signs             names               definition         prefixes      UCUM         source
  ["g",         "",               "gram gramme",      "0.001",           gramPrefixes, "g",         SI],
  ["t",         "",               "tonne",            "1000",            tonnePrefixes, "t",        SI],
  ["lb",        "lbm lbs lb_m",   "pound",            "0.45359237",      none,         "[lb_av]",   YARD],
  ["oz",        "",               "ounce",            "0.45359237/16",   none,         "[oz_av]",   YARD],
  ["gr",        "",               "grain",            "0.00006479891",   none,         "[gr]",      YARD],
  ["slug",      "",               "slug",             "0.45359237*9.80665/0.3048", none, null,      NIST],
  ["st",        "",               "stone",            "6.35029318",      none,         "[stone_av]", YARD],
  ["cwt_short", "",               "",                 "45.359237",       none,         "[scwt_av]", YARD],
  ["cwt_long",  "",               "",                 "50.80234544",     none,         "[lcwt_av]", YARD],
  ["ton_short", "ton_us",         "shortton",         "907.18474",       none,         "[ston_av]", YARD],
  ["ton_long",  "ton_uk",         "longton",          "1016.0469088",    none,         "[lton_av]", YARD],
  ["u",         "Da",             "dalton",           "1.66053906892e-27", none,       null,        CODATA],
]);

const density = unitRows({ mass: 1, length: -3 }, [
  ["pcf",       "",               "",                 "0.45359237/0.028316846592", none, null,      COMMON],
]);

const linearDensity = unitRows({ mass: 1, length: -1 }, [
  ["tex",       "",               "",                 "1e-6",            none,         "tex",       NIST],
  ["denier",    "",               "",                 "1e-3/9000",       none,         "[den]",     NIST],
]);

const force = unitRows({ mass: 1, length: 1, time: -2 }, [
  ["N",         "",               "newton",           "1",               metric,       "N",         SI],
  ["dyn",       "",               "dyne",             "1e-5",            none,         "dyn",       NIST],
  ["kgf",       "kp kg_f",        "kilopond",         "9.80665",         none,         "kgf",       NIST],
  ["gf",        "",               "",                 "0.00980665",      none,         "gf",        NIST],
  ["tf",        "",               "",                 "9806.65",         none,         null,        NIST],
  ["lbf",       "lb_f",           "",                 "0.45359237*9.80665",      none, "[lbf_av]",  NIST],
  ["ozf",       "",               "",                 "0.45359237*9.80665/16",   none, null,        NIST],
  ["kip",       "klbf",           "",                 "453.59237*9.80665",       none, null,        NIST],
  ["tonf_short", "tonf_us",       "",                 "907.18474*9.80665",       none, null,        NIST],
  ["pdl",       "",               "poundal",          "0.45359237*0.3048",       none, null,        NIST],
]);

const pressure = unitRows({ mass: 1, length: -1, time: -2 }, [
  ["Pa",        "",               "pascal",           "1",               metric,       "Pa",        SI],
  ["bar",       "bara",           "bar",              "100000",          ["k", "m", "µ"], "bar",    SI],
  ["psi",       "psia",           "",                 "0.45359237*9.80665/0.00064516", none, "[psi]", NIST],
  ["ksi",       "kpsi",           "",                 "453.59237*9.80665/0.00064516",  none, "10*3.[psi]", NIST, { codes: ["k[psi]"] }],
  ["psf",       "",               "",                 "0.45359237*9.80665/0.09290304", none, null,  NIST],
  ["atm",       "",               "atmosphere",       "101325",          none,         "atm",       SI],
  ["at",        "ata",            "",                 "98066.5",         none,         "att",       NIST, { notice: "at is the technical atmosphere, 1 kgf/cm²." }],
  ["Torr",      "torr",           "torr",             "101325/760",      milli,        null,        NIST],
  ["mmHg",      "",               "",                 "133.322387415",   none,         null,        NIST],
  ["cmHg",      "",               "",                 "1333.22387415",   none,         null,        NIST],
  ["inHg",      "",               "",                 "3386.388640341",  none,         null,        NIST],
  ["mmH2O",     "mmWC mmWG mmWS", "",                "9.80665",         none,         "mm[H2O]",   NIST],
  ["cmH2O",     "cmWC",     "",                 "98.0665",         none,         "cm[H2O]",   NIST],
  ["mH2O",      "mWC mWS",   "",                 "9806.65",         none,         "m[H2O]",    NIST],
  ["inH2O",     "inWC inWG iwg", "",            "249.08891",       none,         "[in_i'H2O]", NIST],
  ["ftH2O",     "ftWC",     "",                 "2989.06692",      none,         null,        NIST],
  ["barye",     "",               "",                 "0.1",             none,         null,        NIST],
  ["barg",      "barG bar(g)",    "",                 "100000", none, null, COMMON, { shift: 1.01325, alone: true, notice: `barg ${GAUGE}` }],
  ["mbarg",     "mbar(g)",        "",                 "100",    none, null, COMMON, { shift: 1013.25, alone: true, notice: `mbarg ${GAUGE}` }],
  ["Pag",       "Pa(g)",          "",                 "1",      none, null, COMMON, { shift: 101325, alone: true, notice: `Pag ${GAUGE}` }],
  ["kPag",      "kPa(g)",         "",                 "1000",   none, null, COMMON, { shift: 101.325, alone: true, notice: `kPag ${GAUGE}` }],
  ["MPag",      "MPa(g)",         "",                 "1000000", none, null, COMMON, { shift: 0.101325, alone: true, notice: `MPag ${GAUGE}` }],
  ["psig",      "psiG psi(g)",    "",                 "0.45359237*9.80665/0.00064516", none, null, COMMON, { shift: 101325 / 6894.757293168361, alone: true, notice: `psig ${GAUGE}` }],
]);

const dynamicViscosity = unitRows({ mass: 1, length: -1, time: -1 }, [
  ["P",         "",               "poise",            "0.1",             ["d", "c", "m", "µ"], "P",   NIST],
  ["reyn",      "",               "",                 "0.45359237*9.80665/0.00064516", ["µ"], null,   NIST],
]);

const kinematicViscosity = unitRows({ length: 2, time: -1 }, [
  ["St",        "",               "stokes",           "0.0001",          ["c", "m"],   "St",        NIST],
]);

const amount = unitRows({ "amount of substance": 1 }, [
  ["mol",       "",               "mole",             "1",  ["k", "M", "m", "µ", "n", "p"], "mol",  SI],
  ["lbmol",     "lb_mol",         "",                 "453.59237",       none,         null,        NIST],
]);

const catalysis = unitRows({ "amount of substance": 1, time: -1 }, [
  ["kat",       "",               "katal",            "1",     ["m", "µ", "n", "p"],   "kat",       SI],
]);

const permeance = unitRows({ time: 1, length: -1 }, [
  ["perm", "perm_us", "", "0.00006479891/3600/0.09290304/3386.388640341", none, null, NIST, { notice: "perm is the US one, gr/(h·ft²·inHg) with mercury at 0 °C." }],
]);

export const mechanicsUnits: readonly UnitRow[] = [
  ...mass,
  ...density,
  ...linearDensity,
  ...force,
  ...pressure,
  ...dynamicViscosity,
  ...kinematicViscosity,
  ...amount,
  ...catalysis,
  ...permeance,
];
