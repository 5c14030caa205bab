import type { CheckResult, InputDeclaration, PropertyName } from "@/lib/language";
import { checkProgram } from "@/lib/language";
import { parseUnit, quantityByName, quantityForDimension, sameDimension } from "@/lib/units";
import type { Material } from "./material";
import { propertyQuantities } from "./property-quantity";

/** Symbol under which a material's working reads the absolute temperature. */
export const temperatureSymbol = "T";

export interface ConstantDeclaration {
  readonly symbol: string;
  readonly quantity: string;
  readonly unit: string;
}

/**
 * What a constant of a material is: its named quantity, else the usual one of its unit (a temperature is absolute
 * unless the unit can only be a difference). null when the unit cannot be read or has no quantity.
 */
export function constantDeclaration(
  symbol: string,
  constant: { readonly unit: string; readonly quantity?: string | undefined },
): ConstantDeclaration | null {
  const reading = parseUnit(constant.unit);
  if (!reading.ok) return null;
  const named = constant.quantity === undefined ? undefined : quantityByName(constant.quantity);
  if (constant.quantity !== undefined) {
    return named && sameDimension(named.dimension, reading.value.dimension)
      ? { symbol, quantity: named.name, unit: constant.unit }
      : null;
  }
  const temperature = quantityByName("temperature");
  const isTemperature =
    temperature !== undefined && sameDimension(temperature.dimension, reading.value.dimension);
  const kind = !isTemperature ? "plain" : reading.value.differenceOnly ? "difference" : "absolute";
  const quantity = quantityForDimension(reading.value.dimension, kind);
  return quantity ? { symbol, quantity: quantity.name, unit: constant.unit } : null;
}

/** Checks the working of one piece: it sees `T` and the constants, its line named like the property is the value. */
export function checkPieceWorking(
  working: string,
  property: PropertyName,
  unit: string,
  constants: Material["constants"],
  path: string,
): CheckResult {
  const inputs: InputDeclaration[] = [
    { kind: "number", symbol: temperatureSymbol, label: "Temperature", quantity: "temperature", unit: "K" },
  ];
  for (const [symbol, constant] of Object.entries(constants ?? {})) {
    const declaration = constantDeclaration(symbol, constant);
    if (declaration) inputs.push({ kind: "number", label: symbol, ...declaration });
  }
  const quantity = propertyQuantities[property];
  const result = checkProgram({
    inputs,
    working,
    conditions: [],
    results: [{ symbol: property, quantity, unit, list: false, path }],
    uses: inputs.map(({ symbol }) => ({ symbol, path })),
  });
  return {
    ...result,
    diagnostics: result.diagnostics.map((found) =>
      found.path === "#/working" ? { ...found, path: `${path}/working` } : found,
    ),
  };
}
