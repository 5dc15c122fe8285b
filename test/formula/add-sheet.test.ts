import ExcelJS from "exceljs";
import JSZip from "jszip";
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { withSheet } from "../../src/formula/xlsx/add-sheet.js";
import { addedStyles } from "../../src/formula/xlsx/added-styles.js";
import { newWorkbook } from "../../src/formula/xlsx/new-workbook.js";
import { readXlsx } from "../../src/formula/xlsx/read-book.js";
import { ZipFile } from "../../src/formula/xlsx/zip.js";
import type { SheetPlan } from "../../src/host/workbook.js";
import { packed, workbookParts } from "./packed.js";

const BID = new URL("./fixtures/bid.xlsx", import.meta.url);

const PLAN: SheetPlan = {
  name: "Simulation",
  cells: [
    { row: 0, column: 0, value: "Cost <against> \"number\" & more", style: "title" },
    { row: 2, column: 0, value: "Count", style: "numberhead" },
    { row: 2, column: 1, value: "Total", style: "numberhead" },
    { row: 3, column: 1, value: 1234567.125, style: "result", look: "money" },
    { row: 3, column: 0, value: 4, style: "result" },
    { row: 4, column: 2, value: 0.25, style: "result", look: "percent" },
    { row: 5, column: 0, formula: "=1+1" },
    { row: 6, column: 0, value: true },
  ],
  columnWidths: [145, 75],
};

async function readBack(bytes: Uint8Array): Promise<ExcelJS.Workbook> {
  const book = new ExcelJS.Workbook();
  await book.xlsx.load(bytes as unknown as ArrayBuffer);
  return book;
}

describe("a sheet added to a workbook that a spreadsheet program saved", () => {
  const before = readFileSync(BID);
  const made = withSheet(readXlsx(before), PLAN);

  it("is read by another reader with its values, looks and widths", async () => {
    const sheet = (await readBack(made.bytes)).getWorksheet("Simulation")!;
    expect(made.sheet).toBe("Simulation");
    expect([sheet.getCell("A1").value, sheet.getCell("A4").value, sheet.getCell("B4").value, sheet.getCell("C5").value, sheet.getCell("A7").value]).toEqual(['Cost <against> "number" & more', 4, 1234567.125, 0.25, true]);
    expect([sheet.getCell("B4").numFmt, sheet.getCell("C5").numFmt, sheet.getCell("A1").font.bold, sheet.getCell("B3").alignment.horizontal, sheet.getCell("A4").font.bold ?? false]).toEqual(["#,##0", "0.0%", true, "right", false]);
    expect(sheet.getCell("A6").value).toBeNull();
    expect(sheet.getColumn(1).width).toBe(20);
    // the face of the workbook's ordinary cells
    expect(sheet.getCell("A1").font.name).toBe("DejaVu Sans");
  });

  it("changes no other part but the four that name it, and of these nothing that stood there", async () => {
    const [old, now] = await Promise.all([JSZip.loadAsync(before), JSZip.loadAsync(made.bytes)]);
    const names = Object.keys(now.files);
    expect(names.filter((name) => old.file(name) === null)).toEqual(["xl/worksheets/sheet3.xml"]);
    const changed: string[] = [];
    for (const name of Object.keys(old.files)) {
      const [was, is] = await Promise.all([old.file(name)!.async("string"), now.file(name)!.async("string")]);
      if (was === is) continue;
      changed.push(name);
      // taking out what was put in leaves what was there; counts of lists are the only figures that may change
      const plain = (xml: string): string => xml.replace(/ count="\d+"/g, "");
      let rest = plain(is);
      for (const piece of plain(was).split(/(?=<)/)) {
        const found = rest.indexOf(piece);
        expect(found, `${name}: ${piece}`).toBeGreaterThanOrEqual(0);
        rest = rest.slice(found + piece.length);
      }
    }
    expect(changed.sort()).toEqual(["[Content_Types].xml", "xl/_rels/workbook.xml.rels", "xl/styles.xml", "xl/workbook.xml"]);
  });

  it("leaves the values, formulas, names and looks of the others as another reader sees them", async () => {
    const [old, now] = await Promise.all([readBack(before), readBack(made.bytes)]);
    expect(now.worksheets.map(({ name }) => name)).toEqual([...old.worksheets.map(({ name }) => name), "Simulation"]);
    for (const sheet of old.worksheets) sheet.eachRow((row) => row.eachCell((cell) => {
      const same = now.getWorksheet(sheet.name)!.getCell(cell.address);
      expect([same.value, same.numFmt, same.font, same.fill]).toEqual([cell.value, cell.numFmt, cell.font, cell.fill]);
    }));
    expect(now.definedNames.model).toEqual(old.definedNames.model);
    const again = withSheet(readXlsx(made.bytes), PLAN);
    expect(again.sheet).toBe("Simulation (2)");
    expect((await readBack(again.bytes)).worksheets).toHaveLength(old.worksheets.length + 2);
  });
});

describe("a sheet added to other workbooks", () => {
  const sheetPart = (bytes: Uint8Array, name: string): string => Buffer.from(new ZipFile(bytes).read(name)!).toString();

  it("takes a free name, part, number and relation", () => {
    const parts = workbookParts({ simulation: "", "Simulation (2)": "" });
    parts["xl/workbook.xml"] = parts["xl/workbook.xml"]!.replace('sheetId="2"', 'sheetId="41"');
    const { bytes, sheet } = withSheet(readXlsx(packed(parts)), PLAN);
    expect(sheet).toBe("Simulation (3)");
    expect(sheetPart(bytes, "xl/workbook.xml")).toContain('<sheet name="Simulation (3)" sheetId="42" r:id="rId3"/></sheets>');
    expect(readXlsx(bytes).book.sheets[2]!.cells.find(({ row, column }) => row === 3 && column === 1)!.value).toBe(1234567.125);
  });

  it("keeps a long name within 31 signs", () => {
    const name = "A sheet whose name is very long";
    expect(withSheet(readXlsx(packed(workbookParts({ [name]: "" }))), { ...PLAN, name }).sheet).toBe("A sheet whose name is very (2)");
  });

  it("keeps prefixes and the strict form of the format", () => {
    const parts = workbookParts({ S: "" });
    parts["xl/workbook.xml"] = parts["xl/workbook.xml"]!.replace(/<(\/?)(workbook|sheets|sheet)\b/g, "<$1x:$2").replace("xmlns=", "xmlns:x=").replace("xmlns:r=", "xmlns:rel=").replace("r:id=", "rel:id=");
    parts["xl/_rels/workbook.xml.rels"] = parts["xl/_rels/workbook.xml.rels"]!.replaceAll("http://schemas.openxmlformats.org/officeDocument/2006/relationships", "http://purl.oclc.org/ooxml/officeDocument/relationships");
    const { bytes } = withSheet(readXlsx(packed(parts)), PLAN);
    expect(sheetPart(bytes, "xl/workbook.xml")).toContain('<x:sheet name="Simulation" sheetId="2" rel:id="rId2"/></x:sheets>');
    expect(sheetPart(bytes, "xl/_rels/workbook.xml.rels")).toContain('Type="http://purl.oclc.org/ooxml/officeDocument/relationships/worksheet" Target="/xl/worksheets/sheet2.xml"');
    expect(readXlsx(bytes).book.sheets.map(({ name }) => name)).toEqual(["S", "Simulation"]);
  });

  it("is refused where the structure is protected", () => {
    const book = readXlsx(packed(workbookParts({ S: "" }, { properties: '<workbookProtection lockStructure="1"/>' })));
    expect(() => withSheet(book, PLAN)).toThrow("The workbook's structure is protected, so no sheet may be added; take the protection away (Review, Protect Workbook) first.");
  });

  it("goes without looks where the styles cannot take them", () => {
    expect(addedStyles('<styleSheet xmlns="x"><cellXfs count="0"/></styleSheet>', [{ style: "title", look: "money" }])).toBeUndefined();
    const { bytes } = withSheet(readXlsx(packed(workbookParts({ S: "" }))), PLAN);
    expect(sheetPart(bytes, "xl/worksheets/sheet2.xml")).toContain('<c r="A4"><v>4</v></c><c r="B4"><v>1234567.125</v></c>');
  });

  it("adds number formats behind those that are there, with numbers of their own", () => {
    const styles = '<styleSheet><numFmts count="1"><numFmt numFmtId="170" formatCode="0"/></numFmts><fonts count="1"><font><b/><sz val="9"/></font></fonts><cellXfs count="2"><xf numFmtId="0"><alignment/></xf><xf/></cellXfs><dxfs count="1"><dxf><font/></dxf></dxfs></styleSheet>';
    const made = addedStyles(styles, [{ style: "note", look: undefined }, { style: "result", look: "ratio" }])!;
    expect(made.numbers).toEqual([2, 3]);
    expect(made.xml).toBe('<styleSheet><numFmts count="2"><numFmt numFmtId="170" formatCode="0"/><numFmt numFmtId="171" formatCode="0.00"/></numFmts><fonts count="3"><font><b/><sz val="9"/></font><font><b/><sz val="9"/></font><font><i/><sz val="9"/></font></fonts><cellXfs count="4"><xf numFmtId="0"><alignment/></xf><xf/><xf numFmtId="0" fontId="2" fillId="0" borderId="0" xfId="0" applyFont="1"/><xf numFmtId="171" fontId="0" fillId="0" borderId="0" xfId="0" applyNumberFormat="1"/></cellXfs><dxfs count="1"><dxf><font/></dxf></dxfs></styleSheet>');
  });
});

it("makes a new workbook that another reader opens, with its defined names, the same bytes each time", async () => {
  const plan = { ...PLAN, name: "It's a sheet", names: [{ name: "Costs", range: "A3:B4" }] };
  const bytes = newWorkbook([plan]);
  expect(Buffer.from(bytes).equals(Buffer.from(newWorkbook([plan])))).toBe(true);
  const book = await readBack(bytes);
  expect(book.getWorksheet("It's a sheet")!.getCell("B4").value).toBe(1234567.125);
  expect(book.definedNames.getRanges("Costs").ranges).toEqual(["'It''s a sheet'!$A$3:$B$4"]);
  const own = readXlsx(bytes).book;
  expect(own.names).toEqual([{ name: "Costs", sheet: undefined, meaning: "'It''s a sheet'!$A$3:$B$4" }]);
  expect((await JSZip.loadAsync(bytes, { checkCRC32: true })).file("xl/workbook.xml")).not.toBeNull();
});

describe("the defined names of an added sheet", () => {
  const NAMED: SheetPlan = { ...PLAN, name: "It's", names: [{ name: "SimulatedCosts", range: "A3:B4" }] };
  const workbookPart = (bytes: Uint8Array): string => Buffer.from(new ZipFile(bytes).read("xl/workbook.xml")!).toString();
  const others = (bytes: Uint8Array) => readXlsx(bytes).book.names.filter(({ name }) => !name.startsWith("SimulatedCosts"));

  it("stands beside those of a workbook that a spreadsheet program saved, which another reader sees unchanged", async () => {
    const before = readFileSync(BID);
    const first = withSheet(readXlsx(before), NAMED);
    const second = withSheet(readXlsx(first.bytes), NAMED);
    expect([first.names, second.names]).toEqual([["SimulatedCosts"], ["SimulatedCosts2"]]);
    expect(others(before).length).toBeGreaterThan(2);
    expect(others(second.bytes)).toEqual(others(before));
    const [old, now] = await Promise.all([readBack(before), readBack(second.bytes)]);
    expect(now.definedNames.getRanges("SimulatedCosts").ranges).toEqual(["'It''s'!$A$3:$B$4"]);
    expect(now.definedNames.getRanges("SimulatedCosts2").ranges).toEqual(["'It''s (2)'!$A$3:$B$4"]);
    expect(now.definedNames.model.filter(({ name }) => !name.startsWith("Simulated"))).toEqual(old.definedNames.model);
    expect(workbookPart(second.bytes).replace(/<definedName name="SimulatedCosts2?">[^<]*<\/definedName>/g, "").replace(/<sheet name="It's[^>]*>/g, "")).toBe(workbookPart(Buffer.from(before)));
  });

  it("comes behind the sheets and what belongs to them, with the workbook's own prefix, where there was no list or an empty one", () => {
    const plain = workbookParts({ S: "" });
    const within = (xml: string, more: string): string => workbookPart(withSheet(readXlsx(packed({ ...plain, "xl/workbook.xml": xml.replace("</workbook>", `${more}</workbook>`) })), NAMED).bytes);
    const name = "<definedName name=\"SimulatedCosts\">'It''s'!$A$3:$B$4</definedName>";
    expect(within(plain["xl/workbook.xml"]!, '<calcPr calcId="1"/>')).toContain(`</sheets><definedNames>${name}</definedNames><calcPr calcId="1"/>`);
    expect(within(plain["xl/workbook.xml"]!, "<functionGroups/><externalReferences><externalReference r:id=\"x\"/></externalReferences><oleSize ref=\"A1\"/>")).toContain(`</externalReferences><definedNames>${name}</definedNames><oleSize`);
    expect(within(plain["xl/workbook.xml"]!, "<definedNames/><calcPr/>")).toContain(`</sheets><definedNames>${name}</definedNames><calcPr/>`);
    const prefixed = plain["xl/workbook.xml"]!.replace(/<(\/?)(workbook|sheets|sheet)\b/g, "<$1x:$2").replace("xmlns=", "xmlns:x=");
    const { bytes } = withSheet(readXlsx(packed({ ...plain, "xl/workbook.xml": prefixed })), NAMED);
    expect(workbookPart(bytes)).toContain("</x:sheets><x:definedNames><x:definedName name=\"SimulatedCosts\">'It''s'!$A$3:$B$4</x:definedName></x:definedNames></x:workbook>");
  });

  it("takes no name that another name has in other letters, or a table", () => {
    const table = '<table xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main" id="1" name="T" displayName="SIMULATEDCOSTS" ref="A1:A2"><tableColumns count="1"><tableColumn id="1" name="a"/></tableColumns></table>';
    expect(withSheet(readXlsx(packed(workbookParts({ S: "" }, { tables: [table] }))), NAMED).names).toEqual(["SimulatedCosts2"]);
    expect(withSheet(readXlsx(packed(workbookParts({ S: "" }, { names: '<definedName name="simulatedcosts">S!$A$1</definedName><definedName name="SimulatedCosts2" localSheetId="0">S!$A$1</definedName>' }))), NAMED).names).toEqual(["SimulatedCosts3"]);
  });
});
