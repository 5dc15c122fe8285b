import { existsSync, statSync } from "node:fs";
import { dirname, extname } from "node:path";
import { simulationSheet, type SimulationContent } from "../../host/simulation-sheet.js";
import type { SheetPlan } from "../../host/workbook.js";
import { misused } from "../failure.js";
import { checkPlace, writeNewFile } from "../files.js";
import { withSheet } from "../xlsx/add-sheet.js";
import { newWorkbook } from "../xlsx/new-workbook.js";
import type { XlsxBook } from "../xlsx/read-book.js";

/** Where the result goes. */
export interface ResultPlace {
  readonly out: string;
  readonly overwrite: boolean;
  /** path of the workbook that is copied, and its content; undefined for a new workbook */
  readonly book: { readonly path: string; readonly xlsx: XlsxBook } | undefined;
  /** the other sheets of a new workbook */
  readonly sheets: readonly SheetPlan[];
}

const EMPTY_SHEET: SheetPlan = { name: "Simulation", cells: [] };

/**
 * Refuses a place that could not be written to in the end, before hours of work.
 *
 * @throws {FormulaLineError} with the reason in words
 */
export function requirePlace({ out, overwrite, book }: ResultPlace): void {
  if (book !== undefined) {
    checkPlace(out, book.path, overwrite);
    withSheet(book.xlsx, EMPTY_SHEET);
    return;
  }
  if (extname(out).toLowerCase() !== ".xlsx") throw misused(`--out writes a new workbook, so its name must end with .xlsx, and ${out} does not.`);
  if (!existsSync(dirname(out))) throw misused(`There is no folder ${dirname(out)} to write into.`);
  const there = statSync(out, { throwIfNoEntry: false });
  if (there?.isFile() === false) throw misused(`${out} is not a file.`);
  if (there !== undefined && !overwrite) throw misused(`The file ${out} is there already; give another name, or add --overwrite to replace it.`);
}

/**
 * Writes the workbook with the simulation on a new sheet.
 *
 * @returns sentences for the person
 * @throws {FormulaLineError} a file that cannot be written
 */
export function writeResult({ out, overwrite, book, sheets }: ResultPlace, content: SimulationContent): string {
  const plan = simulationSheet(content);
  if (book === undefined) {
    writeNewFile(out, newWorkbook([...sheets, plan]), overwrite);
    return `Written to ${out}, sheet ${plan.name}.\n`;
  }
  const { bytes, sheet } = withSheet(book.xlsx, plan);
  writeNewFile(out, bytes, overwrite);
  const signed = book.xlsx.isSigned ? "The workbook was signed; the signature does not hold for the copy.\n" : "";
  return `${signed}Written to ${out}, sheet ${sheet}.\n`;
}
