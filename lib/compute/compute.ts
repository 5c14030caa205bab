import "server-only";
import { MessageChannel } from "node:worker_threads";
import type { CompiledMaterial } from "@/lib/calculation/compiled-material";
import type { Definition } from "@/lib/calculation/definition";
import type {
  Evaluation,
  RowOutcome,
  RowsOutcome,
  RowsRequest,
  RunRequest,
} from "@/lib/calculation/evaluation";
import { evaluate, evaluateRows, type MaterialSnapshots, type Prepared } from "@/lib/calculation/execute";
import { leftOver } from "@/lib/calculation/execute-rows";
import type { Material } from "@/lib/calculation/material";
import { CodedError } from "@/lib/core/errors";
import { Ended, Pool } from "./pool";
import { Programs } from "./programs";
import type { Answer, Progress, SentMaterial, Task } from "./protocol";

export interface TimeLimits {
  /** Seconds that one run may take. */
  readonly run: number;
  /** Seconds that a request with many rows may take. */
  readonly rows: number;
}

const usualLimits: TimeLimits = { run: 2, rows: 10 };
/** Steps of about 10 ns that may run beside other requests: some milliseconds. */
const mostStepsInProcess = 500_000;
/** Definitions with longer workings are checked and compiled in a worker only. */
const longestWorkingInProcess = 8_000;

/** Length of the longest list given for a table, over all rows of a request. */
function rowsGiven(request: RunRequest | RowsRequest, table: string): number {
  const all = "rows" in request ? [...request.rows, request.common] : [request.inputs];
  return all.reduce((most, inputs) => {
    const given = inputs?.[table];
    return Array.isArray(given) ? Math.max(most, given.length) : most;
  }, 0);
}

function steps(prepared: Prepared, request: RunRequest | RowsRequest): number {
  let one = prepared.cost.fixed;
  for (const { value } of prepared.plans) {
    if (value.kind !== "table") continue;
    const rows = Math.max(value.defaultRows.length, rowsGiven(request, value.symbol));
    one += rows * (prepared.cost.perRow.get(value.symbol) ?? 0);
  }
  return "rows" in request ? one * request.rows.length : one;
}

function heavy(materials: MaterialSnapshots): boolean {
  return Object.values(materials).some(({ compiled }) => (compiled as CompiledMaterial).heavy);
}

function resultOf<Result>(answer: Answer<Result>): Result {
  if (answer.ok) return answer.result;
  const { code, message, problems, extra } = answer.error;
  throw new CodedError(code, message, problems, extra);
}

function endedOrThrow(error: unknown): Ended {
  if (error instanceof Ended) return error;
  throw error;
}

/** Runs of definitions: closed forms in the server's own thread, everything that may take long in worker threads. */
export class Compute {
  private readonly programs = new Programs();
  private readonly pool = new Pool();
  private readonly definitionTexts = new WeakMap<Definition, string>();
  private readonly materialTexts = new WeakMap<Material, string>();

  constructor(private readonly limits: TimeLimits = usualLimits) {}

  /**
   * Runs a definition known by its hash. Throws `CodedError` as `evaluate` of the engine does, `definition-invalid`,
   * `budget-exceeded` after 2 s, `busy`.
   */
  async evaluate(
    hash: string,
    definition: Definition,
    request: RunRequest,
    materials: MaterialSnapshots,
  ): Promise<Evaluation> {
    const here = this.inProcess(hash, definition, request, materials);
    if (here) return evaluate(here.prepared, request, here.materials);
    const task: Task = { kind: "run", ...this.sent(hash, definition, materials), request };
    try {
      return resultOf(await this.pool.run<Evaluation>(task, this.limits.run * 1000));
    } catch (error) {
      throw this.tooLong(endedOrThrow(error));
    }
  }

  /** Runs many rows; those not reached within 10 s answer `budget-exceeded`. Throws as `evaluateRows` of the engine. */
  async evaluateRows(
    hash: string,
    definition: Definition,
    request: RowsRequest,
    materials: MaterialSnapshots,
  ): Promise<RowsOutcome> {
    const here = this.inProcess(hash, definition, request, materials);
    if (here) return evaluateRows(here.prepared, request, here.materials);
    const { port1, port2 } = new MessageChannel();
    const finished: RowOutcome[] = [];
    let units: RowsOutcome["units"] | null = null;
    port1.on("message", (progress: Progress) => {
      units = progress.units;
      finished.push(...progress.rows);
    });
    port1.unref();
    const milliseconds = this.limits.rows * 1000;
    const task: Task = {
      kind: "rows",
      ...this.sent(hash, definition, materials),
      request,
      progress: port2,
      milliseconds,
    };
    try {
      // One row alone ends by its fuel; the worker itself stops between rows, so the thread is ended a little later.
      const hardLimit = milliseconds + this.limits.run * 1000;
      return resultOf(await this.pool.run<RowsOutcome>(task, hardLimit, [port2]));
    } catch (error) {
      const ended = endedOrThrow(error);
      // Without units no row was begun: the definition itself took the time.
      if (units === null) throw this.tooLong(ended);
      const rows = request.rows.map((_, i) => finished[i] ?? leftOver(i, this.limits.rows));
      return { units, rows };
    } finally {
      port1.close();
    }
  }

  private tooLong(ended: Ended): CodedError {
    if (ended.reason === "out-of-memory") {
      const message = "The run needs more memory than a run may have. Take shorter tables or fewer lines.";
      return CodedError.from([{ pointer: "#/inputs", code: "budget-exceeded", message, limit: "memory" }]);
    }
    const limit = `${this.limits.run} s`;
    const message = `The run took longer than ${limit} and was ended. Take fewer terms, narrower intervals or shorter tables.`;
    return CodedError.from([{ pointer: "#/inputs", code: "budget-exceeded", message, limit }]);
  }

  /** Starts the first worker thread ahead of the first run. */
  warm(): Promise<void> {
    return this.pool.warm();
  }

  /** Ends the worker threads; they begin again with the next run. */
  close(): Promise<void> {
    return this.pool.close();
  }

  /** Program and compiled materials when the run may be done beside other requests, else null. */
  private inProcess(
    hash: string,
    definition: Definition,
    request: RunRequest | RowsRequest,
    materials: MaterialSnapshots,
  ): { prepared: Prepared; materials: MaterialSnapshots } | null {
    let prepared = this.programs.known(hash);
    if (!prepared) {
      if (definition.working.length > longestWorkingInProcess) return null;
      prepared = this.programs.of(hash, definition);
    }
    if (prepared.program.iterates || steps(prepared, request) > mostStepsInProcess) return null;
    const compiled = this.programs.withCompiled(materials);
    return heavy(compiled) ? null : { prepared, materials: compiled };
  }

  private sent(hash: string, definition: Definition, materials: MaterialSnapshots) {
    return {
      hash,
      definition: textOf(this.definitionTexts, definition),
      materials: Object.entries(materials).map(([name, { slug, revision, material }]): SentMaterial => ({
        name,
        slug,
        revision,
        text: textOf(this.materialTexts, material),
      })),
      started: new Int32Array(new SharedArrayBuffer(4)),
    };
  }
}

function textOf<Key extends object>(texts: WeakMap<Key, string>, value: Key): string {
  let text = texts.get(value);
  if (text === undefined) texts.set(value, (text = JSON.stringify(value)));
  return text;
}

const shared = globalThis as typeof globalThis & { coldfaceCompute?: Compute };

/** The one of this process; it outlives reloads of modules while developing. */
export const compute: Compute = (shared.coldfaceCompute ??= new Compute());
