import type { Problem } from "../engine/index.js";
import { flattenPairs, readPairs } from "./apply-pairs.js";
import { setMethodAside } from "./build-investigation.js";
import { buildProblem, requireOneCurrency } from "./build-problem.js";
import { plainCell, type Cell } from "./cells.js";
import { checkRows, type CheckRow } from "./check-rows.js";
import { contentCache } from "./content-cache.js";
import { usualCounts, rangeText } from "./count.js";
import { attempt, type Fault } from "./fault.js";
import { InputError } from "./input-error.js";
import { MOST_ROWS } from "./limits.js";
import { checkPresence } from "./presence.js";
import { scanBlock, type Block } from "./scan-block.js";
import { Values, whereAvailable } from "./values.js";
import type { InputId } from "./catalogue.js";

/** A site block that can be priced. Equal cells give the very same object, so work on it can be remembered. */
export interface Site {
  readonly problem: Problem;
  /** units of results */
  readonly units: "SI" | "US";
  /** numbers of holes that the block asks for; undefined where it says nothing */
  readonly counts: readonly number[] | undefined;
  /** name of the kind of investigation */
  readonly method: string;
  /** whose money, as written in the unit column; "" where nobody wrote it */
  readonly money: string;
  /** one row for each input */
  readonly rows: readonly CheckRow[];
}

interface Reading {
  readonly site: Site | undefined;
  readonly faults: readonly Fault[];
  readonly rows: readonly CheckRow[];
}

const COLUMNS = 4;
const readings = contentCache<Reading>(200);
const blocks = contentCache<Block>(20);

/**
 * Reads a site block into the problem that the engine prices.
 *
 * @param cells  the range: label, value, unit, note, row by row
 * @param pairs  label, value, label, value, ...: they replace inputs. A value is in the unit of the block's own row for that input, or in
 *   the catalogue's unit where the block has no such row
 * @returns      the site
 * @throws {InputError} anything that cannot be used: the first fault from the top of the block
 */
export function parseSite(cells: readonly (readonly unknown[])[], pairs?: readonly unknown[]): Site {
  const { site, faults } = readSite(cells, pairs);
  if (site !== undefined) return site;
  const { sentence, row, id } = faults[0]!;
  throw new InputError(sentence, row, id);
}

/**
 * Says for each input what is used and why, and for each refused cell what is wrong with it.
 *
 * @param cells  the range: label, value, unit, note, row by row
 * @param pairs  as for `parseSite`
 * @returns      one row for each input, after those that no input is known for
 */
export function checkSite(cells: readonly (readonly unknown[])[], pairs?: readonly unknown[]): CheckRow[] {
  return [...readSite(cells, pairs).rows];
}

function readSite(cells: unknown, pairs: readonly unknown[] | undefined): Reading {
  const faults: Fault[] = [];
  const width = attempt(faults, { id: undefined, label: "Site block", row: undefined }, () => requireBlock(cells));
  if (width === undefined) return { site: undefined, faults, rows: checkRows(undefined, faults, undefined, undefined) };
  const flat = flatten(cells as readonly (readonly unknown[])[], width);
  const flatPairs = flattenPairs(pairs);
  // the separator keeps a block's last cells and the first pair apart
  const key = flatPairs.length === 0 ? flat : [...flat, "\u0000pairs", ...flatPairs];
  const known = readings.find(key);
  if (known !== undefined) return known;
  let block = blocks.find(flat);
  if (block === undefined) {
    block = scanBlock(rowsOf(flat, width));
    blocks.keep(flat, block);
  }
  const reading = resolve(block, flatPairs);
  readings.keep(key, reading);
  return reading;
}

/** Shape of the range, so that a whole column or a single cell is answered at once. */
function requireBlock(cells: unknown): number {
  if (!Array.isArray(cells) || cells.length === 0 || !Array.isArray(cells[0])) {
    throw new InputError("The site block is one cell; mark the range that holds labels, values, units and notes.");
  }
  const rows = cells as unknown[][];
  const columns = rows[0]!.length;
  if (rows.length === 1 && columns <= 1) throw new InputError("The site block is one cell; mark the range that holds labels, values, units and notes.");
  if (rows.length > MOST_ROWS) throw new InputError(`The site block has ${rows.length} rows; mark only the rows that hold inputs, at most ${MOST_ROWS}.`);
  const width = rows.reduce((most, row) => Math.max(most, Array.isArray(row) ? row.length : 0), 0);
  if (width < 2) throw new InputError("The site block has one column; mark the columns of labels, values, units and notes.");
  if (width > COLUMNS) throw new InputError(`The site block has ${width} columns; mark the columns of labels, values, units and notes only.`);
  return width;
}

/** Width first, then all cells, so that ranges of another shape never look alike. */
function flatten(cells: readonly (readonly unknown[])[], width: number): Cell[] {
  const flat: Cell[] = [width];
  for (const row of cells) for (let column = 0; column < width; column++) flat.push(plainCell(Array.isArray(row) ? (row as readonly unknown[])[column] : null));
  return flat;
}

function rowsOf(flat: readonly Cell[], width: number): Cell[][] {
  const rows: Cell[][] = [];
  for (let start = 1; start < flat.length; start += width) rows.push(flat.slice(start, start + width));
  return rows;
}

function resolve(block: Block, pairs: readonly Cell[]): Reading {
  const faults: Fault[] = [...block.faults];
  if (block.rows.size === 0 && faults.length === 0) attempt(faults, { id: undefined, label: "Site block", row: undefined }, () => {
    throw new InputError("The site block is blank; mark the range that holds labels, values, units and notes.");
  });
  const replacements = readPairs(pairs, block, faults);
  const values = new Values(block, replacements, new Set(faults.flatMap(({ id }) => (id === undefined ? [] : [id as InputId]))));
  setMethodAside(values);
  checkPresence(values, faults);
  const problem = buildProblem(values, faults);
  const counts = problem && attempt(faults, { id: "counts", label: "Counts", row: block.rows.get("counts") }, () => whereAvailable(() => countsOf(values, problem)));
  const rows = checkRows(values, faults, problem, counts ?? (problem && usualCounts({ problem })));
  if (problem === undefined || faults.length > 0) return { site: undefined, faults, rows };
  const site: Site = {
    problem, rows,
    units: values.text("resultUnits") as "SI" | "US",
    counts,
    method: values.text("method"),
    money: requireOneCurrency(values),
  };
  return { site, faults, rows };
}

function countsOf(values: Values, problem: Problem): readonly number[] | undefined {
  if (values.source("counts") === "refused") return undefined;
  const counts = values.given("counts")?.value as readonly number[] | undefined;
  const holes = problem.investigation.holes?.length;
  if (counts !== undefined && holes !== undefined && counts[counts.length - 1]! > holes) {
    throw new InputError(`${values.named("counts")} is ${rangeText(counts)}, but ${values.named("holeList")} holds ${holes} ${holes === 1 ? "hole" : "holes"}; add rows to the list or lower the counts.`, values.block.rows.get("counts"));
  }
  return counts;
}
