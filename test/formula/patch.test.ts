import ExcelJS from "exceljs";
import { describe, expect, it } from "vitest";
import { Calculation } from "../../src/formula/calculation.js";
import { ErrorValue } from "../../src/formula/cell-value.js";
import { patchedSheet, type NewValue } from "../../src/formula/xlsx/patch-sheet.js";
import { readXlsx } from "../../src/formula/xlsx/read-book.js";
import { sheetCells } from "../../src/formula/xlsx/sheet-cells.js";
import { withValues } from "../../src/formula/xlsx/write-values.js";
import { ZipFile } from "../../src/formula/xlsx/zip.js";
import { packed, SPILLS, workbookParts, type Extras } from "./packed.js";

function patched(rows: string, values: readonly NewValue[]): string {
  const head = '<worksheet><dimension ref="A1:B2"/><sheetData>';
  const tail = "</sheetData><pageMargins left=\"0.7\"/></worksheet>";
  const xml = head + rows + tail;
  const made = patchedSheet(xml, sheetCells(xml, "S", () => false), values);
  expect(made.endsWith(tail)).toBe(true);
  return made;
}

const inner = (xml: string): string => xml.slice(xml.indexOf("<sheetData>") + 11, xml.indexOf("</sheetData>"));

describe("a value in a sheet", () => {
  it.each([
    ["a number", 1e-7, '<c r="A1" s="4"><f>X</f><v>1e-7</v></c>'],
    ["a text", "a<b & \"c\"", '<c r="A1" s="4" t="str"><f>X</f><v>a&lt;b &amp; &quot;c&quot;</v></c>'],
    ["a text with space around it", " a ", '<c r="A1" s="4" t="str"><f>X</f><v xml:space="preserve"> a </v></c>'],
    ["a text with signs that XML cannot hold", "a\u0001_x000D_\r", '<c r="A1" s="4" t="str"><f>X</f><v>a_x0001__x005F_x000D__x000D_</v></c>'],
    ["a truth value", true, '<c r="A1" s="4" t="b"><f>X</f><v>1</v></c>'],
    ["an error value", new ErrorValue("#N/A"), '<c r="A1" s="4" t="e"><f>X</f><v>#N/A</v></c>'],
    ["an error value that the format lacks", new ErrorValue("#SPILL!"), '<c r="A1" s="4" t="e"><f>X</f><v>#VALUE!</v></c>'],
    ["nothing", null, '<c r="A1" s="4"><f>X</f></c>'],
  ])("replaces %s and keeps style and formula", (_, value, cell) => {
    for (const before of ['<c r="A1" s="4" t="e" vm="1"><f>X</f><v>#NAME?</v></c>', '<c r="A1" s="4"><f>X</f></c>', '<c  r="A1" vm=\'2\' s="4" t="str" ><f>X</f><v/></c>']) {
      expect(inner(patched(`<row r="1">${before}</row>`, [{ row: 0, column: 0, value }])).replace("<c  r", "<c r")).toBe(`<row r="1">${cell}</row>`);
    }
  });

  it("keeps every other sign, what other programs add to a cell included", () => {
    const rows = '<row r="1" spans="1:2" ht="12.5"><c r="A1" s="1"/><c r="B1" t="s" ><v>3</v><extLst><ext uri="{1}"><y v="&gt;"/></ext></extLst></c></row><!-- end -->';
    expect(inner(patched(rows, [{ row: 0, column: 1, value: 9 }]))).toBe(rows.replace(' t="s" ><v>3</v>', "><v>9</v>"));
    expect(inner(patched(rows, []))).toBe(rows);
  });

  it("goes into cells, rows and places that were not there, in order", () => {
    const rows = '<row r="2" spans="2:2"><c r="B2"><v>1</v></c></row><row r="4"/>';
    const values = [[1, 3], [1, 0], [2, 1], [2, 0], [0, 0], [3, 2], [5, 0]].map(([row, column]) => ({ row: row!, column: column!, value: 10 * row! + column! }));
    const made = patched(rows, values);
    expect(inner(made)).toBe('<row r="1"><c r="A1"><v>0</v></c></row><row r="2" spans="1:4"><c r="A2"><v>10</v></c><c r="B2"><v>1</v></c><c r="D2"><v>13</v></c></row><row r="3"><c r="A3"><v>20</v></c><c r="B3"><v>21</v></c></row><row r="4"><c r="C4"><v>32</v></c></row><row r="6"><c r="A6"><v>50</v></c></row>');
    expect(made).toContain('<dimension ref="A1:D6"/>');
  });

  it("keeps the prefix of the sheet's tags", () => {
    const xml = '<x:worksheet><x:sheetData><x:row r="1"><x:c r="A1"><x:f>1</x:f></x:c></x:row></x:sheetData></x:worksheet>';
    expect(patchedSheet(xml, sheetCells(xml, "S", () => false), [{ row: 0, column: 0, value: 1 }, { row: 0, column: 1, value: 2 }])).toBe('<x:worksheet><x:sheetData><x:row r="1"><x:c r="A1"><x:f>1</x:f><x:v>1</x:v></x:c><x:c r="B1"><x:v>2</x:v></x:c></x:row></x:sheetData></x:worksheet>');
  });

  it("is refused where a new cell would shift cells that do not say their place", () => {
    expect(() => patched("<row><c><v>1</v></c></row>", [{ row: 0, column: 5, value: 1 }])).toThrow("does not say where its cells stand");
    expect(inner(patched("<row><c><v>1</v></c></row>", [{ row: 0, column: 0, value: 2 }]))).toBe("<row><c><v>2</v></c></row>");
  });
});

/** Calculates a workbook with the ordinary functions and writes it. */
function rewritten(sheets: Readonly<Record<string, string>>, extras: Extras = {}): { before: Buffer; after: Buffer; changed: number[] } {
  const before = packed(workbookParts(sheets, extras));
  return { before, ...again(before) };
}

function again(before: Buffer): { after: Buffer; changed: number[] } {
  const source = readXlsx(before);
  const calculation = new Calculation(source.book, () => []);
  const calculated = source.book.sheets.map(({ cells }, sheet) => cells.filter(({ formula }) => formula !== undefined).map((cell) => ({ cell, outcome: calculation.cell({ sheet, row: cell.row, column: cell.column })! })));
  const { bytes, changed } = withValues(source, calculated);
  return { after: Buffer.from(bytes), changed };
}

const sheetOf = (file: Buffer): string => Buffer.from(new ZipFile(file).read("xl/worksheets/sheet1.xml")!).toString();

describe("tables that spill in a stored workbook", () => {
  const spilling = (formula: string, stored: string): string => `<row r="1"><c r="A1" cm="1"><f t="array" ref="A1:${stored}">${formula}</f><v>1</v></c><c r="B1"><v>3</v></c></row><row r="2"><c r="A2" s="7"><v>2</v></c></row><row r="3"><c r="A3" s="7" t="str"><v>old</v></c></row>`;

  it("grow into new cells", () => {
    const { after, changed } = rewritten({ S: spilling("_xlfn.SEQUENCE(5)", "A2").replace('<row r="3"><c r="A3" s="7" t="str"><v>old</v></c></row>', "") }, { metadata: SPILLS });
    expect(changed).toEqual([1]);
    expect(sheetOf(after)).toContain('<f t="array" ref="A1:A5">_xlfn.SEQUENCE(5)</f><v>1</v>');
    expect(sheetOf(after)).toContain('<row r="5"><c r="A5"><v>5</v></c></row></sheetData>');
    expect(sheetOf(after)).toContain('<dimension ref="A1:A5"/>');
  });

  it("shrink and leave the cells blank, their style kept", () => {
    const { after } = rewritten({ S: spilling("_xlfn.SEQUENCE(2)", "A3") }, { metadata: SPILLS });
    expect(sheetOf(after)).toContain('ref="A1:A2"');
    expect(sheetOf(after)).toContain('<c r="A3" s="7"/>');
  });

  it("stay inside a fixed rectangle, and become an error where something is in the way", () => {
    const fixed = rewritten({ S: spilling("_xlfn.SEQUENCE(5)", "A2") });
    expect(sheetOf(fixed.after)).toBe(sheetOf(fixed.before));
    const blocked = rewritten({ S: spilling("_xlfn.SEQUENCE(5)", "A2") }, { metadata: SPILLS });
    expect(sheetOf(blocked.after)).toContain('<c r="A1" cm="1" t="e"><f t="array" ref="A1">_xlfn.SEQUENCE(5)</f><v>#VALUE!</v></c>');
    expect(sheetOf(blocked.after)).toContain('<c r="A2" s="7"/>');
    expect(sheetOf(blocked.after)).toContain('<c r="A3" s="7" t="str"><v>old</v></c>');
  });

  it("are kept whole where the formula cannot be calculated", () => {
    const { before, after } = rewritten({ S: `${spilling("OTHERADDIN(5)", "A3")}<row r="4"><c r="A4"><f>SUM(A1:A2)</f><v>3</v></c></row>` }, { metadata: SPILLS });
    expect(sheetOf(after)).toBe(sheetOf(before));
  });
});

describe("a rewritten workbook", () => {
  it("keeps a value that differs in the last digits only, and a circle as it is stored", () => {
    const { before, after, changed } = rewritten({ S: '<row r="1"><c r="A1"><f>1/3</f><v>0.33333333333</v></c><c r="B1"><f>C1+1</f><v>5</v></c><c r="C1"><f>B1+1</f><v>6</v></c></row>' });
    expect(after.equals(before)).toBe(true);
    expect(changed).toEqual([0]);
  });

  it("is the same when it is rewritten once more", () => {
    const { after } = rewritten({ S: '<row r="1"><c r="A1"><f>2*3</f></c><c r="B1"><f>A1&amp;"x"</f></c><c r="C1"><f>1/0</f></c></row>' });
    expect(again(after).after.equals(after)).toBe(true);
    expect(again(after).changed).toEqual([0]);
  });

  it("keeps the encoding of its sheets", () => {
    const parts: Record<string, string | Buffer> = workbookParts({ S: '<row r="1"><c r="A1"><f>2*3</f></c><c r="B1" t="str"><v>é</v></c></row>' });
    const text = String(parts["xl/worksheets/sheet1.xml"]).replace("UTF-8", "UTF-16");
    for (const order of ["little", "big"]) {
      const bytes = Buffer.from(`\ufeff${text}`, "utf16le");
      const { after } = again(packed({ ...parts, "xl/worksheets/sheet1.xml": order === "big" ? bytes.swap16() : bytes }));
      const written = new ZipFile(after).read("xl/worksheets/sheet1.xml")!;
      expect(new TextDecoder(order === "big" ? "utf-16be" : "utf-16le").decode(written)).toContain('<c r="A1"><f>2*3</f><v>6</v></c><c r="B1" t="str"><v>é</v></c>');
    }
  });

  it("is read by an independent reader with its new values", async () => {
    const workbook = new ExcelJS.Workbook();
    const sheet = workbook.addWorksheet("Costs");
    sheet.addRows([["Item", "Quantity", "Rate"], ["Pile", 12, 610.5], ["Rig", 1, 18000]]);
    sheet.getCell("D2").value = { formula: "B2*C2" };
    sheet.getCell("D3").value = { formula: "B3*C3" };
    sheet.getCell("D4").value = { formula: 'IF(SUM(D2:D3)>1000,"dear","cheap")' };
    sheet.getCell("D5").value = { formula: "D2>D3" };
    sheet.getCell("D6").value = { formula: "VLOOKUP(\"none\",A2:C3,2,FALSE)" };
    sheet.getCell("D2").numFmt = "#,##0.00";
    sheet.addConditionalFormatting({ ref: "D2:D3", rules: [{ type: "cellIs", operator: "greaterThan", priority: 1, formulae: ["5000"], style: { font: { bold: true } } }] });
    const { after } = again(Buffer.from(await workbook.xlsx.writeBuffer()));
    const read = new ExcelJS.Workbook();
    await read.xlsx.load(after as never);
    const cell = (address: string): unknown => read.getWorksheet("Costs")!.getCell(address).result;
    expect(["D2", "D3", "D4", "D5", "D6"].map(cell)).toEqual([7326, 18000, "dear", false, { error: "#N/A" }]);
    expect(read.getWorksheet("Costs")!.getCell("D2").numFmt).toBe("#,##0.00");
  });
});
