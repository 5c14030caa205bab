import { none } from "./prefixes";
import { unitRows, type UnitRow } from "./row";

const UCUM = "UCUM 2.2";

/** Units that only UCUM names, or that it sizes differently from the trade. The code is the symbol. */
export const ucumOnlyUnits: readonly UnitRow[] = [
  ...unitRows({ mass: 1, length: 2, time: -2 }, [
    // symbol      signs names definition          prefixes    UCUM         source
    ["[Btu]",      "",   "",   "1054.35",          none,       "[Btu]",      UCUM],
    ["[Btu_th]",   "",   "",   "1054.35",          none,       "[Btu_th]",   UCUM],
    ["[Btu_39]",   "",   "",   "1059.67",          none,       "[Btu_39]",   UCUM],
    ["[Btu_59]",   "",   "",   "1054.8",           none,       "[Btu_59]",   UCUM],
    ["[Btu_60]",   "",   "",   "1054.68",          none,       "[Btu_60]",   UCUM],
    ["[Btu_m]",    "",   "",   "1055.87",          none,       "[Btu_m]",    UCUM],
    ["[Cal]",      "",   "",   "4184",             none,       "[Cal]",      UCUM],
    ["cal_m",      "",   "",   "4.19002",          ["k"],      "cal_m",      UCUM],
    ["cal_[15]",   "",   "",   "4.1858",           ["k"],      "cal_[15]",   UCUM],
    ["cal_[20]",   "",   "",   "4.1819",           ["k"],      "cal_[20]",   UCUM],
  ]),
  ...unitRows({ mass: 1, length: -1, time: -2 }, [
    ["m[Hg]",      "",   "",   "133322",           ["m", "c"], "m[Hg]",      UCUM],
    ["[in_i'Hg]",  "",   "",   "133322*0.0254",    none,       "[in_i'Hg]",  UCUM],
  ]),
  ...unitRows({ length: 1 }, [
    ["[ft_us]",    "",   "",   "1200/3937",        none,       "[ft_us]",    UCUM],
    ["[in_us]",    "",   "",   "100/3937",         none,       "[in_us]",    UCUM],
    ["[mi_us]",    "",   "",   "5280*1200/3937",   none,       "[mi_us]",    UCUM],
  ]),
  ...unitRows({ length: 2 }, [
    ["[acr_us]",   "",   "",   "43560*1200/3937*1200/3937", none, "[acr_us]", UCUM],
  ]),
  ...unitRows({ time: 1 }, [
    ["mo",         "",   "",   "2629800",          none,       "mo",         UCUM],
    ["a_t",        "",   "",   "365.24219*86400",  none,       "a_t",        UCUM],
    ["a_g",        "",   "",   "365.2425*86400",   none,       "a_g",        UCUM],
  ]),
  ...unitRows({}, [
    ["[pi]",       "",   "",   "pi",               none,       "[pi]",       UCUM],
  ]),
];
