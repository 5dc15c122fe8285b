import { existsSync, linkSync, mkdtempSync, readFileSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import ExcelJS from "exceljs";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { formulaLine } from "../../src/formula/formula-line.js";
import { ZipFile } from "../../src/formula/xlsx/zip.js";
import { callFunction } from "../../src/functions/registry.js";
import { demonstrationWorkbook } from "../../src/host/demonstration-workbook.js";
import { packed, SPILLS, workbookParts } from "./packed.js";

const BID = fileURLToPath(new URL("fixtures/bid.xlsx", import.meta.url));
const folder = mkdtempSync(join(tmpdir(), "formula-line-"));
afterAll(() => rmSync(folder, { recursive: true }));

/** The site block of the bid, read by an independent reader. */
let site: unknown[][];
let siteCsv: string;

beforeAll(async () => {
  const workbook = new ExcelJS.Workbook();
  await workbook.xlsx.readFile(BID);
  const sheet = workbook.getWorksheet("Ground")!;
  site = Array.from({ length: 36 }, (_, row) => [1, 2, 3].map((column) => sheet.getCell(row + 5, column).value));
  siteCsv = join(folder, "site.csv");
  writeFileSync(siteCsv, site.map((row) => row.map((value) => value ?? "").join(",")).join("\n"));
});

/** Calls the formula line and checks that it went well. */
function line(...words: string[]): string {
  const { out, err, code } = formulaLine(words);
  expect({ err, code }).toEqual({ err: "", code: 0 });
  return out;
}

describe("a formula", () => {
  it("gives what its function gives, to the last digit", () => {
    for (const id of ["TOTALCOST", "INVESTIGATIONCOST", "FAILURECOST"]) expect(line(`=PROBE.${id}(Site,3)`, "--book", BID)).toBe(`${String(callFunction(id, [site, 3]))}\n`);
    expect(line("=PROBE.SETTLEMENT(1000,10,0.5,20,30)")).toBe(`${String(callFunction("SETTLEMENT", [1000, 10, 0.5, 20, 30]))}\n`);
    expect(line('=PROBE.TOTALCOST(Site,2,"Mean stiffness",2*Ground!B6)', "--book", BID)).toBe(`${String(callFunction("TOTALCOST", [site, 2, "Mean stiffness", 22]))}\n`);
  });

  it("prints a table as rows parted by tabs", () => {
    const table = callFunction("COSTTABLE", [site, 2]) as unknown[][];
    expect(line("=PROBE.COSTTABLE(Site,2)", "--book", BID)).toBe(table.map((row) => `${row.join("\t")}\n`).join(""));
    expect(line('={1,TRUE;"a",2.5}')).toBe("1\tTRUE\na\t2.5\n");
    expect(line('="two"&CHAR(10)&"lines"&CHAR(9)&"x"')).toBe("two lines x\n");
  });

  it("stands on the sheet that is named, or on the one that the workbook opens with", () => {
    // the bid gives the name Rate 200 in the workbook, and the price per metre, 165, on the sheet Bid
    expect(line("=Rate", "--book", BID)).toBe("200\n");
    expect(line("=Rate", "--book", BID, "--sheet", "bid")).toBe("165\n");
    expect(line("=A10", "--book", BID, "--sheet=Bid")).toBe("Cheapest count\n");
  });

  it("takes a whole column as a site block in less than a second", () => {
    const parts = site.map((row, k) => `<row r="${k + 1}">${row.map((value, c) => (value === null ? "" : `<c r="${"ABC"[c]!}${k + 1}"${typeof value === "string" ? ' t="str"' : ""}><v>${String(value)}</v></c>`)).join("")}</row>`).join("");
    const book = join(folder, "columns.xlsx");
    writeFileSync(book, packed(workbookParts({ Ground: `${parts}<row r="900"><c r="F900"><v>1</v></c></row>` })));
    // counted in the processor's time, because other programs may hold the machine
    const began = process.cpuUsage();
    expect(line("=PROBE.TOTALCOST(A:D,1)", "--book", book)).toBe(`${String(callFunction("TOTALCOST", [site, 1]))}\n`);
    const { user, system } = process.cpuUsage(began);
    expect((user + system) / 1000).toBeLessThan(1000);
    // a sheet that is used down to its last row makes the block longer than any block may be
    writeFileSync(book, packed(workbookParts({ Ground: `${parts}<row r="1048576"><c r="F1048576"><v>1</v></c></row>` })));
    expect(formulaLine(["=PROBE.TOTALCOST(A1:D20000,1)", "--book", book]).err).toMatch(/^#VALUE! The site block has 20000 rows/);
    expect(formulaLine(["=PROBE.TOTALCOST(A:D,1)", "--book", book]).err).toMatch(/^#NUM! The formula reads more than 2000000 cells/);
  });

  it("is evaluated beside the demonstration workbook where no book is named", () => {
    const [plan] = demonstrationWorkbook();
    const title = plan!.cells.find(({ row, column }) => row === 0 && column === 0)!.value;
    expect(line("=A1")).toBe(`${String(title)}\n`);
    expect(Number(line("=PROBE.OPTIMALCOUNT(Site,3)"))).toBeGreaterThanOrEqual(0);
    // the bid sheet adds up its own lines
    const [sum, lines] = line("=HSTACK(Bid!E15,SUM(Bid!E9:E14))").trim().split("\t").map(Number);
    expect(sum).toBe(lines);
    expect(sum).toBeGreaterThan(1000);
    // the check rows fill the cells below their formula
    expect(line("=COUNTA(Check!A3:A200)=ROWS(PROBE.CHECK(Site))")).toBe("TRUE\n");
  });
});

describe("an error value", () => {
  it.each([
    ["=PROBE.TOTALCOST(Site,-1)", "#VALUE! "],
    ["=1/0", "#DIV/0! A number is divided by zero"],
    ["=NA()", "#N/A No value is available"],
    ["=Bid!B13", "#N/A Bid!B13: "],
    ["=PROBE.TOTALCOSTS(Site,1)", "#NAME? No function named PROBE.TOTALCOSTS is known; the nearest is PROBE.TOTALCOST."],
    ["=Sita", "#NAME? The workbook has no name Sita; the nearest is Site."],
    ["=SUM(1", "#NAME? The formula cannot be read: a closing bracket is missing."],
    ["=Bit!A1", "#REF! The workbook has no sheet named Bit; the nearest is Bid."],
    ["=[2]Prices!A1", "#REF! The formula takes values from another workbook"],
  ])("gives its reason and exit code 1: %s", (formula, start) => {
    const { out, err, code } = formulaLine([formula, "--book", BID]);
    expect(err.startsWith(start)).toBe(true);
    expect(err).toMatch(/\.\n$/);
    expect({ out, code }).toEqual({ out: "", code: 1 });
  });

  it("carries the very sentence of the function", () => {
    let sentence = "";
    try {
      callFunction("TOTALCOST", [site, -1]);
    } catch (reason) {
      sentence = (reason as Error).message;
    }
    expect(sentence).not.toBe("");
    expect(formulaLine(["=PROBE.TOTALCOST(Site,-1)", "--book", BID]).err).toBe(`#VALUE! ${sentence}\n`);
    expect(formulaLine(["=2*PROBE.TOTALCOST(Site,-1)+1", "--book", BID]).err).toBe(`#VALUE! ${sentence}\n`);
  });

  it("within a table is printed with the table", () => {
    const { out, err, code } = formulaLine(["={1;2}/{1;0}"]);
    expect({ out, code }).toEqual({ out: "1\n#DIV/0!\n", code: 1 });
    expect(err).toContain("#DIV/0!");
  });
});

describe("a csv with a site block", () => {
  it("is Site, and has cells", () => {
    expect(line("=PROBE.TOTALCOST(Site,1)", "--book", siteCsv)).toBe(`${String(callFunction("TOTALCOST", [site, 1]))}\n`);
    expect(line("=A2&B2&C2", "--book", siteCsv)).toBe("Mean stiffness11MPa\n");
    expect(line("=PROBE.TOTALCOST(A1:C36,1)", "--book", siteCsv)).toBe(line("=PROBE.TOTALCOST(Site,1)", "--book", siteCsv));
  });

  it("may use semicolons and decimal commas, and says what is wrong with a number stored as text", () => {
    const semicolons = join(folder, "semicolons.csv");
    writeFileSync(semicolons, site.map((row) => row.map((value) => (typeof value === "number" ? String(value).replace(".", ",") : (value ?? ""))).join(";")).join("\r\n"));
    expect(line("=PROBE.TOTALCOST(Site,1)", "--book", semicolons)).toBe(line("=PROBE.TOTALCOST(Site,1)", "--book", siteCsv));
    const quoted = join(folder, "quoted.csv");
    writeFileSync(quoted, readFileSync(siteCsv, "utf8").replace("Mean stiffness,11", 'Mean stiffness,"11"'));
    const { err, code } = formulaLine(["=PROBE.TOTALCOST(Site,1)", "--book", quoted]);
    expect(code).toBe(1);
    expect(err).toMatch(/^#VALUE! Mean stiffness.*text/);
  });
});

describe("a workbook that is written back", () => {
  const out = join(folder, "priced.xlsx");
  let said: ReturnType<typeof formulaLine>;
  const cell = async (sheet: string, address: string): Promise<unknown> => {
    const workbook = new ExcelJS.Workbook();
    await workbook.xlsx.readFile(out);
    const found = workbook.getWorksheet(sheet)!.getCell(address);
    return found.formula === undefined ? found.value : found.result;
  };

  beforeAll(() => {
    said = formulaLine(["--book", BID, "--out", out]);
  }, 60_000);

  it("says for each sheet what was calculated, and gives the reasons of errors", () => {
    expect(said.out).toContain("Sheet\tFormulas\tCalculated\tChanged\tErrors\tKept\nGround\t2\t2\t0\t0\t0\nBid\t33\t33\t24\t1\t0\n");
    expect(said.out).toContain("Errors:\nBid!B13\t#N/A\tNo value is available");
    expect(said.out).toContain(`Written to ${out}.`);
    expect({ err: said.err, code: said.code }).toEqual({ err: "", code: 1 });
  });

  it("holds the functions' values, readable by an independent reader", async () => {
    for (let count = 0; count <= 4; count++) {
      expect(await cell("Bid", `C${count + 4}`)).toBe(callFunction("TOTALCOST", [site, count]));
      expect(await cell("Bid", `B${count + 4}`)).toBe(callFunction("INVESTIGATIONCOST", [site, count]));
    }
    const totals = [0, 1, 2, 3, 4].map((count) => callFunction("TOTALCOST", [site, count]) as number);
    const cheapest = totals.indexOf(Math.min(...totals));
    expect(await cell("Bid", "B10")).toBe(cheapest);
    expect(await cell("Bid", `E${cheapest + 4}`)).toBe("yes");
    expect(await cell("Bid", "B12")).toBe(true);
    expect(await cell("Bid", "B13")).toEqual({ error: "#N/A" });
    expect(await cell("Bid", "B14")).toBe(10 * 1.5 + 3.142);
    const table = callFunction("COSTTABLE", [site, 2]) as unknown[][];
    expect(await cell("Bid", "H3")).toBe(table[0]![0]);
    expect(await cell("Bid", "M6")).toBe(table[3]![5]);
  });

  it("keeps every other part byte for byte: chart, picture, styles, names, comment, conditional format", () => {
    const [before, after] = [new ZipFile(readFileSync(BID)), new ZipFile(readFileSync(out))];
    expect(after.names).toEqual(before.names);
    const changed = before.names.filter((name) => !Buffer.from(before.read(name)!).equals(Buffer.from(after.read(name)!)));
    expect(changed).toEqual(["xl/worksheets/sheet2.xml"]);
    for (const name of ["xl/charts/chart1.xml", "xl/media/image1.png", "xl/styles.xml", "xl/workbook.xml", "xl/comments2.xml"]) expect(before.names).toContain(name);
    // outside its cells the changed sheet is the same, and in its cells all but type and value is
    const sheet = (zip: ZipFile): string => Buffer.from(zip.read("xl/worksheets/sheet2.xml")!).toString();
    const withoutValues = (xml: string): string => xml.replace(/<v>[^<]*<\/v>/g, "").replace(/ t="(?:e|n|str|b)"/g, "");
    expect(withoutValues(sheet(after))).toBe(withoutValues(sheet(before)));
    expect(sheet(after)).toContain("<conditionalFormatting");
  });

  it("changes nothing when it is written once more", () => {
    const twice = join(folder, "twice.xlsx");
    const { out: report } = formulaLine(["--book", out, "--out", twice]);
    expect(report).toContain("Bid\t33\t33\t0\t1\t0");
    expect(readFileSync(twice).equals(readFileSync(out))).toBe(true);
  });

  it("may be asked for a value at the same time; the report then goes to standard error", () => {
    const { out: value, err, code } = formulaLine(["=SUM(Bid!A4:A8)", "--book", BID, "--out", join(folder, "both.xlsx")]);
    expect({ value, code }).toEqual({ value: "10\n", code: 1 });
    expect(err).toContain("Written to");
  });

  it("understands our functions as other programs store them", async () => {
    const formulas = ["_xldudf_PROBE_SETTLEMENT(1000,10,0.5,20,30)", "[2]!_xldudf_PROBE_SETTLEMENT(1000,10,0.5,20,30)", "'C:\\Tools\\Some.xla'!_xldudf_PROBEDEV_SETTLEMENT(1000,10,0.5,20,30)", "Some.xla!PROBE.SETTLEMENT(1000,10,0.5,20,30)", "_xlfn.PROBE.SETTLEMENT(1000,10,0.5,20,30)", "probe.settlement(1000,10,0.5,20,30)"];
    const rows = formulas.map((formula, k) => `<row r="${k + 1}"><c r="A${k + 1}" t="e"><f>${formula}</f><v>#NAME?</v></c></row>`).join("");
    const table = '<row r="20"><c r="A20" cm="1" t="e"><f t="array" ref="A20">_xldudf_PROBE_METHODS()</f><v>#NAME?</v></c></row>';
    const book = join(folder, "stored.xlsx");
    writeFileSync(book, packed(workbookParts({ S: rows + table }, { metadata: SPILLS })));
    const priced = join(folder, "stored-priced.xlsx");
    expect(formulaLine(["--book", book, "--out", priced]).code).toBe(0);
    const workbook = new ExcelJS.Workbook();
    await workbook.xlsx.readFile(priced);
    const sheet = workbook.getWorksheet("S")!;
    for (let row = 1; row <= 6; row++) expect(sheet.getCell(row, 1).result).toBe(callFunction("SETTLEMENT", [1000, 10, 0.5, 20, 30]));
    const methods = callFunction("METHODS", []) as unknown[][];
    expect(sheet.getCell(20 + methods.length - 1, 1).value).toBe(methods.at(-1)![0]);
    expect(sheet.getCell(21, 2).value).toBe(methods[1]![1]);
  });

  it("says what it keeps, what changes by itself, and that a signature is broken", () => {
    const book = join(folder, "kept.xlsx");
    writeFileSync(book, packed({ ...workbookParts({ S: '<row r="1"><c r="A1"><f>OTHERADDIN(1)</f><v>5</v></c><c r="B1"><f>TODAY()</f><v>1</v></c></row>' }), "_xmlsignatures/sig1.xml": "<s/>" }));
    const { out: report, code } = formulaLine(["--book", book, "--out", join(folder, "kept-priced.xlsx")]);
    expect(code).toBe(0);
    expect(report).toContain("S\t2\t1\t1\t0\t1");
    expect(report).toContain("S!A1\tNo function named OTHERADDIN is known.");
    expect(report).toContain("Another value at each calculation (time or chance): S!B1");
    expect(report).toContain("The workbook was signed");
  });
});

describe("a call that cannot be carried out", () => {
  const there = join(folder, "there.xlsx");
  const own = join(folder, "own.xlsx");
  beforeAll(() => {
    writeFileSync(there, "kept");
    writeFileSync(own, readFileSync(BID));
    linkSync(own, join(folder, "hard.xlsx"));
    symlinkSync(own, join(folder, "soft.xlsx"));
  });

  it.each([
    [[], "Give a formula"],
    [["PROBE.VERSION()"], 'A formula starts with "="'],
    [["=1", "=2"], "Two formulas are given"],
    [["=1", "--bok", "x"], "The option --bok is not known"],
    [["=1", "--book"], "The option --book needs a file after it"],
    [["=1", "--sheet="], "The option --sheet needs the name of a sheet"],
    [["=1", "--book", "a.xlsx", "--book", "b.xlsx"], "The option --book is given twice"],
    [["--out", "a.xlsx"], "say which with --book"],
    [["=1", "--overwrite"], "--overwrite goes with --out"],
    [["=1", "--book", "none.xlsx"], "There is no file none.xlsx"],
    [["=1", "--book", "."], "is not a file"],
    [["=1", "--book", "package.json"], "--book takes an xlsx, xlsm or csv file"],
    [["=1", "--book", BID, "--sheet", "Bids"], "The workbook has no sheet named Bids; it has Ground, Bid."],
    [["=1", "--sheet", "Nothing"], "The workbook has no sheet named Nothing"],
    [["--book", BID, "--out", BID], "--out names the workbook itself"],
    [["--book", own, "--out", join(folder, "hard.xlsx"), "--overwrite"], "--out names the workbook itself"],
    [["--book", own, "--out", join(folder, "soft.xlsx"), "--overwrite"], "--out names the workbook itself"],
    [["--book", own, "--out", join(folder, ".", "own.xlsx"), "--overwrite"], "--out names the workbook itself"],
    [["--book", BID, "--out", there], "is there already; give another name, or add --overwrite to replace it"],
    [["--book", BID, "--out", join(folder, "no", "folder.xlsx")], "There is no folder"],
    [["--book", BID, "--out", join(folder, "macros.xlsm")], "must end with .xlsx, not .xlsm"],
    [["--book", BID, "--out", join(folder, "nothing")], "must end with .xlsx"],
  ])("is refused with exit code 2: %j", (words, sentence) => {
    const { out, err, code } = formulaLine(words);
    expect(err).toContain(sentence);
    expect(err).toMatch(/[.]\n$/);
    expect({ out, code }).toEqual({ out: "", code: 2 });
  });

  it("leaves every file as it was", () => {
    expect(readFileSync(there, "utf8")).toBe("kept");
    expect(readFileSync(own).equals(readFileSync(BID))).toBe(true);
    expect(existsSync(join(folder, "macros.xlsm"))).toBe(false);
  });

  it("replaces a file where that is said", () => {
    expect(formulaLine(["--book", BID, "--out", there, "--overwrite"]).out).toContain("Written to");
    expect(new ZipFile(readFileSync(there)).names).toContain("xl/charts/chart1.xml");
  });

  it("refuses to write values into a csv", () => {
    expect(formulaLine(["--book", siteCsv, "--out", join(folder, "x.csv")])).toMatchObject({ code: 2, err: "--out writes values back into an xlsx workbook; a csv has no formulas to calculate.\n" });
  });

  it("gives exit code 1 for a workbook that cannot be read", () => {
    const broken = join(folder, "broken.xlsx");
    writeFileSync(broken, readFileSync(BID).subarray(0, 5000));
    expect(formulaLine(["=1", "--book", broken])).toEqual({ out: "", err: "The workbook is damaged or cut short: the directory at its end is missing.\n", code: 1 });
  });

  it("explains itself", () => {
    expect(formulaLine(["--help"])).toMatchObject({ code: 0, err: "" });
    expect(formulaLine(["-h"]).out).toContain("--overwrite");
  });
});
