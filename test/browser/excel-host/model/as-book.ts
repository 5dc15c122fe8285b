import type { Book, BookCell } from "../../../../src/formula/book.js";
import { fixedFormula } from "../kinds/places.js";
import type { WorkbookModel } from "./workbook-model.js";

/**
 * The workbook as the formula engine reads one.
 *
 * @param cells  of each sheet
 */
export function asBook({ sheets, names }: WorkbookModel, cells: readonly BookCell[][]): Book {
  const named = [...names, ...sheets.flatMap((sheet) => sheet.names)];
  return {
    sheets: sheets.map(({ name }, index) => ({ name, cells: cells[index] ?? [] })),
    names: named.map(({ name, sheet, range, formula }) => ({
      name,
      sheet: sheet === undefined ? undefined : sheets.indexOf(sheet),
      meaning: (range === undefined ? formula : fixedFormula(range)).slice(1),
    })),
    tables: [],
    activeSheet: 0,
    dates1904: false,
    iterates: false,
  };
}
