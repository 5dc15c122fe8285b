import type { SheetPlan } from "../../host/workbook.js";
import { addedStyles } from "./added-styles.js";
import { lookKey, looksOf, sheetXml } from "./sheet-xml.js";
import { escaped } from "./xml.js";
import { ZipFile } from "./zip.js";

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const MAIN = "http://schemas.openxmlformats.org/spreadsheetml/2006/main";
const OFFICE = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";
const PACKAGE = "http://schemas.openxmlformats.org/package/2006";
const TYPE = "application/vnd.openxmlformats-officedocument.spreadsheetml";
const STYLES = `${HEAD}<styleSheet xmlns="${MAIN}"><fonts count="1"><font><sz val="11"/><name val="Calibri"/><family val="2"/></font></fonts><fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills><borders count="1"><border><left/><right/><top/><bottom/><diagonal/></border></borders><cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs><cellXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/></cellXfs><cellStyles count="1"><cellStyle name="Normal" xfId="0" builtinId="0"/></cellStyles></styleSheet>`;

/**
 * A workbook of values in the xlsx format.
 *
 * @param plans  its sheets with their defined names; formulas are left out
 * @returns      the file; equal plans give equal bytes
 */
export function newWorkbook(plans: readonly SheetPlan[]): Uint8Array {
  const looks = looksOf(plans);
  const styles = addedStyles(STYLES, looks);
  const styleOf = new Map(looks.map((look, k) => [lookKey(look), styles?.numbers[k] ?? 0]));
  const relation = (id: string, kind: string, target: string): string => `<Relationship Id="${id}" Type="${OFFICE}/${kind}" Target="${target}"/>`;
  const override = (part: string, kind: string): string => `<Override PartName="/xl/${part}" ContentType="${TYPE}.${kind}+xml"/>`;
  const names = plans.flatMap(({ name: sheet, names: own }) => (own ?? []).map(({ name, range }) => `<definedName name="${escaped(name)}">'${escaped(sheet.replaceAll("'", "''"))}'!${fixed(range)}</definedName>`));
  const sheets = plans.map(({ name }, k) => `<sheet name="${escaped(name)}" sheetId="${k + 1}" r:id="rId${k + 1}"/>`).join("");
  const parts: Record<string, string> = {
    "[Content_Types].xml": `${HEAD}<Types xmlns="${PACKAGE}/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/>${override("workbook.xml", "sheet.main")}${override("styles.xml", "styles")}${plans.map((_, k) => override(`worksheets/sheet${k + 1}.xml`, "worksheet")).join("")}</Types>`,
    "_rels/.rels": `${HEAD}<Relationships xmlns="${PACKAGE}/relationships">${relation("rId1", "officeDocument", "xl/workbook.xml")}</Relationships>`,
    "xl/workbook.xml": `${HEAD}<workbook xmlns="${MAIN}" xmlns:r="${OFFICE}"><sheets>${sheets}</sheets>${names.length === 0 ? "" : `<definedNames>${names.join("")}</definedNames>`}</workbook>`,
    "xl/_rels/workbook.xml.rels": `${HEAD}<Relationships xmlns="${PACKAGE}/relationships">${plans.map((_, k) => relation(`rId${k + 1}`, "worksheet", `worksheets/sheet${k + 1}.xml`)).join("")}${relation(`rId${plans.length + 1}`, "styles", "styles.xml")}</Relationships>`,
    "xl/styles.xml": styles?.xml ?? STYLES,
    ...Object.fromEntries(plans.map((plan, k) => [`xl/worksheets/sheet${k + 1}.xml`, sheetXml(plan, MAIN, styleOf)])),
  };
  return new ZipFile(EMPTY_ZIP).withParts(new Map(Object.entries(parts).map(([name, xml]) => [name, Buffer.from(xml)])));
}

/** A zip file without parts is the end of its directory alone. */
const EMPTY_ZIP = Uint8Array.of(0x50, 0x4b, 5, 6, ...new Array<number>(18).fill(0));

function fixed(range: string): string {
  return range.replace(/([A-Z]+)([0-9]+)/g, "$$$1$$$2");
}
