import type { InputId } from "./catalogue.js";
import { InputError } from "./input-error.js";

/** One thing that is wrong with a site block, with the sentence that says so. */
export interface Fault {
  readonly sentence: string;
  /** row of the block, 1 for its first; undefined for a missing row or a pair */
  readonly row: number | undefined;
  /** the input, where it is known */
  readonly id: InputId | undefined;
  /** the label as written, where no input is known by it */
  readonly label: string;
}

/** Faults beyond this many are not collected: nobody reads them, and a hostile block must not take long. */
export const MOST_FAULTS = 40;

/**
 * Runs a piece of reading and notes its refusal instead of throwing it, so that one fault does not hide the next.
 *
 * @param faults  where a refusal is noted
 * @param about   what the piece is about
 * @param read    the piece
 * @returns       its result, or undefined where it was refused
 * @throws anything that is not a refusal, because that is a bug
 */
export function attempt<T>(faults: Fault[], about: Omit<Fault, "sentence">, read: () => T): T | undefined {
  try {
    return read();
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    if (faults.length < MOST_FAULTS) faults.push({ ...about, row: error.id === undefined ? error.row ?? about.row : error.row, id: (error.id as InputId | undefined) ?? about.id, sentence: error.message });
    return undefined;
  }
}
