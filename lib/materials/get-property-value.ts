import "server-only";
import type { Actor } from "@/lib/access/actor";
import { compileMaterial } from "@/lib/calculation/compiled-material";
import type { Material } from "@/lib/calculation/material";
import { MaterialReader, rangeText } from "@/lib/calculation/material-reader";
import { propertyQuantities } from "@/lib/calculation/property-quantity";
import { CodedError, type FieldProblem } from "@/lib/core/errors";
import { pointerTo } from "@/lib/core/problem";
import { propertyNames, RunFault, type PropertyName } from "@/lib/language";
import {
  fromSi,
  parseAmount,
  parseUnit,
  quantityByName,
  toSi,
  type ReadOptions,
  type Unit,
} from "@/lib/units";
import { findMaterial, noSuchMaterial } from "./find-material";
import { materialFrom } from "./material-cache";
import type { PropertyValue, PropertyValueQuery } from "./schemas";

type Property = NonNullable<Material["properties"][PropertyName]>;

/**
 * A property at a temperature, or its mean over a range of temperatures. Throws `not-found` for a material or property
 * that is not there, and problems for what cannot be read or lies outside the valid range.
 */
export async function getPropertyValue(
  actor: Actor,
  input: PropertyValueQuery & { slug: string; name: string },
): Promise<PropertyValue> {
  const { revision } = await findMaterial(actor, input.slug, input.revision);
  const material = materialFrom(revision.definitionHash, revision.definition);
  const name = propertyNames.find((known) => known === input.name);
  const property = name && material.properties[name];
  if (!name || !property) throw noSuchMaterial();

  const { from, to, answerUnit } = readQuery(input, property, name);
  const compiled = compileMaterial(material, input.slug, revision.number);
  const reader = new MaterialReader();
  reader.useMaterial(compiled, pointerTo("query", "T"), input.allowExtrapolation === "true");
  const si = readProperty(() =>
    to === null ? reader.value(name, from.si, true) : reader.mean(name, from.si, to.si, true),
  );
  return {
    material: input.slug,
    revision: revision.number,
    property: name,
    value: fromSi(si, answerUnit, "plain"),
    unit: answerUnit.symbol,
    ucum: answerUnit.ucum,
    T: { value: from.value, unit: from.unit.symbol },
    ...(to === null ? {} : { to: { value: to.value, unit: to.unit.symbol } }),
    source: property.source,
    basis: property.basis,
    cautions: reader.extrapolations.map(({ property: extrapolated }) => ({
      code: "extrapolation",
      message: `Read outside its valid range, which is ${rangeText(extrapolated)}.`,
    })),
  };
}

interface Temperature {
  value: number;
  unit: Unit;
  si: number;
}

/** All faults of the query at once. */
function readQuery(input: PropertyValueQuery, property: Property, name: PropertyName) {
  const problems: FieldProblem[] = [];
  const temperature = quantityByName("temperature");
  const asTemperature: ReadOptions = temperature ? { expect: temperature } : {};
  const quantity = quantityByName(propertyQuantities[name]);
  const unitOf = (member: "unit" | "in", text: string, options: ReadOptions): Unit | null => {
    const reading = parseUnit(text, options);
    if (reading.ok) return reading.value;
    problems.push(problemOf(member, text, reading.fault));
    return null;
  };
  const bareUnit = unitOf("unit", input.unit ?? property.argumentUnit, asTemperature);
  const answerUnit = unitOf("in", input.in ?? property.unit, quantity ? { expect: quantity } : {});
  const read = (member: "T" | "to", text: string): Temperature | null => {
    const reading = parseAmount(text, asTemperature);
    if (!reading.ok) {
      problems.push(problemOf(member, text, reading.fault));
      return null;
    }
    const unit = reading.value.unit ?? bareUnit;
    if (unit === null) return null;
    const si = toSi(reading.value.value, unit, "absolute");
    if (si >= 0) return { value: reading.value.value, unit, si };
    const message = `${text} lies below absolute zero.`;
    problems.push({ pointer: pointerTo("query", member), code: "out-of-range", message, received: text });
    return null;
  };
  const from = read("T", input.T);
  const to = input.to === undefined ? null : read("to", input.to);
  if (problems.length > 0 || from === null || answerUnit === null) throw CodedError.from(problems);
  return { from, to, answerUnit };
}

type Fault = Extract<ReturnType<typeof parseUnit>, { ok: false }>["fault"];

function problemOf(member: string, received: string, fault: Fault): FieldProblem {
  const problem: FieldProblem = {
    pointer: pointerTo("query", member),
    code: fault.code,
    message: fault.message,
    received,
  };
  return fault.suggestions.length === 0 ? problem : { ...problem, acceptedUnits: [...fault.suggestions] };
}

function readProperty(read: () => number): number {
  try {
    return read();
  } catch (fault) {
    if (!(fault instanceof RunFault)) throw fault;
    throw CodedError.from([{ pointer: pointerTo("query", "T"), code: fault.code, message: fault.message }]);
  }
}
