import type { MessagePort } from "node:worker_threads";
import type { RowOutcome, RowsOutcome, RowsRequest, RunRequest } from "@/lib/calculation/evaluation";
import type { ErrorCode, FieldProblem } from "@/lib/core/errors";

/** What passes between the server and a worker: plain data only. */

/** A material as JSON text, so that a worker parses and compiles each content once. */
export interface SentMaterial {
  readonly name: string;
  readonly slug: string;
  readonly revision: number;
  readonly text: string;
}

interface SentTask {
  readonly hash: string;
  /** The definition as JSON text. */
  readonly definition: string;
  readonly materials: readonly SentMaterial[];
  /** The worker writes 1 when it begins, so that waiting in the queue is not counted as running. */
  readonly started: Int32Array;
}

export interface RunTask extends SentTask {
  readonly kind: "run";
  readonly request: RunRequest;
}

export interface RowsTask extends SentTask {
  readonly kind: "rows";
  readonly request: RowsRequest;
  /** Finished rows are sent here from time to time, so that they outlive a worker that has to be ended. */
  readonly progress: MessagePort;
  readonly milliseconds: number;
}

export type Task = RunTask | RowsTask;

export interface SentError {
  readonly code: ErrorCode;
  readonly message: string;
  readonly problems: FieldProblem[];
  readonly extra: Record<string, unknown>;
}

export type Answer<Result> =
  { readonly ok: true; readonly result: Result } | { readonly ok: false; readonly error: SentError };

/** Rows finished since the message before. */
export interface Progress {
  readonly units: RowsOutcome["units"];
  readonly rows: RowOutcome[];
}
