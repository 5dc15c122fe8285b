import { COLUMNS, readReference, type Area } from "../addresses.js";
import type { Book, BookCell, BookSheet, BookTable, Placement } from "../book.js";
import type { CellValue } from "../cell-value.js";
import { unreadable } from "../failure.js";
import { sharedFormula } from "../shared-formula.js";
import { sheetCells, type SheetCells, type XmlCell } from "./sheet-cells.js";
import { storedValue } from "./stored-value.js";
import { partBytes, sheetTables, workbookParts } from "./workbook-parts.js";
import { TagScanner, utf16Order, xmlText } from "./xml.js";
import { ZipFile } from "./zip.js";

/** A worksheet with what is needed to write values back into it. */
export interface SheetPart {
  readonly part: string;
  readonly xml: string;
  readonly grid: SheetCells;
  /** the text that its cells with the type "s" point into */
  readonly strings: readonly string[];
  /** how the part was encoded; undefined for UTF-8 */
  readonly utf16: "big" | "little" | undefined;
}

/** An xlsx workbook with its package. */
export interface XlsxBook {
  readonly book: Book;
  readonly zip: ZipFile;
  /** by index of the book's sheets; undefined for a chart sheet */
  readonly parts: readonly (SheetPart | undefined)[];
  readonly isSigned: boolean;
}

const MOST_FORMULAS = 200_000;
const MOST_FILLED = 1_000_000;

/**
 * Reads a workbook in the xlsx format (xlsm too; macros are neither read nor run).
 *
 * @param bytes  the whole file
 * @throws {FormulaLineError} with the reason in words for anything else
 */
export function readXlsx(bytes: Uint8Array): XlsxBook {
  refuseOtherFormats(bytes);
  const zip = new ZipFile(bytes);
  refuseOtherPackages(zip);
  const workbook = workbookParts(zip);
  const tables: BookTable[] = [];
  let formulas = 0;
  const parts = workbook.sheets.map(({ name, part }, index): SheetPart | undefined => {
    if (part === undefined) return undefined;
    const bytes = partBytes(zip, part);
    const xml = xmlText(bytes, part);
    const grid = sheetCells(xml, name, workbook.isDynamic);
    formulas += grid.cells.filter(({ formula }) => formula !== undefined).length;
    if (formulas > MOST_FORMULAS) throw unreadable(`The workbook has more than ${MOST_FORMULAS} formulas, which the formula line does not calculate.`);
    tables.push(...sheetTables(zip, part, index));
    return { part, xml, grid, strings: workbook.strings, utf16: utf16Order(bytes) };
  });
  const sheets = workbook.sheets.map(({ name }, index): BookSheet => {
    const part = parts[index];
    return part === undefined ? { name, cells: [] } : { name, cells: bookCells(part.grid, workbook.strings), ...hiddenRows(part) };
  });
  const { names, activeSheet, dates1904, iterates, isSigned } = workbook;
  return { book: { sheets, names, tables, activeSheet, dates1904, iterates }, zip, parts, isSigned };
}

function refuseOtherFormats(bytes: Uint8Array): void {
  const [a, b, c, d] = bytes;
  if (a === 0xd0 && b === 0xcf && c === 0x11 && d === 0xe0) {
    const isLocked = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength).includes(Buffer.from("EncryptedPackage", "utf16le"));
    throw unreadable(isLocked ? "The workbook is locked with a password; save it without one." : "The file is in the old xls format; save it as xlsx.");
  }
  if (a !== 0x50 || b !== 0x4b) throw unreadable("The file is no xlsx workbook, whatever its name says.");
}

function refuseOtherPackages(zip: ZipFile): void {
  if (zip.names.includes("xl/workbook.bin")) throw unreadable("The file is in the binary xlsb format; save it as xlsx.");
  if (zip.names.includes("content.xml")) throw unreadable("The file is an OpenDocument spreadsheet; save it as xlsx.");
  if (!zip.names.some((name) => name.toLowerCase() === "[content_types].xml")) throw unreadable("The file is a zip file but no xlsx workbook.");
}

function bookCells(grid: SheetCells, strings: readonly string[]): BookCell[] {
  const shared = new Map<string, XmlCell>();
  const filled = new Map<number, CellValue>();
  for (const cell of grid.cells) {
    const { formula } = cell;
    if (formula?.type === "shared" && formula.text !== "" && formula.sharedIndex !== undefined) shared.set(formula.sharedIndex, cell);
    if (formula?.type === "array") for (const key of keysOf(areaOf(cell))) filled.set(key, null);
    if (filled.size > MOST_FILLED) throw unreadable(`The workbook's array formulas fill more than ${MOST_FILLED} cells, which the formula line does not read.`);
  }
  for (const cell of filled.size === 0 ? [] : grid.cells) if (filled.has(cellKey(cell.row, cell.column))) filled.set(cellKey(cell.row, cell.column), storedValue(cell, strings));
  const found: BookCell[] = [];
  for (const cell of grid.cells) {
    const { row, column } = cell;
    const formula = formulaOf(cell, shared);
    const value = storedValue(cell, strings);
    if (formula !== undefined) found.push({ row, column, value, formula, placement: placementOf(cell, filled) });
    // cells that an array formula fills hold its results, not values of their own
    else if (value !== null && !filled.has(cellKey(row, column))) found.push({ row, column, value });
  }
  return found;
}

function areaOf({ formula, row, column }: XmlCell): Area {
  const { top, left, bottom, right } = readReference(formula?.area ?? "") ?? { top: row, left: column, bottom: row, right: column };
  if ((bottom - top + 1) * (right - left + 1) > MOST_FILLED) throw unreadable(`The workbook has an array formula over ${formula?.area ?? ""}, which is more than the formula line reads.`);
  return { top, left, bottom, right };
}

function* keysOf({ top, left, bottom, right }: Area): Generator<number> {
  for (let row = top; row <= bottom; row++) for (let column = left; column <= right; column++) yield cellKey(row, column);
}

function cellKey(row: number, column: number): number {
  return row * COLUMNS + column;
}

function formulaOf({ formula, row, column }: XmlCell, shared: ReadonlyMap<string, XmlCell>): string | undefined {
  // a data table's results are made by a command, not by a formula
  if (formula === undefined || formula.type === "dataTable") return undefined;
  if (formula.text !== "" || formula.type !== "shared") return formula.text === "" ? undefined : formula.text;
  const first = shared.get(formula.sharedIndex ?? "");
  return first?.formula === undefined ? undefined : sharedFormula(first.formula.text, row - first.row, column - first.column);
}

function placementOf(cell: XmlCell, filled: ReadonlyMap<number, CellValue>): Placement {
  if (cell.formula?.type !== "array") return { kind: "single" };
  const area = areaOf(cell);
  const values = Array.from({ length: area.bottom - area.top + 1 }, (_, row) => Array.from({ length: area.right - area.left + 1 }, (__, column) => filled.get(cellKey(area.top + row, area.left + column)) ?? null));
  return { kind: cell.formula.isDynamic ? "spilling" : "fixed", area, ...(values[0]?.[0] === null ? {} : { stored: values }) };
}

function hiddenRows({ xml, grid }: SheetPart): Pick<BookSheet, "hiddenRows" | "filteredRows"> {
  const hidden = grid.rows.filter(({ isHidden }) => isHidden).map(({ row }) => row);
  if (hidden.length === 0) return {};
  const scan = new TagScanner(xml, grid.data.end);
  let filter: Area | undefined;
  while (scan.next()) if (scan.opens("autoFilter")) filter = readReference(scan.attributes().get("ref") ?? "");
  const filtered = filter;
  return { hiddenRows: new Set(hidden), filteredRows: new Set(filtered === undefined ? [] : hidden.filter((row) => row > filtered.top && row <= filtered.bottom)) };
}
