import { amount, found, isEmpty, plainCell } from "./cells.js";
import { InputError } from "./input-error.js";
import { LARGEST_COUNT } from "./limits.js";

/** The parts of a site that say how many holes can be asked for. */
export interface Countable {
  readonly problem: { readonly investigation: { readonly holes: readonly unknown[] | undefined } };
}

/** Numbers of holes that a table shows where nobody says otherwise. */
const USUAL_LARGEST = 12;

/**
 * The number of holes that a formula asks for.
 *
 * @param site   whose hole list bounds it
 * @param count  what the formula holds
 * @param name   what the argument is called, for the sentence
 * @returns      a whole number from 0 to the hole list's length, 60 at most
 * @throws {InputError} anything else
 */
export function requireCount(site: Countable, count: unknown, name = "Count"): number {
  const cell = plainCell(Array.isArray(count) && count.length === 1 && Array.isArray(count[0]) && count[0].length === 1 ? count[0][0] : count);
  if (isEmpty(cell)) throw new InputError(`${name} is missing; a whole number of holes from 0 to ${largestCount(site)} is needed.`);
  if (typeof cell !== "number") throw new InputError(`${name} is ${found(cell)}; a whole number of holes from 0 to ${largestCount(site)} is needed.`);
  if (cell < 0) throw new InputError(`${name} is ${amount(cell)}; a number of holes cannot be negative.`);
  if (!Number.isInteger(cell)) throw new InputError(`${name} is ${amount(cell)}; a number of holes is a whole number.`);
  if (cell > LARGEST_COUNT) throw new InputError(`${name} is ${amount(cell)}; at most ${LARGEST_COUNT} holes are priced.`);
  requireWithinList(site, cell, name);
  return cell;
}

/**
 * The numbers of holes that a table shows where nobody says otherwise.
 *
 * @param site  whose hole list bounds them
 * @returns     0 to 12, or to as many as the hole list holds
 */
export function usualCounts(site: Countable): number[] {
  return upTo(Math.min(USUAL_LARGEST, site.problem.investigation.holes?.length ?? Infinity));
}

/**
 * Numbers of holes in words.
 *
 * @param counts  growing whole numbers
 * @returns       "0 to 12", or all of them with commas
 */
export function rangeText(counts: readonly number[]): string {
  const first = counts[0]!;
  const last = counts[counts.length - 1]!;
  return counts.length > 2 && last - first === counts.length - 1 ? `${first} to ${last}` : counts.join(", ");
}

function largestCount(site: Countable): number {
  return Math.min(LARGEST_COUNT, site.problem.investigation.holes?.length ?? Infinity);
}

function requireWithinList(site: Countable, count: number, name: string): void {
  const holes = site.problem.investigation.holes?.length;
  if (holes !== undefined && count > holes) {
    throw new InputError(`${name} is ${count}, but the hole list holds ${holes} ${holes === 1 ? "hole" : "holes"}; add rows to it, or take it out so that holes are placed automatically.`);
  }
}

function upTo(largest: number): number[] {
  return Array.from({ length: largest + 1 }, (_, index) => index);
}
