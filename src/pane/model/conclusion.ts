import type { CountRow } from "../../engine/index.js";
import type { CostRow } from "./cost-row.js";
import { countsInWords, holesInWords, moneyStep, sentenceCase, shorten, type NumberWriter } from "./numbers.js";

/** What the table of counts says, in sentences for a person who has to act on it. */
export interface Conclusion {
  /** the cheapest count, for the large figure */
  readonly count: number;
  /** the answer in one sentence */
  readonly answer: string;
  /** the answer against the count that the client has in mind */
  readonly comparison: string;
  /** what else must be known before the answer is used; may be empty */
  readonly remarks: readonly string[];
}

/** What the words need of a row of either table, the quick or the simulated. */
export type ConcludedRow = CostRow & Pick<CountRow, "tooShortChance">;

/**
 * Puts the table of counts into words.
 *
 * @param rows      one row a count, counts rising, at least one
 * @param cheapest  the count of the smallest total, one of the rows
 * @param client    the count that the client proposes; undefined: none stated
 * @param money     whose money, as the person wrote it; "" where nobody did
 * @param writer    writes the numbers
 * @returns         sentences that end with a full stop
 */
export function conclude(rows: readonly ConcludedRow[], cheapest: number, client: number | undefined, money: string, writer: NumberWriter): Conclusion {
  const best = rows.find((row) => row.count === cheapest) ?? rows[0]!;
  const step = tableStep(rows);
  const unit = money === "" ? "" : `\u00a0${shorten(money, 12)}`;
  const amount = (value: number): string => writer.money(value, step) + unit;
  const subject = cheapest === 0 ? "Buying no holes costs" : `${sentenceCase(holesInWords(cheapest))} ${cheapest === 1 ? "costs" : "cost"}`;
  const answer = `${subject} least in all: ${amount(best.total)} expected, give or take ${writer.money(2 * best.standardError, step)}.`;
  return { count: best.count, answer, comparison: compare(rows, best, client, amount), remarks: remarks(rows, best, writer) };
}

/**
 * The rounding step that suits all sums of a table.
 *
 * @param rows  the table
 * @returns     a power of ten, money
 */
export function tableStep(rows: readonly Pick<CountRow, "standardError" | "total">[]): number {
  // The smallest error rules: a rounding fit for the worst row would wipe out differences that the others show.
  const smallest = Math.min(...rows.map((row) => row.standardError));
  return moneyStep(smallest, Math.max(...rows.map((row) => row.total)));
}

function compare(rows: readonly ConcludedRow[], best: ConcludedRow, client: number | undefined, amount: (value: number) => string): string {
  if (client === undefined) return "State the count that your client proposes to see what changing it is worth.";
  if (client === best.count) return "That is the count your client proposes.";
  const theirs = rows.find((row) => row.count === client);
  const proposal = client === 0 ? "the proposal to buy none" : `the ${holesInWords(client)} your client proposes`;
  if (theirs === undefined) {
    return `${sentenceCase(holesInWords(client))} ${client === 1 ? "is" : "are"} not among the counts tried (${countsInWords(rows.map((row) => row.count))}), so no saving can be stated.`;
  }
  if (theirs.notDistinguishable) return `At this accuracy it cannot be told from ${proposal}, at ${amount(theirs.total)}.`;
  return `That is ${amount(theirs.total - best.total)} less than ${proposal}, at ${amount(theirs.total)}.`;
}

function remarks(rows: readonly ConcludedRow[], best: ConcludedRow, writer: NumberWriter): string[] {
  const sentences: string[] = [];
  const others = rows.filter((row) => row.notDistinguishable && row.count !== best.count).map((row) => row.count);
  if (others.length > 0) {
    const noun = others.length === 1 && others[0] === 1 ? "hole" : "holes";
    sentences.push(`${sentenceCase(countsInWords(others))} ${noun} cannot be told from the cheapest: the difference is within two of its standard errors.`);
  }
  if (rows.length > 1 && best.count === rows[rows.length - 1]!.count) {
    sentences.push("This is the largest count tried, so more holes may cost less still. Raise the counts in the site block to see.");
  }
  if (best.tooShortChance > 0.005) {
    sentences.push(`In ${writer.percent(best.tooShortChance)} of cases even the longest pile is not enough; those cases are priced at the longest length.`);
  }
  if (best.count === 0) sentences.push("Whatever the price says, the investigation that safety or law requires comes first.");
  return sentences;
}
