import "server-only";
import type { Actor } from "@/lib/access/actor";
import { engineVersion } from "@/lib/calculation/engine";
import type { Definition } from "@/lib/calculation/definition";
import type { GivenInputs, RunRequest, TemplateEvaluation } from "@/lib/calculation/evaluation";
import { materialsNeeded } from "@/lib/calculation/execute";
import { compute } from "@/lib/compute/compute";
import { withProblems } from "@/lib/core/call";
import { CodedError, type FieldProblem } from "@/lib/core/errors";
import { pointerTo } from "@/lib/core/problem";
import { materialSnapshots } from "@/lib/materials/snapshots";
import { definitionOf } from "./definition-cache";
import type { RunnableRevision } from "./find-revision";

export interface RunOptions {
  /** Faults of the request's shape, to be told together with those of the run. */
  problems: readonly FieldProblem[];
  /** Inputs marked so must be typed: in kept records, and for other software. */
  mustType: boolean;
  /** Revisions of materials for a run that repeats an earlier one. */
  pinned?: readonly { slug: string; revision: number }[];
}

/** Runs a revision. Throws CodedError with every problem of the request, and `not-accepted`. */
export async function runRevision(
  revision: Pick<RunnableRevision, "id" | "slug" | "number" | "definitionHash">,
  request: RunRequest,
  options: RunOptions,
): Promise<TemplateEvaluation> {
  const definition = await definitionOf(revision);
  const untyped = options.mustType ? mustTypeProblems(definition, request.inputs ?? {}) : [];
  const evaluation = await withProblems([...options.problems, ...untyped], async () => {
    const materials = await materialSnapshots(
      materialsNeeded(definition, request.inputs ?? {}),
      options.pinned,
    );
    const ran = await compute.evaluate(revision.definitionHash, definition, request, materials);
    if (options.mustType) refuseDefaulted(definition, ran.defaulted);
    return ran;
  });
  const answer = {
    template: revision.slug,
    revision: revision.number,
    definitionHash: revision.definitionHash,
    engine: engineVersion,
    ...evaluation,
  };
  if (request.accept !== undefined && !request.accept.includes(answer.status)) {
    throw new CodedError(
      "not-accepted",
      `The run ended with status ${answer.status}; the request accepts ${request.accept.join(", ")}.`,
      [],
      { evaluation: answer },
    );
  }
  return answer;
}

function mustBeTyped(symbol: string, label: string, place: readonly PropertyKey[]): FieldProblem {
  return {
    pointer: pointerTo(...place, symbol),
    code: "missing-input",
    message: `${label} (${symbol}) takes no default here. Type its value.`,
  };
}

export function hasMustType(definition: Definition): boolean {
  return definition.inputs.some((input) => input.kind !== "table" && input.mustType === true);
}

/** Known before the run: inputs that always apply. The rest shows in what the run left to its default. */
export function mustTypeProblems(
  definition: Definition,
  inputs: GivenInputs,
  place: readonly PropertyKey[] = ["inputs"],
): FieldProblem[] {
  return definition.inputs.flatMap((input) =>
    input.kind !== "table" &&
    input.mustType === true &&
    input.appliesWhen === undefined &&
    (inputs[input.symbol] ?? null) === null
      ? [mustBeTyped(input.symbol, input.label, place)]
      : [],
  );
}

function refuseDefaulted(definition: Definition, defaulted: readonly string[]): void {
  const problems = definition.inputs.flatMap((input) =>
    input.kind !== "table" && input.mustType === true && defaulted.includes(input.symbol)
      ? [mustBeTyped(input.symbol, input.label, ["inputs"])]
      : [],
  );
  if (problems.length > 0) throw CodedError.from(problems);
}

/** The request as the engine takes it, with the key's policy where the request is silent. */
export function requestOf(actor: Actor, input: RunRequest): RunRequest {
  const { inputs, units, allowExtrapolation, steps, accept } = input;
  return {
    ...(inputs === undefined ? {} : { inputs }),
    ...(units === undefined ? {} : { units }),
    ...(allowExtrapolation === undefined ? {} : { allowExtrapolation }),
    ...(steps === undefined ? {} : { steps }),
    ...(accept === undefined ? {} : { accept }),
    ...defaultsOf(actor, input),
  };
}

/** What the request says of defaults, else the policy of the key. */
export function defaultsOf(actor: Actor, input: Pick<RunRequest, "defaults">): Pick<RunRequest, "defaults"> {
  const defaults = input.defaults ?? (actor.kind === "key" ? actor.defaultsPolicy : undefined);
  return defaults === undefined ? {} : { defaults };
}
