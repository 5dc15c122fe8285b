import { columnLetters } from "./addresses.js";
import type { Book, BookCell } from "./book.js";
import { ERROR_CODES, ErrorValue, type CellValue } from "./cell-value.js";
import { unreadable } from "./failure.js";

const MOST_CELLS = 2_000_000;
const WRITTEN_NUMBER = /^[-+]?(?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d{1,3})?%?$/;
const NUMBER_WITH_COMMA = /^[-+]?(?:\d+,\d+|,\d+)(?:[eE][-+]?\d{1,3})?%?$/;

interface Field {
  readonly text: string;
  readonly isQuoted: boolean;
}

/**
 * Reads a csv as a workbook of one sheet whose whole range is named Site.
 *
 * Fields are parted by commas, semicolons or tabs, whichever stands in most lines; a first line "sep=;" decides instead.
 * A field within quotation marks is text. Any other is a number where it is written as one: with a decimal point, or, in a
 * file parted by semicolons or tabs that holds such numbers, with a decimal comma (a decimal point then stays text).
 * TRUE, FALSE and error values are themselves, an empty field is a blank cell, everything else is text.
 *
 * @param bytes  UTF-8, UTF-16 with its mark, or Windows-1252
 * @param name   of the sheet
 */
export function readCsv(bytes: Uint8Array, name: string): Book {
  const text = decoded(bytes);
  if (text.includes("\0")) throw unreadable("The file is no csv: it holds bytes that no text has.");
  const declared = /^sep=([,;\t])\r?\n/i.exec(text);
  const separator = declared?.[1] ?? separatorOf(text);
  const lines = fields(declared === null ? text : text.slice(declared[0].length), separator);
  const hasCommas = separator !== "," && lines.some((line) => line.some(({ text: field, isQuoted }) => !isQuoted && NUMBER_WITH_COMMA.test(field.trim())));
  const cells: BookCell[] = [];
  lines.forEach((line, row) => line.forEach((field, column) => {
    const value = cellOf(field, hasCommas);
    if (value !== null) cells.push({ row, column, value });
  }));
  if (cells.length === 0) throw unreadable("The csv holds no values.");
  const columns = Math.max(...lines.map((line) => line.length));
  const names = [{ name: "Site", sheet: undefined, meaning: `$A$1:$${columnLetters(columns - 1)}$${lines.length}` }];
  return { sheets: [{ name, cells }], names, tables: [], activeSheet: 0, dates1904: false, iterates: false };
}

function decoded(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder("utf-16le").decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder("utf-16be").decode(bytes);
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder("windows-1252").decode(bytes);
  }
}

/** The sign that parts the fields in most of the first lines; quoted text does not count. */
function separatorOf(text: string): string {
  const lines = text.slice(0, 100_000).replace(/"(?:[^"]|"")*"/g, "").split(/\r\n|\n|\r/).filter((line) => line.trim() !== "").slice(0, 200);
  const counts = ["\t", ";", ","].map((sign) => [sign, lines.filter((line) => line.includes(sign)).length] as const);
  return counts.reduce((best, entry) => (entry[1] > best[1] ? entry : best)).at(0) as string;
}

function fields(text: string, separator: string): Field[][] {
  const lines: Field[][] = [];
  let line: Field[] = [];
  let count = 0;
  let at = 0;
  while (at < text.length) {
    const quoted = text.charAt(at) === '"' ? quotedField(text, at) : undefined;
    let end = quoted?.end ?? at;
    while (end < text.length && !isBreak(text, end) && text.charAt(end) !== separator) end++;
    const bare = text.slice(quoted?.end ?? at, end);
    line.push(quoted === undefined ? { text: bare, isQuoted: false } : { text: quoted.text + bare, isQuoted: true });
    if (++count > MOST_CELLS) throw unreadable(`The csv holds more than ${MOST_CELLS} fields.`);
    if (text.charAt(end) === separator) {
      at = end + 1;
      continue;
    }
    lines.push(line);
    line = [];
    at = end + (text.startsWith("\r\n", end) ? 2 : 1);
  }
  if (line.length > 0) lines.push(line);
  return lines;
}

function quotedField(text: string, start: number): { text: string; end: number } {
  let end = start + 1;
  for (; end < text.length; end++) {
    if (text.charAt(end) !== '"') continue;
    if (text.charAt(end + 1) !== '"') return { text: text.slice(start + 1, end).replaceAll('""', '"'), end: end + 1 };
    end++;
  }
  throw unreadable("The csv holds a quotation mark that is never closed.");
}

function isBreak(text: string, at: number): boolean {
  return text.charAt(at) === "\n" || text.charAt(at) === "\r";
}

function cellOf({ text, isQuoted }: Field, hasCommas: boolean): CellValue {
  const trimmed = text.trim();
  if (isQuoted) return text === "" ? null : text;
  if (trimmed === "") return null;
  if (/^(?:TRUE|FALSE)$/i.test(trimmed)) return trimmed.toUpperCase() === "TRUE";
  if (ERROR_CODES.has(trimmed.toUpperCase())) return new ErrorValue(trimmed.toUpperCase());
  const isNumber = hasCommas ? NUMBER_WITH_COMMA.test(trimmed) || (WRITTEN_NUMBER.test(trimmed) && !trimmed.includes(".")) : WRITTEN_NUMBER.test(trimmed);
  if (!isNumber) return trimmed;
  const isPercentage = trimmed.endsWith("%");
  const number = Number((isPercentage ? trimmed.slice(0, -1) : trimmed).replace(",", "."));
  if (!Number.isFinite(number)) return trimmed;
  return isPercentage ? number / 100 : number;
}

