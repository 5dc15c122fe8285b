import type { SimulationTarget } from "../../engine/index.js";
import { LARGEST_COUNT } from "../../inputs/index.js";
import { misused } from "../failure.js";
import { readOptions, wholeNumber, type Options } from "./options.js";

/** What the simulation is asked to do. */
export interface SimulateCall {
  readonly book: string | undefined;
  readonly out: string | undefined;
  readonly overwrite: boolean;
  readonly brief: BriefCall | undefined;
  /** undefined: what the site block asks for */
  readonly counts: readonly number[] | undefined;
  /** undefined: the price of one hole */
  readonly target: SimulationTarget | undefined;
  readonly interaction: boolean;
  readonly workers: number | undefined;
  readonly state: string | undefined;
  readonly part: PartCall | undefined;
}

/** A client brief; client: the count that the client has in mind, undefined where none. */
export interface BriefCall {
  readonly client: number | undefined;
}

/** A part of a larger run; realisations are counted from 1, ends included. */
export interface PartCall {
  readonly from: number;
  readonly to: number;
  readonly file: string;
}

/** How the simulation is called. */
export const SIMULATE_USAGE = `Simulates the site of a workbook by finite elements under every pile, without a spreadsheet program.

  npm run --silent simulate -- --book bid.xlsx --out bid-simulated.xlsx
  npm run --silent simulate -- --book bid.xlsx --counts 0-8,12 --realisations 200 --state bid.state
  npm run --silent simulate -- --book bid.xlsx --from 1 --to 100 --part first.part

  --book FILE        an xlsx or xlsm workbook, or a csv, with a site block named Site; without it the demonstration
  --out FILE         writes a copy of the workbook with the table on a new sheet (for a csv or the demonstration, a new workbook)
  --brief COUNT      adds a client brief of one page to --out, with the saving over the number of holes that the client has in mind, or --brief none
  --overwrite        lets --out replace a file that is there
  --counts LIST      numbers of holes, such as 0-12 or 0,2,4-8; without it those of the site block
  --precision MONEY  stops when choosing the wrong number of holes is expected to cost less; without it the price of one hole
  --realisations N   stops after so many realisations by finite elements instead
  --interaction      lets piles settle their neighbours, also where the block says off
  --workers N        threads that compute; without it one for each core
  --state FILE       keeps what is done in this file, and goes on from it where it is there
  --from A --to B --part FILE
                     computes realisations A to B of a larger run and keeps them in a file for npm run merge

Progress goes to standard error, the table to standard output. Ctrl-C keeps what is done and says how to go on. The table is the
same to the last digit for any number of threads and after any interruption. Exit code 0; 1 where the simulation gives no table or
only an unfinished one, with the reason on standard error; 2 for a call that cannot be carried out as given; 130 after Ctrl-C.
`;

/** What stands after --brief. */
export const BRIEF_MEANING = "the number of holes that the client has in mind, or none,";
const MOST_REALISATIONS = 100_000;
const MOST_WORKERS = 64;
const KNOWN = {
  values: {
    "--book": "a file", "--out": "a file", "--brief": BRIEF_MEANING, "--counts": "numbers of holes, such as 0-12,", "--precision": "a sum of money", "--realisations": "a number",
    "--workers": "a number", "--state": "a file", "--from": "a number", "--to": "a number", "--part": "a file",
  },
  flags: ["--overwrite", "--interaction"],
  plain: undefined,
};

/**
 * Reads the words after the command.
 *
 * @returns "help" where that was asked for
 * @throws {FormulaLineError} for a call that contradicts itself or cannot be carried out
 */
export function readSimulateCall(words: readonly string[]): SimulateCall | "help" {
  const options = readOptions(words, KNOWN);
  if (options === "help") return "help";
  const { values, flags } = options;
  const call: SimulateCall = {
    book: values.get("--book"), out: values.get("--out"), overwrite: flags.has("--overwrite"), brief: briefOf(options), counts: countsOf(values.get("--counts")), target: targetOf(options),
    interaction: flags.has("--interaction"), workers: wholeNumber(options, "--workers", 1, MOST_WORKERS), state: values.get("--state"), part: partOf(options),
  };
  if (call.overwrite && call.out === undefined) throw misused("--overwrite goes with --out.");
  if (call.brief !== undefined && call.out === undefined) throw misused("--brief goes with --out, the workbook that it is written into.");
  const clash = call.part === undefined ? undefined : ["--out", "--state", "--precision", "--realisations"].find((name) => values.has(name));
  if (clash !== undefined) throw misused(`--part and ${clash} do not go together: a part has realisations but no table; npm run merge joins parts and writes it.`);
  return call;
}

function targetOf(options: Options): SimulationTarget | undefined {
  const precision = options.values.get("--precision");
  const realisations = wholeNumber(options, "--realisations", 2, MOST_REALISATIONS);
  if (precision !== undefined && realisations !== undefined) throw misused("--precision and --realisations both say when to stop; give one of them.");
  if (realisations !== undefined) return { realisations };
  if (precision === undefined) return undefined;
  const regret = Number(precision);
  if (precision.trim() === "" || !(regret > 0 && regret < Infinity)) throw misused(`The option --precision is ${precision}; a sum of money above 0 is needed: what choosing the wrong number of holes may be expected to cost.`);
  return { regret };
}

/**
 * The brief that a command asks for.
 *
 * @throws {FormulaLineError} neither a number of holes nor "none"
 */
export function briefOf({ values }: Options): BriefCall | undefined {
  const text = values.get("--brief");
  if (text === undefined) return undefined;
  if (text.trim().toLowerCase() === "none") return { client: undefined };
  const client = Number(text);
  if (text.trim() === "" || !Number.isInteger(client) || client < 0 || client > LARGEST_COUNT) throw misused(`The option --brief is ${text}; ${BRIEF_MEANING} is needed, from 0 to ${LARGEST_COUNT}.`);
  return { client };
}

function partOf(options: Options): PartCall | undefined {
  const file = options.values.get("--part");
  const from = wholeNumber(options, "--from", 1, MOST_REALISATIONS);
  const to = wholeNumber(options, "--to", 1, MOST_REALISATIONS);
  if (file === undefined && from === undefined && to === undefined) return undefined;
  if (file === undefined || from === undefined || to === undefined) throw misused("A part of a run needs all three of --from, --to and --part.");
  if (to < from) throw misused(`The part would go from realisation ${from} to ${to}; --to must not be smaller than --from.`);
  return { from, to, file };
}

function countsOf(text: string | undefined): readonly number[] | undefined {
  if (text === undefined) return undefined;
  const refused = (): Error => misused(`The option --counts is ${text}; numbers of holes from 0 to ${LARGEST_COUNT} are needed, such as 0-12 or 0,2,4-8.`);
  const counts = text.split(",").flatMap((piece) => {
    const [, first, last] = /^\s*(\d{1,3})\s*(?:-\s*(\d{1,3})\s*)?$/.exec(piece) ?? [];
    const [from, to] = [Number(first), Number(last ?? first)];
    if (first === undefined || to < from || to > LARGEST_COUNT) throw refused();
    return Array.from({ length: to - from + 1 }, (_, k) => from + k);
  });
  return [...new Set(counts)].sort((a, b) => a - b);
}
