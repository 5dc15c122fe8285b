import type { Area } from "./addresses.js";
import type { Book, BookTable } from "./book.js";
import { UnsupportedFormula } from "./unsupported.js";

/** Where a formula stands. */
export interface Place {
  readonly sheet: number;
  readonly row: number;
  readonly column: number;
}

/** An area of a sheet. */
export interface SheetArea {
  readonly sheet: number;
  readonly area: Area;
}

/**
 * The cells that a reference to a table means.
 *
 * @param written  such as Costs[Price], Costs[[#This Row],[Price]], Costs[#All] or, inside the table, [@Price]
 * @throws {UnsupportedFormula} for a table, column or part that does not exist
 */
export function tableReference(book: Book, written: string, place: Place): SheetArea {
  const bracket = written.indexOf("[");
  const table = named(book, written.slice(0, bracket), place);
  const { parts, columns } = specifiers(written.slice(bracket));
  const { area } = table;
  const left = columns.length === 0 ? area.left : area.left + columnIndex(table, columns[0] ?? "");
  const right = columns.length === 0 ? area.right : area.left + columnIndex(table, columns[columns.length - 1] ?? "");
  const [top, bottom] = rowsOf(table, parts, place, written);
  return { sheet: table.sheet, area: { top, bottom, left: Math.min(left, right), right: Math.max(left, right) } };
}

function named(book: Book, name: string, place: Place): BookTable {
  const lower = name.toLowerCase();
  const inside = ({ sheet, area }: BookTable): boolean => sheet === place.sheet && place.row >= area.top && place.row <= area.bottom && place.column >= area.left && place.column <= area.right;
  const found = book.tables.find((table) => (name === "" ? inside(table) : table.name.toLowerCase() === lower));
  if (found === undefined) throw new UnsupportedFormula(name === "" ? "A column in square brackets stands outside any table." : `The workbook has no table named ${name}.`, "#REF!");
  return found;
}

/** The parts ("#Totals", "#This Row") and the first and last column between the brackets. */
function specifiers(text: string): { parts: string[]; columns: string[] } {
  const inner = text.slice(1, -1).trim();
  const parts: string[] = [];
  const columns: string[] = [];
  if (inner === "") return { parts, columns };
  const take = (piece: string): void => {
    if (piece.startsWith("#")) parts.push(piece.toLowerCase());
    else columns.push(piece.replace(/'(.)/g, "$1"));
  };
  if (inner.startsWith("@")) {
    parts.push("#this row");
    const rest = inner.slice(1);
    if (rest === "") return { parts, columns };
    if (!rest.startsWith("[")) return { parts, columns: [rest.replace(/'(.)/g, "$1")] };
    for (const piece of nested(rest)) take(piece);
    return { parts, columns };
  }
  if (!inner.startsWith("[")) take(inner);
  else for (const piece of nested(inner)) take(piece);
  return { parts, columns };
}

function nested(text: string): string[] {
  return [...text.matchAll(/\[((?:'.|[^\][])*)\]/g)].map((match) => (match[1] ?? "").trim());
}

function columnIndex(table: BookTable, name: string): number {
  const index = table.columns.findIndex((column) => column.toLowerCase() === name.toLowerCase());
  if (index < 0) throw new UnsupportedFormula(`The table ${table.name} has no column named ${name}.`, "#REF!");
  return index;
}

function rowsOf(table: BookTable, parts: readonly string[], place: Place, written: string): [number, number] {
  const { area, headerRows, totalsRows } = table;
  const firstData = area.top + headerRows;
  const lastData = area.bottom - totalsRows;
  const ranges: [number, number][] = (parts.length === 0 ? ["#data"] : parts).map((part) => {
    if (part === "#all") return [area.top, area.bottom];
    if (part === "#data") return [firstData, lastData];
    if (part === "#headers" && headerRows > 0) return [area.top, firstData - 1];
    if (part === "#totals" && totalsRows > 0) return [lastData + 1, area.bottom];
    if (part === "#this row" && place.sheet === table.sheet && place.row >= firstData && place.row <= lastData) return [place.row, place.row];
    throw new UnsupportedFormula(`The table reference ${written} means no cells here.`, part === "#this row" ? "#VALUE!" : "#REF!");
  });
  return [Math.min(...ranges.map(([first]) => first)), Math.max(...ranges.map(([, last]) => last))];
}
