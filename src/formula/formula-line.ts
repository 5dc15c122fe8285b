import { basename, extname } from "node:path";
import { gridFunctions } from "../practice/grid-functions.js";
import type { Book } from "./book.js";
import { Calculation } from "./calculation.js";
import { readCall, USAGE, type Call } from "./call.js";
import { ErrorValue } from "./cell-value.js";
import { readCsv } from "./csv.js";
import { demonstrationBook } from "./demonstration.js";
import { FormulaLineError, misused } from "./failure.js";
import { checkPlace, readNamedFile, writeNewFile } from "./files.js";
import { printed } from "./print.js";
import { errorCode, isError, report, whyOf } from "./report.js";
import { readXlsx, type XlsxBook } from "./xlsx/read-book.js";
import { withValues, type Calculated } from "./xlsx/write-values.js";

/** What a call of the formula line came to. */
export interface Said {
  /** for standard output */
  readonly out: string;
  /** for standard error */
  readonly err: string;
  readonly code: 0 | 1 | 2;
}

/**
 * Carries out one call of the formula line.
 *
 * @param words  the words after the command
 */
export function formulaLine(words: readonly string[]): Said {
  try {
    const call = readCall(words);
    return call === "help" ? { out: USAGE, err: "", code: 0 } : carriedOut(call);
  } catch (reason) {
    if (reason instanceof FormulaLineError) return { out: "", err: `${reason.message}\n`, code: reason.exitCode };
    throw reason;
  }
}

function carriedOut(call: Call): Said {
  const source = call.book === undefined ? undefined : readBook(call.book, call.out);
  if (call.out !== undefined && call.book !== undefined) checkPlace(call.out, call.book, call.overwrite);
  const book = source === undefined ? demonstrationBook() : "zip" in source ? source.book : source;
  const sheet = sheetNamed(book, call.sheet);
  const calculation = new Calculation(book, gridFunctions);
  try {
    const written = call.out === undefined || source === undefined || !("zip" in source) ? undefined : priced(source, calculation, call.out, call.overwrite);
    if (call.formula === undefined) return written ?? { out: "", err: "", code: 2 };
    const said = value(calculation, call.formula, sheet);
    return written === undefined ? said : { out: said.out, err: said.err + written.out, code: said.code === 0 ? written.code : said.code };
  } finally {
    calculation.dispose();
  }
}

function readBook(path: string, out: string | undefined): XlsxBook | Book {
  const kind = extname(path).toLowerCase();
  const bytes = readNamedFile(path);
  if (kind === ".csv" || kind === ".tsv" || kind === ".txt") {
    if (out !== undefined) throw misused("--out writes values back into an xlsx workbook; a csv has no formulas to calculate.");
    return readCsv(bytes, basename(path, extname(path)));
  }
  if (![".xlsx", ".xlsm", ".xls", ".xlsb", ".ods"].includes(kind)) throw misused(`--book takes an xlsx, xlsm or csv file, and ${basename(path)} is none by its name.`);
  return readXlsx(bytes);
}

function sheetNamed(book: Book, name: string | undefined): number {
  if (name === undefined) return book.activeSheet;
  const index = book.sheets.findIndex((sheet) => sheet.name.toLowerCase() === name.toLowerCase());
  if (index < 0) throw misused(`The workbook has no sheet named ${name}; it has ${book.sheets.map((sheet) => sheet.name).join(", ")}.`);
  return index;
}

function value(calculation: Calculation, formula: string, sheet: number): Said {
  const outcome = calculation.formula(formula, sheet);
  const first = outcome.values[0]?.[0];
  const isOneError = outcome.values.length === 1 && outcome.values[0]?.length === 1 && first instanceof ErrorValue;
  const out = isOneError ? "" : printed(outcome.values);
  return isError({ outcome }) ? { out, err: `${errorCode(outcome.values)} ${whyOf(outcome)}\n`, code: 1 } : { out, err: "", code: 0 };
}

function priced(source: XlsxBook, calculation: Calculation, out: string, overwrite: boolean): Said {
  const calculated = source.book.sheets.map(({ cells }, sheet) =>
    cells.flatMap((cell): Calculated[] => {
      const outcome = calculation.cell({ sheet, row: cell.row, column: cell.column });
      return outcome === undefined ? [] : [{ cell, outcome }];
    }),
  );
  const { bytes, changed } = withValues(source, calculated);
  writeNewFile(out, bytes, overwrite);
  const signed = source.isSigned ? "The workbook was signed; the signature does not hold for the copy.\n" : "";
  return { out: `${report(source.book, calculated, changed)}\n${signed}Written to ${out}.\n`, err: "", code: calculated.flat().some(isError) ? 1 : 0 };
}
