import "server-only";
import { max } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { recordTags, records } from "@/db/schema/records";
import { write } from "@/db/tx";
import { actorId, responsiblePersonId, type Actor } from "@/lib/access/actor";
import { appendAudit } from "@/lib/audit/append";
import { engineVersion } from "@/lib/calculation/engine";
import type { Origin, TemplateEvaluation } from "@/lib/calculation/evaluation";
import { plainCall, type Call } from "@/lib/core/call";
import { now } from "@/lib/core/clock";
import { CodedError, type FieldProblem } from "@/lib/core/errors";
import { nearestName } from "@/lib/core/nearest";
import { pointerTo } from "@/lib/core/problem";
import { lifecycleOf, revisionToRun } from "@/lib/templates/find-revision";
import { requestOf, runRevision } from "@/lib/templates/run-revision";
import { countUsage } from "@/lib/usage/count";
import { recordDigest } from "./digest";
import { recordName } from "./record-number";
import type { CreateRecordBody, KeptRecord } from "./schemas";
import { freshRecordView, type KeptRequest } from "./view";

/** Runs a template and keeps the run with everything needed to repeat it. Answers after the commit. */
export async function createRecord(
  actor: Actor,
  input: CreateRecordBody & { slug: string; revision?: number },
  call: Call<Tx, KeptRecord> = plainCall,
): Promise<KeptRecord> {
  const { revision, permitted } = await revisionToRun(actor, "record.create", input.slug, input.revision);
  if (revision.state === "draft" || revision.state === "in_check") {
    throw new CodedError(
      "state-conflict",
      `Revision ${revision.number} of ${revision.slug} is not issued. Records are kept of issued revisions.`,
    );
  }
  const request = requestOf(actor, input);
  const evaluation = await runRevision(
    revision,
    { ...request, steps: true },
    { problems: [...call.problems, ...unknownOrigins(input)], mustType: true },
  );
  const lifecycle = await lifecycleOf(revision);
  const given: KeptRequest = {
    inputs: input.inputs ?? {},
    ...(input.units === undefined ? {} : { units: input.units }),
    ...(input.allowExtrapolation === undefined ? {} : { allowExtrapolation: input.allowExtrapolation }),
    origins: originsOf(evaluation, input.origins ?? {}),
  };
  const tags = [...new Set(input.tags ?? [])].sort();

  const kept = await write(async (tx) => {
    const [last] = await tx.select({ number: max(records.number) }).from(records);
    const content = {
      number: (last?.number ?? 0) + 1,
      template: revision.slug,
      revision: revision.number,
      definitionHash: revision.definitionHash,
      engineVersion,
      nodeVersion: process.version,
      given: { ...given },
      evaluation: { ...evaluation },
      title: input.title ?? "",
      note: input.note ?? "",
      actorKind: actor.kind,
      actorId: actorId(actor),
      ownerId: responsiblePersonId(actor),
      createdAt: now(),
    };
    const row = {
      ...content,
      templateRevisionId: revision.id,
      status: evaluation.status,
      digest: recordDigest(content),
    };
    await tx.insert(records).values(row);
    if (tags.length > 0) {
      await tx.insert(recordTags).values(tags.map((tag) => ({ recordNumber: row.number, tag })));
    }
    const answer = { record: freshRecordView(row, tags, actor), lifecycle };
    await appendAudit(tx, permitted, {
      action: "record.created",
      object: `record:${recordName(row.number)}`,
      details: { template: row.template, revision: row.revision, status: row.status, digest: row.digest },
    });
    await call.remember(tx, answer);
    return answer;
  });
  countUsage(actor, revision.slug, revision.number);
  return kept;
}

/** What was sent counts as typed unless the request says otherwise; the rest came from defaults. */
function originsOf(evaluation: TemplateEvaluation, stated: Record<string, Origin>): Record<string, Origin> {
  const defaulted = new Set(evaluation.defaulted);
  return Object.fromEntries(
    Object.keys(evaluation.inputs).map((symbol) => [
      symbol,
      defaulted.has(symbol) ? "default" : (stated[symbol] ?? "typed"),
    ]),
  );
}

function unknownOrigins({ origins = {}, inputs = {} }: CreateRecordBody): FieldProblem[] {
  return Object.keys(origins)
    .filter((symbol) => !Object.hasOwn(inputs, symbol) && origins[symbol] !== "default")
    .map((symbol) => {
      const near = nearestName(symbol, Object.keys(inputs));
      return {
        pointer: pointerTo("origins", symbol),
        code: "unknown-member",
        message: `An origin is given for “${symbol}”, which is not among the inputs sent.${near === null ? "" : ` Did you mean “${near}”?`}`,
      };
    });
}
