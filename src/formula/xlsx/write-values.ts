import type { Area } from "../addresses.js";
import type { BookCell } from "../book.js";
import { CIRCULAR, ErrorValue, type CellValue } from "../cell-value.js";
import type { Outcome } from "../sheet-state.js";
import { patchedSheet, type NewValue } from "./patch-sheet.js";
import type { SheetPart, XlsxBook } from "./read-book.js";
import { storedValue } from "./stored-value.js";

/** One calculated formula of a sheet. */
export interface Calculated {
  readonly cell: BookCell;
  readonly outcome: Outcome;
}

/** Values this near are the same: engines differ in the last digits of statistical functions, and a stored figure may be the better one. */
const SAME = 1e-8;

/**
 * Writes calculated values back into a workbook. Formulas that could not be calculated and circles of cells keep what is
 * stored.
 *
 * @param source  the workbook as read
 * @param sheets  the formulas of each sheet, by index
 * @returns       the new file, and for each sheet how many of its formulas show something else now
 */
export function withValues(source: XlsxBook, sheets: readonly (readonly Calculated[])[]): { bytes: Uint8Array; changed: number[] } {
  const replaced = new Map<string, Uint8Array>();
  const changed = sheets.map((calculated, index) => {
    const part = source.parts[index];
    if (part === undefined) return 0;
    const stored = storedValues(part);
    const perFormula = calculated.map(({ cell, outcome }) => changesOf(cell, outcome, stored));
    const values = withoutTwins(perFormula.flat());
    if (values.length > 0) replaced.set(part.part, encodedAs(part, patchedSheet(part.xml, part.grid, values)));
    return perFormula.filter((changes) => changes.length > 0).length;
  });
  return { bytes: source.zip.withParts(replaced), changed };
}

function storedValues({ grid, strings }: SheetPart): (row: number, column: number) => CellValue {
  const cells = new Map(grid.cells.map((cell) => [`${cell.row},${cell.column}`, cell]));
  return (row, column) => {
    const cell = cells.get(`${row},${column}`);
    return cell === undefined ? null : storedValue(cell, strings);
  };
}

function changesOf(cell: BookCell, { values }: Outcome, stored: (row: number, column: number) => CellValue): NewValue[] {
  const first = values[0]?.[0];
  if (first instanceof ErrorValue && first.code === CIRCULAR) return [];
  const { row, column, placement } = cell;
  const now: Area = { top: row, left: column, bottom: row + values.length - 1, right: column + (values[0]?.length ?? 1) - 1 };
  const found: NewValue[] = [];
  const put = (r: number, c: number, value: CellValue): void => {
    if (!isSame(stored(r, c), value)) found.push({ row: r, column: c, value });
  };
  values.forEach((line, r) => line.forEach((value, c) => put(row + r, column + c, value)));
  if (placement?.kind !== "spilling" || sameArea(placement.area, now)) return found;
  const before = placement.area;
  for (let r = before.top; r <= before.bottom; r++) for (let c = before.left; c <= before.right; c++) if (r > now.bottom || c > now.right) put(r, c, null);
  return [{ row, column, value: first ?? null, area: now }, ...found.filter((value) => value.row !== row || value.column !== column)];
}

/** A cell that one table has left may be filled by another. */
function withoutTwins(values: readonly NewValue[]): NewValue[] {
  const byCell = new Map<string, NewValue>();
  for (const value of values) {
    const key = `${value.row},${value.column}`;
    if (value.value !== null || !byCell.has(key)) byCell.set(key, value);
  }
  return [...byCell.values()];
}

function isSame(a: CellValue, b: CellValue): boolean {
  if (typeof a === "number" && typeof b === "number") return a === b || Math.abs(a - b) <= SAME * Math.max(Math.abs(a), Math.abs(b));
  return a instanceof ErrorValue && b instanceof ErrorValue ? a.code === b.code : a === b;
}

function sameArea(a: Area, b: Area): boolean {
  return a.top === b.top && a.left === b.left && a.bottom === b.bottom && a.right === b.right;
}

function encodedAs({ utf16 }: SheetPart, xml: string): Uint8Array {
  if (utf16 === undefined) return Buffer.from(xml, "utf8");
  const littleEndian = Buffer.from(xml, "utf16le");
  return utf16 === "big" ? littleEndian.swap16() : littleEndian;
}
