import { readReference } from "../addresses.js";
import type { BookName, BookTable } from "../book.js";
import { unreadable } from "../failure.js";
import { relations } from "./relations.js";
import { stringTo } from "./sheet-cells.js";
import { TagScanner, textBetween, xmlText } from "./xml.js";
import type { ZipFile } from "./zip.js";

/** What the workbook's own part tells. */
export interface WorkbookParts {
  readonly sheets: readonly { readonly name: string; /** undefined for a chart sheet or macro sheet */ readonly part: string | undefined }[];
  /** their sheet numbers count all sheets, chart sheets too */
  readonly names: readonly BookName[];
  readonly activeSheet: number;
  readonly dates1904: boolean;
  readonly iterates: boolean;
  readonly strings: readonly string[];
  /** tells from a cell's metadata number whether its formula spills */
  readonly isDynamic: (metadata: string) => boolean;
  /** the package holds a digital signature, which a change of its values breaks */
  readonly isSigned: boolean;
}

/**
 * Reads the part that names the sheets, and what belongs to all of them.
 *
 * @throws {FormulaLineError} for a package that is no workbook of this format
 */
export function workbookParts(zip: ZipFile): WorkbookParts {
  const main = relations(zip, "").find(({ kind }) => kind === "officeDocument")?.part ?? "xl/workbook.xml";
  const related = relations(zip, main);
  const xml = partText(zip, main);
  const scan = new TagScanner(xml);
  const sheets: { name: string; part: string | undefined }[] = [];
  const names: BookName[] = [];
  let [activeSheet, dates1904, iterates] = [0, false, false];
  while (scan.next()) {
    if (scan.opens("workbookPr")) dates1904 = isTrue(scan.attributes().get("date1904"));
    else if (scan.opens("workbookView")) activeSheet = Number(scan.attributes().get("activeTab") ?? 0);
    else if (scan.opens("calcPr")) iterates = isTrue(scan.attributes().get("iterate"));
    else if (scan.opens("sheet")) {
      const attributes = scan.attributes();
      const id = [...attributes].find(([name]) => name.endsWith(":id"))?.[1];
      const relation = related.find((entry) => entry.id === id);
      sheets.push({ name: attributes.get("name") ?? "", part: relation?.kind === "worksheet" ? relation.part : undefined });
    } else if (scan.opens("definedName") && !scan.isEmpty()) names.push(definedName(scan));
  }
  if (!sheets.some(({ part }) => part !== undefined)) throw unreadable("The workbook has no worksheet.");
  const strings = related.find(({ kind }) => kind === "sharedStrings")?.part;
  const metadata = related.find(({ kind }) => kind === "sheetMetadata")?.part;
  return {
    sheets, names, dates1904, iterates,
    activeSheet: sheets[activeSheet]?.part === undefined ? sheets.findIndex(({ part }) => part !== undefined) : activeSheet,
    strings: strings === undefined ? [] : sharedStrings(partText(zip, strings)),
    isDynamic: metadata === undefined ? () => false : dynamicCells(partText(zip, metadata)),
    isSigned: zip.names.some((name) => name.startsWith("_xmlsignatures/")),
  };
}

/** The tables of a sheet. */
export function sheetTables(zip: ZipFile, part: string, sheet: number): BookTable[] {
  return relations(zip, part).filter(({ kind }) => kind === "table").flatMap(({ part: table }) => (table === undefined ? [] : readTable(partText(zip, table), sheet)));
}

/** A part that must be there. */
export function partBytes(zip: ZipFile, part: string): Uint8Array {
  const bytes = zip.read(part);
  if (bytes === undefined) throw unreadable(`The workbook lacks its part ${part}.`);
  return bytes;
}

function partText(zip: ZipFile, part: string): string {
  return xmlText(partBytes(zip, part), part);
}

function definedName(scan: TagScanner): BookName {
  const attributes = scan.attributes();
  const from = scan.end;
  scan.next();
  const local = attributes.get("localSheetId");
  return { name: attributes.get("name") ?? "", sheet: local === undefined ? undefined : Number(local), meaning: textBetween(scan.xml, from, scan.start).replace(/^=/, "") };
}

function sharedStrings(xml: string): string[] {
  const scan = new TagScanner(xml);
  const found: string[] = [];
  while (scan.next()) if (scan.opens("si")) found.push(scan.isEmpty() ? "" : stringTo(scan, "si"));
  return found;
}

/** A cell points to an entry of cellMetadata, its record to a kind and a future-metadata block, and the block says "fDynamic". */
function dynamicCells(xml: string): (metadata: string) => boolean {
  const scan = new TagScanner(xml);
  const kinds: string[] = [];
  const blocks: boolean[] = [];
  const cells: { kind: number; block: number }[] = [];
  let inside = "";
  while (scan.next()) {
    if (scan.opens("metadataType")) kinds.push(scan.attributes().get("name") ?? "");
    else if (scan.opens("futureMetadata")) inside = scan.attributes().get("name") ?? "";
    else if (scan.opens("cellMetadata")) inside = "cells";
    else if (scan.opens("valueMetadata")) inside = "values";
    else if (scan.opens("bk") && inside === "XLDAPR") blocks.push(false);
    else if (scan.opens("dynamicArrayProperties") && blocks.length > 0) blocks[blocks.length - 1] = isTrue(scan.attributes().get("fDynamic"));
    else if (scan.opens("rc") && inside === "cells") cells.push({ kind: Number(scan.attributes().get("t")) - 1, block: Number(scan.attributes().get("v")) });
  }
  return (metadata) => {
    const cell = cells[Number(metadata) - 1];
    return cell !== undefined && kinds[cell.kind] === "XLDAPR" && blocks[cell.block] === true;
  };
}

function readTable(xml: string, sheet: number): BookTable[] {
  const scan = new TagScanner(xml);
  const columns: string[] = [];
  let attributes = new Map<string, string>();
  while (scan.next()) {
    if (scan.opens("table")) attributes = scan.attributes();
    else if (scan.opens("tableColumn")) columns.push(scan.attributes().get("name")?.replace(/_x000[aA]_/g, "\n") ?? "");
  }
  const area = readReference(attributes.get("ref") ?? "");
  const name = attributes.get("displayName") ?? attributes.get("name");
  if (area === undefined || name === undefined) return [];
  return [{ name, sheet, area, headerRows: Number(attributes.get("headerRowCount") ?? 1), totalsRows: Number(attributes.get("totalsRowCount") ?? 0), columns }];
}

function isTrue(value: string | undefined): boolean {
  return value === "1" || value === "true";
}
