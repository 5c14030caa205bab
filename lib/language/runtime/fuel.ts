import { RunFault } from "../types";

/** Fuel of one run: about two seconds of the heaviest mixture of nodes. */
export const startFuel = 20_000_000;

/** Extra cost of one reading of a property: a polynomial, a table look-up, or a small working. */
export const propertyValueCost = 10;
/** Extra cost of a mean or an integral of a property over a range. */
export const propertyIntegralCost = 200;

/** Says that a special form has used up the run's fuel; the caller adds the line. */
export function budgetExceeded(): never {
  throw new RunFault(
    "budget-exceeded",
    `The run takes too long: more than ${startFuel.toLocaleString("en")} steps inside balance, argmin, integral, ` +
      "series or fixed_point. Take fewer terms, a narrower interval or a simpler expression.",
    {},
    { limit: startFuel },
  );
}
