import ExcelJS from "exceljs";
import JSZip from "jszip";
import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { withSheet } from "../../src/formula/xlsx/add-sheet.js";
import { newCell } from "../../src/formula/xlsx/cell-xml.js";
import { newWorkbook } from "../../src/formula/xlsx/new-workbook.js";
import { readXlsx } from "../../src/formula/xlsx/read-book.js";
import { contentBlocks } from "../../src/host/planned-blocks.js";
import { simulationSheet } from "../../src/host/simulation-sheet.js";
import type { SheetPlan } from "../../src/host/workbook.js";
import { numberWriter } from "../../src/pane/model/numbers.js";
import { briefSheet } from "../../src/pane/sheets/brief-sheet.js";
import { contentOf, simulationReport, type SimulationReport } from "../../src/pane/sheets/simulation-report.js";
import { sheetData } from "../../src/practice/grid-data.js";
import { orderOfDemonstration, simulatedRow, simulatedTable } from "../pane/simulated-rows.js";
import { hostileTexts } from "./hostile-texts.js";

const texts = hostileTexts(20_261_201, 300);
const plan: SheetPlan = { name: "Prices", cells: texts.map((value, row) => ({ row, column: 1, value, style: "input" })) };

/** Half a pair of surrogates is no sign, and no file can hold it. */
const stored = (text: string): string => text.replace(/[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/g, "\ufffd");

describe("a file that we write", () => {
  const files: readonly (readonly [string, () => Uint8Array])[] = [
    ["of our own making", () => newWorkbook([plan])],
    ["of somebody else's, with a sheet of ours added", () => withSheet(readXlsx(readFileSync(new URL("../formula/fixtures/bid.xlsx", import.meta.url))), plan).bytes],
  ];
  describe.each(files)("%s", (_, make) => {
    let cells: readonly unknown[];
    let xml: string;

    beforeAll(async () => {
      const bytes = make();
      const book = new ExcelJS.Workbook();
      await book.xlsx.load(bytes as unknown as ArrayBuffer);
      const sheet = book.getWorksheet("Prices")!;
      cells = texts.map((_each, row) => sheet.getCell(row + 1, 2).value);
      const zip = await JSZip.loadAsync(bytes);
      const parts = await Promise.all(zip.file(/xl\/worksheets\/sheet\d+\.xml$/).map((part) => part.async("string")));
      xml = parts.find((part) => part.includes("window.planted"))!;
    });

    it("holds no formula, no link and no element of a hostile text's making", () => {
      expect(xml).not.toMatch(/<f[ >/]|<hyperlink|<script|<img|<svg|<iframe/);
      expect(xml.match(/<c /g)!.length).toBe(texts.length);
    });

    it("gives every text back as text", () => {
      const wrong = texts.flatMap((text, k) => (textOf(cells[k]) === stored(text) ? [] : [`${JSON.stringify(text.slice(0, 60))} became ${JSON.stringify(cells[k])?.slice(0, 60)}`]));
      expect(wrong).toEqual([]);
    });
  });

  it("is seen to be wrong by the same reader when a text is written as a formula", async () => {
    const bytes = newWorkbook([{ name: "Prices", cells: [{ row: 0, column: 1, formula: "=1+1" }] }], { valuesOf: () => [[2]] });
    const book = new ExcelJS.Workbook();
    await book.xlsx.load(bytes as unknown as ArrayBuffer);
    expect(book.getWorksheet("Prices")!.getCell("B1").value).toMatchObject({ formula: "1+1" });
  });
});

describe("a cell into which a function's answer is written", () => {
  it("holds the answer as a text and gains no formula", () => {
    for (const text of texts) {
      const xml = newCell("", "B2", text);
      expect(xml).toMatch(/^<c r="B2" t="str"><v(?: xml:space="preserve")?>[^<>]*<\/v><\/c>$/);
    }
  });
});

describe("a sheet that the pane writes", () => {
  it("is handed to Excel with each text marked as text, unless it begins with a letter and holds no digit or is long", () => {
    const written = contentBlocks(plan.cells, "PROBE").flatMap(({ cells }) => cells.map(([cell]) => cell as string));
    expect(written.length).toBe(texts.length);
    for (const [k, text] of texts.entries()) {
      const cell = written[k]!;
      if (cell !== `'${text}`) expect([cell, /^\p{L}/u.test(text)]).toEqual([text, true]);
      expect(cell).not.toMatch(/^[=+\-@\t\r\n{#\d]/);
    }
  });

  it("is handed to the practice grid without a formula", () => {
    const data = sheetData("1", plan).cellData!;
    for (const [row, text] of texts.entries()) {
      const cell = data[row]![1]!;
      expect([cell.v, cell.f ?? null, cell.t]).toEqual([text, null, 1]);
    }
  });

  it("has the same formulas whatever sheets, currencies and blocks are called", () => {
    const rows = [simulatedRow(0, 52_000, { failure: 8000 }), simulatedRow(2, 41_000, { chanceCheapest: 1, investigation: 6000, notDistinguishable: true })];
    const { task } = orderOfDemonstration();
    const report = (word: string): SimulationReport => simulationReport({ task, units: "SI", money: word, place: `'${word}'!A1:D60` }, simulatedTable(rows), { isFinished: true, hasChanged: false }, new Date(Date.UTC(2026, 2, 14)));
    const formulas = (word: string): string[] => [simulationSheet(contentOf(report(word))), briefSheet(report(word), 0, 2, numberWriter("en-GB"))].flatMap(({ cells }) => cells.flatMap(({ row, column, formula }) => (formula === undefined ? [] : [`${row} ${column} ${formula}`])));
    const usual = formulas("EUR");
    for (const text of texts.filter((each) => each.length < 100)) expect(formulas(text)).toEqual(usual);
  });
});

function textOf(cell: unknown): string | undefined {
  if (typeof cell !== "string") return undefined;
  // ISO/IEC 29500, ST_Xstring: _x000B_ stands for a sign that XML cannot hold; this reader leaves it as it is
  return cell.replace(/_x([0-9A-Fa-f]{4})_/g, (_, code: string) => String.fromCharCode(parseInt(code, 16)));
}
