import { type PropertyName, type PropertyReader, RunFault } from "@/lib/language";
import { nearlyEqual } from "@/lib/language/runtime/comparison";
import { NumericFault } from "@/lib/numeric/fault";
import { fromSi, parseUnit } from "@/lib/units";
import { amountText } from "./amount-text";
import type { CompiledMaterial } from "./compiled-material";
import type { CompiledProperty } from "./compiled-property";
import { propertyQuantities } from "./property-quantity";

/** A temperature in words, in the unit that the property's own data use. */
export function temperatureText(kelvin: number, unitText: string): string {
  const reading = parseUnit(unitText);
  const value = reading.ok ? fromSi(kelvin, reading.value, "absolute") : kelvin;
  return amountText(Number(value.toPrecision(6)), reading.ok ? reading.value.symbol : "K");
}

/** Furthest reading outside the valid range that a run was allowed. */
export interface Extrapolation {
  readonly property: CompiledProperty;
  readonly lowest: number;
  readonly highest: number;
}

/**
 * What one input or cell of a run reads its material through: a compiled material, or a constant property in its
 * place. Made once per place and used again for further runs: `use…` begins a run.
 */
export class MaterialReader implements PropertyReader {
  material: CompiledMaterial | null = null;
  /** JSON pointer of the input, for faults. */
  pointer = "#/inputs";
  /** Judged temperatures in kelvin, for the limits of use. */
  lowest = Infinity;
  highest = -Infinity;
  extrapolations: Extrapolation[] = [];
  private constant = NaN;
  private allowExtrapolation = false;

  useMaterial(material: CompiledMaterial, pointer: string, allowExtrapolation: boolean): void {
    this.material = material;
    this.pointer = pointer;
    this.allowExtrapolation = allowExtrapolation;
    this.lowest = Infinity;
    this.highest = -Infinity;
    if (this.extrapolations.length > 0) this.extrapolations = [];
  }

  /** A property that does not vary, in SI. */
  useConstant(value: number, pointer: string): void {
    this.material = null;
    this.constant = value;
    this.pointer = pointer;
    this.lowest = Infinity;
    this.highest = -Infinity;
    if (this.extrapolations.length > 0) this.extrapolations = [];
  }

  value(name: PropertyName, temperature: number, judged: boolean): number {
    if (this.material === null) return this.constant;
    if (Number.isNaN(temperature)) return NaN;
    const property = this.property(name);
    if (judged) this.judge(property, temperature);
    const found = property.value(temperature, this.allowExtrapolation);
    return this.allowExtrapolation && !judged && !Number.isFinite(found)
      ? property.value(temperature, false)
      : found;
  }

  mean(name: PropertyName, from: number, to: number, judged: boolean): number {
    if (this.material === null) return this.constant;
    if (Number.isNaN(from) || Number.isNaN(to)) return NaN;
    const property = this.property(name);
    if (judged) this.judgeInterval(property, from, to);
    try {
      const found = property.mean(from, to, this.allowExtrapolation);
      return this.allowExtrapolation && !judged && !Number.isFinite(found)
        ? property.mean(from, to, false)
        : found;
    } catch (fault) {
      if (!(fault instanceof NumericFault)) throw fault;
      throw new RunFault(
        "not-converged",
        `The mean ${propertyQuantities[name]} of ${this.material.name} from ${temperatureText(from, property.argumentUnit)} to ` +
          `${temperatureText(to, property.argumentUnit)} could not be integrated to its accuracy: the curve is not smooth there.`,
        {},
        { pointer: this.pointer },
      );
    }
  }

  integral(name: PropertyName, from: number, to: number, judged: boolean): number {
    return this.mean(name, from, to, judged) * (to - from);
  }

  private property(name: PropertyName): CompiledProperty {
    const property = this.material?.properties[name];
    if (!property) {
      throw new RunFault(
        "outside-validity",
        `${this.material?.name ?? "The material"} has no ${propertyQuantities[name]}. Choose a material that has one.`,
        {},
        { pointer: this.pointer },
      );
    }
    return property;
  }

  private judge(property: CompiledProperty, temperature: number): void {
    if (temperature < this.lowest) this.lowest = temperature;
    if (temperature > this.highest) this.highest = temperature;
    if (property.validity(temperature) === "inside") return;
    if (!this.allowExtrapolation) this.refuse(property, temperature);
    this.note(property, temperature);
  }

  private judgeInterval(property: CompiledProperty, from: number, to: number): void {
    this.judge(property, from);
    this.judge(property, to);
    const gap = property.gapBetween(from, to);
    if (!gap) return;
    const middle = (gap[0] + gap[1]) / 2;
    if (!this.allowExtrapolation) this.refuse(property, middle);
    this.note(property, middle);
  }

  private note(property: CompiledProperty, temperature: number): void {
    const at = this.extrapolations.findIndex((known) => known.property === property);
    const known = this.extrapolations[at];
    if (!known) {
      this.extrapolations.push({ property, lowest: temperature, highest: temperature });
      return;
    }
    this.extrapolations[at] = {
      property,
      lowest: Math.min(known.lowest, temperature),
      highest: Math.max(known.highest, temperature),
    };
  }

  private refuse(property: CompiledProperty, temperature: number): never {
    const { material } = this;
    const { argumentUnit, source } = property;
    throw new RunFault(
      "outside-validity",
      `The ${propertyQuantities[property.name]} of ${material?.name ?? "the material"} was asked at ` +
        `${temperatureText(temperature, argumentUnit)}. It is valid ${rangeText(property)} (${source.replace(/\.$/, "")}). ` +
        `Choose a material whose range holds this temperature, or allow extrapolation.`,
      {},
      {
        pointer: this.pointer,
        material: material?.slug ?? "",
        property: property.name,
        temperature,
        expected: rangeText(property),
        received: temperatureText(temperature, argumentUnit),
      },
    );
  }

  /** Whether a judged temperature lies beyond the limits of use, and which: null while they hold. */
  serviceBroken(): { readonly temperature: number; readonly limit: number } | null {
    const service = this.material?.service;
    if (!service) return null;
    if (this.highest > service.max && !nearlyEqual(this.highest, service.max)) {
      return { temperature: this.highest, limit: service.max };
    }
    if (this.lowest < service.min && !nearlyEqual(this.lowest, service.min)) {
      return { temperature: this.lowest, limit: service.min };
    }
    return null;
  }
}

/** "from 1 K to 300 K", with the gaps left to the pieces. */
export function rangeText(property: CompiledProperty): string {
  const parts: string[] = [];
  let begin = property.pieces[0]!.min;
  let end = property.pieces[0]!.max;
  const close = () =>
    parts.push(
      `from ${temperatureText(begin, property.argumentUnit)} to ${temperatureText(end, property.argumentUnit)}`,
    );
  for (const piece of property.pieces.slice(1)) {
    if (piece.min > end && !nearlyEqual(piece.min, end)) {
      close();
      begin = piece.min;
    }
    end = Math.max(end, piece.max);
  }
  close();
  return parts.join(" and ");
}
