import { mostRealisations, type SimulationTable, type SimulationTarget, type SimulationTask } from "../engine/index.js";
import type { BatchProgress, BatchRun, BatchSettings } from "./batch.js";
import { runBatches } from "./run-batches.js";
import type { PartTarget } from "./simulation-trade.js";
import type { Threads } from "./threads.js";

/** A target that cannot be run to; the message is for the person. */
export class TargetError extends Error {
  override readonly name = "TargetError";
}

const FEWEST = 2;
const MOST = 100_000;

/**
 * Simulates a task: the table is the same to the last digit for any number of threads, after any interruption, and where a
 * run is continued to more realisations.
 *
 * @param target    expected regret of the cheapest row, money, or number of realisations by finite elements
 * @param settings  kept: finished realisations of the same task
 * @param threads   that have the simulation's trade
 * @param on        hears of the progress five times a second
 * @throws {TargetError} no target that a run can end at
 */
export function runSimulation(task: SimulationTask, target: SimulationTarget, settings: BatchSettings, threads: Threads, on: (progress: BatchProgress<SimulationTable>) => void): BatchRun<SimulationTable> {
  requireTarget(target);
  if ("realisations" in target) requireRoom(task, target.realisations);
  return runBatches({ task, target, first: 0, most: "realisations" in target ? target.realisations : Infinity }, settings, threads, on);
}

/**
 * Simulates a part of a larger run: realisations by finite elements only, to be joined with others; there is no table of it.
 *
 * @param from  index of the first realisation
 * @param to    index behind the last
 * @throws {TargetError} more than a part may keep
 */
export function runPart(task: SimulationTask, from: number, to: number, settings: BatchSettings, threads: Threads, on: (progress: BatchProgress<SimulationTable>) => void): BatchRun<SimulationTable> {
  requireRoom(task, to - from);
  return runBatches({ task, target: { to } satisfies PartTarget, first: from, most: to }, settings, threads, on);
}

/**
 * Refuses more realisations than fit into memory before anything is started.
 *
 * @throws {TargetError} with what fits
 */
function requireRoom(task: SimulationTask, realisations: number): void {
  const most = mostRealisations(task).elements;
  if (realisations <= most) return;
  const { variants, counts } = task;
  const cases = variants.length === 1 ? `${counts.length} counts` : `${variants.length} ways with ${counts.length} counts each`;
  throw new TargetError(`The number of realisations is ${thousands(realisations)}; of ${cases} at most ${thousands(most)} fit into memory at once. Ask for fewer, or name fewer counts or ways.`);
}

const thousands = (n: number): string => n.toLocaleString("en-US");

/**
 * Refuses a target before anything is started.
 *
 * @throws {TargetError} no sum above 0, or no whole number of realisations that a run can hold
 */
function requireTarget(target: SimulationTarget): void {
  if ("regret" in target) {
    if (target.regret > 0 && target.regret < Infinity) return;
    throw new TargetError(`The precision is ${target.regret}; it must be a sum of money above 0: what choosing the wrong count may be expected to cost. The price of one hole is usual.`);
  }
  const { realisations } = target;
  if (!(Number.isInteger(realisations) && realisations >= FEWEST && realisations <= MOST)) {
    throw new TargetError(`The number of realisations is ${realisations}; it must be a whole number from ${FEWEST} to ${MOST / 1000},000.`);
  }
}
