import type { SheetPlan } from "../../host/workbook.js";
import { unreadable } from "../failure.js";
import { withNames } from "./added-names.js";
import { addedStyles } from "./added-styles.js";
import { chartParts, DRAWING_RELATION } from "./chart-parts.js";
import type { XlsxBook } from "./read-book.js";
import { relations, relationsPart } from "./relations.js";
import { lookKey, looksOf, sheetXml } from "./sheet-xml.js";
import { partBytes } from "./workbook-parts.js";
import { escaped, TagScanner, utf16Order, xmlText } from "./xml.js";
import type { ZipFile } from "./zip.js";

const SHEET_TYPE = "application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml";
const LONGEST_NAME = 31;
/** In the strict form of the format drawings have other names, and are left out. */
const ORDINARY = "http://schemas.openxmlformats.org/spreadsheetml/2006/main";

/**
 * Adds a sheet of values behind the others; everything else in the file stays as it is written.
 *
 * @param source  the workbook as read
 * @param plan    the sheet with its defined names; a name that is taken gets a number, formulas are left out
 * @returns       the new file, and the names of sheet and cells that were free
 * @throws {FormulaLineError} a workbook that allows no sheet more
 */
export function withSheet({ zip, book }: XlsxBook, plan: SheetPlan): { bytes: Uint8Array; sheet: string; names: string[] } {
  const main = relations(zip, "").find(({ kind }) => kind === "officeDocument")?.part ?? "xl/workbook.xml";
  const related = relations(zip, main);
  const workbook = textOf(zip, main);
  const root = rootOf(workbook);
  refuseProtected(workbook);
  const sheet = freeName(plan.name, book.sheets.map(({ name }) => name));
  const folder = main.slice(0, main.lastIndexOf("/") + 1);
  const part = freePart(`${folder}worksheets/sheet`, zip.names);
  const id = freeId(related.map((relation) => relation.id));
  const styles = related.find(({ kind }) => kind === "styles")?.part;
  const looks = looksOf([plan]);
  const added = styles === undefined ? undefined : addedStyles(textOf(zip, styles), looks);
  const styleOf = new Map(added === undefined ? [] : looks.map((look, k) => [lookKey(look), added.numbers[k] as number]));
  const parts = new Map<string, Uint8Array>();
  const put = (name: string, xml: string): void => void parts.set(name, inItsEncoding(zip, name, xml));
  const named = withNames(withSheetNamed(workbook, sheet, id), plan, sheet, book.tables.map(({ name }) => name));
  put(main, named.xml);
  put(relationsPart(main), withRelation(textOf(zip, relationsPart(main)), id, `/${part}`));
  const taken = [...zip.names, part];
  const free = (beginning: string): string => {
    const name = freePart(beginning, taken);
    taken.push(name);
    return name;
  };
  const drawn = root === ORDINARY ? chartParts(plan, sheet, part, { styleOf }, free) : [];
  const typed = drawn.filter(({ content }) => content !== "");
  put("[Content_Types].xml", typed.reduce((xml, { name, content }) => withType(xml, name, content), withType(textOf(zip, "[Content_Types].xml"), part, SHEET_TYPE)));
  for (const { name, xml } of drawn) put(name, xml);
  if (styles !== undefined && added !== undefined) put(styles, added.xml);
  put(part, sheetXml(plan, { namespace: root, styleOf, ...(drawn.length > 0 ? { drawing: DRAWING_RELATION } : {}) }));
  return { bytes: zip.withParts(parts), sheet, names: named.names };
}

function textOf(zip: ZipFile, part: string): string {
  return xmlText(partBytes(zip, part), part);
}

/** The namespace of the workbook's own element, which its sheets share. */
function rootOf(workbook: string): string {
  const scan = new TagScanner(workbook);
  scan.next();
  const prefix = scan.prefix.replace(":", "");
  return scan.attributes().get(prefix === "" ? "xmlns" : `xmlns:${prefix}`) ?? ORDINARY;
}

function refuseProtected(workbook: string): void {
  const scan = new TagScanner(workbook);
  while (scan.next()) {
    if (scan.opens("workbookProtection") && ["1", "true"].includes(scan.attributes().get("lockStructure") ?? "")) throw unreadable("The workbook's structure is protected, so no sheet may be added; take the protection away (Review, Protect Workbook) first.");
  }
}

/** "Name", or "Name (2)" and so on where that is taken. */
function freeName(wanted: string, taken: readonly string[]): string {
  const known = new Set(taken.map((name) => name.toLowerCase()));
  for (let number = 1; ; number++) {
    const ending = number === 1 ? "" : ` (${number})`;
    const name = wanted.slice(0, LONGEST_NAME - ending.length).trimEnd() + ending;
    if (!known.has(name.toLowerCase())) return name;
  }
}

function freePart(beginning: string, names: readonly string[]): string {
  const known = new Set(names.map((name) => name.toLowerCase()));
  for (let number = 1; ; number++) if (!known.has(`${beginning}${number}.xml`.toLowerCase())) return `${beginning}${number}.xml`;
}

function freeId(taken: readonly string[]): string {
  for (let number = taken.length + 1; ; number++) if (!taken.includes(`rId${number}`)) return `rId${number}`;
}

function withSheetNamed(xml: string, name: string, id: string): string {
  const scan = new TagScanner(xml);
  let [largest, prefix, idName] = [0, "", "r:id"];
  while (scan.next() && !scan.closes("sheets")) {
    if (!scan.opens("sheet")) continue;
    const attributes = scan.attributes();
    largest = Math.max(largest, Number(attributes.get("sheetId") ?? 0));
    prefix = scan.prefix;
    idName = [...attributes.keys()].find((key) => key.endsWith(":id")) ?? idName;
  }
  return `${xml.slice(0, scan.start)}<${prefix}sheet name="${escaped(name)}" sheetId="${largest + 1}" ${idName}="${id}"/>${xml.slice(scan.start)}`;
}

function withRelation(xml: string, id: string, target: string): string {
  const scan = new TagScanner(xml);
  let [type, prefix] = ["", ""];
  while (scan.next() && !scan.closes("Relationships")) {
    const kind = scan.opens("Relationship") ? (scan.attributes().get("Type") ?? "") : "";
    // the strict form of the format names its kinds otherwise
    if (kind.endsWith("/worksheet")) [type, prefix] = [kind, scan.prefix];
  }
  return `${xml.slice(0, scan.start)}<${prefix}Relationship Id="${id}" Type="${type}" Target="${target}"/>${xml.slice(scan.start)}`;
}

function withType(xml: string, part: string, content: string): string {
  const scan = new TagScanner(xml);
  let prefix = "";
  while (scan.next() && !scan.closes("Types")) if (scan.opens("Override") || scan.opens("Default")) prefix = scan.prefix;
  return `${xml.slice(0, scan.start)}<${prefix}Override PartName="/${part}" ContentType="${content}"/>${xml.slice(scan.start)}`;
}

function inItsEncoding(zip: ZipFile, name: string, xml: string): Uint8Array {
  const before = zip.names.includes(name) ? zip.read(name) : undefined;
  const order = before === undefined ? undefined : utf16Order(before);
  if (order === undefined) return Buffer.from(xml, "utf8");
  const littleEndian = Buffer.from(xml, "utf16le");
  return order === "big" ? littleEndian.swap16() : littleEndian;
}
