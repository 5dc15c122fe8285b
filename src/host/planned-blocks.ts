import type { Area } from "./addresses.js";
import { inNamespace } from "./namespace.js";
import type { CellStyle, CellValue, NumberLook, PlannedCell } from "./workbook.js";

/** Rows of cells that are written with one request. */
export interface Block {
  readonly row: number;
  readonly column: number;
  /** rows equally long; "" for a cell that stays blank, a formula begins with "=" */
  readonly cells: CellValue[][];
}

/** Signs of JSON in one request: Excel on the web refuses requests above 5 MB, and large ones keep the sheet from answering. */
const LARGEST_BLOCK = 900_000;

/**
 * What a plan writes, as blocks of rows none of which is too large to send.
 *
 * @param cells      of the plan
 * @param namespace  under which the functions stand
 * @param largest    signs of JSON in a block
 */
export function contentBlocks(cells: readonly PlannedCell[], namespace: string, largest = LARGEST_BLOCK): Block[] {
  const filled = cells.filter(({ value, formula }) => formula !== undefined || (value !== undefined && value !== ""));
  if (filled.length === 0) return [];
  const left = Math.min(...filled.map(({ column }) => column));
  const width = Math.max(...filled.map(({ column }) => column)) - left + 1;
  const top = Math.min(...filled.map(({ row }) => row));
  const height = Math.max(...filled.map(({ row }) => row)) - top + 1;
  const rows = Array.from({ length: height }, () => new Array<CellValue>(width).fill(""));
  for (const cell of filled) rows[cell.row - top]![cell.column - left] = written(cell, namespace);
  const blocks: Block[] = [];
  let size = 0;
  rows.forEach((row, k) => {
    const own = JSON.stringify(row).length;
    if (blocks.length === 0 || size + own > largest) {
      blocks.push({ row: top + k, column: left, cells: [] });
      size = 0;
    }
    blocks.at(-1)!.cells.push(row);
    size += own;
  });
  return blocks;
}

function written({ value, formula }: PlannedCell, namespace: string): CellValue {
  if (formula !== undefined) return inNamespace(formula, namespace);
  return typeof value === "string" ? asText(value) : value!;
}

/** The longest text that Excel might still take for a date in words. */
const LONGEST_DATE = 40;

/**
 * A text so that Excel keeps it as text: "1/500" would become a date, "=A1" a formula, "1e5" a number. The apostrophe in front
 * does not become part of the cell's value.
 */
function asText(text: string): string {
  const isPlain = /^\p{L}/u.test(text) && !/^(?:true|false)$/i.test(text) && (text.length > LONGEST_DATE || !/\d/.test(text));
  return isPlain ? text : `'${text}`;
}

/** Cells side by side and below each other that look the same. */
export interface LookArea extends Area {
  readonly style: CellStyle | undefined;
  readonly look: NumberLook | undefined;
}

/** The fewest requests that give all cells of a plan their look: runs of a row, and equal runs of rows that follow each other. */
export function lookAreas(cells: readonly PlannedCell[]): LookArea[] {
  const areas: LookArea[] = [];
  // areas that end in the row before, by their columns and looks
  let open = new Map<string, number>();
  for (const [row, runs] of runsByRow(cells)) {
    const next = new Map<string, number>();
    for (const run of runs) {
      const key = `${run.left} ${run.right} ${run.style ?? ""} ${run.look ?? ""}`;
      const above = open.get(key);
      if (above !== undefined && areas[above]!.bottom === row - 1) {
        areas[above] = { ...areas[above]!, bottom: row };
        next.set(key, above);
      } else next.set(key, areas.push(run) - 1);
    }
    open = next;
  }
  return areas;
}

function runsByRow(cells: readonly PlannedCell[]): [number, LookArea[]][] {
  const rows = new Map<number, PlannedCell[]>();
  for (const cell of cells) {
    if (cell.style === undefined && cell.look === undefined) continue;
    const row = rows.get(cell.row);
    if (row === undefined) rows.set(cell.row, [cell]);
    else row.push(cell);
  }
  return [...rows].sort(([a], [b]) => a - b).map(([row, own]) => [row, runsOf(own)]);
}

function runsOf(cells: PlannedCell[]): LookArea[] {
  const runs: LookArea[] = [];
  for (const { row, column, style, look } of cells.sort((a, b) => a.column - b.column)) {
    const last = runs.at(-1);
    if (last !== undefined && last.right === column - 1 && last.style === style && last.look === look) runs[runs.length - 1] = { ...last, right: column };
    else runs.push({ top: row, bottom: row, left: column, right: column, style, look });
  }
  return runs;
}
