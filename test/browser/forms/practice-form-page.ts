import type { CellValue, SheetPlan } from "../../../src/host/workbook.js";
import { CellReasons } from "../../../src/practice/cell-reasons.js";
import { workbookData } from "../../../src/practice/grid-data.js";
import { startGrid } from "../../../src/practice/grid.js";
import { PracticeWorkbook } from "../../../src/practice/practice-workbook.js";
import { STARTING_NAMES, STARTING_SHEETS } from "./starting-book.js";
import { offer } from "./workbook-form.js";

declare global {
  interface Window {
    grid: { cells(): Record<string, CellValue[][]>; type(sheet: string, address: string, value: CellValue): void; select(sheet: string, address: string): void; addSheet(name: string): void };
  }
}

const plans = STARTING_SHEETS.map(({ name, rows }): SheetPlan => ({ name, cells: rows.flatMap((row, r) => row.map((value, column) => (typeof value === "string" && value.startsWith("=") ? { row: r, column, formula: value } : { row: r, column, value }))) }));
const { grid, spilled } = startGrid({ container: document.getElementById("grid")!, workbook: workbookData("contract", plans), descriptions: [], reasons: new CellReasons(), dark: false });
const book = grid.getActiveWorkbook()!;
for (const { name, meaning } of STARTING_NAMES) book.insertDefinedName(name, meaning.slice(1));

const sheetOf = (name: string): ReturnType<typeof book.getActiveSheet> => book.getSheetByName(name)!;
window.grid = {
  cells: () =>
    Object.fromEntries(
      book.getSheets().map((sheet) => [sheet.getSheetName(), sheet.getRange(0, 0, sheet.getLastRow() + 1, sheet.getLastColumn() + 1).getCellDatas().map((row) => row.map((cell) => (cell?.v === undefined || cell.v === null ? "" : cell.t === 3 ? Boolean(Number(cell.v)) : cell.v)))]),
    ),
  type: (sheet, address, value) => void sheetOf(sheet).getRange(address).setValue(value),
  select: (sheet, address) => {
    book.setActiveSheet(sheetOf(sheet));
    sheetOf(sheet).getRange(address).activate();
  },
  addSheet: (name) => void book.insertSheet(name),
};
const workbook = new PracticeWorkbook(grid, spilled, plans);
offer(workbook);
workbook.onChanged(() => document.body.setAttribute("data-state", "ready"));
