/**
 * Starts the thread that holds the engine, so that pricing never holds up the page.
 *
 * @returns a module worker that answers CountRequest with CountReply
 */
export function startCountsWorker(): Worker {
  return new Worker(new URL("../jobs/counts-worker.ts", import.meta.url), { type: "module" });
}

/**
 * Starts a thread of a simulation.
 *
 * @returns a module worker that answers ThreadRequest with ThreadReply
 */
export function startSimulationWorker(): Worker {
  return new Worker(new URL("../jobs/simulation-worker.ts", import.meta.url), { type: "module" });
}
