import type { CatalogueEntry } from "./catalogue.js";
import { amount, found, isBlankOrZero, isEmpty, isError, looksLikeNumber, type Cell } from "./cells.js";
import type { ListColumn } from "./entry.js";
import { attempt, type Fault } from "./fault.js";
import { normaliseLabel } from "./labels.js";
import { inWords, refusal, rowPlace, type Place } from "./place.js";
import { readNumber } from "./read-number.js";
import { readUnitCell, type UnitReading } from "./read-unit-cell.js";

/** A row of cells with its number, 1 for the first row of the block. */
export interface NumberedRow {
  readonly row: number;
  readonly cells: readonly Cell[];
}

/** A list as it stands in the block: its label, its heading if there is one, its rows. */
export interface RawList {
  readonly entry: CatalogueEntry;
  /** row of the label */
  readonly row: number;
  heading: NumberedRow | undefined;
  readonly rows: NumberedRow[];
}

/** A list as read: the numbers of a row in the order of the catalogue's columns, inner units; undefined for an absent optional one. */
export interface ListReading {
  readonly row: number;
  readonly rows: readonly { readonly row: number; readonly values: readonly (number | undefined)[] }[];
}

interface PlacedColumn {
  /** index in the catalogue's columns */
  readonly index: number;
  readonly column: ListColumn;
  /** index in the sheet's columns */
  readonly sheet: number;
  readonly unit: UnitReading;
  readonly range: UnitReading;
}

/**
 * Whether a row is the heading of a list: its first cell names one of the list's columns.
 *
 * @param entry  the list
 * @param first  the row's first cell
 * @returns      true for "x, m", "Pile", "Top (m)" and the like
 */
export function isListHeading(entry: CatalogueEntry, first: Cell): boolean {
  return typeof first === "string" && columnNamed(entry, splitHeading(first).name) !== undefined;
}

/**
 * Whether the first column of a list, by its heading, holds names, so that text there does not end the list.
 *
 * @param list  the list with its heading
 * @returns     true for a heading such as "Pile, x, y, Load"
 */
export function namesComeFirst(list: RawList): boolean {
  const first = list.heading?.cells[0];
  return typeof first === "string" && columnNamed(list.entry, splitHeading(first).name)?.kind === "name";
}

/**
 * Whether a text is a distortion written as a fraction, such as 1/500, 1:500 or 1 in 500.
 *
 * @param text  the cell's text
 * @returns     true for a fraction
 */
export function isFraction(text: string): boolean {
  return /^\s*\d{1,6}(?:\.\d{1,6})?\s*(?:\/|:|in)\s*\d{1,9}(?:\.\d{1,6})?\s*$/i.test(text.slice(0, 60));
}

/**
 * Reads the rows of a list.
 *
 * @param list    as it stands in the block
 * @param faults  where refusals are noted, one for each unusable row
 * @returns       its numbers, or undefined where anything was refused
 */
export function readList(list: RawList, faults: Fault[]): ListReading | undefined {
  const { entry } = list;
  const about = { id: entry.id, label: entry.label };
  const columns = attempt(faults, { ...about, row: list.heading?.row ?? list.row }, () => placeColumns(list));
  if (columns === undefined) return undefined;
  const most = entry.maximumRows!;
  const fits = attempt(faults, { ...about, row: list.row }, () => {
    if (list.rows.length === 0) throw refusal(rowPlace(entry.label, list.row), `has no rows directly below it; write them there, or the word automatic beside the label for ${entry.automatic}`);
    if (list.rows.length > most) throw refusal(rowPlace(entry.label, list.row), `has ${list.rows.length} rows; at most ${most} are accepted`);
    return true;
  });
  if (fits === undefined) return undefined;
  let complete = true;
  const rows = list.rows.map(({ row, cells }) => {
    const values = attempt(faults, { ...about, row }, () => readListRow(list, columns, row, cells));
    if (values === undefined) complete = false;
    return { row, values: values ?? [] };
  });
  return complete ? { row: list.row, rows } : undefined;
}

function readListRow(list: RawList, columns: readonly PlacedColumn[], row: number, cells: readonly Cell[]): (number | undefined)[] {
  const values: (number | undefined)[] = list.entry.columns!.map(() => undefined);
  for (const { index, column, sheet, unit, range } of columns) {
    const cell = cells[sheet] ?? null;
    const place = rowPlace(`${list.entry.label}, ${column.name}`, row);
    if (column.kind === "name") continue;
    if (column.optional && isBlankOrZero(cell)) continue;
    if (isEmpty(cell)) throw refusal(place, "is blank; write a number");
    values[index] = column.kind === "distortion" ? readDistortion(cell, place, column) : readNumber({ ...column, kind: column.kind }, cell, unit, place, range);
  }
  return values;
}

/** A distortion as a fraction in text, or as a number. */
function readDistortion(cell: Cell, place: Place, column: ListColumn): number {
  const accepted = "write it as 1/500 or 0.002";
  if (typeof cell === "string" && isFraction(cell)) {
    const [top, bottom] = cell.toLowerCase().split(/\/|:|in/).map(Number) as [number, number];
    const ratio = top / bottom;
    if (!(ratio >= column.minimum && ratio <= column.maximum)) throw refusal(place, `is ${found(cell.trim())}; distortions from 1/100000 to 1/10 are accepted`);
    return ratio;
  }
  if (typeof cell === "string" && !isError(cell) && looksLikeNumber(cell)) throw refusal(place, `is ${found(cell.trim())}, a number stored as text; ${accepted}`);
  if (typeof cell !== "number") throw refusal(place, `is ${found(cell)}; ${accepted}`);
  if (cell >= column.minimum && cell <= column.maximum) return cell;
  if (cell === 0) throw refusal(place, `is blank or zero; ${accepted}`);
  const date = cell > 30000 && Number.isInteger(cell) ? "; the sheet may have made a date of a fraction, so type it as =1/30" : "";
  const inverse = cell >= 10 && cell <= 10000 ? `; if 1/${amount(cell)} is meant, write it so` : "";
  throw refusal(place, `is ${amount(cell)}${date}${inverse}; distortions from 1/100000 to 1/10 are accepted`);
}

function placeColumns(list: RawList): PlacedColumn[] {
  const { entry, heading } = list;
  const columns = entry.columns!;
  const headings = heading?.cells ?? [];
  const placed: PlacedColumn[] = [];
  if (heading === undefined) {
    const unnamed = columns.filter(({ kind }) => kind !== "name");
    unnamed.forEach((column, sheet) => placed.push(placeColumn(entry, column, sheet, "", list.row)));
    return placed;
  }
  headings.forEach((cell, sheet) => {
    if (isBlankOrZero(cell)) return;
    const { name, unit } = splitHeading(typeof cell === "string" ? cell : String(cell));
    const column = columnNamed(entry, name);
    // a remark beside the last column is welcome, a misspelt column is not: what is missing is named below
    if (column === undefined) return;
    if (placed.some((other) => other.column === column)) throw refusal(rowPlace(entry.label, heading.row), `has two columns headed ${column.name}`);
    placed.push(placeColumn(entry, column, sheet, unit, heading.row));
  });
  const missing = columns.filter((column) => !column.optional && !placed.some((other) => other.column === column)).map(({ name }) => name);
  if (missing.length > 0) {
    const names = columns.map(({ name, optional }) => (optional ? `${name} (may be left out)` : name));
    throw refusal(rowPlace(entry.label, heading.row), `has no column headed ${inWords(missing)}; its columns are ${inWords(names, "and")}`);
  }
  return placed;
}

function placeColumn(entry: CatalogueEntry, column: ListColumn, sheet: number, unit: string, row: number): PlacedColumn {
  const place = rowPlace(`${entry.label}, ${column.name}`, row);
  return {
    index: entry.columns!.indexOf(column), column, sheet,
    unit: readUnitCell(column.kind, unit, column.unit, place),
    range: readUnitCell(column.kind, null, column.unit, place),
  };
}

function columnNamed(entry: CatalogueEntry, name: string): ListColumn | undefined {
  return entry.columns?.find((column) => normaliseLabel(column.name) === name || column.also.includes(name));
}

/** "Load, kN", "Load (kN)" or "Load [kN]": name and unit. */
function splitHeading(text: string): { name: string; unit: string } {
  const cut = text.slice(0, 80).search(/[,([]/);
  if (cut < 0) return { name: normaliseLabel(text.replace(/\.$/, "")), unit: "" };
  return { name: normaliseLabel(text.slice(0, cut).replace(/\.\s*$/, "")), unit: text.slice(cut + 1, 80).replace(/[)\]]\s*$/, "").trim() };
}
