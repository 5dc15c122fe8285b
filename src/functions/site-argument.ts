import { isBlankOrZero, plainCell, type Cell } from "../inputs/cells.js";
import { parseSite, type Site } from "../inputs/index.js";

/**
 * The site that a function's first argument and its trailing pairs describe.
 *
 * @param site   the site block as the host hands it over: rows of cells, or one cell
 * @param pairs  label, value, label, value ...; see pairsFrom
 * @throws {InputError} naming the input and its row
 */
export function siteFrom(site: unknown, pairs?: unknown): Site {
  return parseSite(cellsFrom(site), pairsFrom(pairs));
}

/** The argument as rows of cells; a single cell, which some hosts send bare, becomes one row of one. */
export function cellsFrom(range: unknown): readonly (readonly unknown[])[] {
  return Array.isArray(range) ? range : [[range ?? null]];
}

/**
 * The trailing label, value pairs as one flat list. A pair whose two cells are both blank is left out, so that a formula
 * may point at a pair of cells that is not in use; with the label present a blank value stays and is refused by name.
 *
 * @param pairs  the repeating argument: a list of values or of single cells; null or undefined when omitted
 */
export function pairsFrom(pairs: unknown): Cell[] {
  const flat = (Array.isArray(pairs) ? pairs : [pairs]).flat(2).map(plainCell);
  const kept: Cell[] = [];
  for (let k = 0; k < flat.length; k += 2) {
    const pair = flat.slice(k, k + 2);
    if (!pair.every(isBlankOrZero)) kept.push(...pair); // zero, because desktop Excel sends it for a blank cell
  }
  return kept;
}

/**
 * Takes one pair out of the list: an argument of the function itself rather than an input of the site.
 *
 * @param pairs  what pairsFrom gave
 * @param label  the label to take; case and outer spaces do not matter
 * @returns      the value of its last occurrence (undefined when absent) and the pairs that remain
 */
export function takePair(pairs: readonly Cell[], label: string): { value: Cell | undefined; rest: Cell[] } {
  const rest: Cell[] = [];
  let value: Cell | undefined;
  for (let k = 0; k < pairs.length; k += 2) {
    const name = pairs[k];
    if (typeof name === "string" && name.trim().toLowerCase() === label.toLowerCase()) value = pairs[k + 1] ?? null;
    else rest.push(...pairs.slice(k, k + 2));
  }
  return { value, rest };
}
