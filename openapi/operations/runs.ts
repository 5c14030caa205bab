import { RowsRequest, RunRequest, TemplateEvaluation } from "@/lib/calculation/evaluation";
import { operation } from "@/lib/http/operation";
import {
  RevisionParam,
  RowsEvaluation,
  SlugParam,
  type Evaluated,
  type EvaluatedRows,
} from "@/lib/templates/schemas";
import { evaluation, runInputs } from "../examples";
import { lifecycleHeaderNames, lifecycleHeaders } from "../lifecycle";

const tag = "Runs";
const scope = "runs:evaluate";

const runRefusals = [
  "withdrawn",
  "missing-input",
  "not-accepted",
  "crossed-bounds",
  "unknown-member",
  "invalid-input",
  "unreadable-unit",
  "unknown-material",
  "unit-mismatch",
  "out-of-range",
  "outside-validity",
  "no-solution",
  "not-finite",
  "not-converged",
  "budget-exceeded",
] as const;

const described =
  "An input is a bare number in the declared unit, `{ value, unit }` in any unit of the quantity, an option key, a material (`slug` or `slug@revision`) or rows of a table; one left out takes its default and is named in `defaulted`. Nothing is kept.";

const run = {
  method: "POST",
  tag,
  scope,
  reply: {
    status: 200,
    description: "The evaluation",
    schema: TemplateEvaluation,
    headers: lifecycleHeaderNames,
  },
  refusals: runRefusals,
  present: ({ evaluation: body, lifecycle }: Evaluated) => ({ body, headers: lifecycleHeaders(lifecycle) }),
} as const;

const failure = {
  summary: "A unit of another quantity",
  body: { inputs: { t: { value: 4, unit: "K" } } },
  code: "unit-mismatch",
  detail: "Thickness: K does not measure length. Units that do: mm, m, cm.",
  errors: [
    {
      pointer: "#/inputs/t/unit",
      code: "unit-mismatch",
      message: "Thickness: K does not measure length. Units that do: mm, m, cm.",
      received: "K",
      expected: "length",
      acceptedUnits: ["mm", "m", "cm", "µm", "in", "ft"],
    },
  ],
} as const;

const success = {
  summary: "A wall, thickness in inches",
  body: { inputs: runInputs },
  reply: evaluation,
} as const;

export const evaluateTemplate = operation({
  ...run,
  id: "evaluateTemplate",
  path: "/templates/{slug}/evaluate",
  summary: "Run the issued revision",
  description: `Runs the revision that is issued now. ${described}`,
  request: { params: SlugParam, body: RunRequest, bodyOptional: true, collects: true },
  examples: {
    success: { ...success, params: { slug: "plane-wall" } },
    failure: { ...failure, params: { slug: "plane-wall" } },
  },
});

export const evaluateTemplateRevision = operation({
  ...run,
  id: "evaluateTemplateRevision",
  path: "/templates/{slug}/revisions/{revision}/evaluate",
  summary: "Run a pinned revision",
  description: `Runs the numbered revision as long as it is not withdrawn; \`Deprecation\` tells that it is superseded. ${described}`,
  request: { params: RevisionParam, body: RunRequest, bodyOptional: true, collects: true },
  examples: {
    success: { ...success, params: { slug: "plane-wall", revision: "1" } },
    failure: { ...failure, params: { slug: "plane-wall", revision: "1" } },
  },
});

const rowsDescribed =
  "At most 1,000 rows, answered in order; `common` holds what all rows share. A faulty row is answered with its problem and spoils no other.";

const rows = {
  method: "POST",
  tag,
  scope,
  reply: {
    status: 200,
    description: "The rows in order",
    schema: RowsEvaluation,
    headers: lifecycleHeaderNames,
  },
  refusals: ["withdrawn", "unknown-member", "invalid-input", "unreadable-unit", "unit-mismatch"],
  present: ({ evaluation: body, lifecycle }: EvaluatedRows) => ({
    body,
    headers: lifecycleHeaders(lifecycle),
  }),
} as const;

const rowsExamples = {
  success: {
    summary: "Two thicknesses, one of them impossible",
    body: { rows: [{ t: 50 }, { t: 0 }], common: { k: 0.04 }, units: { q: "BTU/(h·ft²)" } },
    reply: {
      template: "plane-wall",
      revision: 1,
      definitionHash: evaluation.definitionHash,
      engine: "1.0.0",
      units: { q: { unit: "BTU/(h·ft²)", ucum: "[Btu_IT]/(h.[ft_i]2)" }, Q: { unit: "W", ucum: "W" } },
      rows: [
        { status: "ok", results: { R: 1.25, q: 32.967826385327655, Q: 104 } },
        {
          problem: {
            code: "out-of-range",
            detail: "Thickness is 0 mm. It must be greater than 0.",
            errors: [
              {
                pointer: "#/rows/1/t",
                code: "out-of-range",
                message: "Thickness is 0 mm. It must be greater than 0.",
                received: 0,
                limit: 0,
              },
            ],
          },
        },
      ],
    },
  },
  failure: {
    summary: "No rows",
    body: { rows: [] },
    code: "out-of-range",
    detail: "“rows” must have at least 1 item.",
    errors: [
      { pointer: "#/rows", code: "out-of-range", message: "“rows” must have at least 1 item.", limit: 1 },
    ],
  },
} as const;

export const evaluateTemplateRows = operation({
  ...rows,
  id: "evaluateTemplateRows",
  path: "/templates/{slug}/evaluate-rows",
  summary: "Run many rows on the issued revision",
  description: rowsDescribed,
  request: { params: SlugParam, body: RowsRequest, collects: true },
  examples: {
    success: { ...rowsExamples.success, params: { slug: "plane-wall" } },
    failure: { ...rowsExamples.failure, params: { slug: "plane-wall" } },
  },
});

export const evaluateTemplateRevisionRows = operation({
  ...rows,
  id: "evaluateTemplateRevisionRows",
  path: "/templates/{slug}/revisions/{revision}/evaluate-rows",
  summary: "Run many rows on a pinned revision",
  description: rowsDescribed,
  request: { params: RevisionParam, body: RowsRequest, collects: true },
  examples: {
    success: { ...rowsExamples.success, params: { slug: "plane-wall", revision: "1" } },
    failure: { ...rowsExamples.failure, params: { slug: "plane-wall", revision: "1" } },
  },
});
