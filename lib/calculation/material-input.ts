import { parseUnit, type Quantity, quantityByName, toSi } from "@/lib/units";
import { amountText } from "./amount-text";
import { type CompiledMaterial, compileMaterial } from "./compiled-material";
import { absoluteZeroTolerance } from "./declared-number";
import type { UsedQuantity } from "./evaluation";
import type { MaterialPlan } from "./input-plan";
import { isQuantity, receivedOf, usedQuantity, type ValueReader } from "./input-reader";
import type { MaterialReader } from "./material-reader";
import type { MaterialSnapshots } from "./materials-needed";
import { propertyQuantities } from "./property-quantity";

/** Reads material inputs and cells of one request: the name of a material, or a constant in its place. */
export class MaterialInputs {
  private readonly compiled = new Map<string, CompiledMaterial>();

  constructor(
    private readonly values: ValueReader,
    private readonly materials: MaterialSnapshots,
    private readonly allowExtrapolation: boolean,
  ) {}

  /** Sets the reader to a material or a constant; false with the problem told. */
  read(plan: MaterialPlan, given: unknown, reader: MaterialReader): boolean {
    if (typeof given === "string") return this.namedMaterial(plan, given, reader);
    if (plan.constant && isQuantity(given) && given.unit !== undefined) {
      return this.constantProperty(plan.constant, given as { value: number; unit: string }, reader);
    }
    if (plan.constant && (typeof given === "number" || isQuantity(given))) {
      const unit = plan.constant.unit;
      const value = typeof given === "number" ? given : given.value;
      this.values.problem(
        "invalid-input",
        `${this.values.name()} is a number without unit. Send { "value": ${value}, "unit": "${unit}" } or the slug of a material.`,
        { received: value, expected: `a material, or a ${plan.constant.name} with unit` },
      );
      return false;
    }
    const expected = plan.constant
      ? `a material, or a ${plan.constant.name} with unit`
      : "the slug of a material";
    this.values.problem("invalid-input", `${this.values.name()} must be ${expected}.`, {
      ...receivedOf(given),
      expected,
    });
    return false;
  }

  private namedMaterial(plan: MaterialPlan, name: string, reader: MaterialReader): boolean {
    const material = this.compiledMaterial(name);
    if (!material) {
      this.values.problem(
        "unknown-material",
        name === ""
          ? `${this.values.name()} names no material. Give the slug of a material.`
          : `${this.values.name()}: there is no material “${name.slice(0, 80)}”.`,
        { received: name.slice(0, 120), expected: "the slug of an issued material, or slug@revision" },
      );
      return false;
    }
    const lacking = plan.needs.filter((need) => !material.properties[need]);
    if (lacking.length > 0) {
      const words = lacking.map((need) => `${propertyQuantities[need]} (${need})`).join(" and ");
      this.values.problem(
        "invalid-input",
        `${this.values.name()}: ${material.name} has no ${words}. Choose a material that has it.`,
        {
          received: name,
          expected: `a material with ${plan.needs.join(", ")}`,
        },
      );
      return false;
    }
    reader.useMaterial(material, this.values.pointer(), this.allowExtrapolation);
    if (this.values.echo) this.values.used = { material: material.slug, revision: material.revision };
    return true;
  }

  private compiledMaterial(name: string): CompiledMaterial | null {
    const known = this.compiled.get(name);
    if (known) return known;
    const snapshot = Object.hasOwn(this.materials, name) ? this.materials[name] : undefined;
    if (!snapshot) return null;
    const compiled =
      snapshot.compiled ?? compileMaterial(snapshot.material, snapshot.slug, snapshot.revision);
    this.compiled.set(name, compiled);
    return compiled;
  }

  private constantProperty(
    quantity: Quantity,
    given: { value: number; unit: string; at?: { value: number; unit: string } },
    reader: MaterialReader,
  ): boolean {
    const unit = this.values.unit(given.unit, quantity);
    if (!unit) return false;
    const si = toSi(given.value, unit, "plain");
    if (!Number.isFinite(si) || si <= 0) {
      this.values.problem(
        "out-of-range",
        `${this.values.name()}: the ${quantity.name} is ${amountText(given.value, unit.symbol)}. It must be greater than 0.`,
        { received: given.value, expected: "greater than 0", limit: 0 },
      );
      return false;
    }
    const at = given.at && this.statedAt(given.at);
    if (at === null) return false;
    reader.useConstant(si, this.values.pointer());
    if (this.values.echo)
      this.values.used = { constant: usedQuantity(given.value, unit, si), ...(at && { at }) };
    return true;
  }

  /** Mean temperature that a constant was stated at; null with the problem told. */
  private statedAt(at: { value: number; unit: string }): UsedQuantity | null {
    const temperature = quantityByName("temperature");
    const reading = parseUnit(at.unit, temperature ? { expect: temperature } : {});
    if (!reading.ok) {
      this.values.problem(reading.fault.code, `${this.values.name()}: ${reading.fault.message}`, {
        pointer: this.values.pointer("at", "unit"),
        received: at.unit,
      });
      return null;
    }
    const si = toSi(at.value, reading.value, "absolute");
    if (si >= absoluteZeroTolerance) return usedQuantity(at.value, reading.value, si);
    this.values.problem(
      "out-of-range",
      `${this.values.name()}: the temperature it is stated at lies below absolute zero.`,
      {
        pointer: this.values.pointer("at", "value"),
        received: at.value,
      },
    );
    return null;
  }
}
