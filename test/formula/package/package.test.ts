import JSZip from "jszip";
import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { templateWorkbook } from "../../../src/formula/template/template.js";
import { withSheet } from "../../../src/formula/xlsx/add-sheet.js";
import { newWorkbook } from "../../../src/formula/xlsx/new-workbook.js";
import { readXlsx } from "../../../src/formula/xlsx/read-book.js";
import type { PlannedChart, SheetPlan } from "../../../src/host/workbook.js";
import { packageFaults } from "./package-faults.js";

const CHART: PlannedChart = {
  title: 'Cost & "count"', words: "Costs by number of holes <invented>", place: "E2:J15", categories: "A2:A4", categoryTitle: "Number of holes", valueTitle: "EUR", valueLook: "money",
  series: [
    { kind: "part", name: "Foundation", values: "B2:B4" }, { kind: "part", name: "Damage", values: "C2:C4" }, { kind: "line", name: "Total", values: "D2:D4" },
    { kind: "bound", name: "Two errors up", values: "D2:D4" }, { kind: "bound", name: "Two errors down", values: "D2:D4", hiddenInLegend: true }, { kind: "mark", name: "Cheapest", values: "D2:D4" },
  ],
};

/** A sheet with everything that a plan may hold. */
export const FULL: SheetPlan = {
  name: "It's <full> & more",
  cells: [
    { row: 0, column: 0, value: "Holes", style: "head" },
    ...[0, 1, 2].flatMap((k) => [{ row: k + 1, column: 0, value: k, style: "input" as const }, { row: k + 1, column: 1, value: 100 - k, look: "money" as const }, { row: k + 1, column: 2, value: 50 / (k + 1) }, { row: k + 1, column: 3, formula: `=B${k + 2}+C${k + 2}`, style: "result" as const }]),
    { row: 5, column: 0, value: "soft", validation: { kind: "choice", choices: ["soft", "stiff"], words: "Write soft or stiff." } },
    { row: 6, column: 0, value: 4, validation: { kind: "number", least: 0.5, most: 20, words: "From 0.5 to 20." } },
    { row: 7, column: 0, value: "none", validation: { kind: "number", least: 1e-7, whole: true, orWords: ["none", 'the "usual"'], words: "A whole number, or the word none." } },
    { row: 8, column: 0, value: "", style: "section" },
    { row: 9, column: 0, value: " _x000D_ <tag> & \u0007\nnext ", style: "note" },
    { row: 10, column: 0, value: true },
  ],
  names: [{ name: "Costs", range: "A2:D4" }], columnWidths: [80, 90], frozenRows: 1, printed: "A1:J15", charts: [CHART, { ...CHART, title: "Again" }],
};

const filled = (): Uint8Array => newWorkbook([FULL, { ...FULL, name: "Second", charts: [], names: [], onePage: true }], { valuesOf: (_, row) => [[100 - row + 1 + 50 / row]], about: { title: "T <&>", program: "Probeworth", version: "1.2.3" } });

let template: Uint8Array;

beforeAll(() => {
  template = templateWorkbook(false, "PROBE");
}, 60_000);

describe("workbooks that we write", () => {
  it("hold nothing that Excel would repair: the template, the blank one, that for developers", { timeout: 60_000 }, async () => {
    expect(await packageFaults(template)).toEqual([]);
    expect(await packageFaults(templateWorkbook(true, "PROBEDEV"))).toEqual([]);
  });
  it("with everything that a plan may hold, and without formulas", async () => {
    expect(await packageFaults(filled())).toEqual([]);
    expect(await packageFaults(newWorkbook([{ ...FULL, charts: [] }]))).toEqual([]);
  });
  it("and the template with a sheet added", async () => {
    const once = withSheet(readXlsx(template), FULL).bytes;
    expect(await packageFaults(once)).toEqual([]);
    const twice = withSheet(readXlsx(once), FULL).bytes;
    expect(await packageFaults(twice)).toEqual([]);
    // one of the template's own, two of each sheet that was added
    expect(readXlsx(twice).zip.names.filter((name) => name.startsWith("xl/charts/"))).toHaveLength(5);
  });
  it("and what another program saved, with a sheet added, has no fault of ours", async () => {
    const before = await packageFaults(readFileSync(new URL("../fixtures/bid.xlsx", import.meta.url)));
    const after = await packageFaults(withSheet(readXlsx(readFileSync(new URL("../fixtures/bid.xlsx", import.meta.url))), FULL).bytes);
    expect(after.filter((fault) => !before.includes(fault) && !before.includes(fault.replace(/(\D)3\.xml/, "$12.xml")))).toEqual([]);
  });
});

// Every fault is put into a sound file by hand; the checker must name it.
describe("the checker of packages", () => {
  const planted = async (part: string, from: string | RegExp, to: string): Promise<string[]> => {
    const zip = await JSZip.loadAsync(filled());
    const xml = await zip.file(part)!.async("string");
    const changed = xml.replace(from, to);
    expect(changed, `nothing to plant in ${part}`).not.toBe(xml);
    zip.file(part, changed);
    return packageFaults(await zip.generateAsync({ type: "uint8array" }));
  };
  const SHEET = "xl/worksheets/sheet1.xml";

  it.each<[string, string, string | RegExp, string, string]>([
    ["a tag that is not closed", SHEET, "</sheetData>", "", "no well-formed XML"],
    ["a sign that XML has not", SHEET, "<t xml:space", "\u0007<t xml:space", "no well-formed XML"],
    ["a prefix without a namespace", "xl/charts/chart1.xml", ' xmlns:a="http://schemas.openxmlformats.org/drawingml/2006/main"', "", "no well-formed XML"],
    ["rules behind the margins", SHEET, /(<dataValidations.*<\/dataValidations>)(<pageMargins[^>]*>)/, "$2$1", "dataValidations stands behind pageMargins"],
    ["views behind columns", SHEET, /(<sheetViews>.*<\/sheetViews>)(<cols>.*<\/cols>)/, "$2$1", "sheetViews stands behind cols"],
    ["an element of another part", SHEET, "<sheetData>", "<fonts/><sheetData>", "worksheet holds fonts, which has no place there"],
    ["two of what there is one", SHEET, /(<pageSetup[^>]*>)/, "$1$1", "worksheet holds pageSetup twice"],
    ["the value before the formula", SHEET, /(<f>[^<]*<\/f>)(<v>[^<]*<\/v>)/, "$2$1", "f stands behind v in c"],
    ["fills before fonts", "xl/styles.xml", /(<fonts.*<\/fonts>)(<fills.*<\/fills>)/, "$2$1", "fonts stands behind fills"],
    ["a count that is wrong", "xl/styles.xml", /<fonts count="\d+"/, '<fonts count="2"', "fonts counts 2 and holds 6"],
    ["a font that is not there", "xl/styles.xml", /fontId="3"/, 'fontId="17"', "a look has the fontId 17"],
    ["a format that is not there", "xl/styles.xml", /numFmtId="164" fontId/, 'numFmtId="190" fontId', "a look has the numFmtId 190"],
    ["a look that is not there", SHEET, / s="\d+"/, ' s="99"', "has the look 99"],
    ["cells out of order", SHEET, '<c r="C2"', '<c r="A2"', "the cell A2 stands out of order"],
    ["rows out of order", SHEET, '<row r="4"', '<row r="2"', "row 2 stands behind row 3"],
    ["a cell in another row", SHEET, '<c r="D3"', '<c r="D4"', "the cell D4 stands out of order"],
    ["metadata without a part", SHEET, '<c r="D2"', '<c r="D2" cm="1"', "D2 has the metadata 1, which is not there"],
    ["an array that begins elsewhere", SHEET, "<f>B2+C2</f>", '<f t="array" ref="D3">B2+C2</f>', "D2 has an array formula that begins elsewhere"],
    ["a function as a person writes it", SHEET, "<f>B2+C2</f>", "<f>PROBE.VERSION()</f>", "D2 calls a function of ours by the name that a person writes"],
    ["no number", SHEET, "<v>100</v>", "<v>NaN</v>", "B2 holds NaN for a number"],
    ["a text without its form", SHEET, ' t="inlineStr"', "", "holds a text in the wrong form"],
    ["a refusal that is too long", SHEET, 'error="', `error="${"a".repeat(250)}`, "is longer than 255 signs"],
    ["a list that is too long", SHEET, "soft,stiff", `soft,${"a".repeat(255)}`, "the list at A6 is longer than 255 signs"],
    ["a drawing without a relation", SHEET, 'r:id="rId1"', 'r:id="rId7"', "drawing names the relation rId7"],
    ["a relation to nothing", "xl/_rels/workbook.xml.rels", "worksheets/sheet2.xml", "worksheets/sheet9.xml", "points to xl/worksheets/sheet9.xml, which is not there"],
    ["a part that nothing leads to", "xl/_rels/workbook.xml.rels", /<Relationship Id="rId2"[^>]*>/, "", "xl/worksheets/sheet2.xml: nothing leads to it"],
    ["a relation twice", "xl/_rels/workbook.xml.rels", 'Id="rId2"', 'Id="rId1"', "rId1 comes twice"],
    ["a relation of another kind", "xl/_rels/workbook.xml.rels", /relationships\/styles"/, 'relationships/theme"', "is of an unknown kind"],
    ["a part of another kind", "[Content_Types].xml", "drawingml.chart+xml", "drawing+xml", "xl/charts/chart1.xml says that it is application/vnd.openxmlformats-officedocument.drawing+xml"],
    ["a part without a kind", "[Content_Types].xml", /<Override PartName="\/xl\/styles.xml"[^>]*>/, "", "xl/styles.xml says that it is nothing"],
    ["a kind without a part", "[Content_Types].xml", "/xl/styles.xml", "/xl/style.xml", "/xl/style.xml is not there"],
    ["series before the direction", "xl/charts/chart1.xml", /(<c:barDir val="col"\/>)(.*?)(<c:gapWidth)/, "$2$1$3", "c:barDir"],
    ["a chart without axes", "xl/charts/chart1.xml", /<c:axId val="\d+"\/>(?=<c:axId val="\d+"\/><\/c:barChart>)|<c:axId val="\d+"\/>(?=<\/c:barChart>)/g, "", "c:barChart lacks c:axId"],
    ["an anchor without its end", "xl/drawings/drawing1.xml", /<xdr:clientData\/>/, "", "xdr:twoCellAnchor lacks xdr:clientData"],
    ["a name for a place that is not there", "xl/workbook.xml", "'Second'!$A$1", "'Third'!$A$1", "which is no place in the workbook"],
    ["two sheets of one name", "xl/workbook.xml", 'name="Second"', `name="It's &lt;full&gt; &amp; MORE"`, "two sheets have one name"],
    ["a sheet name that is not allowed", "xl/workbook.xml", 'name="Second"', 'name="A/B"', "the sheet A/B has a name that is not allowed"],
    ["a name twice", "xl/workbook.xml", /(<definedName name="Costs">[^<]*<\/definedName>)/, "$1$1", "a name is defined twice"],
  ])("names %s", async (_, part, from, to, fault) => {
    expect((await planted(part, from, to)).join("\n")).toContain(fault);
  });
});
