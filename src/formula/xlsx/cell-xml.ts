import { areaAddress, type Area } from "../addresses.js";
import { ErrorValue, STORED_ERRORS, type CellValue } from "../cell-value.js";
import type { XmlCell } from "./sheet-cells.js";
import { escaped, TagScanner } from "./xml.js";

const TYPE = /\s+t\s*=\s*(?:"[^"]*"|'[^']*')/;
// metadata of the old value, such as the reason of an error, says nothing of the new one
const VALUE_METADATA = /\s+vm\s*=\s*(?:"[^"]*"|'[^']*')/;
const AREA = /(\sref\s*=\s*)(?:"[^"]*"|'[^']*')/;

/**
 * The XML of a cell with another value. Style, formula and whatever else it holds stay as they are written.
 *
 * @param value  null leaves the cell without a value
 * @param area   where the table of its array formula goes now; undefined leaves that as it is
 */
export function cellWithValue(xml: string, cell: XmlCell, value: CellValue, area?: Area): string {
  const { prefix, start, open, end, formula } = cell;
  const isEmpty = xml.charAt(open - 2) === "/";
  const tag = xml.slice(start, isEmpty ? open - 2 : open - 1).replace(TYPE, "").replace(VALUE_METADATA, "").trimEnd();
  const written = formula === undefined ? "" : xml.slice(formula.start, formula.end);
  const resized = area === undefined ? written : written.replace(AREA, (_, name: string) => `${name}"${areaAddress(area)}"`);
  const body = resized + valueXml(prefix, value) + (isEmpty ? "" : otherChildren(xml, open, end, formula));
  return body === "" ? `${tag}/>` : `${tag}${typeAttribute(value)}>${body}</${prefix}c>`;
}

/** The XML of a cell where there was none. */
export function newCell(prefix: string, address: string, value: CellValue): string {
  return `<${prefix}c r="${address}"${typeAttribute(value)}>${valueXml(prefix, value)}</${prefix}c>`;
}

/** The attribute that tells of what kind a value is; none for numbers and blanks. */
export function typeAttribute(value: CellValue): string {
  if (typeof value === "string") return ' t="str"';
  if (typeof value === "boolean") return ' t="b"';
  return value instanceof ErrorValue ? ' t="e"' : "";
}

/** The element that holds a value; nothing for a blank. */
export function valueXml(prefix: string, value: CellValue): string {
  if (value === null) return "";
  const text = value instanceof ErrorValue ? (STORED_ERRORS.has(value.code) ? value.code : "#VALUE!") : typeof value === "boolean" ? (value ? "1" : "0") : typeof value === "number" ? String(value) : withCodes(value);
  const keepsSpace = typeof value === "string" && text !== text.trim() ? ' xml:space="preserve"' : "";
  return `<${prefix}v${keepsSpace}>${escaped(text)}</${prefix}v>`;
}

/** A text within an element, as a cell of a new sheet holds it. */
export function inlineXml(text: string): string {
  return `<is><t xml:space="preserve">${escaped(withCodes(text))}</t></is>`;
}

/** Signs that XML cannot hold become _x000B_; a text that looks like such a code gets its first sign written as one. */
function withCodes(text: string): string {
  const marked = text.replace(/_(?=x[0-9A-Fa-f]{4}_)/g, codeOf);
  return Array.from(marked).some(needsCode) ? Array.from(marked, (sign) => (needsCode(sign) ? codeOf(sign) : sign)).join("") : marked;
}

function needsCode(sign: string): boolean {
  const code = sign.charCodeAt(0);
  return (code < 0x20 && sign !== "\t" && sign !== "\n") || code === 0xfffe || code === 0xffff;
}

function codeOf(sign: string): string {
  return `_x${sign.charCodeAt(0).toString(16).toUpperCase().padStart(4, "0")}_`;
}

/** What a cell holds besides formula, value and inline string: extensions of other programs. */
function otherChildren(xml: string, open: number, end: number, formula: XmlCell["formula"]): string {
  const scan = new TagScanner(xml, formula?.end ?? open);
  let kept = "";
  while (scan.next() && scan.start < end && !scan.closes("c")) {
    const { name, start } = scan;
    while (!scan.isEmpty() && !scan.closes(name) && scan.next());
    if (name !== "v" && name !== "is" && name !== "f") kept += xml.slice(start, scan.end);
  }
  return kept;
}
