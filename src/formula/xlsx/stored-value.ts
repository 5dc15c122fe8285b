import { ErrorValue, type CellValue } from "../cell-value.js";
import type { XmlCell } from "./sheet-cells.js";

/**
 * The value that a file holds for a cell.
 *
 * @param strings  the workbook's shared strings
 * @returns        null for a cell without one
 */
export function storedValue({ type, value }: XmlCell, strings: readonly string[]): CellValue {
  if (value === undefined) return null;
  if (type === "s") return strings[Number(value)] ?? "";
  if (type === "str" || type === "inlineStr") return value;
  if (type === "b") return value === "1" || value === "true";
  if (type === "e") return new ErrorValue(value);
  if (type === "d") return serialOf(value);
  const number = Number(value);
  return value.trim() === "" || !Number.isFinite(number) ? null : number;
}

/** A date written in letters, as a few programs do, counted in days as the sheet counts them. */
function serialOf(date: string): CellValue {
  const time = Date.parse(/Z|[+-]\d\d:\d\d$/.test(date) ? date : date.includes("T") ? `${date}Z` : date);
  return Number.isNaN(time) ? date : time / 86_400_000 + 25_569;
}
