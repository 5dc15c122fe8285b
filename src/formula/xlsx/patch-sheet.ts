import { areaAddress, cellAddress, COLUMNS, readReference, type Area } from "../addresses.js";
import type { CellValue } from "../cell-value.js";
import { unreadable } from "../failure.js";
import { cellWithValue, newCell } from "./cell-xml.js";
import type { SheetCells, XmlCell, XmlRow } from "./sheet-cells.js";

/** What a cell shall hold. */
export interface NewValue {
  readonly row: number;
  readonly column: number;
  readonly value: CellValue;
  /** where the table of the cell's own array formula goes, when that has changed */
  readonly area?: Area;
}

interface Edit {
  readonly start: number;
  readonly end: number;
  readonly text: string;
}

/**
 * Writes values into the XML of a sheet and leaves every other sign of it as it is.
 *
 * @param xml     the sheet
 * @param grid    where its cells stand
 * @param values  each cell at most once
 * @returns       the sheet with the values; the same text where there are none
 */
export function patchedSheet(xml: string, grid: SheetCells, values: readonly NewValue[]): string {
  const cells = new Map(grid.cells.map((cell) => [cell.row * COLUMNS + cell.column, cell]));
  const edits: Edit[] = [];
  const added: NewValue[] = [];
  for (const { row, column, value, area } of values) {
    const cell = cells.get(row * COLUMNS + column);
    if (cell !== undefined) edits.push({ start: cell.start, end: cell.end, text: cellWithValue(xml, cell, value, area) });
    else if (value !== null) added.push({ row, column, value });
  }
  edits.push(...additions(xml, grid, added));
  return applied(xml, edits);
}

function additions(xml: string, grid: SheetCells, added: readonly NewValue[]): Edit[] {
  if (added.length === 0) return [];
  const byRow = new Map<number, NewValue[]>();
  for (const value of added) byRow.set(value.row, [...(byRow.get(value.row) ?? []), value]);
  const rows = new Map(grid.rows.map((row) => [row.row, row]));
  const cellsOf = new Map<number, XmlCell[]>();
  for (const cell of grid.cells) if (byRow.has(cell.row)) cellsOf.set(cell.row, [...(cellsOf.get(cell.row) ?? []), cell]);
  const edits = [...byRow].sort(([a], [b]) => a - b).flatMap(([number, values]) => {
    const sorted = [...values].sort((a, b) => a.column - b.column);
    const row = rows.get(number);
    return row === undefined ? [newRow(grid, number, sorted)] : intoRow(xml, row, cellsOf.get(number) ?? [], sorted);
  });
  return [...merged(edits), ...widenedDimension(xml, grid, added)];
}

function newRow(grid: SheetCells, number: number, values: readonly NewValue[]): Edit {
  if (grid.rows.some(({ hasAddresses }) => !hasAddresses)) throw withoutAddresses();
  const { prefix, close } = grid.data;
  const at = grid.rows.find(({ row }) => row > number)?.start ?? close;
  return { start: at, end: at, text: `<${prefix}row r="${number + 1}">${values.map((value) => cellText(prefix, value)).join("")}</${prefix}row>` };
}

function intoRow(xml: string, row: XmlRow, cells: readonly XmlCell[], values: readonly NewValue[]): Edit[] {
  if (!row.hasAddresses) throw withoutAddresses();
  const { prefix } = row;
  const tag = xml.slice(row.start, row.open);
  const widened = widenedSpans(tag, values);
  if (row.isEmpty) return [{ start: row.start, end: row.end, text: `${widened.replace(/\s*\/>$/, ">")}${values.map((value) => cellText(prefix, value)).join("")}</${prefix}row>` }];
  const edits = values.map((value): Edit => {
    const at = cells.find(({ column }) => column > value.column)?.start ?? row.close;
    return { start: at, end: at, text: cellText(prefix, value) };
  });
  return widened === tag ? edits : [{ start: row.start, end: row.open, text: widened }, ...edits];
}

function cellText(prefix: string, { row, column, value }: NewValue): string {
  return newCell(prefix, cellAddress(row, column), value);
}

/** Texts that go in at the same place keep their order. */
function merged(edits: readonly Edit[]): Edit[] {
  const found: Edit[] = [];
  for (const edit of edits) {
    const last = found[found.length - 1];
    if (last !== undefined && last.start === edit.start && last.end === edit.start && edit.end === edit.start) found[found.length - 1] = { ...last, text: last.text + edit.text };
    else found.push(edit);
  }
  return found;
}

/** The row's hint of its first and last column, which must not leave out a cell. */
function widenedSpans(tag: string, values: readonly NewValue[]): string {
  return tag.replace(/(\sspans\s*=\s*)(["'])(\d+):(\d+)\2/, (whole, name: string, quote: string, first: string, last: string) => {
    const columns = values.map(({ column }) => column + 1);
    const from = Math.min(Number(first), ...columns);
    const to = Math.max(Number(last), ...columns);
    return from === Number(first) && to === Number(last) ? whole : `${name}${quote}${from}:${to}${quote}`;
  });
}

function widenedDimension(xml: string, grid: SheetCells, added: readonly NewValue[]): Edit[] {
  const match = /<(?:\w+:)?dimension\s[^>]*?ref\s*=\s*["']([^"']*)["']/.exec(xml.slice(0, grid.data.start));
  const area = readReference(match?.[1] ?? "");
  if (match === null || area === undefined) return [];
  const wide = added.reduce<Area>((sum, { row, column }) => ({ top: Math.min(sum.top, row), left: Math.min(sum.left, column), bottom: Math.max(sum.bottom, row), right: Math.max(sum.right, column) }), area);
  const end = match.index + match[0].length - 1;
  const written = match[1] ?? "";
  const text = areaAddress(wide);
  return text === areaAddress(area) ? [] : [{ start: end - written.length, end, text }];
}

function applied(xml: string, edits: readonly Edit[]): string {
  let text = "";
  let at = 0;
  for (const { start, end, text: replacement } of [...edits].sort((a, b) => a.start - b.start || a.end - b.end)) {
    text += xml.slice(at, start) + replacement;
    at = end;
  }
  return text + xml.slice(at);
}

function withoutAddresses(): Error {
  return unreadable("A sheet of the workbook does not say where its cells stand, and a table that has grown cannot be put in; open and save the workbook in a spreadsheet program first.");
}
