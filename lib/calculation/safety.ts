import type { Definition } from "./definition";
import type { Notice } from "./evaluation";

/**
 * Standing texts by temperatures that occur as input or result, and by category. They are notices: they change no
 * status and never permit anything.
 */

/** Absolute temperatures in kelvin. */
const burn = 333.15;
const ice = 273.15;
const embrittlement = 253.15;
/** Air condenses on surfaces colder than about this; the condensate is rich in oxygen. */
const condensingAir = 91;

const contactBurns: Notice = {
  code: "safety-contact-burns",
  message:
    "A temperature above 60 °C occurs. On a surface that people can reach it burns on contact: the threshold depends on the material of the surface and on the time of contact (ISO 13732-1).",
};
const coldContact: Notice = {
  code: "safety-cold-contact",
  message:
    "A temperature below 0 °C occurs. Bare skin freezes to cold surfaces, and moisture turns to ice that blocks, bursts and makes floors slippery.",
};
const brittleSteel: Notice = {
  code: "safety-embrittlement",
  message:
    "A temperature below −20 °C occurs. Ferritic steels may be brittle there: check the lowest temperature that the material is rated for.",
};
const oxygen: Notice = {
  code: "safety-oxygen",
  message:
    "A temperature below 91 K occurs. Air condenses and the condensate is enriched in oxygen, evaporating gas displaces the oxygen of a room, and liquid trapped between closed valves bursts its enclosure: provide relief and ventilation.",
};
const pressure: Notice = {
  code: "safety-pressure",
  message:
    "Only heat is calculated here. Whether a pipe or vessel withstands its pressure at this temperature is a matter of the pressure code.",
};
const electricalInsulation: Notice = {
  code: "safety-electrical-insulation",
  message:
    "Only heat is calculated here. Creepage, clearance and dielectric strength of interface materials and of live parts are judged by the electrical code.",
};
const structuralUse: Notice = {
  code: "safety-structural-use",
  message:
    "Only heat is calculated here. Insulation that carries load needs its strength and creep judged at the temperatures it reaches.",
};

/** Closes the list in every run. */
const governance: Notice = {
  code: "local-codes",
  message:
    "Local codes and licensed practice govern. This is a calculation under the stated assumptions, not an approval.",
};

const byCategory: Partial<Record<Definition["category"], readonly Notice[]>> = {
  walls: [structuralUse],
  pipes: [pressure],
  joints: [electricalInsulation],
};

/**
 * Notices for a run whose absolute temperatures (kelvin, inputs and results together) reach from `lowest` to
 * `highest`; pass Infinity and −Infinity when there are none.
 */
export function safetyNotices(category: Definition["category"], lowest: number, highest: number): Notice[] {
  const notices: Notice[] = [];
  // Margins of rounding: 140 °F is 60 °C and does not lie above it.
  const above = (limit: number) => highest > limit * (1 + 1e-9);
  const below = (limit: number) => lowest < limit * (1 - 1e-9);
  if (above(burn)) notices.push(contactBurns);
  if (below(ice)) notices.push(coldContact);
  if (below(embrittlement)) notices.push(brittleSteel);
  if (below(condensingAir)) notices.push(oxygen);
  return [...notices, ...(byCategory[category] ?? []), governance];
}
