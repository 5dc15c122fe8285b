import { InputError } from "./input-error.js";

/** Where an input stands: its name, and the words for its row or its pair. */
export interface Place {
  readonly name: string;
  /** such as "row 12 of the site block" */
  readonly words: string;
  /** 1 for the first row of the block */
  readonly row?: number;
  /** the input of the catalogue */
  readonly id?: string;
}

/**
 * The place of an input in the site block.
 *
 * @param name  the input's label
 * @param row   1 for the first row of the block
 * @returns     its place
 */
export function rowPlace(name: string, row: number): Place {
  return { name, words: rowWords(row), row };
}

/**
 * The place of an input in the trailing pairs of a formula.
 *
 * @param name  the input's label
 * @param pair  1 for the first pair
 * @returns     its place
 */
export function pairPlace(name: string, pair: number): Place {
  return { name, words: `pair ${pair} of the formula` };
}

/**
 * Words for a row.
 *
 * @param row  1 for the first row of the block
 * @returns    "row 12 of the site block"
 */
export function rowWords(row: number): string {
  return `row ${row} of the site block`;
}

/**
 * The error for an input that cannot be used.
 *
 * @param place   where it stands
 * @param reason  what was found and what is accepted: the sentence after the name, without its full stop
 * @returns       an error to throw
 */
export function refusal(place: Place, reason: string): InputError {
  return new InputError(`${place.name} (${place.words}) ${reason}.`, place.row, place.id);
}

/**
 * A list in words.
 *
 * @param words  what is listed
 * @param join   the word before the last one
 * @returns      "a, b or c"
 */
export function inWords(words: readonly string[], join = "or"): string {
  return words.length < 2 ? words.join("") : `${words.slice(0, -1).join(", ")} ${join} ${words[words.length - 1]}`;
}
