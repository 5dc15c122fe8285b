import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import type { SheetPlan } from "../../src/host/workbook.js";
import { PRODUCT_VERSION } from "../../src/results/index.js";
import { serveForms, startExcelForm, startPracticeForm, type FormSite } from "./forms/start-forms.js";
import type { WorkbookForm } from "./forms/workbook-form.js";
import { launchBrowser } from "./harness/browser.js";

let browser: Browser;
let site: FormSite;
beforeAll(async () => {
  [browser, site] = await Promise.all([launchBrowser(), serveForms()]);
});
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

const PLAN: SheetPlan = {
  name: "Data",
  cells: [
    { row: 0, column: 0, value: "Table", style: "title" },
    { row: 1, column: 0, value: "1/500", style: "input" },
    { row: 1, column: 1, value: 1234.5, style: "result", look: "money" },
    { row: 2, column: 0, value: "=not a formula", style: "label" },
    { row: 2, column: 1, value: false, style: "label" },
    { row: 3, column: 0, formula: "=B2*2", style: "result", look: "ratio" },
    { row: 3, column: 1, formula: '=PROBE.VERSION()&" PROBE.X"', style: "result" },
    { row: 4, column: 0, value: "12", style: "note" },
    { row: 4, column: 1, value: "", style: "input" },
    { row: 5, column: 2, style: "result" },
    { row: 6, column: 2, value: "end", style: "note" },
  ],
  names: [{ name: "block", range: "A1:B5" }, { name: "Fresh", range: "B2" }],
  columnWidths: [120, 90],
};
const WRITTEN = [["Table", ""], ["1/500", 1234.5], ["=not a formula", false], [2469, `Probeworth ${PRODUCT_VERSION} PROBE.X`], ["12", ""]];

// One suite over every form: whoever writes against the interface gets the same from each.
describe.each([
  ["the practice grid", () => startPracticeForm(browser, site)],
  ["Excel", () => startExcelForm(browser, site)],
  ["Excel 2021", () => startExcelForm(browser, site, "1.9")],
] as const)("the workbook that is %s", (_, start) => {
  let form: WorkbookForm;
  beforeAll(async () => {
    form = await start();
  });
  afterAll(() => form?.close());

  it("reads the range of a name in any case, with texts, numbers, truths, errors and blanks apart", async () => {
    const block = { sheet: "Data", address: "A1:B4", values: [["Label", "Value"], ["depth", 1.5], ["", true], ["#DIV/0!", 3]] };
    expect(await form.workbook.readName("Block")).toEqual(block);
    expect(await form.workbook.readName(" bLOCK ")).toEqual(block);
    expect(await form.workbook.readName("Alone")).toEqual({ sheet: "It's other", address: "A1", values: [["alone"]] });
  });

  it("cuts whole columns to the used part of the sheet", async () => {
    const used = await form.workbook.readName("Wide");
    expect(used).toMatchObject({ sheet: "Data", address: "A1:B5" });
    expect(used!.values).toHaveLength(5);
  });

  it("knows nothing of names that stand for no range, for several, or do not exist", async () => {
    for (const name of ["Share", "Gone", "Several", "Nobody", "not a name", ""]) expect(await form.workbook.readName(name), name).toBeUndefined();
    expect(await form.workbook.names()).toEqual(["Alone", "Block", "wide"]);
  });

  it("reads what is selected", async () => {
    await form.select("Data", "A2:B3");
    expect(await form.workbook.readSelection()).toEqual({ sheet: "Data", address: "A2:B3", values: [["depth", 1.5], ["", true]] });
    await form.select("Data", "D5");
    expect(await form.workbook.readSelection()).toEqual({ sheet: "Data", address: "D5", values: [["far"]] });
    await form.select("It's other", "A1");
    expect(await form.workbook.readSelection()).toMatchObject({ sheet: "It's other", address: "A1" });
  });

  it("adds a sheet under a free name with free names over its cells, keeps texts texts, calculates, and changes nothing else", async () => {
    const before = await form.cells();
    expect(await form.workbook.insertSheet(PLAN)).toEqual({ sheet: "Data (2)", names: ["block2", "Fresh"] });
    await form.settled();
    const { "Data (2)": added, ...others } = await form.cells();
    expect(others).toEqual(before);
    expect(added!.at(-1)!.at(-1)).toBe("end");
    expect(await form.workbook.readName("Block2")).toEqual({ sheet: "Data (2)", address: "A1:B5", values: WRITTEN });
    expect(await form.workbook.readName("fresh")).toEqual({ sheet: "Data (2)", address: "B2", values: [[1234.5]] });
    expect(await form.workbook.names()).toEqual(["Alone", "Block", "block2", "Fresh", "wide"]);
    // the new sheet is in front
    expect(await form.workbook.readSelection()).toMatchObject({ sheet: "Data (2)" });
  });

  it("adds two sheets at the same moment, each whole and under a name of its own", async () => {
    const both = await Promise.all([form.workbook.insertSheet({ ...PLAN, name: "Twin" }), form.workbook.insertSheet({ ...PLAN, name: "Twin" })]);
    await form.settled();
    expect(both.map(({ sheet }) => sheet).sort()).toEqual(["Twin", "Twin (2)"]);
    expect(new Set(both.flatMap(({ names }) => names)).size).toBe(4);
    for (const { sheet, names } of both) expect(await form.workbook.readName(names[0]!)).toEqual({ sheet, address: "A1:B5", values: WRITTEN });
  });

  it("reads what a formula fills, also in the cells beside it", async () => {
    const filled: SheetPlan = { name: "Filled", cells: [{ row: 0, column: 0, formula: "=SEQUENCE(3,2)" }], names: [{ name: "Table", range: "A1:B2" }] };
    await form.workbook.insertSheet(filled);
    await form.settled();
    expect(await form.workbook.readName("Table")).toEqual({ sheet: "Filled", address: "A1:B2", values: [[1, 2], [3, 4]] });
    await form.select("Filled", "B1:B9");
    expect(await form.workbook.readSelection()).toEqual({ sheet: "Filled", address: "B1:B3", values: [[2], [4], [6]] });
  });

  it("tells of cells, of what is calculated from them and of sheets, not of the selection, and no more after the end", async () => {
    const watch = await form.watch();
    await form.settled();
    const since = async (): Promise<() => Promise<number>> => {
      const start = await watch.count();
      return async () => (await watch.count()) - start;
    };
    let more = await since();
    await form.select("Data", "A1:B2");
    await form.settled();
    expect(await more()).toBe(0);
    await form.type("Data", "B2", 2);
    expect(await more()).toBeGreaterThan(0);
    expect((await form.workbook.readName("Block"))!.values[3]![1]).toBe(4);
    more = await since();
    await form.addSheet("By hand");
    await form.settled();
    expect(await more()).toBeGreaterThan(0);
    more = await since();
    await form.workbook.insertSheet({ name: "Told", cells: [{ row: 0, column: 0, value: 1 }] });
    await form.settled();
    expect(await more()).toBeGreaterThan(0);
    await watch.stop();
    await watch.stop();
    await form.settled();
    more = await since();
    await form.type("Data", "B2", 1.5);
    expect(await more()).toBe(0);
  });

  it("never takes a sheet's or a table's name from anybody in the end", async () => {
    const names = (await form.workbook.names()).map((name) => name.toLowerCase());
    expect(new Set(names).size).toBe(names.length);
    expect(Object.keys(await form.cells()).slice(0, 2)).toEqual(["Data", "It's other"]);
    expect((await form.cells())["Data"]!.slice(0, 3)).toEqual([["Label", "Value", "", ""], ["depth", 1.5, "", ""], ["", true, "", ""]]);
  });
});
