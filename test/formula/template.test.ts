import ExcelJS from "exceljs";
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { Calculation } from "../../src/formula/calculation.js";
import { ErrorValue, type CellValue } from "../../src/formula/cell-value.js";
import { demonstrationBook } from "../../src/formula/demonstration.js";
import { formulaLine } from "../../src/formula/formula-line.js";
import { siteSource } from "../../src/formula/simulation/site-source.js";
import { template, templateWorkbook } from "../../src/formula/template/template.js";
import { readXlsx } from "../../src/formula/xlsx/read-book.js";
import { storedFormula } from "../../src/formula/xlsx/stored-formula.js";
import { ZipFile } from "../../src/formula/xlsx/zip.js";
import { demonstrationWorkbook } from "../../src/host/demonstration-workbook.js";
import type { PlannedCell } from "../../src/host/workbook.js";
import { CATALOGUE, checkSite, parseSite } from "../../src/inputs/index.js";
import { gridFunctions } from "../../src/practice/grid-functions.js";
import { PRODUCT_VERSION } from "../../src/results/index.js";

const folder = mkdtempSync(join(tmpdir(), "template-"));
const at = (name: string): string => join(folder, name);
const plans = demonstrationWorkbook();
let file: Buffer;
let other: ExcelJS.Workbook;

beforeAll(async () => {
  expect(template([at("bid.xlsx")])).toMatchObject({ code: 0, err: "" });
  file = readFileSync(at("bid.xlsx"));
  other = new ExcelJS.Workbook();
  await other.xlsx.load(file as unknown as ArrayBuffer);
}, 60_000);

afterAll(() => rmSync(folder, { recursive: true }));

const planned = (sheet: string): readonly PlannedCell[] => plans.find(({ name }) => name === sheet)!.cells;
const formulas = (): { sheet: string; at: number; cell: PlannedCell }[] => plans.flatMap(({ name, cells }, at) => cells.filter(({ formula }) => formula !== undefined).map((cell) => ({ sheet: name, at, cell })));
const isOurs = (formula: string): boolean => /PROBE\./.test(formula);

describe("the template, read by exceljs", () => {
  it("holds every planned value, formula and figure", { timeout: 30_000 }, () => {
    const calculation = new Calculation(demonstrationBook(), gridFunctions);
    expect(other.worksheets.map(({ name }) => name)).toEqual(plans.map(({ name }) => name));
    for (const { name, cells } of plans) for (const { row, column, value, formula } of cells) {
      const found = other.getWorksheet(name)!.getCell(row + 1, column + 1);
      if (formula === undefined) {
        if (value !== undefined && value !== "") expect(found.value, `${name} ${found.address}`).toBe(value);
        continue;
      }
      // to the bit: the shortest decimal that gives the number back
      const figure = calculation.cell({ sheet: plans.findIndex((plan) => plan.name === name), row, column })!.values[0]![0];
      expect(found.formula, `${name} ${found.address}`).toBe(storedFormula(formula, "PROBE").text);
      expect(found.result, `${name} ${found.address}`).toBe(figure);
    }
    calculation.dispose();
    expect(formulas().length).toBeGreaterThan(150);
  });

  it("holds what the tables spill, in cells without formulas", () => {
    const counts = other.getWorksheet("Counts")!;
    const head = planned("Counts").find(({ formula }) => formula?.startsWith("=PROBE.COSTTABLE"))!;
    for (let k = 1; k <= 13; k++) {
      const line = counts.getRow(head.row + 1 + k);
      expect(line.getCell(1).value).toBe(k - 1);
      expect(line.getCell(6).value).toBe(counts.getRow(4 + k).getCell(6).result);
    }
    const check = other.getWorksheet("Check")!;
    expect(check.getColumn(1).values.slice(4)).toEqual([...checkSite(siteRows(file)).map(({ label }) => label), "Site block"]);
  });

  it("has names, looks, widths, panes, print set-up and properties", () => {
    expect(other.definedNames.getRanges("Site").ranges).toEqual([`Site!$A$1:$D$${siteRows(file).length}`]);
    expect(other.definedNames.getRanges("Cheapest").ranges).toEqual(["Counts!$C$2"]);
    const looks = { money: "#,##0", ratio: "0.00", metres: "0.0", percent: "0.0%" };
    for (const { name, cells, columnWidths, frozenRows = 0 } of plans) {
      const sheet = other.getWorksheet(name)!;
      for (const { row, column, style, look } of cells) {
        const cell = sheet.getCell(row + 1, column + 1);
        expect(cell.numFmt ?? "General", cell.address).toBe(look === undefined ? "General" : looks[look]);
        expect(cell.font?.bold === true, cell.address).toBe(style === "title" || style === "section" || style === "head" || style === "numberhead");
        if (style === "input") expect([cell.fill, cell.protection?.locked], cell.address).toMatchObject([{ pattern: "solid", fgColor: { argb: "FFFFF6D6" } }, false]);
        else expect(cell.protection?.locked ?? true, cell.address).toBe(true);
      }
      columnWidths!.forEach((pixels, k) => expect(Math.abs(sheet.getColumn(k + 1).width! * 7 + 5 - pixels)).toBeLessThan(0.5));
      const view = (sheet.views as (Partial<ExcelJS.WorksheetViewFrozen> | undefined)[] | null)?.[0];
      expect(view?.state === "frozen" ? view.ySplit : 0).toBe(frozenRows);
      expect(sheet.pageSetup).toMatchObject({ orientation: "landscape", fitToPage: true, fitToWidth: 1, fitToHeight: 0 });
      expect(sheet.headerFooter.oddFooter).toBe(`&L&A&CProbeworth ${PRODUCT_VERSION}&RPage &P of &N`);
    }
    expect(Buffer.from(new ZipFile(file).read("xl/workbook.xml")!).toString()).toContain(`<calcPr calcId="191029" fullCalcOnLoad="1"/>`);
    expect([other.title, other.creator]).toEqual(["Quillhaven seed store, piled ground floor (invented)", `Probeworth ${PRODUCT_VERSION}`]);
    expect(Buffer.from(new ZipFile(file).read("docProps/custom.xml")!).toString()).toContain(`name="Probeworth version"><vt:lpwstr>${PRODUCT_VERSION}<`);
  });

  it("draws the cells of each chart, and repeats their figures", () => {
    let drawn = 0;
    for (const { name, charts = [] } of plans) for (const chart of charts) {
      const xml = Buffer.from(new ZipFile(file).read(`xl/charts/chart${++drawn}.xml`)!).toString();
      const references = [...xml.matchAll(/<c:(cat|val)><c:numRef><c:f>([^<]*)<\/c:f><c:numCache>(.*?)<\/c:numCache>/g)].map(([, , range, cache]) => [range, [...cache!.matchAll(/<c:v>([^<]*)</g)].map(([, v]) => Number(v))]);
      const cells = (range: string): unknown[] => {
        const [, column, from, to] = /^([A-Z]+)(\d+):[A-Z]+(\d+)$/.exec(range)!;
        const values = Array.from({ length: Number(to) - Number(from) + 1 }, (_, k) => other.getWorksheet(name)!.getCell(`${column}${Number(from) + k}`)).map((cell) => (cell.formula === undefined ? cell.value : cell.result));
        return [`'${name}'!$${column}$${from}:$${column}$${to}`, values];
      };
      expect(references).toEqual([...chart.series].sort((a, b) => Number(b.kind === "part") - Number(a.kind === "part")).flatMap(({ values }) => [cells(chart.categories), cells(values)]));
    }
    expect(drawn).toBeGreaterThan(0);
  });

  it("has a rule for every input that the plan rules, with its words, and none else", () => {
    let rules = 0;
    for (const { name, cells } of plans) for (const { row, column, validation } of cells) {
      const found = other.getWorksheet(name)!.getCell(row + 1, column + 1).dataValidation as ExcelJS.DataValidation | undefined;
      if (validation === undefined) {
        expect(found).toBeUndefined();
        continue;
      }
      rules++;
      expect(found).toMatchObject({ showErrorMessage: true, allowBlank: true });
      expect(validation.words.startsWith(found!.error!.replace(/\.\.\.$/, ""))).toBe(true);
      if (validation.kind === "choice" && found!.type === "list") expect(found!.formulae).toEqual([`"${validation.choices.join(",")}"`]);
    }
    expect(rules).toBeGreaterThan(30);
  });
});

function siteRows(bytes: Uint8Array): (string | number)[][] {
  const { book } = readXlsx(bytes);
  const calculation = new Calculation(book, gridFunctions);
  const { values } = calculation.formula("=Site", 0);
  calculation.dispose();
  return values.map((row) => row.map((value) => (value === null ? "" : (value as string | number))));
}

describe("the template, read back", () => {
  it("shows the same figures when the formula line calculates it, formula by formula", { timeout: 60_000 }, () => {
    const said = formulaLine(["--book", at("bid.xlsx"), "--out", at("priced.xlsx")]);
    expect(said).toMatchObject({ code: 0, err: "" });
    const lines = said.out.split("\n").slice(1, plans.length + 1).map((line) => line.split("\t"));
    expect(lines.map(([name, , , changed, errors, kept]) => [name, changed, errors, kept])).toEqual(plans.map(({ name }) => [name, "0", "0", "0"]));
    expect(lines.reduce((sum, [, count]) => sum + Number(count), 0)).toBe(formulas().length);
    expect(formulaLine(["=Bid!E17", "--book", at("bid.xlsx")]).out).toBe(formulaLine(["=Bid!E17"]).out);
  });

  it("keeps every formula of ours as one that spills, and no other but a table", () => {
    const { book } = readXlsx(file);
    for (const { at: sheet, cell } of formulas()) {
      const found = book.sheets[sheet]!.cells.find(({ row, column }) => row === cell.row && column === cell.column)!;
      expect(found.placement!.kind).toBe(isOurs(cell.formula!) ? "spilling" : "single");
    }
  });

  it("gives the simulation its site", () => {
    expect(siteSource(at("bid.xlsx")).site.problem).toEqual(siteSource(undefined).site.problem);
  });

  it("calls the functions of the add-in that developers load, when that is asked for", () => {
    const bytes = templateWorkbook(false, "PROBEDEV");
    const sheet = Buffer.from(new ZipFile(bytes).read("xl/worksheets/sheet3.xml")!).toString();
    expect(sheet).toContain("_xldudf_PROBEDEV_COSTTABLE(Site,12)");
    expect(sheet).not.toContain("PROBE_");
    expect(readXlsx(bytes).book.sheets[1]!.cells.find(({ row, column }) => row === 2 && column === 1)!.value).toBe(4);
  });

  it("stores ordinary functions by names that the format knew from its beginning", () => {
    const known = new Set(["PI", "SUM", "VLOOKUP", "IF", "MIN", "MAX", "NA", "ROUND", "INDEX", "MATCH", "IFERROR", "ISNUMBER", "AND", "OR"]);
    for (const { cell } of formulas()) for (const [, name] of cell.formula!.replace(/"[^"]*"/g, "").matchAll(/([A-Z][A-Z.0-9]*)\(/g)) if (!name!.startsWith("PROBE.")) expect(known, name).toContain(name);
  });
});

// Source: fixtures/read_template.py, LibreOffice 7.4.7.2: what that sees in the file, and what it calculates for the ordinary formulas.
describe("the template, read by LibreOffice", () => {
  interface Seen { look: number; value?: number | string | { error: string }; formula?: string }
  interface SeenSheet { name: string; cells: Record<string, Seen>; rules: Record<string, unknown[]>; charts: { title: string; series: [string, Record<string, string>][] }[]; frozenRows: number; titleRows: number; landscape: boolean; pages: number[]; footer: string; calculated: Record<string, number | string> }
  const seen = JSON.parse(readFileSync(new URL("fixtures/template-in-libreoffice.json", import.meta.url), "utf8")) as { title: string; properties: Record<string, string>; names: Record<string, string>; looks: [string, boolean, number, number, number, boolean, boolean][]; sheets: SeenSheet[] };
  const remake = "npm run template and fixtures/read_template.py make the fixture anew";
  const address = ({ row, column }: PlannedCell): string => `${String.fromCharCode(65 + column)}${row + 1}`;

  it("has the same sheets, names, panes, titles, charts, rules and properties", () => {
    expect(seen.sheets.map(({ name }) => name)).toEqual(plans.map(({ name }) => name));
    expect(seen.names).toEqual(Object.fromEntries(plans.flatMap(({ name: sheet, names }) => (names ?? []).map(({ name, range }) => [name, `$${sheet}.${range.replace(/([A-Z]+)(\d+)/g, "$$$1$$$2")}`]))));
    seen.sheets.forEach((sheet, k) => {
      const { cells, frozenRows = 0, charts = [] } = plans[k]!;
      expect([sheet.frozenRows, sheet.titleRows, sheet.landscape, sheet.pages, sheet.footer]).toEqual([frozenRows, frozenRows, true, [1, 0], `Probeworth ${PRODUCT_VERSION}`]);
      expect(Object.keys(sheet.rules).sort(), remake).toEqual(cells.filter(({ validation }) => validation !== undefined).map(address).sort());
      expect(sheet.charts.map(({ title }) => title)).toEqual(charts.map(({ title }) => title));
      sheet.charts.forEach(({ series }, c) => expect(series.map(([kind, { "values-y": values }]) => [kind.includes("Column"), values])).toEqual([...charts[c]!.series].sort((a, b) => Number(b.kind === "part") - Number(a.kind === "part")).map(({ kind, values }) => [kind === "part", `$${sheet.name}.${values.replace(/([A-Z]+)(\d+)/g, "$$$1$$$2")}`])));
    });
    expect(seen.title).toBe("Quillhaven seed store, piled ground floor (invented)");
    expect(seen.properties["Probeworth version"]).toBe(PRODUCT_VERSION);
  });

  it("has the same values, formulas and looks", () => {
    for (const { name, cells } of plans) {
      const sheet = seen.sheets.find((entry) => entry.name === name)!;
      for (const cell of cells) {
        const found = sheet.cells[address(cell)];
        const [format, bold, , , , locked] = found === undefined ? ["General", false, 0, 0, 0, true] : seen.looks[found.look]!;
        if (found !== undefined) expect([format, bold, locked], address(cell)).toEqual([cell.look === undefined ? "General" : { money: "#,##0", ratio: "0.00", metres: "0.0", percent: "0.0%" }[cell.look], ["title", "section", "head", "numberhead"].includes(cell.style!), cell.style !== "input"]);
        if (cell.formula === undefined) {
          if (cell.value !== undefined && cell.value !== "") expect(found?.value, `${name} ${address(cell)}: ${remake}`).toBe(cell.value);
          continue;
        }
        const written = found!.formula!.replace(/^\{|\}$/g, "").replaceAll(";", ",");
        expect(written.toUpperCase(), `${name} ${address(cell)}: ${remake}`).toBe(`=${storedFormula(cell.formula, "PROBE").text.replaceAll("FALSE", "FALSE()")}`.toUpperCase());
        expect(found!.formula!.startsWith("{")).toBe(isOurs(cell.formula));
      }
    }
  });

  it("calculates the ordinary formulas from the figures in the file to the same values", () => {
    const calculation = new Calculation(demonstrationBook(), gridFunctions);
    let compared = 0;
    for (const { sheet, at: k, cell } of formulas()) {
      if (isOurs(cell.formula!)) continue;
      const figure = calculation.cell({ sheet: k, row: cell.row, column: cell.column })!.values[0]![0] as number;
      const theirs = seen.sheets.find(({ name }) => name === sheet)!.calculated[address(cell)] as number;
      expect(Math.abs(theirs - figure), `${sheet} ${address(cell)} ${cell.formula}: ${remake}`).toBeLessThanOrEqual(1e-9 * Math.abs(figure));
      compared++;
    }
    calculation.dispose();
    expect(compared).toBeGreaterThan(8);
  });
});

describe("the blank template", () => {
  let rows: (string | number)[][];
  beforeAll(() => {
    expect(template([at("blank.xlsx"), "--blank"])).toMatchObject({ code: 0, out: expect.stringContaining("the sheet Check says what is missing") as string });
    rows = siteRows(readFileSync(at("blank.xlsx")));
  }, 60_000);

  it("leaves blank what every job must state, names a default elsewhere, and shows no figure of the demonstration", () => {
    const required = new Set(CATALOGUE.filter((entry) => entry.fallback === undefined && entry.automatic === undefined).map(({ label }) => label));
    const inputs = rows.filter(([label]) => CATALOGUE.some((entry) => entry.label === label));
    for (const [label, value] of inputs) expect(value, String(label)).toEqual(required.has(String(label)) || label === "Damage list" ? "" : expect.stringMatching(/^(default|automatic)$/));
    const refused = checkSite(rows).filter(({ ok }) => !ok).map(({ label }) => label);
    expect(refused).toEqual(CATALOGUE.map(({ label }) => label).filter((label) => required.has(label) || label === "Damage list"));
  });

  it("prices the demonstration again once its figures are typed in", () => {
    const full = siteRows(file);
    const typed = rows.map((row, k) => [row[0]!, full[k]![1]!, ...row.slice(2)].map((cell, column) => (column === 0 && full[k]![0] !== "" ? full[k]![0]! : cell)));
    expect(parseSite(typed).problem).toEqual(parseSite(full).problem);
  });

  it("holds error values where nothing can be calculated yet", () => {
    const bid = readXlsx(readFileSync(at("blank.xlsx"))).book.sheets[1]!;
    const value: CellValue = bid.cells.find(({ row, column }) => row === 2 && column === 1)!.value;
    expect(value instanceof ErrorValue && value.code).toBe("#VALUE!");
  });
});

describe("the command", () => {
  const said = (...words: string[]) => template(words);

  it("never overwrites a file without being told", { timeout: 30_000 }, () => {
    writeFileSync(at("mine.xlsx"), "mine");
    expect(said(at("mine.xlsx"))).toEqual({ out: "", err: `The file ${at("mine.xlsx")} is there already; give another name, or add --overwrite to replace it.\n`, code: 2 });
    expect(readFileSync(at("mine.xlsx"), "utf8")).toBe("mine");
    expect(said(at("mine.xlsx"), "--overwrite").code).toBe(0);
    expect(Buffer.compare(readFileSync(at("mine.xlsx")), file)).toBe(0);
  });

  it.each([
    [[], "Give the name of the workbook to write, such as bid.xlsx; --help says more."],
    [["a.xlsx", "b.xlsx"], "One workbook is written, and 2 names are given: a.xlsx, b.xlsx."],
    [["bid.xls"], "The template is an xlsx workbook, so its name must end with .xlsx, and bid.xls does not."],
    [["nowhere/at/all/bid.xlsx"], "There is no folder nowhere/at/all to write into."],
    [["bid.xlsx", "--empty"], "The option --empty is not known; the options are --blank, --development and --overwrite."],
  ])("refuses %j", (words, sentence) => {
    expect(said(...words)).toEqual({ out: "", err: `${sentence}\n`, code: 2 });
    expect(existsSync("bid.xls")).toBe(false);
  });

  it("refuses a folder, and says how it is called", () => {
    expect(said(`${folder}.xlsx/..`)).toMatchObject({ code: 2 });
    expect(said("--help").out).toContain("npm run --silent template -- bid.xlsx");
  });
});
