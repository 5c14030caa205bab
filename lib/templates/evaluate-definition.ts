import "server-only";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import { Definition } from "@/lib/calculation/definition";
import { engineVersion } from "@/lib/calculation/engine";
import type { RunRequest } from "@/lib/calculation/evaluation";
import { materialsNeeded } from "@/lib/calculation/execute";
import { definitionHash } from "@/lib/calculation/hash";
import { checkDefinition } from "@/lib/calculation/program";
import { compute } from "@/lib/compute/compute";
import { plainCall, withProblems, type Call } from "@/lib/core/call";
import { CodedError } from "@/lib/core/errors";
import { materialSnapshots } from "@/lib/materials/snapshots";
import { requestOf } from "./run-revision";
import type { DefinitionEvaluation } from "./schemas";

/**
 * Runs a definition that is not saved. Its working is checked where it runs, away from other requests when it is
 * long. Throws `definition-invalid` with its diagnostics.
 */
export async function evaluateDefinition(
  actor: Actor,
  input: RunRequest & { definition?: unknown },
  call: Call = plainCall,
): Promise<DefinitionEvaluation> {
  permit(actor, "definition.evaluate");
  const parsed = Definition.safeParse(input.definition);
  if (!parsed.success) {
    const { diagnostics } = checkDefinition(input.definition);
    const first = diagnostics.find(({ severity }) => severity === "error");
    const detail = `The definition has errors. ${first?.message ?? ""}`.trim();
    throw new CodedError("definition-invalid", detail, [...call.problems], { diagnostics });
  }
  const definition = parsed.data;
  const request = requestOf(actor, input);
  const hash = definitionHash(definition);
  const evaluation = await withProblems(call.problems, async () => {
    const materials = await materialSnapshots(materialsNeeded(definition, request.inputs ?? {}));
    return compute.evaluate(hash, definition, request, materials);
  });
  const answer = { definitionHash: hash, engine: engineVersion, ...evaluation };
  if (request.accept !== undefined && !request.accept.includes(answer.status)) {
    throw new CodedError("not-accepted", `The run ended with status ${answer.status}.`, [], {
      evaluation: answer,
    });
  }
  return answer;
}
