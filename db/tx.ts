import "server-only";
import { CodedError } from "@/lib/core/errors";
import { log } from "@/lib/core/log";
import { writeClient, writer, type Tx } from "./client";
import { isBusy, isStorageFault } from "./faults";
import { retryWhileBusy } from "./retry";

/**
 * All writes of this process pass through one queue. Writes that wait at the same time share a transaction, each in
 * its own savepoint, and so share one flush to the disk; each is still all or nothing, and none is answered before
 * the commit. Never call `write` inside `write`, and never wait for anything but the database inside.
 */

interface Job {
  work: (tx: Tx) => Promise<unknown>;
  resolve: (value: unknown) => void;
  reject: (reason: unknown) => void;
}

interface Queue {
  jobs: Job[];
  running: boolean;
}

const shared = globalThis as typeof globalThis & { coldfaceWrites?: Queue };
const queue: Queue = (shared.coldfaceWrites ??= { jobs: [], running: false });

const largestGroup = 32;

/**
 * Runs `work` in a write transaction and answers its value once that is on the disk. Errors of `work` undo its own
 * changes and are passed on. `work` may run again when the transaction was undone for a foreign lock. Throws CodedError `busy` when another process holds the lock for 5 s, or when the disk
 * is full or read-only.
 */
export function write<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
  return new Promise<T>((resolve, reject) => {
    queue.jobs.push({ work, resolve: resolve as (value: unknown) => void, reject });
    if (!queue.running) {
      queue.running = true;
      void drain();
    }
  });
}

async function drain(): Promise<void> {
  // Writes asked for in this same turn of the event loop join the first group.
  await Promise.resolve();
  while (queue.jobs.length > 0) await commitGroup(queue.jobs.splice(0, largestGroup));
  queue.running = false;
}

async function commitGroup(group: Job[]): Promise<void> {
  const outcomes: (() => void)[] = [];
  let fault: unknown;
  try {
    // Only the beginning of a transaction meets a foreign lock: it takes the write lock at once (BEGIN IMMEDIATE).
    await retryWhileBusy(writeClient(), () =>
      writer().transaction(async (tx) => {
        outcomes.length = 0;
        for (const job of group) {
          const outcome = await runInSavepoint(tx, job);
          if ("fault" in outcome) throw (fault = outcome.fault);
          outcomes.push(outcome.settle);
        }
      }),
    );
  } catch (error) {
    // After a fault of the storage the library's own undoing fails, too, and would hide the reason.
    const reason = unwritable(fault ?? error);
    for (const job of group) job.reject(reason);
    return;
  }
  for (const settle of outcomes) settle();
}

/** `fault` when the whole transaction is gone with the job, and so are the earlier jobs of the group. */
async function runInSavepoint(tx: Tx, job: Job): Promise<{ settle: () => void } | { fault: unknown }> {
  let own: unknown;
  try {
    const value = await tx.transaction(async (savepoint) => {
      try {
        return await job.work(savepoint);
      } catch (error) {
        own = error;
        throw error;
      }
    });
    return { settle: () => job.resolve(value) };
  } catch (error) {
    const reason = own ?? error;
    if (isStorageFault(reason) || reason !== error) return { fault: reason };
    return { settle: () => job.reject(reason) };
  }
}

function unwritable(error: unknown): unknown {
  if (isBusy(error)) {
    return new CodedError(
      "busy",
      "The database was busy for 5 seconds. Nothing was kept; try again shortly.",
    );
  }
  if (isStorageFault(error)) {
    log.error("database-not-writable", { error });
    return new CodedError(
      "busy",
      "The database cannot be written at the moment. Nothing was kept; try again later.",
    );
  }
  return error;
}
