import { areaAddress, columnLetters, COLUMNS, readReference, ROWS, type Area } from "../../../../src/formula/addresses.js";
import { invalidArgument } from "../host-error.js";
import type { Place } from "../model/chart-model.js";
import type { SheetModel } from "../model/sheet-model.js";
import type { WorkbookModel } from "../model/workbook-model.js";

const WHOLE: Area = { top: 0, left: 0, bottom: ROWS - 1, right: COLUMNS - 1 };

/** The range that an address or a name means on a sheet; "Sheet1!A1" only on that sheet. */
export function placeOn(book: WorkbookModel, sheet: SheetModel, address: string | undefined): Place {
  if (address === undefined) return { sheet, area: WHOLE };
  const bang = address.lastIndexOf("!");
  const before = bang < 0 ? undefined : address.slice(0, bang).replace(/^=?'?|'$/g, "").replaceAll("''", "'");
  if (before !== undefined && book.findSheet(before) !== sheet) throw invalidArgument(`${address} is not on ${sheet.name}`);
  const reference = readReference(address.slice(bang + 1));
  if (reference !== undefined) return { sheet, area: { top: reference.top, left: reference.left, bottom: reference.bottom, right: reference.right } };
  const named = [...sheet.names, ...book.names].find(({ name, range }) => name.toLowerCase() === address.toLowerCase() && range?.sheet === sheet);
  if (named?.range === undefined) throw invalidArgument(`${address} is no range`);
  return { sheet, area: named.range.area };
}

/** "Sheet1!A1:B2", "'My sheet'!A:A". */
export function fullAddress({ sheet, area }: Place): string {
  return `${quotedSheet(sheet.name)}!${shortAddress(area)}`;
}

/** "=Sheet1!$A$1:$B$2", as a name shows it. */
export function fixedFormula({ sheet, area }: Place): string {
  return `=${quotedSheet(sheet.name)}!${shortAddress(area).replace(/([A-Z]+)/g, "$$$1").replace(/(\d+)/g, "$$$1")}`;
}

function shortAddress(area: Area): string {
  if (area.top === 0 && area.bottom === ROWS - 1) return `${columnLetters(area.left)}:${columnLetters(area.right)}`;
  if (area.left === 0 && area.right === COLUMNS - 1) return `${area.top + 1}:${area.bottom + 1}`;
  return areaAddress(area);
}

export function quotedSheet(name: string): string {
  return /^[\p{L}_][\p{L}\p{N}_.]*$/u.test(name) && !/^[a-z]{1,3}\d+$/i.test(name) ? name : `'${name.replaceAll("'", "''")}'`;
}

/** Whole columns and rows have no values of their own to read or write. */
export function isUnbounded({ top, left, bottom, right }: Area): boolean {
  return (top === 0 && bottom === ROWS - 1) || (left === 0 && right === COLUMNS - 1);
}

export function rowsOf({ top, bottom }: Area): number {
  return bottom - top + 1;
}

export function columnsOf({ left, right }: Area): number {
  return right - left + 1;
}

/** @throws {HostError} for a rectangle that runs past the edge */
export function onSheet(area: Area): Area {
  if (area.top < 0 || area.left < 0 || area.bottom >= ROWS || area.right >= COLUMNS || area.top > area.bottom || area.left > area.right) throw invalidArgument("the range lies outside the sheet");
  return area;
}

/** Whether a cell, as "id row column", lies in a range. */
export function isInside(key: string, { sheet, area }: Place): boolean {
  const [id, row, column] = key.split(" ");
  return id === sheet.id && Number(row) >= area.top && Number(row) <= area.bottom && Number(column) >= area.left && Number(column) <= area.right;
}
