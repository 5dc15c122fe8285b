import { COLUMNS, readReference, ROWS } from "../addresses.js";
import { unreadable } from "../failure.js";
import { TagScanner, textBetween } from "./xml.js";

/** A cell as it stands in the XML of its sheet. */
export interface XmlCell {
  readonly row: number;
  readonly column: number;
  /** from "<c" to behind its end */
  readonly start: number;
  /** behind the opening tag */
  readonly open: number;
  readonly end: number;
  /** namespace prefix with its colon, or "" */
  readonly prefix: string;
  /** n, s, str, inlineStr, b, e or d */
  readonly type: string;
  /** text of the value, or of an inline string; undefined without one */
  readonly value: string | undefined;
  readonly formula: XmlFormula | undefined;
}

/** A formula as it stands in a cell. */
export interface XmlFormula {
  readonly start: number;
  readonly end: number;
  /** decoded; empty for all but the first cell of a shared formula */
  readonly text: string;
  /** normal, shared, array or dataTable */
  readonly type: string;
  readonly area: string | undefined;
  readonly sharedIndex: string | undefined;
  /** the cell belongs to a formula that spills */
  readonly isDynamic: boolean;
}

/** A row as it stands in the XML of its sheet. */
export interface XmlRow {
  readonly row: number;
  readonly start: number;
  /** behind the opening tag */
  readonly open: number;
  /** before the closing tag; the same as open for an empty one */
  readonly close: number;
  readonly end: number;
  readonly isEmpty: boolean;
  readonly isHidden: boolean;
  /** it and its cells say where they stand; otherwise their order does */
  readonly hasAddresses: boolean;
  readonly prefix: string;
}

/** The grid of a sheet's XML. */
export interface SheetCells {
  readonly cells: readonly XmlCell[];
  readonly rows: readonly XmlRow[];
  /** the element that holds the rows, in the same terms as a row */
  readonly data: { readonly start: number; readonly open: number; readonly close: number; readonly end: number; readonly isEmpty: boolean; readonly prefix: string };
}

const MOST_CELLS = 1_000_000;

/**
 * Finds the rows and cells of a worksheet part.
 *
 * @param xml        the part
 * @param sheet      its name, for messages
 * @param isDynamic  tells from a cell's metadata number ("cm") whether its array formula spills
 * @throws {FormulaLineError} for a part that is no worksheet or holds too many cells
 */
export function sheetCells(xml: string, sheet: string, isDynamic: (metadata: string) => boolean): SheetCells {
  const scan = new TagScanner(xml);
  while (scan.next()) if (scan.opens("sheetData")) break;
  if (!scan.opens("sheetData")) throw unreadable(`The sheet ${sheet} of the workbook has no cells part that can be read.`);
  const { start, end: open, prefix } = scan;
  const cells: XmlCell[] = [];
  const rows: XmlRow[] = [];
  if (scan.isEmpty()) return { cells, rows, data: { start, open, close: open, end: open, isEmpty: true, prefix } };
  let nextRow = 0;
  while (scan.next()) {
    if (scan.closes("sheetData")) return { cells, rows, data: { start, open, close: scan.start, end: scan.end, isEmpty: false, prefix } };
    if (!scan.opens("row")) continue;
    const row = readRow(scan, nextRow, sheet, isDynamic, cells);
    rows.push(row);
    nextRow = row.row + 1;
    if (cells.length > MOST_CELLS) throw unreadable(`The workbook's sheet ${sheet} has more than ${MOST_CELLS} cells, which the formula line does not read.`);
  }
  throw unreadable(`The sheet ${sheet} of the workbook breaks off before its end.`);
}

function readRow(scan: TagScanner, expected: number, sheet: string, isDynamic: (metadata: string) => boolean, cells: XmlCell[]): XmlRow {
  const { start, end: open, prefix } = scan;
  const attributes = scan.attributes();
  const row = attributes.has("r") ? Number(attributes.get("r")) - 1 : expected;
  if (!Number.isInteger(row) || row < 0 || row >= ROWS) throw unreadable(`The sheet ${sheet} of the workbook has a row numbered ${attributes.get("r") ?? ""}.`);
  const isHidden = attributes.get("hidden") === "1" || attributes.get("hidden") === "true";
  if (scan.isEmpty()) return { row, start, open, close: open, end: open, isEmpty: true, isHidden, hasAddresses: attributes.has("r"), prefix };
  let column = 0;
  let hasAddresses = attributes.has("r");
  while (scan.next()) {
    if (scan.closes("row")) return { row, start, open, close: scan.start, end: scan.end, isEmpty: false, isHidden, hasAddresses, prefix };
    if (!scan.opens("c")) continue;
    const hasAddress = scan.attributes().has("r");
    const cell = readCell(scan, row, column, sheet, isDynamic);
    if (!hasAddress) hasAddresses = false;
    cells.push(cell);
    column = cell.column + 1;
  }
  throw unreadable(`The sheet ${sheet} of the workbook breaks off within row ${row + 1}.`);
}

function readCell(scan: TagScanner, row: number, expected: number, sheet: string, isDynamic: (metadata: string) => boolean): XmlCell {
  const { start, end: open, prefix } = scan;
  const attributes = scan.attributes();
  const address = attributes.get("r");
  const column = address === undefined ? expected : (readReference(address)?.left ?? COLUMNS);
  if (column >= COLUMNS) throw unreadable(`The sheet ${sheet} of the workbook has a cell at ${address ?? `row ${row + 1}`}, which is no place in a sheet.`);
  const type = attributes.get("t") ?? "n";
  const spills = isDynamic(attributes.get("cm") ?? "");
  let value: string | undefined;
  let formula: XmlFormula | undefined;
  if (scan.isEmpty()) return { row, column, start, open, end: scan.end, prefix, type, value, formula };
  while (scan.next()) {
    if (scan.closes("c")) return { row, column, start, open, end: scan.end, prefix, type, value, formula };
    if (scan.opens("f")) formula = readFormula(scan, spills);
    else if (scan.opens("v")) value = scan.isEmpty() ? "" : withoutCodes(textTo(scan, "v"));
    else if (scan.opens("is")) value = scan.isEmpty() ? "" : stringTo(scan, "is");
  }
  throw unreadable(`The sheet ${sheet} of the workbook breaks off within a cell.`);
}

function readFormula(scan: TagScanner, isDynamic: boolean): XmlFormula {
  const { start } = scan;
  const attributes = scan.attributes();
  const text = scan.isEmpty() ? "" : textTo(scan, "f");
  return { start, end: scan.end, text, type: attributes.get("t") ?? "normal", area: attributes.get("ref"), sharedIndex: attributes.get("si"), isDynamic };
}

/** The text up to the closing tag, where the scanner stops. */
function textTo(scan: TagScanner, name: string): string {
  const from = scan.end;
  while (scan.next()) if (scan.closes(name)) return textBetween(scan.xml, from, scan.start);
  return "";
}

/**
 * The text of a string element (a shared one or one within a cell), its runs put together; phonetic help is left out.
 *
 * @param scan  at the opening tag; stops at the closing one
 */
export function stringTo(scan: TagScanner, name: string): string {
  let text = "";
  let phonetic = false;
  while (scan.next()) {
    if (scan.closes(name)) break;
    if (scan.name === "rPh") phonetic = scan.opens("rPh") && !scan.isEmpty();
    else if (scan.opens("t") && !scan.isEmpty()) {
      const part = textTo(scan, "t");
      if (!phonetic) text += part;
    }
  }
  return withoutCodes(text);
}

/** The format writes signs that XML cannot hold as _x000D_. */
function withoutCodes(text: string): string {
  return text.includes("_x") ? text.replace(/_x([0-9A-Fa-f]{4})_/g, (_, code: string) => String.fromCharCode(Number.parseInt(code, 16))) : text;
}
