import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { RowsRequest } from "@/lib/calculation/evaluation";
import { materialsNeededForRows } from "@/lib/calculation/execute";
import { engineVersion } from "@/lib/calculation/engine";
import { compute } from "@/lib/compute/compute";
import { mergeProblems, plainCall, type Call } from "@/lib/core/call";
import { CodedError, type FieldProblem } from "@/lib/core/errors";
import { materialSnapshots } from "@/lib/materials/snapshots";
import { countUsage } from "@/lib/usage/count";
import { definitionOf } from "./definition-cache";
import { lifecycleOf, revisionToRun } from "./find-revision";
import { defaultsOf, hasMustType, mustTypeProblems } from "./run-revision";
import type { EvaluatedRows, RowAnswer } from "./schemas";

/** Runs many rows of a template; a faulty row is answered in its place and spoils no other. */
export async function evaluateRows(
  actor: Actor,
  input: RowsRequest & { slug: string; revision?: number },
  call: Call = plainCall,
): Promise<EvaluatedRows> {
  const { revision } = await revisionToRun(actor, "template.evaluate", input.slug, input.revision);
  const { ofRows, ofRequest } = sorted(call.problems);
  if (ofRequest.length > 0) throw CodedError.from([...call.problems]);
  const definition = await definitionOf(revision);
  const request: RowsRequest = {
    rows: input.rows,
    ...(input.common === undefined ? {} : { common: input.common }),
    ...(input.units === undefined ? {} : { units: input.units }),
    ...(input.allowExtrapolation === undefined ? {} : { allowExtrapolation: input.allowExtrapolation }),
    ...defaultsOf(actor, input),
  };
  const materials = await materialSnapshots(materialsNeededForRows(definition, request));
  const ran = await compute.evaluateRows(revision.definitionHash, definition, request, materials);
  countUsage(actor, revision.slug, revision.number, request.rows.length);
  const mustType = actor.kind === "key" && hasMustType(definition);
  const untyped = (index: number): FieldProblem[] => {
    if (!mustType) return [];
    return mustTypeProblems(definition, { ...input.common, ...input.rows[index] }, ["rows", index]);
  };
  return {
    evaluation: {
      template: revision.slug,
      revision: revision.number,
      definitionHash: revision.definitionHash,
      engine: engineVersion,
      units: ran.units,
      rows:
        mustType || ofRows.size > 0
          ? ran.rows.map((row, index) => withFaults(row, [...(ofRows.get(index) ?? []), ...untyped(index)]))
          : ran.rows,
    },
    lifecycle: await lifecycleOf(revision),
  };
}

/** Faults of the request's shape, those of a row by its index. */
function sorted(problems: readonly FieldProblem[]): {
  ofRows: Map<number, FieldProblem[]>;
  ofRequest: FieldProblem[];
} {
  const ofRows = new Map<number, FieldProblem[]>();
  const ofRequest: FieldProblem[] = [];
  for (const problem of problems) {
    const index = /^#\/rows\/(\d+)(?:\/|$)/.exec(problem.pointer)?.[1];
    if (index === undefined) ofRequest.push(problem);
    else ofRows.set(Number(index), [...(ofRows.get(Number(index)) ?? []), problem]);
  }
  return { ofRows, ofRequest };
}

function withFaults(row: RowAnswer, faults: readonly FieldProblem[]): RowAnswer {
  if (faults.length === 0) return row;
  const found = "problem" in row ? (row.problem.errors ?? []) : [];
  const error = CodedError.from(mergeProblems(faults, found));
  return { problem: { code: error.code, detail: error.message, errors: error.problems } };
}
