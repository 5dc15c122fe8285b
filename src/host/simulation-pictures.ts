import { lengthPercentiles, type SimulationRow } from "../engine/index.js";
import { areaAddress } from "./addresses.js";
import type { PlannedCell, PlannedChart } from "./workbook.js";

/** Cells that hold the numbers of a picture, and the picture. */
export interface CostPicture {
  readonly cells: readonly PlannedCell[];
  readonly chart: PlannedChart;
}

/** Foundation first, because it is the largest and the others are read against its even top. */
const PARTS = [
  ["Foundation", (row: SimulationRow) => row.foundation],
  ["Failure", (row: SimulationRow) => row.failure],
  ["Delay", (row: SimulationRow) => row.delay],
  ["Investigation", (row: SimulationRow) => row.investigation],
] as const;

/**
 * Cost against count: parts stacked, the total with the edges of its error, the counts that cannot be told apart marked.
 *
 * @param rows   of one method, each count once
 * @param at     upper left cell of the block of numbers: a line of words, the heads, then a row a count
 * @param place  cells that the picture covers
 * @param money  whose money; "" where nobody wrote it
 */
export function costPicture(rows: readonly SimulationRow[], at: { readonly row: number; readonly column: number }, place: string, money: string): CostPicture {
  const best = rows.reduce((least, row) => (row.total < least.total ? row : least));
  const isMarked = (row: SimulationRow): boolean => row === best || row.notDistinguishable;
  const first = at.row + 2;
  const columnAt = (k: number): string => areaAddress({ top: first, bottom: first + rows.length - 1, left: at.column + k, right: at.column + k });
  const heads = ["Holes", ...PARTS.map(([name]) => name), "Total", "Lower edge", "Upper edge", "Least or tied"];
  const cells: PlannedCell[] = [
    { row: at.row, column: at.column, value: "The numbers that the picture of costs draws", style: "note" },
    ...heads.map((value, k): PlannedCell => ({ row: at.row + 1, column: at.column + k, value, style: "numberhead" })),
    ...rows.flatMap((row, r) => {
      const values = [row.count, ...PARTS.map(([, of]) => of(row)), row.total, row.total - 2 * row.standardError, row.total + 2 * row.standardError, ...(isMarked(row) ? [row.total] : [])];
      return values.map((value, k): PlannedCell => ({ row: first + r, column: at.column + k, value, style: "label", ...(k === 0 ? {} : { look: "money" }) }));
    }),
  ];
  const unit = money === "" ? "" : ` (${money})`;
  return {
    cells,
    chart: {
      title: "Expected cost by number of holes",
      words: costInWords(rows, best, money),
      place,
      categories: columnAt(0),
      categoryTitle: "Number of holes",
      valueTitle: `Expected cost${unit}`,
      valueLook: "money",
      series: [
        ...PARTS.map(([name], k) => ({ kind: "part" as const, name, values: columnAt(k + 1) })),
        { kind: "line", name: "Total", values: columnAt(5) },
        { kind: "bound", name: "Give or take two standard errors", values: columnAt(6) },
        { kind: "bound", name: "Upper edge", values: columnAt(7), hiddenInLegend: true },
        { kind: "mark", name: "Cheapest, or cannot be told from it", values: columnAt(8) },
      ],
    },
  };
}

function costInWords(rows: readonly SimulationRow[], best: SimulationRow, money: string): string {
  const amount = (value: number): string => `${Math.round(value).toLocaleString("en-US")}${money === "" ? "" : ` ${money}`}`;
  const others = rows.filter((row) => row.notDistinguishable && row !== best).map(({ count }) => count);
  const tied = others.length === 0 ? "" : ` Cannot be told from it: ${others.join(", ")}.`;
  return `Expected cost of ${rows[0]!.count} to ${rows.at(-1)!.count} holes, by parts. Cheapest: ${best.count} ${best.count === 1 ? "hole" : "holes"}, ${amount(best.total)} in all, give or take ${amount(2 * best.standardError)}.${tied}`;
}

/**
 * How long the piles may turn out, as lines over the percentiles: the fewest holes, the cheapest number and the most holes.
 *
 * @param rows     of one method, in the order of the table
 * @param columnOf the cells of a row's lengths, one cell a percentile
 * @param categories  the cells of the percentiles
 * @param place    cells that the picture covers
 * @param unit     of the lengths in the cells
 */
export function lengthPicture(rows: readonly SimulationRow[], columnOf: (row: SimulationRow) => string, categories: string, place: string, unit: string): PlannedChart {
  const best = rows.reduce((least, row) => (row.total < least.total ? row : least));
  const shown = rows.filter((row) => row === rows[0] || row === best || row === rows.at(-1));
  const holes = ({ count }: SimulationRow): string => `${count} ${count === 1 ? "hole" : "holes"}`;
  const middle = lengthPercentiles.indexOf(50);
  return {
    title: "Mean pile length that the design may ask for",
    words: `Mean pile length against the percentile of outcomes; a steep line means lengths that are hard to foresee. Half of all outcomes stay below, in metres: ${shown.map((row) => `${row.meanLengths[middle]!.toFixed(1)} with ${holes(row)}`).join(", ")}.`,
    place,
    categories,
    categoryTitle: "Percentile (%)",
    valueTitle: `Mean pile length (${unit})`,
    valueLook: "metres",
    series: shown.map((row) => ({ kind: "line", name: holes(row), values: columnOf(row) })),
  };
}
