import type { SimulationTable } from "../../engine/index.js";
import type { BatchProgress } from "../../jobs/batch.js";
import { timeInWords } from "../../jobs/time-in-words.js";
import { decade, powerOfTen } from "../../results/powers-of-ten.js";
import type { RunState } from "../run-store.js";
import { tableStep } from "./conclusion.js";
import { holesInWords, sentenceCase, shorten, type NumberWriter } from "./numbers.js";
import { groundsInWords, waysOf } from "./ways.js";

/**
 * How far a run is, in a sentence or two.
 *
 * @param progress  as the run tells it
 * @param writer    writes the numbers
 */
export function progressInWords(progress: BatchProgress<SimulationTable>, writer: NumberWriter): string {
  const { done, wanted, secondsLeft, phase } = progress;
  if (phase === "preparing" && done.elements + done.form === 0) return "Preparing: the piles are analysed in the median ground.";
  const of = (part: number, whole: number): string => (whole > part ? `${writer.plain(part, 0)} of about ${writer.plain(whole, 0)}` : writer.plain(part, 0));
  const left = secondsLeft === undefined ? "The time left is not known yet." : secondsLeft < 1 ? "Nearly done." : `About ${timeInWords(secondsLeft)} left.`;
  return `${of(done.elements, wanted.elements)} grounds by finite elements, ${of(done.form, wanted.form)} by the short form. ${left}`;
}

/**
 * The best estimate so far, with its error.
 *
 * @param table   the last one
 * @param money   whose money; "" where nobody said
 * @param writer  writes the numbers
 */
export function bestInWords(table: SimulationTable, money: string, writer: NumberWriter): string {
  const best = table.rows[table.cheapest]!;
  const step = tableStep(table.rows);
  const unit = money === "" ? "" : `\u00a0${shorten(money, 12)}`;
  const way = waysOf(table).length > 1 ? ` by ${shorten(best.name, 60)}` : "";
  const cost = `${writer.money(best.total, step)}${unit} expected, give or take ${writer.money(2 * best.standardError, step)}`;
  return `${sentenceCase(best.count === 0 ? "buying no holes" : holesInWords(best.count))}${way} ${best.count > 1 ? "cost" : "costs"} least: ${cost}.`;
}

/**
 * How sure the choice is.
 *
 * @param table   the last one
 * @param money   whose money; "" where nobody said
 * @param writer  writes the numbers
 */
export function surenessInWords(table: SimulationTable, money: string, writer: NumberWriter): string {
  const best = table.rows[table.cheapest]!;
  const unit = money === "" ? "" : `\u00a0${shorten(money, 12)}`;
  const regret = writer.money(table.expectedRegret, regretStep(table.expectedRegret));
  return `Its chance of being the cheapest is ${writer.percent(best.chanceCheapest)}. Choosing it is expected to cost ${regret}${unit} more than the unknown best.`;
}

/** Two figures of a sum that says how small a doubt is. */
function regretStep(regret: number): number {
  return regret > 0 ? Math.max(0.01, powerOfTen(decade(regret) - 1)) : 1;
}

/**
 * How a run stands once it no longer goes on.
 *
 * @param state   of the run
 * @param writer  writes the numbers
 */
export function standingInWords(state: RunState, writer: NumberWriter): string {
  const there = `${groundsInWords(state.used, writer)} ${state.used.elements + state.used.form === 1 ? "is" : "are"} there`;
  const where = state.isKept ? "kept on this machine" : "stay until the pane closes";
  switch (state.end) {
    case "kept":
      return `A run was left on this machine: ${there}. It can go on from here.`;
    case "cancelled":
      return `Cancelled. ${sentenceCase(there)} and ${where}.`;
    case "done":
      return `Finished: ${groundsInWords(state.used, writer)}.`;
    case undefined:
      return "";
    default:
      return `${state.message} ${state.used.elements + state.used.form > 0 ? `${sentenceCase(there)} and ${where}.` : ""}`.trim();
  }
}
