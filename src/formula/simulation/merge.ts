import { basename } from "node:path";
import { inputsHash } from "../../jobs/inputs-hash.js";
import { runSimulation, TargetError } from "../../jobs/run-simulation.js";
import { simulationStamp } from "../../jobs/simulation-stamp.js";
import { simulationReport } from "../../pane/sheets/simulation-report.js";
import { simulationText } from "../../results/index.js";
import { FormulaLineError, misused, unreadable } from "../failure.js";
import { joinedParts, type JoinedParts, type NamedPart } from "./join-parts.js";
import { readOptions, wholeNumber, type Options } from "./options.js";
import { ProgressLine } from "./progress-line.js";
import { requirePlace, writeResult, type ResultPlace } from "./result-file.js";
import { simulationThreads, type ThreadsFor } from "./simulate.js";
import { BRIEF_MEANING, briefOf } from "./simulate-call.js";
import { siteSource, taskOf } from "./site-source.js";
import { readStateFile } from "./state-file.js";
import type { Terminal } from "./terminal.js";

/** How parts are joined. */
const USAGE = `Joins parts of a simulation into the table that one run would have given, to the last digit.

  npm run --silent merge -- first.part second.part third.part --book bid.xlsx --out bid-simulated.xlsx

  --out FILE      writes the table on a sheet of a new workbook
  --book FILE     the workbook that the parts were made from; --out then writes a copy of it with the table on a new sheet
  --brief COUNT   adds a client brief of one page to --out, with the saving over the number of holes that the client has in mind, or --brief none
  --overwrite     lets --out replace a file that is there
  --workers N     threads that compute what parts do not hold, the second-order form; without it one for each core

Parts of other inputs or another version, with gaps or overlaps, are refused. Exit code 0; 1 where there is no table, with the reason
on standard error; 2 for a call that cannot be carried out as given; 130 after Ctrl-C, and the parts stay as they are.
`;

const KNOWN = { values: { "--out": "a file", "--book": "a file", "--brief": BRIEF_MEANING, "--workers": "a number" }, flags: ["--overwrite"], plain: "parts" };
const MOST_WORKERS = 64;
const INTERRUPTED = 130;
const MISUSED = 2;

/**
 * Carries out one call that joins parts.
 *
 * @param words  the words after the command
 * @returns      the exit code
 */
export async function merge(words: readonly string[], terminal: Terminal, threadsFor: ThreadsFor = simulationThreads): Promise<number> {
  try {
    const options = readOptions(words, KNOWN);
    if (options !== "help") return await carriedOut(options, terminal, threadsFor);
    terminal.out(USAGE);
    return 0;
  } catch (reason) {
    if (!(reason instanceof FormulaLineError || reason instanceof TargetError)) throw reason;
    terminal.err(`${reason.message}\n`);
    return reason instanceof TargetError ? MISUSED : reason.exitCode;
  }
}

async function carriedOut(options: Options, terminal: Terminal, threadsFor: ThreadsFor): Promise<number> {
  if (options.plain.length === 0) throw misused("Name the parts to join, such as first.part second.part; --help says more.");
  const workers = wholeNumber(options, "--workers", 1, MOST_WORKERS);
  const parts = joinedParts(options.plain.map(namedPart));
  if (parts.count < 2) throw unreadable("The parts hold one realisation; a table needs at least 2.");
  const place = placeOf(options, parts);
  if (place !== undefined) requirePlace(place);
  const line = new ProgressLine(terminal);
  const run = runSimulation(parts.task, { realisations: parts.count }, { kept: parts.rows }, threadsFor(workers), (progress) => line.show(progress));
  const deaf = terminal.onInterrupt(() => run.cancel());
  const end = await run.end;
  deaf();
  line.clear();
  if (end.message !== "") terminal.err(`${end.message}\n`);
  if (end.kind === "cancelled") terminal.err("Stopped; the parts are as they were.\n");
  if (end.kind !== "done" || end.table === undefined) return end.kind === "cancelled" ? INTERRUPTED : 1;
  const stamp = simulationStamp(parts.task, end.table, new Date());
  terminal.out(`${simulationText(end.table, stamp, parts.labels.units, parts.labels.money)}\n`);
  if (place !== undefined) terminal.err(writeResult(place, simulationReport({ task: parts.task, ...parts.labels, place: place.origin }, end.table, { isFinished: true, hasChanged: false }, new Date())));
  return 0;
}

function namedPart(path: string): NamedPart {
  const state = readStateFile(path);
  if (state === undefined) throw misused(`There is no file ${path}.`);
  return { path, state };
}

function placeOf(options: Options, { task }: JoinedParts): ResultPlace | undefined {
  const { values, flags } = options;
  const [out, path, overwrite, brief] = [values.get("--out"), values.get("--book"), flags.has("--overwrite"), briefOf(options)];
  if (out === undefined) {
    const lone = overwrite ? "--overwrite" : path !== undefined ? "--book" : brief !== undefined ? "--brief" : undefined;
    if (lone !== undefined) throw misused(`${lone} goes with --out.`);
    return undefined;
  }
  if (path === undefined) return { out, overwrite, book: undefined, sheets: [], brief, origin: `parts ${options.plain.map((part) => basename(part)).join(", ")}` };
  const { site, xlsx, sheets, origin } = siteSource(path);
  if (inputsHash(taskOf(site, task.counts, task.variants[0]!.problem.piles.groupInteraction)) !== inputsHash(task)) throw unreadable(`The site block of ${path} is not the one that the parts were made from; take the workbook as it was, or leave --book out.`);
  return { out, overwrite, book: xlsx === undefined ? undefined : { path, xlsx }, sheets, brief, origin };
}
