import { existsSync, statSync } from "node:fs";
import { dirname, extname } from "node:path";
import { simulationSheet } from "../../host/simulation-sheet.js";
import type { SheetPlan } from "../../host/workbook.js";
import { numberWriter } from "../../pane/model/numbers.js";
import { briefSheet } from "../../pane/sheets/brief-sheet.js";
import { contentOf, type SimulationReport } from "../../pane/sheets/simulation-report.js";
import { misused } from "../failure.js";
import { checkPlace, writeNewFile } from "../files.js";
import { withSheet } from "../xlsx/add-sheet.js";
import { newWorkbook } from "../xlsx/new-workbook.js";
import { readXlsx, type XlsxBook } from "../xlsx/read-book.js";

/** Where the result goes. */
export interface ResultPlace {
  readonly out: string;
  readonly overwrite: boolean;
  /** path of the workbook that is copied, and its content; undefined for a new workbook */
  readonly book: { readonly path: string; readonly xlsx: XlsxBook } | undefined;
  /** the other sheets of a new workbook */
  readonly sheets: readonly SheetPlan[];
  /** the client brief that goes with the figures, for a count that the client has in mind or none; undefined: no brief */
  readonly brief: { readonly client: number | undefined } | undefined;
  /** where the inputs were read */
  readonly origin: string;
}

/** The language of the terminal's own table, so that both say the same. */
const LOCALE = "en-US";
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
 * Writes the workbook with the simulation, and the client brief where one is wanted, on new sheets.
 *
 * @returns sentences for the person
 * @throws {FormulaLineError} a file that cannot be written
 */
export function writeResult({ out, overwrite, book, sheets, brief }: ResultPlace, report: SimulationReport): string {
  const plans = [simulationSheet(contentOf(report)), ...(brief === undefined ? [] : [briefSheet(report, 0, brief.client, numberWriter(LOCALE))])];
  if (book === undefined) {
    writeNewFile(out, newWorkbook([...sheets, ...plans]), overwrite);
    return written(out, plans.map(({ name }) => name));
  }
  let { xlsx } = book;
  const added = plans.map((plan) => {
    const { bytes, sheet, names } = withSheet(xlsx, plan);
    xlsx = readXlsx(bytes);
    return { bytes, sheet, names };
  });
  writeNewFile(out, added.at(-1)!.bytes, overwrite);
  const signed = book.xlsx.isSigned ? "The workbook was signed; the signature does not hold for the copy.\n" : "";
  const names = added.flatMap((each) => each.names);
  return `${signed}${written(out, added.map(({ sheet }) => sheet))}${names.length === 0 ? "" : `The costs are named ${names.join(", ")}.\n`}`;
}

function written(out: string, sheets: readonly string[]): string {
  return `Written to ${out}, ${sheets.length === 1 ? "sheet" : "sheets"} ${sheets.join(" and ")}.\n`;
}
