import { units } from "./catalogue";
import { quantityRows } from "./catalogue/quantities";
import { dimensionKey, isTemperature } from "./dimension";
import { knownUnits } from "./known-units";
import { readUnit } from "./read-unit";
import { rational, rationalText } from "./rational";
import { baseQuantities, type Dimension, type Quantity, type ScaleKind, type Unit } from "./types";

/** A unit written in our own tables. */
const tableUnit = (text: string): Unit => (knownUnits.get(text) ?? readUnit(text)).unit;

/** Every quantity, the preferred one of a dimension before its like. */
export const quantities: readonly Quantity[] = quantityRows.map(([name, offered, range, kind]) => {
  const symbols = offered.split(" ");
  const unit = tableUnit(symbols[0] ?? "1");
  return {
    name,
    dimension: unit.dimension,
    kind: kind ?? "plain",
    unit: unit.symbol,
    units: symbols,
    ...(range && { typical: range }),
  };
});

const byName: ReadonlyMap<string, Quantity> = new Map(
  quantities.map((quantity) => [quantity.name, quantity]),
);

const mapKey = (dimension: Dimension, kind: ScaleKind): string =>
  `${dimensionKey(dimension)} ${isTemperature(dimension) ? kind : "plain"}`;

// Written back to front, so that the first row of a dimension stays.
const preferred: ReadonlyMap<string, Quantity> = new Map(
  [...quantities].reverse().map((quantity) => [mapKey(quantity.dimension, quantity.kind), quantity]),
);

export function quantityByName(name: string): Quantity | undefined {
  return byName.get(name);
}

/**
 * The catalogue's preferred quantity of a dimension. `kind` counts for temperature only, where `plain` (a value in kelvin
 * that is neither) has none.
 */
export function quantityForDimension(dimension: Dimension, kind: ScaleKind): Quantity | undefined {
  return preferred.get(mapKey(dimension, kind));
}

/** Unit texts that a field of this quantity takes: the usual ones first, then every other unit of the catalogue that fits. */
export function compatibleUnits(quantity: Quantity): string[] {
  const key = dimensionKey(quantity.dimension);
  const others = units
    .filter((row) => dimensionKey(row.dimension) === key)
    .filter((row) => !row.differenceOnly || quantity.kind !== "absolute")
    .map((row) => row.symbol);
  return [...new Set([...quantity.units, ...others])];
}

const baseUnits: readonly string[] = ["m", "kg", "s", "K", "A", "mol", "cd", "EUR"];

// ───────────────────────────── coherent SI texts for messages

const coherent: ReadonlyMap<string, string> = new Map(
  [...quantities].reverse().flatMap((quantity) => {
    const symbol = quantity.units.find((text) => {
      const unit = tableUnit(text);
      return unit.factor === 1 && unit.shift === 0;
    });
    return symbol === undefined ? [] : [[dimensionKey(quantity.dimension), symbol] as const];
  }),
);

/** Coherent SI unit of a dimension as text: `W/(m·K)`, else base units, `kg·m/s^(1/2)`. Dimensionless is `1`. */
export function siUnitSymbol(dimension: Dimension): string {
  const known = coherent.get(dimensionKey(dimension));
  if (known !== undefined) return known;
  const side = (wanted: 1 | -1): string[] =>
    baseQuantities.flatMap((_, i) => {
      const exponent = dimension[i];
      if (!exponent || Math.sign(exponent.n) !== wanted) return [];
      const size = rational(Math.abs(exponent.n), exponent.d);
      const power =
        size.n === 1 && size.d === 1 ? "" : size.d === 1 ? `^${size.n}` : `^(${rationalText(size)})`;
      return [`${baseUnits[i] ?? ""}${power}`];
    });
  const [above, below] = [side(1), side(-1)];
  const text = `${above.join("·") || "1"}${below.length > 0 ? `/(${below.join("·")})` : ""}`;
  return tableUnit(text).symbol;
}
