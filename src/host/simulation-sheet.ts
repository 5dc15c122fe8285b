import type { SimulationTable } from "../engine/index.js";
import { areaAddress, columnLetters } from "./addresses.js";
import { costPicture, lengthPicture } from "./simulation-pictures.js";
import { simulationLengthTable, simulationTable, stampTable, type SimulationStamp } from "../results/index.js";
import type { ResultColumn, ResultTable } from "../results/result-table.js";
import { resultUnit, type UnitSystem } from "../units/result-units.js";
import type { NumberLook, PlannedCell, SheetPlan } from "./workbook.js";

/** A simulation as it is written into a sheet. */
export interface SimulationContent {
  readonly table: SimulationTable;
  readonly stamp: SimulationStamp;
  readonly units: UnitSystem;
  /** whose money; "" where nobody wrote it */
  readonly money: string;
  /** sentences that must be read before the figures, such as that the run was not finished */
  readonly warnings: readonly string[];
}

/**
 * All figures of a simulation on one new sheet: stamp, costs and lengths, with what belongs under each, and their pictures.
 *
 * @param content  the simulation
 */
export function simulationSheet({ table, stamp, units, money, warnings }: SimulationContent): SheetPlan {
  const costs = simulationTable(table, units, money);
  const cells: PlannedCell[] = [{ row: 0, column: 0, value: costs.title, style: "title" }];
  let row = 1;
  for (const warning of warnings) cells.push({ row: row++, column: 0, value: warning, style: "section" });
  row++;
  for (const line of stampTable(stamp).rows) {
    cells.push({ row, column: 0, value: line[0]!, style: "label" }, { row: row++, column: STAMP_COLUMN, value: line[1]!, style: "label" });
  }
  row++;
  const first = row;
  row = addTable(cells, costs, row);
  const names = [{ name: "SimulatedCosts", range: `A${first + 1}:${columnLetters(costs.columns.length - 1)}${row}` }];
  row = addNotes(cells, [...costs.notes, ...stampTable(stamp).notes], row);
  const columnWidths = costs.columns.map((column) => Math.max(90, Math.round(LETTER * headOf(column).length) + 14));
  const pictures = row;
  row += PICTURE_ROWS + 3;
  const lengths = simulationLengthTable(table, units);
  cells.push({ row: row++, column: 0, value: lengths.title, style: "section" });
  const percentiles = row + 1;
  row = addNotes(cells, lengths.notes, addTable(cells, lengths, row));
  const own = table.rows.filter(({ variant }) => variant === table.rows[table.cheapest]!.variant);
  const middle = columnsOver(columnWidths, 0, PICTURE_WIDTH);
  const picture = costPicture(own, { row, column: 0 }, areaAddress({ top: pictures, bottom: pictures + PICTURE_ROWS - 1, left: 0, right: middle - 1 }), money);
  const column = (k: number): string => areaAddress({ top: percentiles, bottom: percentiles + lengths.rows.length - 1, left: k, right: k });
  const right = columnsOver(columnWidths, middle + 1, PICTURE_WIDTH);
  const lengthChart = lengthPicture(own, (each) => column(1 + table.rows.indexOf(each)), column(0), areaAddress({ top: pictures, bottom: pictures + PICTURE_ROWS - 1, left: middle + 1, right: right - 1 }), resultUnit("length", units));
  cells.push(...picture.cells, ...[picture.chart, lengthChart].map(({ words }, k): PlannedCell => ({ row: pictures + PICTURE_ROWS + k, column: 0, value: words, style: "note" })));
  return { name: "Simulation", cells, names, columnWidths, charts: [picture.chart, lengthChart] };
}

/** Rows of a picture, and the pixels that its columns make up at least. */
const PICTURE_ROWS = 19;
const PICTURE_WIDTH = 600;

/** The column after those that make up a width. */
function columnsOver(widths: readonly number[], from: number, pixels: number): number {
  let [column, sum] = [from, 0];
  while (sum < pixels) sum += widths[column++] ?? 64; // the usual width of a column
  return column;
}

/** Pixels of a bold letter of a head. */
const LETTER = 7.8;
/** The stamp's words are longer than the first column. */
const STAMP_COLUMN = 3;

function addTable(cells: PlannedCell[], { columns, rows }: ResultTable, from: number): number {
  columns.forEach((column, k) => {
    const isText = rows.length > 0 && typeof rows[0]![k] === "string";
    cells.push({ row: from, column: k, value: headOf(column), style: isText ? "head" : "numberhead" });
  });
  rows.forEach((values, r) => {
    values.forEach((value, k) => {
      const look = typeof value === "number" ? lookOf(columns[k]!) : undefined;
      cells.push({ row: from + 1 + r, column: k, value, style: "result", ...(look === undefined ? {} : { look }) });
    });
  });
  return from + 1 + rows.length;
}

function headOf({ label, unit }: ResultColumn): string {
  return unit === "" ? label : `${label} (${unit})`;
}

function addNotes(cells: PlannedCell[], notes: readonly string[], from: number): number {
  notes.forEach((note, k) => cells.push({ row: from + k, column: 0, value: note, style: "note" }));
  return from + notes.length + 1;
}

/** How the numbers of a column show; whole numbers and percentiles show as they are. */
function lookOf({ unit }: ResultColumn): NumberLook | undefined {
  if (unit === "0 to 1") return "percent";
  if (unit === "m" || unit === "ft") return "metres";
  if (unit === "piles" || unit === "times") return "ratio";
  return unit === "holes" || unit === "%" ? undefined : "money";
}
