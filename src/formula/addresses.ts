/** Rows and columns of a sheet in the xlsx format. */
export const ROWS = 1_048_576;
export const COLUMNS = 16_384;

/** A rectangle of cells of one sheet; rows and columns start at 0, ends included. */
export interface Area {
  readonly top: number;
  readonly left: number;
  readonly bottom: number;
  readonly right: number;
}

/** A reference as a formula writes it: an area and which of its ends move when the formula is copied. */
export interface Reference extends Area {
  readonly kind: "cells" | "columns" | "rows";
  readonly topFixed: boolean;
  readonly leftFixed: boolean;
  readonly bottomFixed: boolean;
  readonly rightFixed: boolean;
}

/** The letters of a column; 0 is "A". */
export function columnLetters(column: number): string {
  let letters = "";
  for (let rest = column + 1; rest > 0; rest = Math.floor((rest - 1) / 26)) letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
  return letters;
}

/** The number of a column from its letters; "A" is 0. */
function columnNumber(letters: string): number {
  let number = 0;
  for (const letter of letters.toUpperCase()) number = number * 26 + letter.charCodeAt(0) - 64;
  return number - 1;
}

/** "B4" for row 3, column 1. */
export function cellAddress(row: number, column: number): string {
  return `${columnLetters(column)}${row + 1}`;
}

/** "B4:C9", or "B4" for a single cell. */
export function areaAddress({ top, left, bottom, right }: Area): string {
  const first = cellAddress(top, left);
  return top === bottom && left === right ? first : `${first}:${cellAddress(bottom, right)}`;
}

const CELLS = /^(\$?)([A-Z]{1,3})(\$?)([0-9]{1,7})(?::(\$?)([A-Z]{1,3})(\$?)([0-9]{1,7}))?$/i;
const WHOLE_COLUMNS = /^(\$?)([A-Z]{1,3}):(\$?)([A-Z]{1,3})$/i;
const WHOLE_ROWS = /^(\$?)([0-9]{1,7}):(\$?)([0-9]{1,7})$/;

/**
 * Reads a reference without its sheet.
 *
 * @param text  "A1", "$A$1:D9", "A:D" or "3:7"
 * @returns     undefined where the text is no reference or lies outside the sheet
 */
export function readReference(text: string): Reference | undefined {
  const cells = CELLS.exec(text);
  if (cells !== null) {
    const [, leftMark, leftLetters, topMark, topDigits, rightMark, rightLetters, bottomMark, bottomDigits] = cells as unknown as string[];
    const single = rightLetters === undefined;
    return ordered({
      kind: "cells",
      top: Number(topDigits) - 1,
      left: columnNumber(leftLetters ?? ""),
      bottom: Number(single ? topDigits : bottomDigits) - 1,
      right: columnNumber((single ? leftLetters : rightLetters) ?? ""),
      topFixed: topMark === "$",
      leftFixed: leftMark === "$",
      bottomFixed: (single ? topMark : bottomMark) === "$",
      rightFixed: (single ? leftMark : rightMark) === "$",
    });
  }
  const columns = WHOLE_COLUMNS.exec(text);
  if (columns !== null) {
    const [, leftMark, left, rightMark, right] = columns as unknown as [string, string, string, string, string];
    return ordered({ kind: "columns", top: 0, left: columnNumber(left), bottom: ROWS - 1, right: columnNumber(right), topFixed: true, leftFixed: leftMark === "$", bottomFixed: true, rightFixed: rightMark === "$" });
  }
  const rows = WHOLE_ROWS.exec(text);
  if (rows === null) return undefined;
  const [, topMark, top, bottomMark, bottom] = rows as unknown as [string, string, string, string, string];
  return ordered({ kind: "rows", top: Number(top) - 1, left: 0, bottom: Number(bottom) - 1, right: COLUMNS - 1, topFixed: topMark === "$", leftFixed: true, bottomFixed: bottomMark === "$", rightFixed: true });
}

/**
 * Moves the ends of a reference that are not fixed, as copying its formula does; past the edge it comes back on the other side.
 *
 * @param rows     rows down
 * @param columns  columns to the right
 */
export function moved(reference: Reference, rows: number, columns: number): Reference {
  const row = (value: number, fixed: boolean): number => (fixed ? value : (((value + rows) % ROWS) + ROWS) % ROWS);
  const column = (value: number, fixed: boolean): number => (fixed ? value : (((value + columns) % COLUMNS) + COLUMNS) % COLUMNS);
  const { topFixed, leftFixed, bottomFixed, rightFixed } = reference;
  return { ...reference, top: row(reference.top, topFixed), left: column(reference.left, leftFixed), bottom: row(reference.bottom, bottomFixed), right: column(reference.right, rightFixed) };
}

/** The reference as a formula writes it, dollar signs included. */
export function writtenReference(reference: Reference): string {
  const { kind, top, left, bottom, right, topFixed, leftFixed, bottomFixed, rightFixed } = reference;
  const column = (number: number, fixed: boolean): string => `${fixed ? "$" : ""}${columnLetters(number)}`;
  const row = (number: number, fixed: boolean): string => `${fixed ? "$" : ""}${number + 1}`;
  if (kind === "columns") return `${column(left, leftFixed)}:${column(right, rightFixed)}`;
  if (kind === "rows") return `${row(top, topFixed)}:${row(bottom, bottomFixed)}`;
  const first = column(left, leftFixed) + row(top, topFixed);
  return top === bottom && left === right ? first : `${first}:${column(right, rightFixed)}${row(bottom, bottomFixed)}`;
}

function ordered(reference: Reference): Reference | undefined {
  const { top, left, bottom, right, topFixed, leftFixed, bottomFixed, rightFixed } = reference;
  if (Math.min(top, bottom) < 0 || Math.max(top, bottom) >= ROWS || Math.max(left, right) >= COLUMNS) return undefined;
  const rowsTurned = top > bottom;
  const columnsTurned = left > right;
  return {
    kind: reference.kind,
    top: Math.min(top, bottom),
    bottom: Math.max(top, bottom),
    left: Math.min(left, right),
    right: Math.max(left, right),
    topFixed: rowsTurned ? bottomFixed : topFixed,
    bottomFixed: rowsTurned ? topFixed : bottomFixed,
    leftFixed: columnsTurned ? rightFixed : leftFixed,
    rightFixed: columnsTurned ? leftFixed : rightFixed,
  };
}
