import type { CellStyle, NumberLook } from "../../host/workbook.js";
import { TagScanner } from "./xml.js";

/** What a cell is for and how its number shows. */
export interface CellLook {
  readonly style: CellStyle | undefined;
  readonly look: NumberLook | undefined;
}

const FORMATS: Readonly<Record<NumberLook, string>> = { money: "#,##0", ratio: "0.00", metres: "0.0", percent: "0.0%" };
const BOLD: ReadonlySet<CellStyle> = new Set<CellStyle>(["title", "section", "head", "numberhead"]);
const FIRST_FREE_FORMAT = 164; // smaller numbers are the format's own

/**
 * Adds looks to the styles of a workbook; those that are there keep their numbers.
 *
 * @param xml    the styles part
 * @param looks  the looks wanted
 * @returns      the part with them, and the number of each look; undefined where the part lacks what every style refers to
 */
export function addedStyles(xml: string, looks: readonly CellLook[]): { xml: string; numbers: number[] } | undefined {
  const fonts = list(xml, "fonts");
  const styles = list(xml, "cellXfs");
  if (fonts === undefined || styles === undefined || styles.items === 0) return undefined;
  const formats = list(xml, "numFmts");
  const { prefix } = styles;
  const kinds = [...new Set(looks.flatMap(({ look }) => (look === undefined ? [] : [look])))];
  const firstFormat = Math.max(FIRST_FREE_FORMAT, ...formatNumbers(xml)) + 1;
  const newFormats = kinds.map((look, k) => `<${prefix}numFmt numFmtId="${firstFormat + k}" formatCode="${FORMATS[look]}"/>`).join("");
  const ordinary = firstFont(xml, fonts);
  const newFonts = ["b", "i"].map((mark) => `<${prefix}font><${prefix}${mark}/>${ordinary}</${prefix}font>`).join("");
  const newStyles = looks.map(({ style, look }) => {
    const font = style !== undefined && BOLD.has(style) ? fonts.items : style === "note" ? fonts.items + 1 : 0;
    const format = look === undefined ? 0 : firstFormat + kinds.indexOf(look);
    const marks = `${format > 0 ? ' applyNumberFormat="1"' : ""}${font > 0 ? ' applyFont="1"' : ""}`;
    const head = `<${prefix}xf numFmtId="${format}" fontId="${font}" fillId="0" borderId="0" xfId="0"${marks}`;
    return style === "numberhead" ? `${head} applyAlignment="1"><${prefix}alignment horizontal="right"/></${prefix}xf>` : `${head}/>`;
  });
  // from the back, so that the places in front stay where they are
  let made = extended(xml, styles, newStyles.join(""), looks.length);
  made = extended(made, fonts, newFonts, 2);
  if (kinds.length > 0) made = formats === undefined ? made.slice(0, fonts.start) + `<${prefix}numFmts count="${kinds.length}">${newFormats}</${prefix}numFmts>` + made.slice(fonts.start) : extended(made, formats, newFormats, kinds.length);
  return { xml: made, numbers: looks.map((_, k) => styles.items + k) };
}

interface List {
  readonly start: number;
  readonly open: number;
  readonly close: number;
  readonly prefix: string;
  readonly items: number;
}

/** Where a list of the styles part stands, and how many items it holds. */
function list(xml: string, name: string): List | undefined {
  const scan = new TagScanner(xml);
  while (scan.next() && !scan.opens(name));
  if (!scan.opens(name) || scan.isEmpty()) return undefined;
  const { start, end: open, prefix } = scan;
  let items = 0;
  let depth = 0;
  while (scan.next() && !scan.closes(name)) {
    if (scan.kind !== "close" && depth === 0) items++;
    depth += scan.kind === "open" ? 1 : scan.kind === "close" ? -1 : 0;
  }
  return { start, open, close: scan.start, prefix, items };
}

function extended(xml: string, { start, open, close, items }: List, added: string, count: number): string {
  const tag = xml.slice(start, open).replace(/(\scount\s*=\s*)(?:"\d*"|'\d*')/, `$1"${items + count}"`);
  return xml.slice(0, start) + tag + xml.slice(open, close) + added + xml.slice(close);
}

function formatNumbers(xml: string): number[] {
  const scan = new TagScanner(xml);
  const found: number[] = [];
  while (scan.next()) if (scan.opens("numFmt")) found.push(Number(scan.attributes().get("numFmtId") ?? 0));
  return found.filter(Number.isFinite);
}

/** What the workbook's ordinary font consists of, without bold and italic. */
function firstFont(xml: string, fonts: List): string {
  const scan = new TagScanner(xml, fonts.open);
  scan.next();
  if (!scan.opens("font") || scan.isEmpty()) return "";
  const from = scan.end;
  while (scan.next() && !scan.closes("font"));
  return xml.slice(from, scan.start).replace(/<(?:\w+:)?[bi](?:\s[^>]*)?\/>/g, "");
}
