import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { RunRequest } from "@/lib/calculation/evaluation";
import { plainCall, type Call } from "@/lib/core/call";
import { countUsage } from "@/lib/usage/count";
import { lifecycleOf, revisionToRun } from "./find-revision";
import { requestOf, runRevision } from "./run-revision";
import type { Evaluated } from "./schemas";

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
