import { z } from "zod";
import { revisionStates } from "@/db/vocabulary";
import { categories, Definition, Slug } from "@/lib/calculation/definition";
import { Evaluation, RunRequest, Status, type TemplateEvaluation } from "@/lib/calculation/evaluation";
import { pageQuery } from "@/lib/core/paging";
import { FaultOfRow } from "@/lib/core/problem";
import { Named, orNull, RevisionMembers, RevisionNumber } from "@/lib/materials/schemas";

/** Shapes of what templates are asked and what they answer. */

const Moment = z.iso.datetime();

const TemplateSlug = Slug.describe("Slug of the template.");

export const SlugParam = z.object({ slug: TemplateSlug });
export const RevisionParam = z.object({ slug: TemplateSlug, revision: RevisionNumber });

export const RevisionSummary = z.object({ template: z.string(), ...RevisionMembers.shape });
export const RevisionView = z.object({ ...RevisionSummary.shape, definition: Definition });

export const TemplateItem = z.object({
  slug: z.string(),
  title: z.string(),
  summary: z.string(),
  category: z.enum(categories),
  tags: z.array(z.string()),
  revision: z.int(),
  state: z.enum(revisionStates),
  supplied: z.boolean(),
  adopted: z.boolean(),
  issuedAt: orNull(Moment),
  issuedBy: orNull(Named),
  verifyBy: orNull(Moment),
  withdrawalDate: orNull(Moment),
  /** Evaluations and records of all revisions in the last 30 days. */
  runsLast30Days: z.int(),
});
export const TemplatePage = z.object({ items: z.array(TemplateItem), nextCursor: orNull(z.string()) });

export const TemplateView = z.object({
  slug: z.string(),
  category: z.enum(categories),
  createdAt: Moment,
  /** The revision that a run by slug uses; the latest that may be seen when none is issued. */
  current: RevisionView,
});
export const RevisionPage = z.object({ items: z.array(RevisionSummary), nextCursor: orNull(z.string()) });

export const ListTemplatesQuery = z.strictObject({
  ...pageQuery,
  search: z
    .string()
    .trim()
    .min(1)
    .max(120)
    .optional()
    .describe("Beginnings of words in title, tags, symbols, labels or quantities; all must be found."),
  category: z.enum(categories).optional().describe("Only this category."),
  state: z.enum(revisionStates).optional().describe("Only revisions in this state."),
});
export const ListRevisionsQuery = z.strictObject(pageQuery);

/** JSON Schema (2020-12) of a revision's inputs. */
export const InputSchemaView = z.looseObject({
  $schema: z.string(),
  $id: z.string(),
  title: z.string(),
  type: z.literal("object"),
  properties: z.record(z.string(), z.unknown()),
  required: z.array(z.string()),
  additionalProperties: z.literal(false),
});

export const RowAnswer = z.union([
  z.object({
    status: Status,
    results: z.record(z.string(), z.union([z.number(), z.array(z.number())])),
    cautions: z
      .array(z.object({ code: z.string(), message: z.string(), pointer: z.string().optional() }))
      .optional(),
  }),
  z.object({ problem: FaultOfRow }),
]);
export const RowsEvaluation = z.object({
  template: z.string(),
  revision: z.int(),
  definitionHash: z.string(),
  engine: z.string(),
  units: z.record(z.string(), z.object({ unit: z.string(), ucum: orNull(z.string()) })),
  rows: z.array(RowAnswer),
});

// ───────────────────────────── definitions that are not saved

/** Any JSON: what is wrong with it is the answer, not a refusal. */
export const CheckDefinitionBody = z.strictObject({ definition: z.unknown() });

export const DiagnosticView = z.object({
  path: z.string(),
  line: z.int().optional(),
  column: z.int().optional(),
  endLine: z.int().optional(),
  endColumn: z.int().optional(),
  severity: z.enum(["error", "warning", "remark"]),
  code: z.string(),
  message: z.string(),
  hint: z.string().optional(),
  mend: z
    .object({
      title: z.string(),
      span: z.object({ line: z.int(), column: z.int(), endLine: z.int(), endColumn: z.int() }),
      text: z.string(),
    })
    .optional(),
});
export const DefinitionCheck = z.object({
  ok: z.boolean(),
  diagnostics: z.array(DiagnosticView),
  lines: z.array(
    z.object({ symbol: z.string(), quantity: orNull(z.string()), unit: z.string(), shape: z.string() }),
  ),
});

export const EvaluateDefinitionBody = z.strictObject({ definition: z.unknown(), ...RunRequest.shape });
export const DefinitionEvaluation = z.object({
  definitionHash: z.string(),
  engine: z.string(),
  ...Evaluation.shape,
});

// ───────────────────────────── units and functions

export const QuantityPage = z.object({
  items: z.array(
    z.object({
      name: z.string(),
      /** Whether °C and °F are temperatures, differences, or neither. */
      kind: z.enum(["absolute", "difference", "plain"]),
      unit: z.string(),
      units: z.array(z.object({ unit: z.string(), ucum: orNull(z.string()) })),
    }),
  ),
  nextCursor: orNull(z.string()),
});
export const FunctionPage = z.object({
  items: z.array(
    z.object({
      name: z.string(),
      kind: z.enum(["function", "special form"]),
      parameters: z.array(z.string()),
      /** The last parameter may be repeated. */
      variadic: z.boolean(),
      help: z.string(),
      source: z.string().optional(),
    }),
  ),
  constants: z.array(
    z.object({
      name: z.string(),
      /** In the coherent SI unit beside it. */
      value: z.number(),
      unit: z.string(),
      help: z.string(),
      source: z.string(),
    }),
  ),
  nextCursor: orNull(z.string()),
});

/** How a revision stands on its way out of use, for the caller's warning. */
export interface Lifecycle {
  slug: string;
  supersededAt: Date | null;
  withdrawalDate: Date | null;
  /** The issued revision that replaced it. */
  successor: number | null;
}
export interface Evaluated {
  evaluation: TemplateEvaluation;
  lifecycle: Lifecycle;
}
export interface EvaluatedRows {
  evaluation: RowsEvaluation;
  lifecycle: Lifecycle;
}

export type QuantityPage = z.infer<typeof QuantityPage>;
export type FunctionPage = z.infer<typeof FunctionPage>;
export type RevisionSummary = z.infer<typeof RevisionSummary>;
export type RevisionView = z.infer<typeof RevisionView>;
export type TemplateItem = z.infer<typeof TemplateItem>;
export type TemplateView = z.infer<typeof TemplateView>;
export type ListTemplatesQuery = z.infer<typeof ListTemplatesQuery>;
export type RowsEvaluation = z.infer<typeof RowsEvaluation>;
export type RowAnswer = z.infer<typeof RowAnswer>;
export type DefinitionCheck = z.infer<typeof DefinitionCheck>;
export type DefinitionEvaluation = z.infer<typeof DefinitionEvaluation>;
export type InputSchemaView = z.infer<typeof InputSchemaView>;
