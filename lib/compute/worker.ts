import { type Definition } from "@/lib/calculation/definition";
import { evaluate, type MaterialSnapshots } from "@/lib/calculation/execute";
import { leftOver, RowsRun } from "@/lib/calculation/execute-rows";
import type { Evaluation, RowOutcome, RowsOutcome } from "@/lib/calculation/evaluation";
import type { Material } from "@/lib/calculation/material";
import { CodedError } from "@/lib/core/errors";
import { Lru } from "./lru";
import { Programs } from "./programs";
import type { Answer, Progress, RowsTask, RunTask, SentMaterial, Task } from "./protocol";

/** What runs in a worker thread: it can be ended from outside at any time, and keeps nothing but caches. */

const programs = new Programs();
const contents = new Lru<Material>(200);
/** Milliseconds between messages about finished rows. */
const progressEvery = 5;

function materialsOf(sent: readonly SentMaterial[]): MaterialSnapshots {
  const snapshots = Object.fromEntries(
    sent.map(({ name, slug, revision, text }) => {
      let material = contents.get(text);
      if (!material) contents.set(text, (material = JSON.parse(text) as Material));
      return [name, { slug, revision, material }];
    }),
  );
  return programs.withCompiled(snapshots);
}

function preparedOf(task: Task) {
  return programs.known(task.hash) ?? programs.of(task.hash, JSON.parse(task.definition) as Definition);
}

function runOne(task: RunTask): Evaluation {
  return evaluate(preparedOf(task), task.request, materialsOf(task.materials));
}

function runRows(task: RowsTask): RowsOutcome {
  const run = new RowsRun(preparedOf(task), task.request, materialsOf(task.materials));
  task.progress.postMessage({ units: run.units, rows: [] } satisfies Progress);
  const end = performance.now() + task.milliseconds;
  const rows: RowOutcome[] = [];
  let toldAt = performance.now();
  let told = 0;
  for (let i = 0; i < run.count; i++) {
    const now = performance.now();
    if (now - toldAt >= progressEvery && rows.length > told) {
      task.progress.postMessage({ units: run.units, rows: rows.slice(told) } satisfies Progress);
      toldAt = now;
      told = rows.length;
    }
    rows.push(now > end ? leftOver(i, task.milliseconds / 1000) : run.evaluate(i));
  }
  task.progress.close();
  return { units: run.units, rows };
}

export default function work(task: Task): Answer<Evaluation | RowsOutcome> {
  Atomics.store(task.started, 0, 1);
  try {
    return { ok: true, result: task.kind === "run" ? runOne(task) : runRows(task) };
  } catch (error) {
    if (!(error instanceof CodedError)) throw error;
    const { code, message, problems, extra } = error;
    return { ok: false, error: { code, message, problems, extra } };
  }
}
