import { isTemperature } from "@/lib/units";
import type { Expression } from "../types";
import type { Context } from "./context";
import { exponentOfTemperature, holdsAbsolute, isPowerOfTemperature } from "./reading";
import type { Operand } from "./unify";
import { describe } from "./words";

/** `h*T_s`: an absolute temperature times something per kelvin, where a difference is probably meant. */
export function warnOfAbsoluteProduct(
  operator: "*" | "/",
  [left, right]: readonly [Operand, Operand],
  expression: Expression,
  context: Context,
): void {
  if (left.value.law || right.value.law) return;
  const temperature = [left, right].find(
    ({ value }) => isTemperature(value.type.dimension) && holdsAbsolute(value.type),
  );
  if (!temperature || (operator === "/" && temperature === right)) return;
  const other = temperature === left ? right : left;
  const exponent = exponentOfTemperature(other.value.type.dimension);
  const perKelvin = exponent.d === 1 && exponent.n === (operator === "*" ? -1 : 1);
  // T1/T2 and 1/T compare temperatures with each other; an input in 1/K (an expansion coefficient) does not.
  const ofTemperaturesOnly =
    isPowerOfTemperature(other.value.type.dimension) && (operator === "/" || holdsAbsolute(other.value.type));
  if (!perKelvin || ofTemperaturesOnly) return;
  const { place } = context;
  place.tell({
    severity: "warning",
    code: "absolute-product",
    span: expression.span,
    message:
      `${place.quote(expression.span)} ${operator === "*" ? "multiplies" : "divides"} the absolute temperature ` +
      `${place.quote(temperature.expression.span)} ${operator === "*" ? "with" : "by"} ${describe(other.value.type)}.`,
    hint: "A temperature difference is probably meant.",
  });
}
