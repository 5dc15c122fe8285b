import { nodeThreads } from "../../../src/formula/simulation/node-threads.js";
import { simulationThreads } from "../../../src/formula/simulation/simulate.js";
import { runBatches } from "../../../src/jobs/run-batches.js";
import { runPart } from "../../../src/jobs/run-simulation.js";
import { MOST, TASK } from "./demonstration-task.js";

// What only whole runs show: two threads against one, how soon a run is cancelled, how often it tells, what it holds in memory.

// a short run, of whose time each thread spends more than a second on getting ready, and one that shows the work alone
const RUNS = [{ realisations: 200, rounds: 3 }, { realisations: 800, rounds: 3 }];
const CANCELLED = 200;

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;
const say = (line: string): void => void process.stdout.write(`${line}\n`);

/** Seconds that a part takes from its start to its end, preparing included. */
async function seconds(workers: number, realisations: number): Promise<number> {
  const begun = performance.now();
  const run = runPart(TASK, 0, realisations, {}, simulationThreads(workers), () => undefined);
  const { kind, message } = await run.end;
  if (kind !== "done") throw new Error(message);
  return (performance.now() - begun) / 1000;
}

/** Milliseconds from cancelling to the end, in the middle of realisations; and progress a second. */
async function cancelled(): Promise<{ took: number; perSecond: number }> {
  let pressed = 0;
  let heard = 0;
  const begun = performance.now();
  const run = runPart(TASK, 0, CANCELLED, {}, simulationThreads(2), ({ done }) => {
    heard++;
    if (done.elements < 10) return;
    pressed = performance.now();
    run.cancel();
  });
  await run.end;
  return { took: performance.now() - pressed, perSecond: (1000 * heard) / (pressed - begun) };
}

/** Megabytes of the whole process, all threads, at most, over a run of so many rows of elements and the form's to them. */
async function megabytes(rows: number): Promise<number> {
  let most = 0;
  const run = runBatches({ task: undefined, target: rows, first: 0, most: rows }, {}, nodeThreads(new URL("./wide-thread.ts", import.meta.url), 2), () => {
    most = Math.max(most, process.memoryUsage.rss());
  });
  const { kind, message } = await run.end;
  if (kind !== "done") throw new Error(message);
  return Math.max(most, process.memoryUsage.rss()) / 2 ** 20;
}

for (const { realisations, rounds } of RUNS) {
  const ratios: number[] = [];
  for (let round = 0; round < rounds; round++) {
    const [one, two] = [await seconds(1, realisations), await seconds(2, realisations)];
    ratios.push(one / two);
    say(`${realisations} realisations, 12 piles, 13 counts: one thread ${one.toFixed(1)} s, two ${two.toFixed(1)} s`);
  }
  say(`two threads against one: ${median(ratios).toFixed(2)} x, target 1.8 x on idle cores`);
}
const ends = [await cancelled(), await cancelled(), await cancelled()];
say(`cancelled within ${median(ends.map(({ took }) => took)).toFixed(1)} ms, target 200 ms; progress ${median(ends.map(({ perSecond }) => perSecond)).toFixed(1)} a second, target 4`);
const [few, many, most] = [await megabytes(1_000), await megabytes(10_000), await megabytes(MOST.elements)];
say(`memory of all threads with 1,000 realisations ${few.toFixed(0)} MB, with 10,000 ${many.toFixed(0)} MB, with as many as a run may keep (${MOST.elements}) ${most.toFixed(0)} MB: kept by the run and by the thread that makes the tables`);
