import { ErrorValue, type CellValue } from "./cell-value.js";

/** Values as rows of text parted by tabs, each row closed; tabs and line breaks within a text become spaces. */
export function printed(values: readonly (readonly CellValue[])[]): string {
  return values.map((row) => `${row.map(printedValue).join("\t")}\n`).join("");
}

/** One value as text: numbers in full, TRUE and FALSE, error values by their name. */
function printedValue(value: CellValue): string {
  if (value === null) return "";
  if (value instanceof ErrorValue) return value.code;
  if (typeof value === "boolean") return value ? "TRUE" : "FALSE";
  return typeof value === "number" ? String(value) : value.replace(/[\t\r\n]+/g, " ");
}
