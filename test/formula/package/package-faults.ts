import JSZip from "jszip";
import { parsedXml } from "../../guards/parsed-page.js";
import { ORDER } from "./schema-order.js";

const DOCUMENT = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";
const SHEET = "application/vnd.openxmlformats-officedocument.spreadsheetml";
/** What a part of each kind of relation must say that it is. */
const CONTENT: Readonly<Record<string, string>> = {
  officeDocument: `${SHEET}.sheet.main+xml`, worksheet: `${SHEET}.worksheet+xml`, styles: `${SHEET}.styles+xml`, sheetMetadata: `${SHEET}.sheetMetadata+xml`,
  drawing: "application/vnd.openxmlformats-officedocument.drawing+xml", chart: "application/vnd.openxmlformats-officedocument.drawingml.chart+xml",
  "core-properties": "application/vnd.openxmlformats-package.core-properties+xml", "extended-properties": "application/vnd.openxmlformats-officedocument.extended-properties+xml", "custom-properties": "application/vnd.openxmlformats-officedocument.custom-properties+xml",
};

/**
 * Everything in an xlsx file for which Excel would offer to repair it: parts that are no XML, elements out of order or place,
 * relations and kinds of content that do not close, numbers of looks, metadata and lists that point nowhere, rules and names
 * beyond the format's limits.
 */
export async function packageFaults(bytes: Uint8Array): Promise<string[]> {
  const zip = await JSZip.loadAsync(bytes, { checkCRC32: true });
  const texts = new Map<string, string>();
  for (const [name, { dir }] of Object.entries(zip.files)) if (!dir) texts.set(name, await zip.file(name)!.async("string"));
  const faults: string[] = [];
  const roots = new Map<string, Element>();
  for (const [name, xml] of texts) {
    const root = parsed(xml);
    if (root === undefined) faults.push(`${name}: no well-formed XML`);
    else roots.set(name, root);
  }
  for (const [name, root] of roots) faults.push(...orderFaults(root).map((fault) => `${name}: ${fault}`), ...countFaults(root).map((fault) => `${name}: ${fault}`));
  faults.push(...relationFaults(roots), ...typeFaults(roots));
  const styles = roots.get("xl/styles.xml");
  const looks = styles === undefined ? 0 : one(styles, "cellXfs")?.children.length ?? 0;
  if (styles !== undefined) faults.push(...styleFaults(styles));
  const metadata = roots.get("xl/metadata.xml");
  const marks = metadata === undefined ? 0 : one(metadata, "cellMetadata")?.children.length ?? 0;
  for (const [name, root] of roots) if (root.localName === "worksheet") faults.push(...sheetFaults(root, looks, marks).map((fault) => `${name}: ${fault}`));
  const workbook = roots.get("xl/workbook.xml");
  if (workbook !== undefined) faults.push(...workbookFaults(workbook));
  return faults;
}

function parsed(xml: string): Element | undefined {
  try {
    const document = parsedXml(xml);
    return document.querySelector("parsererror") === null ? document.documentElement : undefined;
  } catch {
    return undefined;
  }
}

/** Elements that stand where the schema does not let them. */
function orderFaults(element: Element): string[] {
  const faults: string[] = [];
  const children = [...element.children];
  const list = ORDER[element.nodeName] ?? [];
  const names = list.map((word) => word.replace(/[*!]+$/, ""));
  let last = 0;
  for (const [k, child] of children.entries()) {
    const at = names.indexOf(child.nodeName);
    if (at < 0) faults.push(`${element.nodeName} holds ${child.nodeName}, which has no place there`);
    else if (at < last) faults.push(`${child.nodeName} stands behind ${names[last]} in ${element.nodeName}`);
    else if (at === last && k > 0 && children[k - 1]!.nodeName === child.nodeName && !list[at]!.includes("*")) faults.push(`${element.nodeName} holds ${child.nodeName} twice`);
    last = Math.max(last, at);
  }
  list.forEach((word, k) => {
    if (word.includes("!") && !children.some((child) => child.nodeName === names[k])) faults.push(`${element.nodeName} lacks ${names[k]!}`);
  });
  return [...faults, ...children.flatMap(orderFaults)];
}

function countFaults(root: Element): string[] {
  return [root, ...root.querySelectorAll("*")].flatMap((element) => {
    const count = element.getAttribute("count");
    return count === null || Number(count) === element.children.length ? [] : [`${element.nodeName} counts ${count} and holds ${element.children.length}`];
  });
}

function relationFaults(roots: ReadonlyMap<string, Element>): string[] {
  const faults: string[] = [];
  const known = new Set<string>();
  for (const [name, root] of roots) {
    if (!name.endsWith(".rels")) continue;
    const owner = name.replace("_rels/", "").replace(/\.rels$/, "");
    const folder = owner.slice(0, owner.lastIndexOf("/") + 1);
    const ids = new Set<string>();
    for (const relation of root.children) {
      const [id, type, target] = ["Id", "Type", "Target"].map((key) => relation.getAttribute(key) ?? "") as [string, string, string];
      if (ids.has(id)) faults.push(`${name}: ${id} comes twice`);
      ids.add(id);
      const part = target.startsWith("/") ? target.slice(1) : folder + target;
      known.add(part);
      if (!roots.has(part)) faults.push(`${name}: ${id} points to ${part}, which is not there`);
      const wanted = CONTENT[type.split("/").at(-1)!];
      const said = contentOf(roots, part);
      if (wanted === undefined) faults.push(`${name}: ${id} is of an unknown kind`);
      else if (said !== wanted) faults.push(`${part} says that it is ${said ?? "nothing"}`);
    }
    const source = roots.get(owner);
    for (const element of source === undefined ? [] : [source, ...source.querySelectorAll("*")]) {
      const used = element.getAttributeNS(DOCUMENT, "id");
      if (used !== null && !ids.has(used)) faults.push(`${owner}: ${element.nodeName} names the relation ${used}, which is not there`);
    }
  }
  for (const [name, root] of roots) {
    if (name !== "[Content_Types].xml" && !name.endsWith(".rels") && !known.has(name)) faults.push(`${name}: nothing leads to it`);
    const usesRelations = [root, ...root.querySelectorAll("*")].some((element) => element.getAttributeNS(DOCUMENT, "id") !== null);
    if (usesRelations && !roots.has(name.replace(/([^/]+)$/, "_rels/$1.rels"))) faults.push(`${name}: its relations are not there`);
  }
  return faults;
}

function contentOf(roots: ReadonlyMap<string, Element>, part: string): string | undefined {
  const types = roots.get("[Content_Types].xml");
  return [...(types?.children ?? [])].find((entry) => entry.getAttribute("PartName") === `/${part}`)?.getAttribute("ContentType") ?? undefined;
}

function typeFaults(roots: ReadonlyMap<string, Element>): string[] {
  const entries = [...(roots.get("[Content_Types].xml")?.children ?? [])];
  const parts = entries.map((entry) => entry.getAttribute("PartName")).filter((name) => name !== null);
  return [...parts.filter((name) => !roots.has(name.slice(1))).map((name) => `[Content_Types].xml: ${name} is not there`), ...parts.filter((name, k) => parts.indexOf(name) !== k).map((name) => `[Content_Types].xml: ${name} comes twice`)];
}

function styleFaults(styles: Element): string[] {
  const sizes = { fontId: "fonts", fillId: "fills", borderId: "borders" } as const;
  const formats = new Set([...(one(styles, "numFmts")?.children ?? [])].map((format) => format.getAttribute("numFmtId")));
  return [...styles.querySelectorAll("cellXfs > xf, cellStyleXfs > xf")].flatMap((xf) => {
    const faults = Object.entries(sizes).filter(([key, list]) => Number(xf.getAttribute(key)) >= (one(styles, list)?.children.length ?? 0)).map(([key]) => `xl/styles.xml: a look has the ${key} ${xf.getAttribute(key)}, which is not there`);
    const format = xf.getAttribute("numFmtId") ?? "0";
    return Number(format) >= 164 && !formats.has(format) ? [...faults, `xl/styles.xml: a look has the numFmtId ${format}, which is not there`] : faults;
  });
}

function sheetFaults(sheet: Element, looks: number, marks: number): string[] {
  const faults: string[] = [];
  let row = 0;
  for (const line of sheet.querySelectorAll("sheetData > row")) {
    const number = Number(line.getAttribute("r"));
    if (!(number > row)) faults.push(`row ${number} stands behind row ${row}`);
    row = number;
    let column = 0;
    for (const cell of line.children) {
      const [, letters = "", digits = ""] = /^([A-Z]+)(\d+)$/.exec(cell.getAttribute("r") ?? "") ?? [];
      const at = [...letters].reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0);
      if (Number(digits) !== row || !(at > column)) faults.push(`the cell ${cell.getAttribute("r")} stands out of order`);
      column = at;
      faults.push(...cellFaults(cell, looks, marks));
    }
  }
  for (const rule of sheet.querySelectorAll("dataValidation")) faults.push(...ruleFaults(rule));
  return faults;
}

function cellFaults(cell: Element, looks: number, marks: number): string[] {
  const faults: string[] = [];
  const place = cell.getAttribute("r");
  const look = cell.getAttribute("s");
  if (look !== null && !(Number(look) < looks)) faults.push(`${place} has the look ${look}, which is not there`);
  const mark = cell.getAttribute("cm");
  if (mark !== null && !(Number(mark) >= 1 && Number(mark) <= marks)) faults.push(`${place} has the metadata ${mark}, which is not there`);
  const formula = one(cell, "f");
  const isArray = formula?.getAttribute("t") === "array";
  if (isArray && !(formula!.getAttribute("ref") ?? "").match(new RegExp(`^${place}(:|$)`))) faults.push(`${place} has an array formula that begins elsewhere`);
  if (mark !== null && !isArray) faults.push(`${place} says that it spills and holds no array formula`);
  if (/(^|[^A-Z_.])PROBE(DEV)?\./i.test(formula?.textContent?.replace(/"[^"]*"/g, "") ?? "")) faults.push(`${place} calls a function of ours by the name that a person writes`);
  const type = cell.getAttribute("t") ?? "n";
  const value = one(cell, "v")?.textContent;
  if (type === "n" && value !== undefined && value !== null && (value === "" || !Number.isFinite(Number(value)))) faults.push(`${place} holds ${value} for a number`);
  if (type === "inlineStr" ? formula !== undefined || one(cell, "is") === undefined : one(cell, "is") !== undefined) faults.push(`${place} holds a text in the wrong form`);
  return faults;
}

/** @source Excel specifications and limits; [MS-OI29500], dataValidation */
function ruleFaults(rule: Element): string[] {
  const place = rule.getAttribute("sqref") ?? "";
  const faults: string[] = [];
  if ((rule.getAttribute("error") ?? "").length > 255) faults.push(`the refusal at ${place} is longer than 255 signs`);
  if ((rule.getAttribute("errorTitle") ?? "").length > 32) faults.push(`the title of the refusal at ${place} is longer than 32 signs`);
  const formula = one(rule, "formula1")?.textContent ?? "";
  const type = rule.getAttribute("type");
  if (type === "list" && (formula.length > 257 || !/^"[^"]*"$/.test(formula))) faults.push(`the list at ${place} is longer than 255 signs, or holds a quotation mark`);
  if (type !== "list" && formula.length > 8192) faults.push(`the rule at ${place} is longer than a formula may be`);
  return faults;
}

function workbookFaults(workbook: Element): string[] {
  const sheets = [...workbook.querySelectorAll("sheets > sheet")];
  const names = sheets.map((sheet) => sheet.getAttribute("name") ?? "");
  const faults = names.filter((name) => name === "" || name.length > 31 || /[\\/?*[\]:]/.test(name)).map((name) => `the sheet ${name} has a name that is not allowed`);
  if (new Set(names.map((name) => name.toLowerCase())).size !== names.length) faults.push("two sheets have one name");
  if (new Set(sheets.map((sheet) => sheet.getAttribute("sheetId"))).size !== sheets.length) faults.push("two sheets have one number");
  const defined = [...workbook.querySelectorAll("definedName")].map((name) => `${name.getAttribute("name")?.toLowerCase()} ${name.getAttribute("localSheetId") ?? ""}`);
  if (new Set(defined).size !== defined.length) faults.push("a name is defined twice");
  for (const name of workbook.querySelectorAll("definedName")) {
    const [, sheet] = /^'((?:[^']|'')+)'!\$/.exec(name.textContent ?? "") ?? [];
    if (sheet === undefined || !names.includes(sheet.replaceAll("''", "'"))) faults.push(`the name ${name.getAttribute("name")} stands for ${name.textContent}, which is no place in the workbook`);
  }
  return faults;
}

function one(parent: Element, name: string): Element | undefined {
  return [...parent.children].find((child) => child.localName === name);
}
