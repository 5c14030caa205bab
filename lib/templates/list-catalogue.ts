import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { languageConstants, languageFunctions, specialForms } from "@/lib/language";
import { parseUnit, quantities } from "@/lib/units";
import type { FunctionPage, QuantityPage } from "./schemas";

/** The named quantities with the units that are offered for each. */
export async function listQuantities(actor: Actor): Promise<QuantityPage> {
  permit(actor, "unit.read");
  return { items: quantityItems, nextCursor: null };
}

const quantityItems: QuantityPage["items"] = quantities.map((quantity) => ({
  name: quantity.name,
  kind: quantity.kind,
  unit: quantity.unit,
  units: quantity.units.map((symbol) => {
    const reading = parseUnit(symbol, { expect: quantity });
    return { unit: symbol, ucum: reading.ok ? reading.value.ucum : null };
  }),
}));

/** Functions, special forms and constants of the working language. */
export async function listFunctions(actor: Actor): Promise<FunctionPage> {
  permit(actor, "unit.read");
  return { items: functionItems, constants: constantItems, nextCursor: null };
}

const functionItems: FunctionPage["items"] = [
  ...languageFunctions.map((row) => ({
    name: row.name,
    kind: "function" as const,
    parameters: [...row.parameters],
    variadic: row.variadic ?? false,
    help: row.help,
    ...(row.source === undefined ? {} : { source: row.source }),
  })),
  ...specialForms.map((row) => ({
    name: row.name,
    kind: "special form" as const,
    parameters: [...row.parameters],
    variadic: false,
    help: row.help,
  })),
];

const constantItems: FunctionPage["constants"] = languageConstants.map((row) => ({
  name: row.name,
  value: row.value,
  unit: row.unit,
  help: row.help,
  source: row.source,
}));
