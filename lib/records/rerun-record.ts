import "server-only";
import { eq } from "drizzle-orm";
import { reader } from "@/db/client";
import { templateRevisions } from "@/db/schema/templates";
import type { Actor } from "@/lib/access/actor";
import { permit } from "@/lib/access/permit";
import type { ResultValue, RunRequest, TemplateEvaluation } from "@/lib/calculation/evaluation";
import { findShownRevision, nothingHere } from "@/lib/templates/find-revision";
import { runRevision } from "@/lib/templates/run-revision";
import { findRecord } from "./find-record";
import type { Deviation, Rerun } from "./schemas";
import type { KeptRequest, RecordRow } from "./view";

/**
 * Runs a record's request again and keeps nothing: with the record's own revisions of template and materials, withdrawn
 * ones too, or with the current ones. Answers both results and their deviations.
 */
export async function rerunRecord(
  actor: Actor,
  { number, on = "record" }: { number: string; on?: "record" | "current" },
): Promise<Rerun> {
  const row = await findRecord(reader(), number);
  permit(actor, "record.rerun", row);
  const { steps: _steps, ...before } = row.evaluation as unknown as TemplateEvaluation & { steps?: unknown };
  const after = on === "record" ? await rerunAsKept(row, before) : await rerunOnCurrent(actor, row);
  const deviations = deviationsOf(before, after);
  return {
    number,
    on,
    same: deviations.length === 0 && before.status === after.status,
    before,
    after,
    deviations,
  };
}

function requestOf(row: RecordRow): RunRequest {
  const { inputs, units, allowExtrapolation } = row.given as unknown as KeptRequest;
  return {
    inputs,
    ...(units === undefined ? {} : { units }),
    ...(allowExtrapolation === undefined ? {} : { allowExtrapolation }),
  };
}

async function rerunAsKept(row: RecordRow, before: TemplateEvaluation): Promise<TemplateEvaluation> {
  const [revision] = await reader()
    .select({ id: templateRevisions.id, definitionHash: templateRevisions.definitionHash })
    .from(templateRevisions)
    .where(eq(templateRevisions.id, row.templateRevisionId));
  if (!revision) throw nothingHere();
  const kept = { ...revision, slug: row.template, number: row.revision };
  return runRevision(kept, requestOf(row), { problems: [], mustType: false, pinned: before.materials });
}

async function rerunOnCurrent(actor: Actor, row: RecordRow): Promise<TemplateEvaluation> {
  permit(actor, "template.read", { slug: row.template });
  const current = await findShownRevision(actor, row.template);
  if (current?.state !== "issued") throw nothingHere();
  return runRevision(current, requestOf(row), { problems: [], mustType: false });
}

function valueOf(result: ResultValue | undefined): Deviation["before"] {
  if (!result) return null;
  const { value, values, unit } = result;
  return { ...(value === undefined ? {} : { value }), ...(values === undefined ? {} : { values }), unit };
}

/** Results that differ in any digit, are missing on one side, or have another unit. */
function deviationsOf(before: TemplateEvaluation, after: TemplateEvaluation): Deviation[] {
  const symbols = [...new Set([...Object.keys(before.results), ...Object.keys(after.results)])];
  return symbols.flatMap((symbol): Deviation[] => {
    const [was, is] = [valueOf(before.results[symbol]), valueOf(after.results[symbol])];
    const [left, right] = [numbersOf(was), numbersOf(is)];
    const comparable = was !== null && is !== null && was.unit === is.unit && left.length === right.length;
    if (!comparable) return [{ symbol, before: was, after: is, absolute: null, relative: null }];
    const absolute = Math.max(0, ...left.map((value, index) => Math.abs((right[index] ?? value) - value)));
    if (absolute === 0) return [];
    const relatives = left.map((value, index) => Math.abs((right[index] ?? value) - value) / Math.abs(value));
    const relative = Math.max(...relatives);
    return [
      { symbol, before: was, after: is, absolute, relative: Number.isFinite(relative) ? relative : null },
    ];
  });
}

function numbersOf(value: Deviation["before"]): readonly number[] {
  if (value === null) return [];
  return value.values ?? (value.value === undefined ? [] : [value.value]);
}
