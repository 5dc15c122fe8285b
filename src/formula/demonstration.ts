import { demonstrationWorkbook } from "../host/demonstration-workbook.js";
import type { PlannedCell, SheetPlan } from "../host/workbook.js";
import type { Book, BookCell } from "./book.js";

/** The demonstration workbook, of the same sheets as on the practice page; its formulas spill as they do there. */
export function demonstrationBook(): Book {
  return bookOfPlans(demonstrationWorkbook());
}

/** Planned sheets as a workbook whose formulas all spill. */
export function bookOfPlans(plans: readonly SheetPlan[]): Book {
  return {
    sheets: plans.map(({ name, cells }) => ({ name, cells: cells.flatMap(bookCell) })),
    names: plans.flatMap(({ name: sheet, names }) => (names ?? []).map(({ name, range }) => ({ name, sheet: undefined, meaning: `'${sheet.replaceAll("'", "''")}'!${fixed(range)}` }))),
    tables: [],
    activeSheet: 0,
    dates1904: false,
    iterates: false,
  };
}

function bookCell({ row, column, value, formula }: PlannedCell): BookCell[] {
  const area = { top: row, left: column, bottom: row, right: column };
  if (formula !== undefined) return [{ row, column, value: null, formula: formula.replace(/^=/, ""), placement: { kind: "spilling", area } }];
  return value === undefined || value === "" ? [] : [{ row, column, value }];
}

function fixed(range: string): string {
  return range.replace(/([A-Z]+)([0-9]+)/g, "$$$1$$$2");
}
