import type { PlannedCell, SheetPlan } from "../../host/workbook.js";
import { areaAddress, cellAddress } from "../addresses.js";
import type { CellLook } from "./added-styles.js";
import { newCell } from "./cell-xml.js";

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';

/** The looks that a sheet's cells have, each once. */
export function looksOf(plans: readonly SheetPlan[]): CellLook[] {
  const found = new Map<string, CellLook>();
  for (const { cells } of plans) for (const { style, look } of cells) found.set(lookKey({ style, look }), { style, look });
  return [...found.values()];
}

/** A look as a key. */
export function lookKey({ style, look }: CellLook): string {
  return `${style ?? ""} ${look ?? ""}`;
}

/**
 * A plan of values as a worksheet part; formulas are left out, because nothing here would calculate them.
 *
 * @param plan       the sheet
 * @param namespace  of worksheets in this workbook
 * @param styleOf    number of a look by its key; undefined where the workbook's styles could not take it
 */
export function sheetXml(plan: SheetPlan, namespace: string, styleOf: ReadonlyMap<string, number>): string {
  const rows = new Map<number, PlannedCell[]>();
  for (const cell of plan.cells) if (cell.value !== undefined && cell.value !== "") rows.set(cell.row, [...(rows.get(cell.row) ?? []), cell]);
  const filled = [...rows].sort(([a], [b]) => a - b);
  const used = { top: 0, left: 0, bottom: Math.max(0, ...rows.keys()), right: Math.max(0, ...plan.cells.map(({ column }) => column)) };
  const columns = (plan.columnWidths ?? []).map((pixels, k) => `<col min="${k + 1}" max="${k + 1}" width="${((pixels - 5) / 7).toFixed(2)}" customWidth="1"/>`).join("");
  const data = filled.map(([row, cells]) => `<row r="${row + 1}">${[...cells].sort((a, b) => a.column - b.column).map((cell) => cellXml(cell, styleOf)).join("")}</row>`).join("");
  return `${HEAD}<worksheet xmlns="${namespace}"><dimension ref="${areaAddress(used)}"/>${columns === "" ? "" : `<cols>${columns}</cols>`}<sheetData>${data}</sheetData></worksheet>`;
}

function cellXml(cell: PlannedCell, styleOf: ReadonlyMap<string, number>): string {
  const { row, column, value, style, look } = cell;
  const number = styleOf.get(lookKey({ style, look }));
  const xml = newCell("", cellAddress(row, column), value ?? null);
  return number === undefined ? xml : xml.replace(/^<c /, `<c s="${number}" `);
}
