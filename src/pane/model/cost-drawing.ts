import { tableStep } from "./conclusion.js";
import type { CostRow } from "./cost-row.js";
import { countsInWords, type NumberWriter } from "./numbers.js";

/** The parts of the total, from the base of the stack upwards: what the count hardly moves stands lowest. */
const PARTS: readonly (readonly [name: string, amount: (row: CostRow) => number])[] = [
  ["Foundation", (row) => row.foundation],
  ["Failure", (row) => row.failure],
  ["Delay", (row) => row.delay],
  ["Investigation", (row) => row.investigation],
];

/** One block of the stack. */
export interface PartBlock {
  readonly count: number;
  readonly part: string;
  readonly from: number;
  readonly to: number;
}

/** One point of the total with its band, cut to the axis. */
export interface TotalPoint {
  readonly count: number;
  readonly total: number;
  readonly low: number;
  readonly high: number;
  /** the total lies above the axis and is drawn as an arrow on its edge */
  readonly above: boolean;
  readonly inSet: boolean;
  readonly cheapest: boolean;
}

/** All that the cost picture shows. */
export interface CostDrawing {
  readonly counts: readonly number[];
  readonly blocks: readonly PartBlock[];
  /** parts that are not zero everywhere, from the base of the stack upwards */
  readonly parts: readonly string[];
  readonly points: readonly TotalPoint[];
  /** axis of the totals, money; does not start at zero */
  readonly totalAxis: readonly [number, number];
  /** axis of the parts, money; starts at zero */
  readonly partAxis: readonly [number, number];
}

/**
 * Chooses blocks, points and axes for the picture of cost against count.
 *
 * @param rows      one row a count, counts rising, at least one
 * @param cheapest  the count of the smallest total
 * @returns         parts that nobody pays for are left out
 */
export function costDrawing(rows: readonly CostRow[], cheapest: number): CostDrawing {
  const parts = PARTS.filter(([, amount]) => rows.some((row) => amount(row) > 0));
  const totalAxis = axisOfTotals(rows);
  const top = totalAxis[1];
  const points = rows.map((row) => ({
    count: row.count,
    total: Math.min(row.total, top),
    low: Math.min(row.total - 2 * row.standardError, top),
    high: Math.min(row.total + 2 * row.standardError, top),
    above: row.total > top,
    inSet: row.notDistinguishable || row.count === cheapest,
    cheapest: row.count === cheapest,
  }));
  const largest = Math.max(...rows.map((row) => row.total));
  return {
    counts: rows.map((row) => row.count),
    blocks: rows.flatMap((row) => stack(row, parts)),
    parts: parts.map(([name]) => name),
    points,
    totalAxis,
    partAxis: [0, largest > 0 ? largest * 1.04 : 1],
  };
}

/**
 * Says in sentences what the picture shows, for a person who does not see it.
 *
 * @param rows      one row a count, counts rising, at least one
 * @param cheapest  the count of the smallest total
 * @param writer    writes the numbers
 * @returns         the course of the total and the marked set
 */
export function describeCosts(rows: readonly CostRow[], cheapest: number, writer: NumberWriter): string {
  const step = tableStep(rows);
  const first = rows[0]!;
  const last = rows[rows.length - 1]!;
  const best = rows.find((row) => row.count === cheapest) ?? first;
  const path = [first, best, last].filter((row, k, all) => all.indexOf(row) === k);
  const set = rows.filter((row) => row.notDistinguishable || row.count === cheapest).map((row) => row.count);
  const marked = set.length > 1 ? ` Marked as not to be told apart: ${countsInWords(set)}.` : "";
  const course = path.map((row) => `${writer.money(row.total, step)} at ${row.count}`).join(", ");
  return `Expected total cost against number of holes: ${course}.${marked} All figures are in the table below the picture.`;
}

function stack(row: CostRow, parts: typeof PARTS): PartBlock[] {
  let from = 0;
  return parts.map(([part, amount]) => {
    const block = { count: row.count, part, from, to: from + amount(row) };
    from = block.to;
    return block;
  });
}

function axisOfTotals(rows: readonly CostRow[]): [number, number] {
  const low = Math.min(...rows.map((row) => row.total - 2 * row.standardError));
  const high = Math.max(...rows.map((row) => row.total + 2 * row.standardError));
  const least = Math.min(...rows.map((row) => row.total));
  const excess = rows.map((row) => row.total - least).sort((a, b) => a - b);
  // One hopeless count (often none at all) would flatten the part of the curve on which people decide.
  const typical = excess[Math.ceil((excess.length - 1) / 2)]!;
  const cut = excess.length >= 5 && typical > 0 ? Math.min(high, least + 4 * typical) : high;
  const margin = (cut - low) * 0.08 || Math.abs(cut) * 0.05 || 1;
  return [low - margin, cut + margin];
}
