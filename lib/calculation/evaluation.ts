import { z } from "zod";
import type { FaultOfRow } from "@/lib/core/problem";

/**
 * What a run is asked and what it answers, in the form of the REST contract. The same shapes serve the form, the API,
 * the record and the sheet; a number never travels without its unit.
 */

const Finite = z.number();

/** `{ value, unit }` in any unit of the declared dimension; a missing unit is the declared one. */
export const GivenQuantity = z.strictObject({
  value: Finite,
  unit: z.string().max(64).optional(),
  uncertainty: Finite.nonnegative().optional(),
  halfWidth: Finite.nonnegative().optional(),
  distribution: z.enum(["normal", "uniform", "triangular"]).optional(),
  degreesOfFreedom: Finite.positive().optional(),
  /** Of a constant property in place of a material: the mean temperature it was stated at. */
  at: z.strictObject({ value: Finite, unit: z.string().max(64) }).optional(),
});

export const GivenCell = z.union([Finite, z.string().max(200), GivenQuantity, z.null()]);
/** A number, an option key, a material slug (`slug` or `slug@revision`), a quantity, rows of a table, or null (as if missing). */
export const GivenValue = z.union([
  Finite,
  z.string().max(200),
  GivenQuantity,
  z.array(z.record(z.string().max(64), GivenCell)).max(1000),
  z.null(),
]);
export const GivenInputs = z.record(z.string().max(64), GivenValue);

/** Where an input came from, kept in records and shown beside the field. */
export const origins = ["typed", "default", "list", "tag", "file", "record"] as const;
export const Origin = z.enum(origins);

export const statuses = ["ok", "caution", "stop"] as const;
export const Status = z.enum(statuses);

export const RunRequest = z.strictObject({
  inputs: GivenInputs.optional(),
  /** Units wanted for results: `{ "Q": "BTU/h" }`. */
  units: z.record(z.string().max(64), z.string().max(64)).optional(),
  allowExtrapolation: z.boolean().optional(),
  steps: z.boolean().optional(),
  defaults: z.enum(["allow", "refuse"]).optional(),
  accept: z.array(Status).min(1).max(3).optional(),
});

export const RowsRequest = z.strictObject({
  rows: z.array(GivenInputs).min(1).max(1000),
  common: GivenInputs.optional(),
  units: z.record(z.string().max(64), z.string().max(64)).optional(),
  allowExtrapolation: z.boolean().optional(),
  defaults: z.enum(["allow", "refuse"]).optional(),
});

/** A number as used: as given, and in SI. */
export const UsedQuantity = z.object({
  value: Finite,
  unit: z.string(),
  ucum: z.string().nullable(),
  si: Finite,
});
export const UsedMaterial = z.object({ material: z.string(), revision: z.number().int() });
export const UsedConstant = z.object({ constant: UsedQuantity, at: UsedQuantity.optional() });
export const UsedCell = z.union([
  UsedQuantity,
  UsedMaterial,
  UsedConstant,
  z.object({ option: z.string() }),
  z.object({ text: z.string() }),
]);
export const UsedValue = z.union([UsedCell, z.object({ rows: z.array(z.record(z.string(), UsedCell)) })]);

export const ResultValue = z.object({
  value: Finite.optional(),
  values: z.array(Finite).optional(),
  unit: z.string(),
  ucum: z.string().nullable(),
  label: z.string(),
  quantity: z.string(),
});

export const LimitVerdict = z.object({
  code: z.string(),
  level: z.enum(["caution", "stop"]),
  label: z.string(),
  broken: z.boolean(),
  message: z.string().optional(),
  value: Finite.optional(),
  bound: Finite.optional(),
  unit: z.string().optional(),
});

/** `pointer` leads to the input concerned. */
export const Caution = z.object({ code: z.string(), message: z.string(), pointer: z.string().optional() });
/** Standing text: of the template, of a unit that was read with a remark, or by temperature (`safety-…`). */
export const Notice = z.object({ code: z.string(), message: z.string() });

export const Step = z.object({
  symbol: z.string(),
  expression: z.string(),
  value: Finite.optional(),
  values: z.array(Finite).optional(),
  unit: z.string(),
});

export const Evaluation = z.object({
  status: Status,
  inputs: z.record(z.string(), UsedValue),
  defaulted: z.array(z.string()),
  results: z.record(z.string(), ResultValue),
  limits: z.array(LimitVerdict),
  cautions: z.array(Caution),
  notices: z.array(Notice),
  materials: z.array(z.object({ slug: z.string(), revision: z.number().int() })),
  steps: z.array(Step).optional(),
});

/** An evaluation of a template's revision, as the API answers it. */
export const TemplateEvaluation = z.object({
  template: z.string(),
  revision: z.number().int(),
  definitionHash: z.string(),
  engine: z.string(),
  ...Evaluation.shape,
});

/** One row of an evaluation of many: results as bare numbers in the units stated once for all rows. */
export type RowOutcome =
  | {
      status: Status;
      results: Record<string, number | number[]>;
      cautions?: Caution[];
    }
  | { problem: FaultOfRow };

export interface RowsOutcome {
  /** Unit of each result. */
  units: Record<string, { unit: string; ucum: string | null }>;
  rows: RowOutcome[];
}

export type GivenInputs = z.infer<typeof GivenInputs>;
export type GivenValue = z.infer<typeof GivenValue>;
export type GivenCell = z.infer<typeof GivenCell>;
export type GivenQuantity = z.infer<typeof GivenQuantity>;
export type RunRequest = z.infer<typeof RunRequest>;
export type RowsRequest = z.infer<typeof RowsRequest>;
export type Evaluation = z.infer<typeof Evaluation>;
export type TemplateEvaluation = z.infer<typeof TemplateEvaluation>;
export type UsedValue = z.infer<typeof UsedValue>;
export type UsedCell = z.infer<typeof UsedCell>;
export type ResultValue = z.infer<typeof ResultValue>;
export type UsedQuantity = z.infer<typeof UsedQuantity>;
export type Caution = z.infer<typeof Caution>;
export type Notice = z.infer<typeof Notice>;
export type Step = z.infer<typeof Step>;
export type LimitVerdict = z.infer<typeof LimitVerdict>;
export type Status = z.infer<typeof Status>;
export type Origin = z.infer<typeof Origin>;
