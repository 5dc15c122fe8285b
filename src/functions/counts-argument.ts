import { isEmpty, plainCell } from "../inputs/cells.js";
import { usualCounts } from "../inputs/count.js";
import { InputError, LARGEST_COUNT, requireCount, type Site } from "../inputs/index.js";
import { oneCell } from "./arguments.js";
import { cellsFrom } from "./site-argument.js";

/**
 * A number of holes out of an argument.
 *
 * @param value  the argument as the host hands it over
 * @param site   whose hole list bounds it
 * @param name   the argument in the person's words
 * @throws {InputError} for anything but a whole number from 0 to the largest that the site allows
 */
export function countFrom(value: unknown, site: Site, name = "Count"): number {
  return requireCount(site, oneCell(value, name), name);
}


/**
 * The counts of a table: 0 to N from one number N, the cells of a range as they stand, or what the site asks for.
 *
 * @param value  one number, a range or an array; omitted or blank: the site's own counts
 * @param site   whose hole list bounds them
 * @returns      the counts in the person's order, repeats kept, so that rows line up with the cells they came from
 * @throws {InputError} naming the cell of the range that cannot be used
 */
export function countsFrom(value: unknown, site: Site): readonly number[] {
  const rows = cellsFrom(value);
  if (rows.length > MOST_ROWS_READ) throw new InputError(`Counts is a range of ${rows.length} rows; ${MARK}`);
  const range = rows.flat();
  let used = range.length;
  while (used > 0 && isEmpty(plainCell(range[used - 1]))) used--;
  if (used === 0) return site.counts ?? usualCounts(site);
  if (range.length === 1) return Array.from({ length: countFrom(range[0], site, "Largest count") + 1 }, (_, count) => count);
  if (used > MOST_CELLS) throw new InputError(`Counts is a range of ${used} cells; ${MARK}`);
  return range.slice(0, used).map((cell, k) => countFrom(cell, site, `Count in cell ${k + 1} of the range`));
}

/** No list of counts is longer than every count twice. */
const MOST_CELLS = 2 * LARGEST_COUNT;
/** A whole column given by mistake is refused before it is read. */
const MOST_ROWS_READ = 10_000;
const MARK = `mark only the counts to compare, at most ${MOST_CELLS}.`;
