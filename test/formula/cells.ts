import { Calculation } from "../../src/formula/calculation.js";
import { readReference } from "../../src/formula/addresses.js";
import type { Book, BookCell, BookName } from "../../src/formula/book.js";
import { ErrorValue, type CellValue } from "../../src/formula/cell-value.js";
import type { Outcome } from "../../src/formula/sheet-state.js";

/** A value, or a formula with "="; an object gives more of the cell. */
type Written = string | number | boolean | null | ErrorValue | Partial<BookCell>;

/** A workbook out of written cells: sheet, address, content. Formulas with "=" are ordinary, those with "=>" spill. */
export function bookOf(sheets: Readonly<Record<string, Readonly<Record<string, Written>>>>, more: Partial<Book> = {}, names: readonly (Omit<BookName, "sheet"> & { readonly sheet?: number })[] = []): Book {
  return {
    sheets: Object.entries(sheets).map(([name, cells]) => ({ name, cells: Object.entries(cells).map(([address, content]) => cellOf(address, content)) })),
    names: names.map((entry) => ({ sheet: undefined, ...entry })),
    tables: [],
    activeSheet: 0,
    dates1904: false,
    iterates: false,
    ...more,
  };
}

function cellOf(address: string, content: Written): BookCell {
  const { top: row, left: column } = readReference(address)!;
  if (content !== null && typeof content === "object" && !(content instanceof ErrorValue)) return { row, column, value: null, ...content };
  if (typeof content !== "string" || !content.startsWith("=")) return { row, column, value: content };
  if (!content.startsWith("=>")) return { row, column, value: null, formula: content.slice(1), placement: { kind: "single" } };
  return { row, column, value: null, formula: content.slice(2), placement: { kind: "spilling", area: { top: row, left: column, bottom: row, right: column } } };
}

/** Calculates with the ordinary functions alone. */
export function calculationOf(book: Book): Calculation {
  return new Calculation(book, () => []);
}

/** The outcome of one cell. */
export function outcomeAt(calculation: Calculation, address: string, sheet = 0): Outcome {
  const { top: row, left: column } = readReference(address)!;
  const outcome = calculation.cell({ sheet, row, column });
  if (outcome === undefined) throw new Error(`${address} holds no formula`);
  return outcome;
}

/** Values with error values as their names, for comparison. */
export function plain(values: readonly (readonly CellValue[])[]): unknown[][] {
  return values.map((row) => row.map((value) => (value instanceof ErrorValue ? value.code : value)));
}
