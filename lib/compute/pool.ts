import { existsSync } from "node:fs";
import { availableParallelism } from "node:os";
import path from "node:path";
import { pathToFileURL } from "node:url";
import type { MessagePort } from "node:worker_threads";
import { Piscina } from "piscina";
import { CodedError } from "@/lib/core/errors";
import type { Answer, Task } from "./protocol";

const mostThreads = 4;
const mostWaiting = 500;
/** A task that has not begun by then is refused as busy. */
const longestWait = 15_000;

/** Path of the bundle. While developing and in tests it is built when missing or stale. */
async function workerFile(): Promise<string> {
  const file = path.join(/* turbopackIgnore: true */ process.cwd(), "dist", "workers", "calc.mjs");
  if (process.env.NODE_ENV !== "production") {
    const builder = pathToFileURL(
      path.join(/* turbopackIgnore: true */ process.cwd(), "lib", "compute", "build-worker.mjs"),
    ).href;
    const { buildWorker } = (await import(/* turbopackIgnore: true */ /* @vite-ignore */ builder)) as {
      buildWorker: () => Promise<string>;
    };
    return buildWorker();
  }
  if (!existsSync(file))
    throw new Error(`The calculation worker ${file} is missing. Build it with "npm run up".`);
  return file;
}

/** Why a task was ended from outside. */
export class Ended extends Error {
  constructor(readonly reason: "too-long" | "out-of-memory") {
    super(`The task was ended: ${reason}.`);
    this.name = "Ended";
  }
}

function reasonOf(error: unknown, outcome: "running" | "too-long" | "never-began"): unknown {
  if (outcome === "too-long") return new Ended("too-long");
  const code = error instanceof Error && "code" in error ? error.code : null;
  if (code === "ERR_WORKER_OUT_OF_MEMORY") return new Ended("out-of-memory");
  const full = error instanceof Error && /queue/i.test(error.message);
  if (outcome === "never-began" || full) {
    return new CodedError("busy", "Many calculations are running. Try again in a few seconds.");
  }
  return error;
}

/** Worker threads for what may take long. A task that overruns is ended together with its thread. */
export class Pool {
  private pool: Promise<Piscina<Task, Answer<unknown>>> | null = null;

  /** Starts the first thread, so that no caller waits for it. Throws when the bundle of the worker is missing. */
  async warm(): Promise<void> {
    await this.open();
  }

  private open(): Promise<Piscina<Task, Answer<unknown>>> {
    this.pool ??= this.start();
    return this.pool;
  }

  private async start(): Promise<Piscina<Task, Answer<unknown>>> {
    const filename = pathToFileURL(await workerFile()).href;
    const threads = Math.max(2, Math.min(mostThreads, availableParallelism() - 1));
    return new Piscina<Task, Answer<unknown>>({
      filename,
      minThreads: 1,
      maxThreads: threads,
      idleTimeout: 60_000,
      maxQueue: mostWaiting,
      resourceLimits: { maxOldGenerationSizeMb: 256, maxYoungGenerationSizeMb: 64 },
    });
  }

  /** Runs a task at most `milliseconds` long, counted from its beginning. Throws `Ended`, `CodedError` `busy`. */
  async run<Result>(
    task: Task,
    milliseconds: number,
    transfer: readonly MessagePort[] = [],
  ): Promise<Answer<Result>> {
    const pool = await this.open();
    const controller = new AbortController();
    const queued = performance.now();
    let begun: number | null = null;
    let outcome: "running" | "too-long" | "never-began" = "running";
    let timer: NodeJS.Timeout | undefined;
    const look = () => {
      const now = performance.now();
      if (begun === null && Atomics.load(task.started, 0) === 1) begun = now;
      if (begun === null && now - queued > longestWait) outcome = "never-began";
      // The first look sees the beginning up to one limit late, never early.
      if (begun !== null && now - begun >= milliseconds) outcome = "too-long";
      if (outcome !== "running") controller.abort();
      else timer = setTimeout(look, begun === null ? 50 : Math.max(1, milliseconds - (now - begun)));
      timer?.unref();
    };
    timer = setTimeout(look, 50);
    timer.unref();
    try {
      return (await pool.run(task, {
        signal: controller.signal,
        transferList: [...transfer],
      })) as Answer<Result>;
    } catch (error) {
      throw reasonOf(error, outcome);
    } finally {
      clearTimeout(timer);
    }
  }

  /** Ends all threads. */
  async close(): Promise<void> {
    const open = this.pool;
    this.pool = null;
    await (await open)?.destroy();
  }
}
