import { CodedError } from "@/lib/core/errors";
import { type Diagnostic, propertyNames, type PropertyName, RunFault } from "@/lib/language";
import { nearlyEqual } from "@/lib/language/runtime/comparison";
import { NumericFault } from "@/lib/numeric/fault";
import { parseUnit, quantityByName, toSi, type Unit } from "@/lib/units";
import { absoluteZeroTolerance } from "./declared-number";
import { type CompiledMaterial, compileMaterial } from "./compiled-material";
import type { CompiledProperty } from "./compiled-property";
import { Material, type Piece, type Property } from "./material";
import { checkPieceWorking, constantDeclaration, temperatureSymbol } from "./material-program";
import { temperatureText } from "./material-reader";
import { propertyQuantities } from "./property-quantity";
import { schemaDiagnostics } from "./schema-diagnostics";
import { sizeDiagnostic } from "./size-limit";

export interface MaterialCheck {
  /** null when the shape is wrong. */
  readonly material: Material | null;
  readonly diagnostics: Diagnostic[];
}

type Add = (
  path: string,
  code: string,
  message: string,
  hint?: string,
  severity?: Diagnostic["severity"],
) => void;

const memberNames = [
  ...Object.keys(Material.shape),
  ...propertyNames,
  ..."pieces form value coefficients numerator denominator interpolation points working range min max unit source argumentUnit uncertainty relative absolute kind basis status quantity note".split(
    " ",
  ),
];

/** Unit that must measure a quantity, or null with a diagnostic. */
function unitAt(text: string, quantityName: string, path: string, add: Add): Unit | null {
  const quantity = quantityByName(quantityName);
  const reading = parseUnit(text, quantity ? { expect: quantity } : {});
  if (reading.ok) return reading.value;
  add(path, reading.fault.code, reading.fault.message);
  return null;
}

/** Whether the points of a table rise. */
function checkPoints(piece: Piece, path: string, add: Add): boolean {
  if (piece.form !== "table") return true;
  let rising = true;
  piece.points.forEach(([x], i) => {
    const before = piece.points[i - 1]?.[0];
    if (before !== undefined && x <= before) {
      rising = false;
      add(
        `${path}/points/${i}`,
        "falling-points",
        `Point ${i + 1} (${x}) must lie above point ${i} (${before}).`,
      );
    }
  });
  return rising;
}

/** A table holds between its points only; a logarithm or root only for a positive argument. */
function checkReach(piece: Piece, property: Property, argument: Unit, path: string, add: Add): void {
  const rangeUnit = unitAt(piece.range.unit, "temperature", `${path}/range/unit`, add);
  if (!rangeUnit) return;
  const from = toSi(piece.range.min, rangeUnit, "absolute");
  const to = toSi(piece.range.max, rangeUnit, "absolute");
  if (from < absoluteZeroTolerance) {
    add(`${path}/range/min`, "out-of-range", "The range begins below absolute zero.");
  }
  if (piece.form === "table") {
    const first = toSi(piece.points[0]![0], argument, "absolute");
    const last = toSi(piece.points.at(-1)![0], argument, "absolute");
    const outside = (from < first && !nearlyEqual(from, first)) || (to > last && !nearlyEqual(to, last));
    if (outside) {
      const text = `${temperatureText(first, property.argumentUnit)} to ${temperatureText(last, property.argumentUnit)}`;
      add(
        `${path}/range`,
        "range-beyond-points",
        `The range reaches beyond the points, which go from ${text}.`,
      );
    }
  }
  const needsPositive = piece.form === "log10-polynomial" || piece.form === "log10-ratio";
  if (needsPositive && from / argument.factor - argument.shift <= 0) {
    add(
      `${path}/range/min`,
      "out-of-range",
      "The form takes a logarithm or root of the argument: the range must begin above 0.",
    );
  }
}

function checkProperty(
  name: PropertyName,
  property: Property,
  material: Material,
  add: Add,
  take: (found: Diagnostic[]) => void,
): void {
  const path = `#/properties/${name}`;
  const argument = unitAt(property.argumentUnit, "temperature", `${path}/argumentUnit`, add);
  const unit = unitAt(property.unit, propertyQuantities[name], `${path}/unit`, add);
  if (unit && unit.shift !== 0) add(`${path}/unit`, "unit-mismatch", `${unit.symbol} has a zero of its own.`);
  property.pieces.forEach((piece, i) => {
    const at = `${path}/pieces/${i}`;
    if (checkPoints(piece, at, add) && argument) checkReach(piece, property, argument, at, add);
    if (piece.form === "working") {
      take(
        checkPieceWorking(piece.working, name, property.unit, material.constants, at).diagnostics.map(
          (found) => ({ ...found }),
        ),
      );
    }
  });
  const { uncertainty } = property;
  if (uncertainty?.relative !== undefined && uncertainty.absolute !== undefined) {
    add(
      `${path}/uncertainty`,
      "uncertainty",
      "Give the uncertainty as `relative` or as `absolute`, not both.",
    );
  }
}

function checkConstants(material: Material, add: Add): void {
  for (const [symbol, constant] of Object.entries(material.constants ?? {})) {
    const path = `#/constants/${symbol}`;
    if (symbol === temperatureSymbol || propertyNames.some((name) => name === symbol)) {
      add(path, "name-taken", `\`${symbol}\` has a meaning of its own here.`, "Choose another symbol.");
    }
    if (constantDeclaration(symbol, constant)) continue;
    const reading = parseUnit(constant.unit);
    if (!reading.ok) add(`${path}/unit`, reading.fault.code, reading.fault.message);
    else if (constant.quantity === undefined) {
      add(
        `${path}/unit`,
        "unknown-quantity",
        `${reading.value.symbol} measures no quantity that is known here.`,
      );
    } else {
      add(
        `${path}/quantity`,
        "unknown-quantity",
        `“${constant.quantity}” is no quantity that ${reading.value.symbol} measures.`,
      );
    }
  }
}

function checkService(material: Material, add: Add): void {
  const limits = (["min", "max"] as const).map((end) => {
    const limit = material.service?.[end];
    if (!limit) return null;
    const unit = unitAt(limit.unit, "temperature", `#/service/${end}/unit`, add);
    return unit && toSi(limit.value, unit, "absolute");
  });
  const [min, max] = limits;
  if (typeof min === "number" && typeof max === "number" && min >= max) {
    add("#/service/min", "crossed-bounds", "The limits of use leave no temperature.");
  }
}

/** Pieces join without overlap; values are positive at both ends and nearly agree where pieces meet. */
function checkJoints(property: CompiledProperty, add: Add): void {
  const path = `#/properties/${property.name}`;
  const at = (kelvin: number) => temperatureText(kelvin, property.argumentUnit);
  property.pieces.forEach((piece, i) => {
    const bad = [piece.min, piece.max].find((end) => !(piece.value(end) > 0 && piece.value(end) < Infinity));
    if (bad !== undefined) {
      add(
        `${path}/pieces`,
        "not-positive",
        `The ${propertyQuantities[property.name]} comes out at ${piece.value(bad)} (SI) at ${at(bad)}. It must be greater than 0.`,
      );
    }
    const next = property.pieces[i + 1];
    if (!next) return;
    if (nearlyEqual(piece.max, next.min)) {
      const [left, right] = [piece.value(piece.max), next.value(next.min)];
      if (Math.abs(left - right) > 0.05 * Math.max(Math.abs(left), Math.abs(right))) {
        add(
          `${path}/pieces`,
          "jump",
          `Two pieces meet at ${at(next.min)} with values that differ by more than 5 %.`,
          undefined,
          "warning",
        );
      }
    } else if (piece.max > next.min) {
      add(
        `${path}/pieces`,
        "overlapping-pieces",
        `Two pieces overlap from ${at(next.min)} to ${at(Math.min(piece.max, next.max))}.`,
        "Let each end where the next begins.",
      );
    } else {
      add(
        `${path}/pieces`,
        "gap",
        `No piece holds between ${at(piece.max)} and ${at(next.min)}; runs are refused there.`,
        undefined,
        "warning",
      );
    }
  });
}

function compiledOrFault(material: Material, add: Add): CompiledMaterial | null {
  try {
    return compileMaterial(material, "material", 1);
  } catch (error) {
    if (!(error instanceof CodedError || error instanceof RangeError)) throw error;
    add("#", "not-compiled", error.message);
    return null;
  }
}

/**
 * Checks a material as it came in: size, shape, units, constants, workings, ranges, joints and limits of use. Never
 * throws; everything found is in `diagnostics`.
 */
export function checkMaterial(raw: unknown): MaterialCheck {
  const size = sizeDiagnostic(raw);
  if (size) return { material: null, diagnostics: [size] };
  const parsed = Material.safeParse(raw);
  if (!parsed.success)
    return { material: null, diagnostics: schemaDiagnostics(parsed.error, raw, memberNames) };
  const material = parsed.data;
  const diagnostics: Diagnostic[] = [];
  const add: Add = (path, code, message, hint, severity = "error") =>
    diagnostics.push({ path, severity, code, message, ...(hint !== undefined && { hint }) });

  checkConstants(material, add);
  checkService(material, add);
  const declared = propertyNames.flatMap((name) => {
    const property = material.properties[name];
    return property ? [[name, property] as const] : [];
  });
  if (declared.length === 0)
    add("#/properties", "no-property", "The material has no property.", "Give at least one, for example k.");
  for (const [name, property] of declared) {
    checkProperty(name, property, material, add, (found) => diagnostics.push(...found));
  }
  if (diagnostics.some(({ severity }) => severity === "error")) return { material, diagnostics };
  const compiled = compiledOrFault(material, add);
  for (const property of Object.values(compiled?.properties ?? {})) {
    try {
      checkJoints(property, add);
    } catch (error) {
      if (!(error instanceof RunFault || error instanceof NumericFault)) throw error;
      add(`#/properties/${property.name}/pieces`, "not-finite", error.message);
    }
  }
  return { material, diagnostics };
}
