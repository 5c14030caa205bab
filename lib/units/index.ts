/**
 * Units for engineers: reading what they type, UCUM codes, conversion to SI, named quantities, numbers for people.
 * Everything is data and pure functions; nothing here keeps state.
 */
export * from "./types";
export { addRational, multiplyRational, rational, rationalFromNumber, rationalToNumber } from "./rational";
export {
  dimension,
  dimensionKey,
  dimensionless,
  divide,
  isDimensionless,
  isTemperature,
  multiply,
  power,
  sameDimension,
} from "./dimension";
export { parseUnit, unitNotices } from "./parse-unit";
export { parseUcum } from "./ucum";
export { parseNumber } from "./number";
export { parseAmount } from "./amount";
export { fromSi, toSi } from "./scale";
export {
  compatibleUnits,
  quantities,
  quantityByName,
  quantityForDimension,
  siUnitSymbol,
} from "./quantities";
export { formatExact, formatSignificant } from "./format";
