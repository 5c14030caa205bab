import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { RunRequest, TemplateEvaluation } from "@/lib/calculation/evaluation";
import { plainCall, type Call } from "@/lib/core/call";
import { countUsage } from "@/lib/usage/count";
import { lifecycleOf, revisionToRun, type Lifecycle } from "./find-revision";
import { requestOf, runRevision } from "./run-revision";

export interface Evaluated {
  evaluation: TemplateEvaluation;
  lifecycle: Lifecycle;
}

/** Runs a template and keeps nothing: the issued revision, or the numbered one. */
export async function evaluateTemplate(
  actor: Actor,
  input: RunRequest & { slug: string; revision?: number },
  call: Call = plainCall,
): Promise<Evaluated> {
  const { revision } = await revisionToRun(actor, "template.evaluate", input.slug, input.revision);
  const evaluation = await runRevision(revision, requestOf(actor, input), {
    problems: call.problems,
    mustType: actor.kind === "key",
  });
  countUsage(actor, revision.slug, revision.number);
  return { evaluation, lifecycle: await lifecycleOf(revision) };
}
