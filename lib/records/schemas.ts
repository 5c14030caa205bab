import { z } from "zod";
import { actorKinds } from "@/db/vocabulary";
import { Slug } from "@/lib/calculation/definition";
import { GivenInputs, Origin, RunRequest, Status, TemplateEvaluation } from "@/lib/calculation/evaluation";
import { pageQuery } from "@/lib/core/paging";
import { orNull, RevisionNumber } from "@/lib/materials/schemas";
import type { Lifecycle } from "@/lib/templates/schemas";

/** Shapes of what records are asked and what they answer. */

const Moment = z.iso.datetime();

export const recordNumberPattern = /^R-\d{6,12}$/;
export const RecordNumber = z.string().regex(recordNumberPattern, "A record's number looks like R-000001.");
export const RecordParam = z.object({ number: RecordNumber.describe("Number of the record, `R-000001`.") });

export const Tag = z.string().trim().min(1).max(64);

export const CreateRecordBody = z.strictObject({
  ...RunRequest.shape,
  tags: z.array(Tag).max(20).optional(),
  title: z.string().trim().max(160).optional(),
  note: z.string().trim().max(2000).optional(),
  /** Where inputs came from, when not typed: `{ "d_in": "list" }`. */
  origins: z.record(z.string().max(64), Origin).optional(),
});

export const RecordActor = z.object({ kind: z.enum(actorKinds), id: z.string(), name: z.string() });

/** The request as it was typed. */
export const GivenRequest = z.object({
  inputs: GivenInputs,
  units: z.record(z.string(), z.string()).optional(),
  allowExtrapolation: z.boolean().optional(),
});

export const RecordVoid = z.object({ reason: z.string(), at: Moment, by: RecordActor });

export const RecordView = z.object({
  number: z.string(),
  ...TemplateEvaluation.shape,
  /** The request as it was typed, before units were converted. */
  given: GivenRequest,
  /** Where each input came from. */
  origins: z.record(z.string(), Origin),
  title: z.string(),
  note: z.string(),
  tags: z.array(z.string()),
  createdAt: Moment,
  createdBy: RecordActor,
  node: z.string(),
  /** SHA-256 over the canonical content without tags and void, hex. */
  digest: z.string(),
  void: orNull(RecordVoid),
});

export const RecordItem = z.object({
  number: z.string(),
  template: z.string(),
  templateTitle: z.string(),
  revision: z.int(),
  status: Status,
  title: z.string(),
  tags: z.array(z.string()),
  createdAt: Moment,
  createdBy: RecordActor,
  voided: z.boolean(),
});
export const RecordPage = z.object({ items: z.array(RecordItem), nextCursor: orNull(z.string()) });

export const ListRecordsQuery = z.strictObject({
  ...pageQuery,
  template: Slug.optional().describe("Slug of the template."),
  revision: RevisionNumber.optional(),
  tag: Tag.optional().describe("Only records with this tag."),
  status: Status.optional().describe("Only runs that ended so."),
  owner: z
    .string()
    .min(1)
    .max(64)
    .optional()
    .describe("`me`, or the id of the person who answers for the record."),
  voided: z.enum(["true", "false"]).optional().describe("Only void records, or only those that stand."),
  from: z.iso.datetime({ offset: true }).optional().describe("First moment of creation."),
  to: z.iso.datetime({ offset: true }).optional().describe("Last moment of creation."),
  search: z.string().trim().min(1).max(120).optional().describe("Part of the title, or a record's number."),
});

export const VoidRecordBody = z.strictObject({ reason: z.string().trim().min(1).max(600) });

export const RerunRecordBody = z.strictObject({
  /** `record` (the record's own revisions, also withdrawn ones) or `current`. */
  on: z.enum(["record", "current"]).optional(),
});
const DeviationValue = orNull(
  z.object({ value: z.number().optional(), values: z.array(z.number()).optional(), unit: z.string() }),
);
export const Deviation = z.object({
  symbol: z.string(),
  before: DeviationValue,
  after: DeviationValue,
  /** Greatest difference, in the unit of both; null when one is missing or the units differ. */
  absolute: orNull(z.number()),
  relative: orNull(z.number()),
});
export const Rerun = z.object({
  number: z.string(),
  on: z.enum(["record", "current"]),
  /** Every result has the same digits. */
  same: z.boolean(),
  before: TemplateEvaluation,
  after: TemplateEvaluation,
  deviations: z.array(Deviation),
});

/** A record just kept, and how the revision used stands. */
export interface KeptRecord {
  record: RecordView;
  lifecycle: Lifecycle;
}

export type CreateRecordBody = z.infer<typeof CreateRecordBody>;
export type GivenRequest = z.infer<typeof GivenRequest>;
export type RecordActor = z.infer<typeof RecordActor>;
export type RecordView = z.infer<typeof RecordView>;
export type RecordItem = z.infer<typeof RecordItem>;
export type ListRecordsQuery = z.infer<typeof ListRecordsQuery>;
export type Rerun = z.infer<typeof Rerun>;
export type Deviation = z.infer<typeof Deviation>;
