import { usualRegret, type SimulationTable, type SimulationTask } from "../../engine/index.js";
import type { BatchEnd, BatchRun, KeptRows } from "../../jobs/batch.js";
import { runPart, runSimulation, TargetError } from "../../jobs/run-simulation.js";
import { loadState, saveState, type TableLabels } from "../../jobs/simulation-state.js";
import { simulationStamp } from "../../jobs/simulation-stamp.js";
import type { Threads } from "../../jobs/threads.js";
import { simulationReport } from "../../pane/sheets/simulation-report.js";
import { simulationText } from "../../results/index.js";
import { FormulaLineError } from "../failure.js";
import { nodeThreads } from "./node-threads.js";
import { loadPart, requireFreeOrOwn } from "./part-file.js";
import { ProgressLine } from "./progress-line.js";
import { requirePlace, writeResult, type ResultPlace } from "./result-file.js";
import { readSimulateCall, SIMULATE_USAGE, type SimulateCall } from "./simulate-call.js";
import { labelsOf, siteSource, taskOf } from "./site-source.js";
import { freeFile, ofFile, readStateFile, writeStateFile } from "./state-file.js";
import type { Terminal } from "./terminal.js";

/** Ended by Ctrl-C, as shells count it. */
const INTERRUPTED = 130;
/** More was asked for than a run can hold. */
const MISUSED = 2;
const SAVE_EVERY = 5_000;

/** A run and everything that is done about it. */
interface Order {
  readonly task: SimulationTask;
  readonly labels: TableLabels;
  readonly kept: KeptRows | undefined;
  /** where what is done is kept as the run goes on; undefined: only after an interruption */
  readonly keepIn: string | undefined;
  readonly call: SimulateCall;
  readonly place: ResultPlace | undefined;
}

/** Threads for a number of workers; a test hands in its own. */
export type ThreadsFor = (workers: number | undefined) => Threads;

/** The threads of the simulation in Node. */
export const simulationThreads: ThreadsFor = (workers) => nodeThreads(new URL("./simulation-thread.ts", import.meta.url), workers);

/**
 * Carries out one call of the simulation.
 *
 * @param words  the words after the command
 * @returns      the exit code
 */
export async function simulate(words: readonly string[], terminal: Terminal, threadsFor = simulationThreads): Promise<number> {
  try {
    const call = readSimulateCall(words);
    if (call !== "help") return await carriedOut(orderOf(call), words, terminal, threadsFor);
    terminal.out(SIMULATE_USAGE);
    return 0;
  } catch (reason) {
    if (!(reason instanceof FormulaLineError || reason instanceof TargetError)) throw reason;
    terminal.err(`${reason.message}\n`);
    return reason instanceof TargetError ? MISUSED : reason.exitCode;
  }
}

function orderOf(call: SimulateCall): Order {
  const { site, xlsx, sheets, origin } = siteSource(call.book);
  const task = taskOf(site, call.counts, call.interaction);
  const place = call.out === undefined ? undefined : { out: call.out, overwrite: call.overwrite, book: xlsx === undefined || call.book === undefined ? undefined : { path: call.book, xlsx }, sheets, brief: call.brief, origin };
  if (place !== undefined) requirePlace(place);
  const labels = labelsOf(site);
  if (call.part !== undefined) return { task, labels, kept: loadPart(call.part, task), keepIn: call.part.file, call, place };
  const state = call.state === undefined ? undefined : readStateFile(call.state);
  if (call.state !== undefined && state !== undefined) requireFreeOrOwn(call.state, state, undefined);
  const kept = state === undefined ? undefined : ofFile(call.state ?? "", () => loadState(state, task));
  return { task, labels, kept, keepIn: call.state, call, place };
}

async function carriedOut(order: Order, words: readonly string[], terminal: Terminal, threadsFor: ThreadsFor): Promise<number> {
  const line = new ProgressLine(terminal);
  const run = started(order, line, threadsFor(order.call.workers));
  const keep = (path: string): void => writeStateFile(path, stateOf(order, run));
  let unsaved: FormulaLineError | undefined;
  const saving = setInterval(() => {
    try {
      if (order.keepIn !== undefined) keep(order.keepIn);
    } catch (reason) {
      if (!(reason instanceof FormulaLineError)) throw reason;
      unsaved = reason;
      run.cancel();
    }
  }, SAVE_EVERY);
  const deaf = terminal.onInterrupt(() => run.cancel());
  const end = await run.end;
  clearInterval(saving);
  deaf();
  line.clear();
  if (unsaved !== undefined) throw unsaved;
  return concluded(order, run, end, words, terminal);
}

function started({ task, kept, call }: Order, line: ProgressLine, threads: Threads): BatchRun<SimulationTable> {
  const on: Parameters<typeof runSimulation>[4] = (progress) => line.show(progress);
  if (call.part !== undefined) return runPart(task, call.part.from - 1, call.part.to, { kept }, threads, on);
  return runSimulation(task, call.target ?? { regret: usualRegret(task) }, { kept }, threads, on);
}

function stateOf({ task, labels, call }: Order, run: BatchRun<SimulationTable>): ReturnType<typeof saveState> {
  return saveState(task, run.rows(), labels, call.part === undefined ? undefined : { from: call.part.from - 1, to: call.part.to });
}

function concluded(order: Order, run: BatchRun<SimulationTable>, end: BatchEnd<SimulationTable>, words: readonly string[], terminal: Terminal): number {
  const { task, labels, call, place } = order;
  const isDone = end.kind === "done";
  const path = order.keepIn ?? (isDone ? undefined : freeFile((call.out ?? "simulation").replace(/\.xlsx$/i, ""), ".state"));
  const hasRows = run.rows().elements.length + run.rows().form.length > 0;
  if (path !== undefined && hasRows) writeStateFile(path, stateOf(order, run));
  if (end.table !== undefined) terminal.out(`${isDone ? "" : "Not finished; as far as it went:\n\n"}${simulationText(end.table, simulationStamp(task, end.table, new Date()), labels.units, labels.money)}\n`);
  if (end.message !== "") terminal.err(`${end.message}\n`);
  if (!isDone) {
    terminal.err(hasRows && path !== undefined ? keptSentence(path, call, words) : "Nothing was finished yet, so nothing is kept.\n");
    return end.kind === "cancelled" ? INTERRUPTED : 1;
  }
  if (call.part !== undefined) terminal.err(`Realisations ${call.part.from} to ${call.part.to} are in ${call.part.file}; npm run merge joins the parts.\n`);
  if (place !== undefined && end.table !== undefined) terminal.err(writeResult(place, simulationReport({ task, ...labels, place: place.origin }, end.table, { isFinished: true, hasChanged: false }, new Date())));
  return 0;
}

function keptSentence(path: string, call: SimulateCall, words: readonly string[]): string {
  const again = call.part !== undefined || call.state !== undefined ? words : [...words, "--state", path];
  return `What is finished is kept in ${path}. To go on: npm run --silent simulate -- ${again.map(quoted).join(" ")}\n`;
}

function quoted(word: string): string {
  return /^[\w./=,:-]+$/.test(word) ? word : `'${word.replaceAll("'", `'\\''`)}'`;
}
