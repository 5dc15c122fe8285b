import type { SimulationTask } from "../../src/engine/index.js";
import type { ThreadsFor } from "../../src/formula/simulation/simulate.js";
import { threadAnswerer, type RowMaker, type Trade } from "../../src/jobs/answer-thread.js";
import { inputsHash } from "../../src/jobs/inputs-hash.js";
import { simulationTrade } from "../../src/jobs/simulation-trade.js";

const known = new Map<string, RowMaker>();

/** Prepares a task once, and makes each realisation once, however many runs ask: a realisation depends on its index alone. */
function remembered(task: SimulationTask): RowMaker {
  const name = inputsHash(task);
  const maker = known.get(name);
  if (maker !== undefined) return maker;
  const make = simulationTrade.prepare(task as never);
  const rows = new Map<string, Float64Array>();
  const remembering: RowMaker = (kind, index) => {
    const key = `${kind} ${index}`;
    const row = rows.get(key) ?? make(kind, index);
    rows.set(key, row);
    return row;
  };
  known.set(name, remembering);
  return remembering;
}

const trade: Trade = { ...simulationTrade, prepare: remembered };

/**
 * The simulation's threads without threads: for what is done about a run, where the real ones would only make the same
 * realisations again. They answer one request a turn, so that timers and keys are heard in between.
 */
export const quickThreads: ThreadsFor = (workers = 2) => ({
  size: workers,
  start(listener) {
    let hasEnded = false;
    const answer = threadAnswerer(trade, (reply) => {
      if (!hasEnded) listener.reply(structuredClone(reply));
    });
    return {
      post: (request) =>
        void setImmediate(() => {
          if (!hasEnded) answer(structuredClone(request));
        }),
      end: () => void (hasEnded = true),
    };
  },
});
