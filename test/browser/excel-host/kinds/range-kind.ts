import { ErrorValue, type CellValue } from "../../../../src/formula/cell-value.js";
import type { Arguments } from "../arguments.js";
import type { ExcelHost } from "../excel-host.js";
import { accessDenied, HostError, invalidArgument } from "../host-error.js";
import { opened, type Kind, type Opened } from "../kind.js";
import type { Place } from "../model/chart-model.js";
import { columnsOf, fullAddress, isUnbounded, onSheet, placeOn, rowsOf } from "./places.js";
import { refuseLook } from "./looks.js";

const MOST_CELLS = 500_000;

/** A rectangle of cells. */
export const rangeKind: Kind<Place> = {
  get: {
    address: (place) => fullAddress(place),
    values: (place, host) => eachCell(place, host, (row, column) => shown(place.sheet.valueAt(row, column))),
    formulas: (place, host) => eachCell(place, host, (row, column) => shown(place.sheet.enteredAt(row, column))),
    valueTypes: (place, host) => eachCell(place, host, (row, column) => typeOf(place.sheet.valueAt(row, column))),
    numberFormat: (place, host) => eachCell(place, host, (row, column) => place.sheet.lookAt(row, column, "numberFormat") ?? "General"),
    rowIndex: ({ area }) => area.top,
    columnIndex: ({ area }) => area.left,
    rowCount: ({ area }) => rowsOf(area),
    columnCount: ({ area }) => columnsOf(area),
    cellCount: ({ area }) => (rowsOf(area) * columnsOf(area) > 2 ** 31 - 1 ? -1 : rowsOf(area) * columnsOf(area)),
    isEntireColumn: ({ area }) => area.top === 0 && isUnbounded(area) && rowsOf(area) > 1_000_000,
    isEntireRow: ({ area }) => area.left === 0 && columnsOf(area) === 16_384,
    hasSpill: (place, host) => {
      const spills = host.calculator.spillsIn(place);
      return spills === rowsOf(place.area) * columnsOf(place.area) ? true : spills === 0 ? false : null;
    },
  },
  set: {
    values: (place, value, host) => host.book.write(place.sheet, bounded(place), matrix(value), "addin"),
    formulas: (place, value, host) => host.book.write(place.sheet, bounded(place), matrix(value), "addin"),
    numberFormat: ({ sheet, area }, value) => {
      const rows = matrix(value);
      refuseLook({ sheet, area });
      const isOne = rows.length === 1 && rows[0]?.length === 1;
      if (!isOne && (rows.length !== rowsOf(area) || rows.some((row) => row.length !== columnsOf(area)))) throw invalidArgument("the formats do not fit the range");
      bounded({ sheet, area });
      for (let row = area.top; row <= area.bottom; row++) for (let column = area.left; column <= area.right; column++) {
        const format = isOne ? rows[0]?.[0] : rows[row - area.top]?.[column - area.left];
        if (format === null || format === undefined) continue;
        if (typeof format !== "string") throw invalidArgument(`the number format ${JSON.stringify(format)}`);
        sheet.setLook(row, column, "numberFormat", format);
      }
    },
  },
  open: {
    format: (place) => opened("RangeFormat", place),
    dataValidation: (place) => opened("DataValidation", place),
    worksheet: ({ sheet }) => opened("Worksheet", sheet),
    getCell: ({ sheet, area }, given) => part(sheet, area.top + given.integer(0), area.left + given.integer(1), 1, 1),
    getRow: ({ sheet, area }, given) => part(sheet, area.top + given.integer(0), area.left, 1, columnsOf(area)),
    getColumn: ({ sheet, area }, given) => part(sheet, area.top, area.left + given.integer(0), rowsOf(area), 1),
    getLastCell: ({ sheet, area }) => part(sheet, area.bottom, area.right, 1, 1),
    getLastRow: ({ sheet, area }) => part(sheet, area.bottom, area.left, 1, columnsOf(area)),
    getEntireColumn: ({ sheet, area }) => part(sheet, 0, area.left, 1_048_576, columnsOf(area)),
    getEntireRow: ({ sheet, area }) => part(sheet, area.top, 0, rowsOf(area), 16_384),
    getOffsetRange: ({ sheet, area }, given) => part(sheet, area.top + given.integer(0, -Infinity), area.left + given.integer(1, -Infinity), rowsOf(area), columnsOf(area)),
    getResizedRange: ({ sheet, area }, given) => part(sheet, area.top, area.left, rowsOf(area) + given.integer(0, -Infinity), columnsOf(area) + given.integer(1, -Infinity)),
    getAbsoluteResizedRange: ({ sheet, area }, given) => part(sheet, area.top, area.left, given.integer(0, 1), given.integer(1, 1)),
    getBoundingRect: (place, given, host) => bounding(place, other(place, given, host)),
    getIntersectionOrNullObject: (place, given, host) => crossing(place, other(place, given, host)),
    getUsedRange: (place, given) => usedPart(place, given.truth(0, false)) ?? part(place.sheet, place.area.top, place.area.left, 1, 1),
    getUsedRangeOrNullObject: (place, given) => usedPart(place, given.truth(0, false)),
    getSpillParentOrNullObject: (place, _given, host) => {
      const parent = host.calculator.spillParent(place);
      return parent === undefined ? null : part(place.sheet, parent.row, parent.column, 1, 1);
    },
  },
  call: {
    select: ({ sheet, area }, _given, host) => host.book.select(sheet, [area]),
    calculate: (place, _given, host) => host.calculator.again(place),
    clear: ({ sheet, area }, given, host) => {
      const what = given.choice(0, ["All", "Contents", "Formats"], "All");
      if (sheet.isLocked(area)) throw accessDenied(`${sheet.name} is protected`);
      if (what !== "Formats") host.book.write(sheet, bounded({ sheet, area }), [[""]], "addin");
      if (what !== "Contents") for (const key of [...sheet.looks.keys()]) if (inside(key, { sheet, area })) sheet.looks.delete(key);
    },
    // large writes are checked as a whole and then sent in parts
    _ValidateArraySize: ({ area }, given) => {
      if (given.integer(0, 1) !== rowsOf(area) || given.integer(1, 1) !== columnsOf(area)) throw invalidArgument("the number of rows or columns in the input array doesn't match the size or dimensions of the range");
    },
  },
};

/** A rectangle of a sheet as an object of the platform. */
export function part(sheet: Place["sheet"], top: number, left: number, rows: number, columns: number): Opened {
  return opened("Range", { sheet, area: onSheet({ top, left, bottom: top + rows - 1, right: left + columns - 1 }) });
}

function bounded({ area }: Place): Place["area"] {
  if (isUnbounded(area)) throw invalidArgument("cells of an unbounded range cannot be set");
  return area;
}

function matrix(value: unknown): unknown[][] {
  if (!Array.isArray(value)) return [[value]];
  if (!value.every((row) => Array.isArray(row))) throw invalidArgument("the input is no two-dimensional array");
  return value as unknown[][];
}

function eachCell(place: Place, host: ExcelHost, read: (row: number, column: number) => unknown): unknown[][] | null {
  const { area } = place;
  if (isUnbounded(area)) return null;
  if (rowsOf(area) * columnsOf(area) > MOST_CELLS) throw new HostError("ResponsePayloadSizeLimitExceeded", "The response payload size has exceeded the limit.");
  host.calculator.bringUpToDate();
  return Array.from({ length: rowsOf(area) }, (_, row) => Array.from({ length: columnsOf(area) }, (__, column) => read(area.top + row, area.left + column)));
}

function shown(value: CellValue): unknown {
  return value === null ? "" : value instanceof ErrorValue ? value.code : value;
}

function typeOf(value: CellValue): string {
  if (value === null) return "Empty";
  if (value instanceof ErrorValue) return "Error";
  return { number: "Double", string: "String", boolean: "Boolean" }[typeof value as "number" | "string" | "boolean"];
}

function other(place: Place, given: Arguments, host: ExcelHost): Place {
  const range = given.object(0, "Range") ?? placeOn(host.book, place.sheet, given.text(0));
  if (range.sheet !== place.sheet) throw invalidArgument("the two ranges are on different sheets");
  return range;
}

function bounding({ sheet, area: a }: Place, { area: b }: Place): Opened {
  const area = { top: Math.min(a.top, b.top), left: Math.min(a.left, b.left), bottom: Math.max(a.bottom, b.bottom), right: Math.max(a.right, b.right) };
  return opened("Range", { sheet, area });
}

function crossing({ sheet, area: a }: Place, { area: b }: Place): Opened | null {
  const area = { top: Math.max(a.top, b.top), left: Math.max(a.left, b.left), bottom: Math.min(a.bottom, b.bottom), right: Math.min(a.right, b.right) };
  return area.top > area.bottom || area.left > area.right ? null : opened("Range", { sheet, area });
}

function usedPart(place: Place, valuesOnly: boolean): Opened | null {
  const area = place.sheet.used(valuesOnly);
  return area === undefined ? null : crossing(place, { sheet: place.sheet, area });
}

function inside(key: number, { area }: Place): boolean {
  const row = Math.floor(key / 16_384);
  const column = key % 16_384;
  return row >= area.top && row <= area.bottom && column >= area.left && column <= area.right;
}
