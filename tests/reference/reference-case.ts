import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { fromSi, parseUnit } from "@/lib/units";
import { si } from "./shelf";

/** Reference cases as they were collected: each with inputs, expected values, tolerance, source and basis. */

interface Quantity {
  readonly value: number | string | readonly number[] | readonly string[];
  readonly unit: string;
}
interface Expected {
  readonly value: number | boolean;
  readonly unit: string;
  readonly abs_tol?: number;
  readonly rel_tol?: number;
}
export interface ReferenceCase {
  readonly id: string;
  readonly topic: string;
  readonly title: string;
  readonly inputs: Readonly<Record<string, Quantity>>;
  readonly expected: Readonly<Record<string, Expected>>;
  readonly source: string;
  readonly basis: string;
  readonly note?: string;
}

export const referenceCases = JSON.parse(
  readFileSync(fileURLToPath(new URL("./data/cases.json", import.meta.url)), "utf8"),
) as readonly ReferenceCase[];

/** Spellings of the collection that differ from what the unit reader takes. */
const spelling: Readonly<Record<string, string>> = {
  "-": "1",
  "m/m": "1",
  degC: "°C",
  degF: "°F",
  "ohm*m": "Ω·m",
  "W*ohm/K^2": "W·Ω/K²",
  "Btu/(h*ft*degF)": "BTU/(h·ft·°F)",
  day: "d",
  rad: "1",
};
export const unitOf = (unit: string) => spelling[unit] ?? unit;

/** Scalar input in SI. */
export function input(reference: ReferenceCase, name: string): number {
  const found = reference.inputs[name];
  if (!found || typeof found.value !== "number") throw new Error(`${reference.id} has no number ${name}.`);
  return si(found.value, unitOf(found.unit));
}

/** List input in SI. */
export function inputs(reference: ReferenceCase, name: string): number[] {
  const found = reference.inputs[name];
  if (!found || !Array.isArray(found.value)) throw new Error(`${reference.id} has no list ${name}.`);
  return (found.value as readonly number[]).map((value) => si(value, unitOf(found.unit)));
}

/** How far an answer in SI lies from what is expected, in the case's unit, and how far it may lie. */
export function deviation(expected: Expected, answer: number) {
  if (typeof expected.value !== "number") throw new Error("A number answers a yes-or-no question.");
  const unit = unitOf(expected.unit);
  const reading = parseUnit(unit);
  if (!reading.ok) throw new Error(`${unit}: ${reading.fault.message}`);
  const got = fromSi(answer, reading.value, unit === "°C" || unit === "°F" ? "absolute" : "plain");
  const allowed = Math.max(expected.abs_tol ?? 0, (expected.rel_tol ?? 0) * Math.abs(expected.value));
  return { got, expected: expected.value, distance: Math.abs(got - expected.value), allowed };
}

export type Answers = Readonly<Record<string, number | boolean>>;

/** How a case is run: through which part of the product, and its answers in SI by expected name. */
export interface CaseRun {
  readonly through: string;
  readonly answers: (reference: ReferenceCase) => Answers;
}
export type CaseRuns = Readonly<Record<string, CaseRun>>;
