import type { SheetPlan } from "../../host/workbook.js";
import type { CellValue } from "../cell-value.js";
import { CELL_METADATA } from "./cell-metadata.js";
import { chartParts, DRAWING_RELATION, relation, relationsOf, type WrittenPart } from "./chart-parts.js";
import { PROPERTY_KINDS, propertyParts, type About } from "./document-properties.js";
import { lookKey, looksOf, sheetXml, type SheetSurroundings } from "./sheet-xml.js";
import type { Namespace } from "./stored-formula.js";
import { workbookStyles } from "./workbook-styles.js";
import { escaped } from "./xml.js";
import { ZipFile } from "./zip.js";

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const MAIN = "http://schemas.openxmlformats.org/spreadsheetml/2006/main";
const OFFICE = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";
const PACKAGE = "http://schemas.openxmlformats.org/package/2006";
const TYPE = "application/vnd.openxmlformats-officedocument";

/** What a new workbook holds besides its plans. */
export interface WorkbookContents {
  /** the table that a formula gives, for readers that do not calculate; absent: formulas are left out */
  readonly valuesOf?: (sheet: number, row: number, column: number) => readonly (readonly CellValue[])[] | undefined;
  /** of the add-in that calculates our functions; absent: the installed one */
  readonly functions?: Namespace;
  readonly about?: About;
}

/**
 * A workbook in the xlsx format.
 *
 * @param plans  its sheets with their defined names, rules, charts and print set-up
 * @returns      the file; equal plans give equal bytes
 */
export function newWorkbook(plans: readonly SheetPlan[], { valuesOf, functions = "PROBE", about }: WorkbookContents = {}): Uint8Array {
  const looks = looksOf(plans);
  const styleOf = new Map(looks.map((look, k) => [lookKey(look), k + 1]));
  const footer = about === undefined ? undefined : `${about.program} ${about.version}`;
  const pictures: WrittenPart[] = [];
  const made = new Map<string, number>();
  const free = (beginning: string): string => {
    made.set(beginning, (made.get(beginning) ?? 0) + 1);
    return `${beginning}${made.get(beginning)}.xml`;
  };
  const sheets = plans.map((plan, k): WrittenPart => {
    const own: Pick<SheetSurroundings, "styleOf" | "valuesOf"> = { styleOf, ...(valuesOf === undefined ? {} : { valuesOf: (row, column) => valuesOf(k, row, column) }) };
    const name = `xl/worksheets/sheet${k + 1}.xml`;
    const drawn = chartParts(plan, plan.name, name, own, free);
    pictures.push(...drawn);
    const around: SheetSurroundings = { ...own, namespace: MAIN, functions, isShown: k === 0, ...(footer === undefined ? {} : { footer }), ...(drawn.length > 0 ? { drawing: DRAWING_RELATION } : {}) };
    return { name, xml: sheetXml(plan, around), content: `${TYPE}.spreadsheetml.worksheet+xml` };
  });
  const spills = sheets.some(({ xml }) => / cm="/.test(xml));
  const main: WrittenPart[] = [
    { name: "xl/workbook.xml", xml: workbookXml(plans, valuesOf !== undefined), content: `${TYPE}.spreadsheetml.sheet.main+xml` },
    { name: "xl/styles.xml", xml: workbookStyles(looks), content: `${TYPE}.spreadsheetml.styles+xml` },
    ...(spills ? [{ name: "xl/metadata.xml", xml: CELL_METADATA, content: `${TYPE}.spreadsheetml.sheetMetadata+xml` }] : []),
  ];
  const workbookRelations = [...sheets.map(({ name }, k) => relation(`rId${k + 1}`, "worksheet", `/${name}`)), relation(`rId${sheets.length + 1}`, "styles", "/xl/styles.xml"), ...(spills ? [relation(`rId${sheets.length + 2}`, "sheetMetadata", "/xl/metadata.xml")] : [])];
  const properties = Object.entries(about === undefined ? {} : propertyParts(about)).map(([name, xml]): WrittenPart => ({ name, xml, content: PROPERTY_KINDS[name]!.content }));
  const packageRelations = [relation("rId1", "officeDocument", "xl/workbook.xml"), ...properties.map(({ name }, k) => `<Relationship Id="rId${k + 2}" Type="${PROPERTY_KINDS[name]!.relation}" Target="${name}"/>`)];
  const parts = [...main, ...sheets, ...pictures.filter(({ content }) => content !== ""), ...properties];
  const all = [typesPart(parts), relationsOf("", packageRelations), main[0]!, relationsOf("xl/workbook.xml", workbookRelations), ...main.slice(1), ...sheets, ...pictures, ...properties];
  return new ZipFile(EMPTY_ZIP).withParts(new Map(all.map(({ name, xml }) => [name, Buffer.from(xml)])));
}

/** A zip file without parts is the end of its directory alone. */
const EMPTY_ZIP = Uint8Array.of(0x50, 0x4b, 5, 6, ...new Array<number>(18).fill(0));

function typesPart(parts: readonly WrittenPart[]): WrittenPart {
  const overrides = parts.map(({ name, content }) => `<Override PartName="/${name}" ContentType="${content}"/>`).join("");
  return { name: "[Content_Types].xml", xml: `${HEAD}<Types xmlns="${PACKAGE}/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/>${overrides}</Types>`, content: "" };
}

/** @param isCalculated  the file holds formulas, whose figures a program with the add-in makes anew as it opens */
function workbookXml(plans: readonly SheetPlan[], isCalculated: boolean): string {
  const sheets = plans.map(({ name }, k) => `<sheet name="${escaped(name)}" sheetId="${k + 1}" r:id="rId${k + 1}"/>`).join("");
  const names = plans.flatMap((plan, k) => {
    const named = (name: string, meaning: string, attributes = ""): string => `<definedName name="${escaped(name)}"${attributes}>${escaped(meaning)}</definedName>`;
    const here = quoted(plan.name);
    const { frozenRows = 0, printed } = plan;
    return [
      ...(printed === undefined ? [] : [named("_xlnm.Print_Area", `${here}!${fixed(printed)}`, ` localSheetId="${k}"`)]),
      ...(frozenRows === 0 || plan.onePage === true ? [] : [named("_xlnm.Print_Titles", `${here}!$1:$${frozenRows}`, ` localSheetId="${k}"`)]),
      ...(plan.names ?? []).map(({ name, range }) => named(name, `${here}!${fixed(range)}`)),
    ];
  });
  const calculation = isCalculated ? '<calcPr calcId="191029" fullCalcOnLoad="1"/>' : "";
  return `${HEAD}<workbook xmlns="${MAIN}" xmlns:r="${OFFICE}"><bookViews><workbookView activeTab="0"/></bookViews><sheets>${sheets}</sheets>${names.length === 0 ? "" : `<definedNames>${names.join("")}</definedNames>`}${calculation}</workbook>`;
}

function quoted(sheet: string): string {
  return `'${sheet.replaceAll("'", "''")}'`;
}

function fixed(range: string): string {
  return range.replace(/([A-Z]+)([0-9]+)/g, "$$$1$$$2");
}
