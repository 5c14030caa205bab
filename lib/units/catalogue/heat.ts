import { kiloMega, none, upward, wide, metric } from "./prefixes";
import { unitRows, type UnitRow } from "./row";
import { CODATA, COMMON, IT, NIST, SI } from "./sources";

const BTU = "BTU is the International Table one, 1055.05585262 J; BTU_th is the thermochemical one.";
const CAL = "cal is the thermochemical calorie, 4.184 J; cal_IT is 4.1868 J.";
const KCAL = "kcal is 4186.8 J (International Table), as in heat-transfer tables; kcal_th is 4184 J.";
const BTU_IT = "1055.05585262";

const energy = unitRows({ mass: 1, length: 2, time: -2 }, [
  // symbol  signs                      names              definition        prefixes   UCUM       source
  ["J",      "",                       "joule",           "1",              wide,      "J",       SI],
  ["Wh",     "",                       "watthour",        "3600",           upward,    "W.h",     NIST],
  ["eV",     "",                       "electronvolt",    "1.602176634e-19", ["T", "G", "M", "k", "m", "µ", "n"], "eV", SI],
  ["cal",    "",                       "calorie",         "4.184",          none,      "cal",     NIST, { notice: CAL }],
  ["cal_th", "",                       "calorie_th",      "4.184",          kiloMega,  "cal_th",  NIST, { codes: ["cal"] }],
  ["cal_IT", "",                       "cal_IT calorie_IT", "4.1868",       kiloMega,  "cal_IT",  IT],
  ["cal_15", "",                       "",                "4.1858",         none,      null,      NIST],
  ["kcal",   "",                       "kilocalorie",     "4186.8",         none,      "kcal_IT", IT, { notice: KCAL }],
  ["Mcal",   "",                       "",                "4186800",        none,      "Mcal_IT", IT, { notice: "Mcal is 1000 kcal of 4186.8 J (International Table)." }],
  ["Gcal",   "",                       "",                "4186800000",     none,      "Gcal_IT", IT, { notice: "Gcal is 10⁶ kcal of 4186.8 J (International Table)." }],
  ["BTU",    "Btu btu BTU_IT Btu_IT btu_IT", "BTU btu",         BTU_IT,           none,      "[Btu_IT]", IT, { notice: BTU }],
  ["kBTU",   "kBtu kbtu",              "",                `${BTU_IT}*1000`, none,      "10*3.[Btu_IT]", IT, { notice: BTU }],
  ["MMBTU",  "MMBtu mmbtu",            "",                `${BTU_IT}*1000000`, none,   "10*6.[Btu_IT]", IT, { notice: "MMBTU is 10⁶ BTU (International Table)." }],
  ["BTU_th", "Btu_th btu_th",          "",                "4.184*453.59237/1.8", none, null,      NIST],
  ["therm",  "thm",                    "",                `${BTU_IT}*100000`, none,    "10*5.[Btu_IT]", NIST, { notice: "therm is 100 000 BTU (International Table)." }],
  ["erg",    "",                       "",                "1e-7",           none,      "erg",     NIST],
  ["hph",    "",                       "",                "550*0.3048*0.45359237*9.80665*3600", none, null, NIST],
  ["toe",    "",                       "",                "41868000000",    kiloMega,  null,      IT, { notice: "toe is 10⁷ kcal (International Table), 41.868 GJ." }],
  ["tce",    "SKE",                    "",                "29307600000",    kiloMega,  null,      IT, { notice: "tce is 7·10⁶ kcal (International Table), 29.3076 GJ." }],
  ["Eh",     "",                       "hartree",         "4.3597447222060e-18", none, null,      CODATA],
]);

const power = unitRows({ mass: 1, length: 2, time: -3 }, [
  ["W",      "",                       "watt",            "1",              metric,    "W",       SI],
  ["VA",     "",                       "",                "1",              ["k", "M", "G", "m"], "V.A", NIST],
  ["var",    "VAr",                    "",                "1",              kiloMega,  null,      NIST],
  ["BTUH",   "Btuh BTUh btuh",         "",                `${BTU_IT}/3600`, none,      "[Btu_IT]/h", IT, { notice: BTU }],
  ["MBH",    "",                       "",                `${BTU_IT}/3.6`,  none,      "10*3.[Btu_IT]/h", IT, { notice: "MBH is 1000 BTU/h (International Table)." }],
  ["hp",     "HP",                     "horsepower",      "550*0.3048*0.45359237*9.80665", none, "[HP]", NIST, { notice: "hp is 550 ft·lbf/s, 745.7 W; the metric horsepower is PS." }],
  ["PS",     "CV pk",                  "",                "735.49875",      none,      null,      NIST],
  ["hp_E",   "",                       "",                "746",            none,      null,      NIST],
  ["hp_boiler", "",                    "boilerhorsepower", "9809.5",        none,      null,      NIST],
  ["ton_refrigeration", "TR tonref ton_ref", "",          `${BTU_IT}*12000/3600`, none, null,     NIST, { notice: "ton_refrigeration is 12 000 BTU/h, 3517 W." }],
]);

const heatFlux = unitRows({ mass: 1, time: -3 }, [
  ["met",    "",                       "",                "58.2",           none,      null,      "ISO 7730:2005"],
]);

const radiantExposure = unitRows({ mass: 1, time: -2 }, [
  ["langley", "Ly",                    "",                "41840",          none,      null,      NIST],
]);

const insulance = unitRows({ temperature: 1, time: 3, mass: -1 }, [
  ["clo",    "",                       "",                "0.155",          none,      null,      "ISO 9920"],
  ["tog",    "",                       "",                "0.1",            none,      null,      "BS 4745"],
  ["RSI",    "",                       "",                "1",              none,      null,      COMMON],
]);

export const heatUnits: readonly UnitRow[] = [
  ...energy,
  ...power,
  ...heatFlux,
  ...radiantExposure,
  ...insulance,
];
