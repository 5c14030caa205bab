import { CodedError } from "@/lib/core/errors";
import { propertyNames, type PropertyName, RunFault } from "@/lib/language";
import { compileProgram } from "@/lib/language/compile";
import { quantityByName, toSi, type Unit, parseUnit } from "@/lib/units";
import { type CompiledPiece, CompiledProperty } from "./compiled-property";
import type { Material, Piece, Property } from "./material";
import { checkPieceWorking, constantDeclaration, temperatureSymbol } from "./material-program";
import {
  constantForm,
  type FormCurve,
  type FormScale,
  logPolynomialForm,
  logRatioForm,
  polynomialForm,
  quadratureForm,
  tableForm,
} from "./property-forms";
import { propertyQuantities } from "./property-quantity";
import { runCost } from "./run-cost";

/** A material's revision ready to be read in runs. Holds no state of a run and may be shared. */
export interface CompiledMaterial {
  readonly slug: string;
  readonly revision: number;
  readonly name: string;
  readonly properties: Readonly<Partial<Record<PropertyName, CompiledProperty>>>;
  /** Limits of use in kelvin, ±Infinity where there is none, and the unit they are stated in. null without any. */
  readonly service: {
    readonly min: number;
    readonly max: number;
    readonly unit: Unit;
    readonly note: string;
  } | null;
  /** One of its workings iterates or is long: read it where it can be ended from outside. */
  readonly heavy: boolean;
}

/** Steps of one reading up to which a working is as quick as the other forms. */
const longestLightWorking = 1_000;

function unitOf(text: string, quantityName: string, what: string): Unit {
  const quantity = quantityByName(quantityName);
  const reading = parseUnit(text, quantity ? { expect: quantity } : {});
  if (!reading.ok) throw new CodedError("definition-invalid", `${what}: ${reading.fault.message}`);
  return reading.value;
}

function workingForm(
  piece: Extract<Piece, { form: "working" }>,
  property: PropertyName,
  declared: Property,
  material: Material,
): { curve: FormCurve; heavy: boolean } {
  const { program, diagnostics } = checkPieceWorking(
    piece.working,
    property,
    declared.unit,
    material.constants,
    `#/properties/${property}`,
  );
  if (!program) {
    const first = diagnostics.find(({ severity }) => severity === "error");
    throw new CodedError(
      "definition-invalid",
      `${material.name}, ${propertyQuantities[property]}: ${first?.message ?? "the working has errors."}`,
      [],
      { diagnostics },
    );
  }
  const compiled = compileProgram(program);
  const frame = compiled.newFrame();
  const place = program.layout.numbers.indexOf(temperatureSymbol);
  program.layout.numbers.forEach((symbol, index) => {
    const constant = material.constants?.[symbol];
    if (!constant) return;
    const declaration = constantDeclaration(symbol, constant);
    const quantity = declaration ? quantityByName(declaration.quantity) : undefined;
    if (!quantity) return;
    frame.numbers[index] = toSi(constant.value, unitOf(constant.unit, quantity.name, symbol), quantity.kind);
  });
  const line = program.lines.findIndex(({ symbol }) => symbol === property);
  const { numbers, values } = frame;
  const curve = quadratureForm((temperature) => {
    if (place >= 0) numbers[place] = temperature;
    try {
      compiled.run(frame);
    } catch (fault) {
      if (!(fault instanceof RunFault)) throw fault;
      // The lines of the material are not those of the template that reads it.
      throw new RunFault(fault.code, `${material.name}, ${propertyQuantities[property]}: ${fault.message}`);
    }
    return values[line] as number;
  });
  return { curve, heavy: program.iterates || runCost(program).fixed > longestLightWorking };
}

function compilePiece(
  piece: Piece,
  property: PropertyName,
  declared: Property,
  material: Material,
): { piece: CompiledPiece; heavy: boolean } {
  const what = `${material.name}, ${propertyQuantities[property]}`;
  const argument = unitOf(declared.argumentUnit, "temperature", what);
  const unit = unitOf(declared.unit, propertyQuantities[property], what);
  const scale: FormScale = { factor: argument.factor, shift: argument.shift, scale: unit.factor };
  const form = (): { curve: FormCurve; heavy: boolean } => {
    switch (piece.form) {
      case "constant":
        return { curve: constantForm(piece.value * scale.scale), heavy: false };
      case "polynomial":
        return { curve: polynomialForm(piece.coefficients, scale), heavy: false };
      case "log10-polynomial":
        return { curve: logPolynomialForm(piece.coefficients, scale), heavy: false };
      case "log10-ratio":
        return { curve: logRatioForm(piece.numerator, piece.denominator, scale), heavy: false };
      case "table":
        return { curve: tableForm(piece.points, piece.interpolation, scale), heavy: false };
      case "working":
        return workingForm(piece, property, declared, material);
    }
  };
  const { curve, heavy } = form();
  const rangeUnit = unitOf(piece.range.unit, "temperature", what);
  return {
    piece: {
      value: curve.value,
      mean: curve.mean,
      min: toSi(piece.range.min, rangeUnit, "absolute"),
      max: toSi(piece.range.max, rangeUnit, "absolute"),
      source: piece.source ?? declared.source,
    },
    heavy,
  };
}

function serviceOf({ name, service }: Material): CompiledMaterial["service"] {
  const stated = service?.max ?? service?.min;
  if (!service || !stated) return null;
  const unit = (text: string) => unitOf(text, "temperature", `${name}, limit of use`);
  const kelvin = (limit: { value: number; unit: string } | undefined, none: number): number =>
    limit ? toSi(limit.value, unit(limit.unit), "absolute") : none;
  return {
    min: kelvin(service.min, -Infinity),
    max: kelvin(service.max, Infinity),
    unit: unit(stated.unit),
    note: service.note,
  };
}

/**
 * Compiles every property of a material. Throws `CodedError` `definition-invalid` for a unit or working that cannot
 * be read; `checkMaterial` finds all of them beforehand.
 */
export function compileMaterial(material: Material, slug: string, revision: number): CompiledMaterial {
  const properties: Partial<Record<PropertyName, CompiledProperty>> = {};
  let heavy = false;
  for (const name of propertyNames) {
    const declared = material.properties[name];
    if (!declared) continue;
    const pieces = declared.pieces.map((piece) => compilePiece(piece, name, declared, material));
    heavy ||= pieces.some((piece) => piece.heavy);
    properties[name] = new CompiledProperty(
      name,
      pieces.map(({ piece }) => piece),
      declared,
    );
  }
  return { slug, revision, name: material.name, properties, service: serviceOf(material), heavy };
}
