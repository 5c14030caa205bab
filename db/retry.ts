import { setTimeout as wait } from "node:timers/promises";
import { isBusy } from "./faults";

/** Runs `work` again, with jitter and without stopping the event loop, while another process holds the lock. */
export async function retryWhileBusy<T>(work: () => Promise<T>, patience = 5000): Promise<T> {
  const deadline = Date.now() + patience;
  for (;;) {
    try {
      return await work();
    } catch (error) {
      if (!isBusy(error) || Date.now() >= deadline) throw error;
    }
    await wait(5 + Math.random() * 45);
  }
}
