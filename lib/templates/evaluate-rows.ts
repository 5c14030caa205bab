import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { GivenInputs, RowsRequest } from "@/lib/calculation/evaluation";
import { materialsNeeded } from "@/lib/calculation/execute";
import { engineVersion } from "@/lib/calculation/engine";
import { compute } from "@/lib/compute/compute";
import { plainCall, type Call } from "@/lib/core/call";
import { CodedError, type FieldProblem } from "@/lib/core/errors";
import { materialSnapshots } from "@/lib/materials/snapshots";
import { countUsage } from "@/lib/usage/count";
import { definitionOf } from "./definition-cache";
import { lifecycleOf, revisionToRun } from "./find-revision";
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
  };
  const names = new Set(
    request.rows.flatMap((row: GivenInputs) => materialsNeeded(definition, { ...request.common, ...row })),
  );
  const materials = await materialSnapshots([...names]);
  const ran = await compute.evaluateRows(revision.definitionHash, definition, request, materials);
  countUsage(actor, revision.slug, revision.number, request.rows.length);
  return {
    evaluation: {
      template: revision.slug,
      revision: revision.number,
      definitionHash: revision.definitionHash,
      engine: engineVersion,
      units: ran.units,
      rows: ran.rows.map((row: RowAnswer, index: number) => withShapeFaults(row, ofRows.get(index))),
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

function withShapeFaults(row: RowAnswer, faults: FieldProblem[] | undefined): RowAnswer {
  if (faults === undefined) return row;
  const error = CodedError.from(faults);
  return { problem: { code: error.code, detail: error.message, errors: faults } };
}
