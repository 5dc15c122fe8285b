import ExcelJS from "exceljs";
import { describe, expect, it } from "vitest";
import { ErrorValue } from "../../src/formula/cell-value.js";
import { readXlsx } from "../../src/formula/xlsx/read-book.js";
import { calculationOf, outcomeAt, plain } from "./cells.js";
import { packed, SPILLS, workbookParts, type Extras } from "./packed.js";

function read(sheets: Readonly<Record<string, string>>, extras: Extras = {}): ReturnType<typeof readXlsx>["book"] {
  return readXlsx(packed(workbookParts(sheets, extras))).book;
}

/** Values by address, error values by their names. */
function valuesOf(book: ReturnType<typeof read>, sheet = 0): Record<string, unknown> {
  return Object.fromEntries(book.sheets[sheet]!.cells.map(({ row, column, value }) => [`${String.fromCharCode(65 + column)}${row + 1}`, value instanceof ErrorValue ? value.code : value]));
}

// Source of the forms: ECMA-376 part 1, sections 18.3.1.4 (c), 18.3.1.40 (f), 18.4 (shared strings), 18.18.11 (cell types), 22.9.2.19 (_xHHHH_).
describe("the cells of a workbook", () => {
  it("are read in every kind", () => {
    const strings = "<si><t>plain</t></si><si><r><t>rich </t></r><r><rPr><b/></rPr><t xml:space=\"preserve\">text </t></r><rPh sb=\"0\" eb=\"1\"><t>help</t></rPh></si><si/>";
    const cells = '<row r="1"><c r="A1"><v>1.5</v></c><c r="B1" t="s"><v>0</v></c><c r="C1" t="s"><v>1</v></c><c r="D1" t="inlineStr"><is><t>in &amp; line</t></is></c><c r="E1" t="str"><f>"x"</f><v>a_x000D_b&#233;&#x20AC;</v></c><c r="F1" t="b"><v>1</v></c><c r="G1" t="e"><v>#N/A</v></c><c r="H1" t="d"><v>2026-12-01</v></c><c r="I1" s="3"/><c r="J1" t="s"><v>2</v></c><c r="K1" t="str"><v><![CDATA[<c & d>]]></v></c></row>';
    // 1 December 2026 is day 46357 counted from 1900, as DATE(2026,12,1) of the spreadsheet program gives in ordinary.xlsx
    expect(valuesOf(read({ S: cells }, { strings }))).toEqual({ A1: 1.5, B1: "plain", C1: "rich text ", D1: "in & line", E1: "a\rbé€", F1: true, G1: "#N/A", H1: 46357, J1: "", K1: "<c & d>" });
  });

  it("are found where rows and cells do not say their place, and where every tag has a prefix", () => {
    const sheet = '<?xml version="1.0"?><!-- a > b --><x:worksheet xmlns:x="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><x:sheetData><x:row><x:c><x:v>1</x:v></x:c><x:c t="str"><x:v>b</x:v></x:c></x:row><x:row r="5"><x:c r="C5"><x:v>3</x:v></x:c><x:c><x:v>4</x:v></x:c></x:row><x:row><x:c><x:v>5</x:v></x:c></x:row></x:sheetData></x:worksheet>';
    expect(valuesOf(read({ S: sheet }))).toEqual({ A1: 1, B1: "b", C5: 3, D5: 4, A6: 5 });
  });

  it("share formulas as an independent reader says", async () => {
    const workbook = new ExcelJS.Workbook();
    const sheet = workbook.addWorksheet("S");
    sheet.fillFormula("B2:D6", 'A1+$A1*A$1-$A$1&"A1"+SUM(A1:B$2)', () => 0);
    const bytes = Buffer.from(await workbook.xlsx.writeBuffer());
    const again = new ExcelJS.Workbook();
    await again.xlsx.load(bytes as never);
    const { book } = readXlsx(bytes);
    const ours = Object.fromEntries(book.sheets[0]!.cells.map(({ row, column, formula }) => [`${row},${column}`, formula]));
    expect(Object.keys(ours)).toHaveLength(15);
    again.getWorksheet("S")!.eachRow((row) => row.eachCell((cell) => {
      // that reader also moves what stands within quotation marks, which is text
      expect(ours[`${cell.fullAddress.row - 1},${cell.fullAddress.col - 1}`]!.replace(/"[^"]*"/, '""')).toBe(cell.formula.replace(/"[^"]*"/, '""'));
    }));
    expect(ours["5,3"]).toContain('&"A1"');
  });

  it("tell array formulas that spill from those over a fixed rectangle, and do not take their results for values", () => {
    const cells = '<row r="1"><c r="A1" cm="1"><f t="array" ref="A1:A2">_xlfn.SEQUENCE(3)</f><v>1</v></c><c r="C1"><f t="array" ref="C1:D1">{7,8,9}</f><v>7</v></c><c r="D1"><v>8</v></c></row><row r="2"><c r="A2"><v>2</v></c></row>';
    const calculation = calculationOf(read({ S: cells }, { metadata: SPILLS }));
    expect(outcomeAt(calculation, "A1").values).toEqual([[1], [2], [3]]);
    expect(outcomeAt(calculation, "C1").values).toEqual([[7, 8]]);
    const fixed = calculationOf(read({ S: cells }));
    expect(outcomeAt(fixed, "A1").values).toEqual([[1], [2]]);
  });

  it("leave the results of a data table as values", () => {
    const cells = '<row r="1"><c r="A1"><f t="dataTable" ref="A1:A2" dt2D="0" r1="B1">A1+1</f><v>4</v></c></row>';
    expect(read({ S: cells }).sheets[0]!.cells).toEqual([{ row: 0, column: 0, value: 4 }]);
  });

  it("calculate with the functions of younger versions, and strip what programs add to names", () => {
    const formulas: Record<number, string> = { 1: '_xlfn.CONCAT("a","b")', 2: "_xlfn._xlws.SORT({3;1;2})", 33: "_xlfn.LET(_xlpm.x,3,_xlpm.x*2)", 34: "SUM(_xlfn.ANCHORARRAY(A2))", 35: "_xlfn.XLOOKUP(2,{1,2},{5,6})", 36: "COM.MICROSOFT.NOTHING(1)" };
    const rows = Object.entries(formulas).map(([row, formula]) => {
      const spills = row === "2" ? { cell: ' cm="1"', formula: ' t="array" ref="A2"' } : { cell: "", formula: "" };
      return `<row r="${row}"><c r="A${row}" t="str"${spills.cell}><f${spills.formula}>${formula.replaceAll('"', "&quot;")}</f><v>old</v></c></row>`;
    });
    const calculation = calculationOf(read({ S: rows.join("") }, { metadata: SPILLS }));
    expect(plain(["A1", "A2", "A33", "A34", "A35"].map((address) => outcomeAt(calculation, address).values.flat()))).toEqual([["ab"], [1, 2, 3], [6], [6], [6]]);
    expect(outcomeAt(calculation, "A36")).toMatchObject({ isKept: true, values: [["old"]] });
  });
});

describe("a workbook", () => {
  it("has names of its own and of its sheets, also where a chart sheet stands between", () => {
    const parts = workbookParts({ One: '<row r="1"><c r="A1"><f>Rate*2</f></c></row>', Chart: "", Two: '<row r="1"><c r="A1"><f>Rate*2</f></c><c r="B1"><v>50</v></c></row>' }, {
      names: '<definedName name="Rate">10</definedName><definedName name="Rate" localSheetId="2">Two!$B$1</definedName>',
      properties: '<workbookPr date1904="1"/><bookViews><workbookView activeTab="1"/></bookViews><calcPr iterate="1"/>',
    });
    parts["xl/_rels/workbook.xml.rels"] = parts["xl/_rels/workbook.xml.rels"]!.replace(/worksheet" Target="worksheets\/sheet2.xml/, 'chartsheet" Target="chartsheets/sheet1.xml');
    const { book } = readXlsx(packed(parts));
    expect(book).toMatchObject({ dates1904: true, iterates: true, activeSheet: 0 });
    const calculation = calculationOf(book);
    expect(outcomeAt(calculation, "A1", 0).values).toEqual([[20]]);
    expect(outcomeAt(calculation, "A1", 2).values).toEqual([[100]]);
  });

  it("has tables", () => {
    const table = '<table xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main" id="1" name="T" displayName="Costs" ref="A1:B3" totalsRowCount="0"><tableColumns count="2"><tableColumn id="1" name="Item"/><tableColumn id="2" name="Price"/></tableColumns></table>';
    const cells = '<row r="1"><c r="A1" t="inlineStr"><is><t>Item</t></is></c></row><row r="2"><c r="B2"><v>4</v></c></row><row r="3"><c r="B3"><v>5</v></c><c r="D3"><f>SUM(Costs[Price])*Costs[[#This Row],[Price]]</f></c></row>';
    expect(outcomeAt(calculationOf(read({ S: cells }, { tables: [table] })), "D3").values).toEqual([[45]]);
  });

  it("knows which rows a filter has taken away", () => {
    const sheet = `<?xml version="1.0"?><worksheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><sheetData><row r="1"/><row r="2" hidden="1"/><row r="3"/><row r="9" hidden="true"/></sheetData><autoFilter ref="A1:A4"/></worksheet>`;
    const [first] = read({ S: sheet }).sheets;
    expect([...first!.hiddenRows!]).toEqual([1, 8]);
    expect([...first!.filteredRows!]).toEqual([1]);
  });

  it("may name its parts from the top of the package or from below it, never outside", () => {
    const parts = workbookParts({ S: '<row r="1"><c r="A1"><v>1</v></c></row>' });
    for (const target of ["/xl/worksheets/sheet1.xml", "../xl/worksheets/sheet1.xml", "../../../../xl/worksheets/sheet1.xml", "./worksheets/./sheet1.xml"]) {
      const moved = { ...parts, "xl/_rels/workbook.xml.rels": parts["xl/_rels/workbook.xml.rels"]!.replace("worksheets/sheet1.xml", target) };
      expect(valuesOf(readXlsx(packed(moved)).book)).toEqual({ A1: 1 });
    }
    const outside = { ...parts, "xl/_rels/workbook.xml.rels": parts["xl/_rels/workbook.xml.rels"]!.replace("worksheets/sheet1.xml", "../../../etc/passwd") };
    expect(() => readXlsx(packed(outside))).toThrow("The workbook lacks its part etc/passwd.");
  });
});

describe("a file that is no xlsx workbook, or a hostile one", () => {
  const parts = workbookParts({ S: '<row r="1"><c r="A1"><v>1</v></c></row>' });
  const ole = Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]);

  it.each([
    ["text", Buffer.from("Site;1"), "is no xlsx workbook, whatever its name says"],
    ["an empty file", Buffer.alloc(0), "is no xlsx workbook"],
    ["the old binary format", Buffer.concat([ole, Buffer.alloc(600)]), "old xls format; save it as xlsx"],
    ["a locked workbook", Buffer.concat([ole, Buffer.alloc(600), Buffer.from("EncryptedPackage", "utf16le")]), "locked with a password"],
    ["the binary xlsb format", packed({ "[Content_Types].xml": "<Types/>", "xl/workbook.bin": "" }), "binary xlsb format"],
    ["an OpenDocument spreadsheet", packed({ mimetype: "application/vnd.oasis.opendocument.spreadsheet", "content.xml": "" }), "OpenDocument"],
    ["another zip file", packed({ "letter.txt": "hello" }), "a zip file but no xlsx workbook"],
    ["a package without a workbook", packed({ "[Content_Types].xml": "<Types/>" }), "lacks its part xl/workbook.xml"],
    ["a workbook without sheets", packed({ ...parts, "xl/workbook.xml": "<workbook/>" }), "has no worksheet"],
    ["a workbook without its sheet", packed(Object.fromEntries(Object.entries(parts).filter(([name]) => !name.endsWith("sheet1.xml")))), "lacks its part xl/worksheets/sheet1.xml"],
    ["a sheet without cells", packed({ ...parts, "xl/worksheets/sheet1.xml": "<worksheet/>" }), "The sheet S of the workbook has no cells part"],
    ["a sheet that breaks off in a tag", packed({ ...parts, "xl/worksheets/sheet1.xml": '<worksheet><sheetData><row r="1"><c r="A1' }), "breaks off in the middle of a tag"],
    ["a sheet that breaks off in a cell", packed({ ...parts, "xl/worksheets/sheet1.xml": '<worksheet><sheetData><row r="1"><c r="A1"><v>1</v>' }), "breaks off within a cell"],
    ["a sheet that breaks off between rows", packed({ ...parts, "xl/worksheets/sheet1.xml": '<worksheet><sheetData><row r="1"></row>' }), "breaks off before its end"],
    ["a row beyond the sheet", packed({ ...parts, "xl/worksheets/sheet1.xml": '<worksheet><sheetData><row r="9999999"/></sheetData></worksheet>' }), "a row numbered 9999999"],
    ["a cell beyond the sheet", packed({ ...parts, "xl/worksheets/sheet1.xml": '<worksheet><sheetData><row r="1"><c r="ZZZ1"/></row></sheetData></worksheet>' }), "a cell at ZZZ1"],
    ["bytes that are no text", packed({ ...parts, "xl/worksheets/sheet1.xml": Buffer.from([0x3c, 0xff, 0xff]) }), "no text that can be read"],
    ["an array formula over the whole sheet", packed({ ...parts, "xl/worksheets/sheet1.xml": '<worksheet><sheetData><row r="1"><c r="A1"><f t="array" ref="A1:XFD1048576">1</f></c></row></sheetData></worksheet>' }), "more than the formula line reads"],
  ])("is refused in words: %s", (_, bytes, sentence) => {
    expect(() => readXlsx(bytes)).toThrow(sentence);
  });

  it("cannot grow by entities of its own", () => {
    const laughs = '<!DOCTYPE w [<!ENTITY a "ha"><!ENTITY b "&a;&a;&a;&a;&a;&a;&a;&a;"><!ENTITY c SYSTEM "file:///etc/passwd">]>';
    for (const part of ["xl/workbook.xml", "xl/worksheets/sheet1.xml", "xl/_rels/workbook.xml.rels"]) {
      expect(() => readXlsx(packed({ ...parts, [part]: parts[part]!.replace("?>", `?>${laughs}`) }))).toThrow("declares entities of its own");
    }
    // without a declaration an unknown entity is no more than its letters
    const unknown = { ...parts, "xl/worksheets/sheet1.xml": parts["xl/worksheets/sheet1.xml"]!.replace("<c r=\"A1\"><v>1</v>", '<c r="A1" t="str"><v>&lol;&c;</v>') };
    expect(valuesOf(readXlsx(packed(unknown)).book)).toEqual({ A1: "&lol;&c;" });
  });

  it("may hold strange names of parts without reaching anything outside the package", () => {
    const { book } = readXlsx(packed({ ...parts, "../../evil.xml": "x", "/etc/passwd": "y", "C:\\windows\\x": "z" }));
    expect(valuesOf(book)).toEqual({ A1: 1 });
  });
});
