import { compatibleUnits, fromSi, parseUnit, quantityByName, toSi } from "@/lib/units";

/** Units offered for a declared quantity, the declared unit first. */
export function unitsFor(quantity: string, declared: string): string[] {
  const known = quantityByName(quantity);
  const units = known ? compatibleUnits(known) : [];
  return [declared, ...units.filter((unit) => unit !== declared)];
}

/** A number in another unit of the same quantity, to 12 digits: enough for any drawing, without binary noise. */
export function convertText(value: number, from: string, to: string, quantity: string): string | null {
  const source = parseUnit(from);
  const target = parseUnit(to);
  const kind = quantityByName(quantity)?.kind ?? "plain";
  if (!source.ok || !target.ok) return null;
  return String(Number(fromSi(toSi(value, source.value, kind), target.value, kind).toPrecision(12)));
}
