import { setTimeout as wait } from "node:timers/promises";
import type { Client } from "@libsql/client";
import { isBusy } from "./faults";

/**
 * Runs `work` on the single connection of `client` again, with jitter and without stopping the event loop, while another
 * process holds the lock. The library leaves a statement that met a lock unfinished, after which the connection can
 * neither open a savepoint nor commit ("SQL statements in progress"): each further try gets a new connection.
 */
export async function retryWhileBusy<T>(client: Client, work: () => Promise<T>, patience = 5000): Promise<T> {
  const deadline = Date.now() + patience;
  for (;;) {
    try {
      return await work();
    } catch (error) {
      if (!isBusy(error)) throw error;
      client.reconnect();
      if (Date.now() >= deadline) throw error;
    }
    await wait(5 + Math.random() * 45);
  }
}
