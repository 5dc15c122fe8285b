import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import { ErrorValue } from "../../src/formula/cell-value.js";
import { areaOf } from "../../src/host/addresses.js";
import { siteSheet } from "../../src/host/site-sheet.js";
import type { CellValue, SheetPlan } from "../../src/host/workbook.js";
import type { Area } from "../../src/formula/addresses.js";
import type { ChartModel } from "./excel-host/model/chart-model.js";
import { serveForms, startExcelForm, type ExcelForm, type FormSite } from "./forms/start-forms.js";
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

/** Runs a test beside an Excel of its own; the page may complain of nothing, and what stood in the workbook before must stand there still. */
async function beside(test: (form: ExcelForm) => Promise<void>, excelApi?: string): Promise<void> {
  const form = await startExcelForm(browser, site, excelApi);
  const { Data, "It's other": other } = await form.cells();
  await test(form);
  expect(form.excel.complaints).toEqual([]);
  expect(await form.cells()).toMatchObject({ Data, "It's other": other });
  await form.close();
}

/** What the workbook says when it refuses. */
async function refusal(form: ExcelForm, act: "insert" | "read" | "names" | "selection" | "repair", plan: SheetPlan = PLAN): Promise<{ name: string; kind: string; message: string }> {
  return form.excel.page.evaluate(
    async ([what, each]) => {
      const { workbook } = window.form;
      try {
        await { insert: () => workbook.insertSheet(each as SheetPlan), read: () => workbook.readName("Block"), names: () => workbook.names(), selection: () => workbook.readSelection(), repair: () => window.repair() }[what]();
        return { name: "", kind: "", message: "" };
      } catch (reason) {
        const { name, kind, message } = reason as { name: string; kind: string; message: string };
        return { name, kind, message };
      }
    },
    [act, plan as unknown] as const,
  );
}

const PLAN: SheetPlan = {
  name: "Costs",
  cells: [
    { row: 0, column: 0, value: "Costs", style: "title" },
    { row: 1, column: 0, value: "Holes", style: "numberhead" },
    ...["Foundation", "Failure", "Total", "Low", "High", "Tied"].map((value, k) => ({ row: 1, column: k + 1, value, style: "numberhead" as const })),
    ...[0, 2, 4].flatMap((count, r) => [count, 100, 50 - 10 * r, 150 - 10 * r, 140 - 10 * r, 160 - 10 * r, ...(r === 0 ? [] : [150 - 10 * r])].map((value, column) => ({ row: 2 + r, column, value, style: "result" as const, ...(column === 0 ? {} : { look: "money" as const }) }))),
    { row: 6, column: 0, value: "yes", style: "input", validation: { kind: "choice", choices: ["yes", "no"], words: "Yes or no." } },
    { row: 6, column: 1, value: 3, style: "input", validation: { kind: "number", least: 1, most: 9, whole: true, words: "A whole number from 1 to 9." } },
    { row: 6, column: 2, value: "none", style: "input", validation: { kind: "number", least: 0, orWords: ["none"], words: "A price, or none." } },
    { row: 6, column: 3, value: 0.25, style: "input", look: "percent" },
  ],
  names: [{ name: "CostByCount", range: "A2:D5" }],
  columnWidths: [80, 120],
  frozenRows: 2,
  onePage: true,
  printed: "A1:G30",
  charts: [
    {
      title: "Cost", words: "Cost of 0 to 4 holes.", place: "A9:G24", categories: "A3:A5", categoryTitle: "Holes", valueTitle: "Cost (EUR)", valueLook: "money",
      series: [
        { kind: "part", name: "Foundation", values: "B3:B5" },
        { kind: "part", name: "Failure", values: "C3:C5" },
        { kind: "line", name: "Total", values: "D3:D5" },
        { kind: "bound", name: "Give or take", values: "E3:E5" },
        { kind: "bound", name: "High", values: "F3:F5", hiddenInLegend: true },
        { kind: "mark", name: "Tied", values: "G3:G5" },
      ],
    },
  ],
};

describe("what a plan becomes in Excel", () => {
  it("looks: formats, fills, lines, widths, panes and one page", () =>
    beside(async (form) => {
      await form.workbook.insertSheet(PLAN);
      const sheet = form.excel.host.book.sheet("Costs");
      const look = (address: string, property: string): unknown => sheet.lookAt(areaOf(address).top, areaOf(address).left, property);
      expect([look("A1", "font/bold"), look("A1", "font/size"), look("A1", "fill/color")]).toEqual([true, 15, undefined]);
      expect([look("A2", "horizontalAlignment"), look("A2", "font/bold")]).toEqual(["Right", true]);
      expect([look("B3", "numberFormat"), look("A3", "numberFormat"), look("D7", "numberFormat")]).toEqual(["#,##0", undefined, "0.0%"]);
      for (const address of ["B3", "F4", "A7", "D7"]) expect(look(address, "fill/color"), address).toMatch(/^#/);
      expect(look("A7", "fill/color")).not.toBe(look("B3", "fill/color"));
      // 80 and 120 pixels of 96 to the inch are 60 and 90 points of 72
      expect([sheet.columnWidths.get(0), sheet.columnWidths.get(1), sheet.columnWidths.get(2)]).toEqual([60, 90, undefined]);
      expect(sheet.frozen).toMatchObject({ top: 0, bottom: 1 });
      expect(sheet.page).toMatchObject({ orientation: "Landscape", zoom: { horizontalFitToPages: 1, verticalFitToPages: 1 } });
      expect(sheet.printArea).toEqual({ top: 0, left: 0, bottom: 29, right: 6 });
      expect(form.excel.host.book.active).toBe(sheet);
      await form.workbook.insertSheet({ ...PLAN, name: "Standing", standing: true, printed: undefined });
      expect(form.excel.host.book.sheet("Standing").page).toMatchObject({ orientation: "Portrait" });
      // all cells and the chart below them
      expect(form.excel.host.book.sheet("Standing").printArea).toEqual({ top: 0, left: 0, bottom: 23, right: 6 });
    }));

  it("native charts: every series from its own cells, parts stacked, lines over them, marks without a line", () =>
    beside(async (form) => {
      await form.workbook.insertSheet(PLAN);
      const [chart, ...more] = form.excel.host.book.sheet("Costs").charts as [ChartModel, ...ChartModel[]];
      expect(more).toEqual([]);
      expect(chart.properties).toMatchObject({ chartType: "ColumnStacked", "title/text": "Cost", "legend/position": "Bottom", "axes/categoryAxis/title/text": "Holes", "axes/valueAxis/title/text": "Cost (EUR)", "axes/valueAxis/numberFormat": "#,##0", "legend/legendEntries/4/visible": false });
      expect(chart.position).toEqual(areaOf("A9:G24"));
      const at = (area: Area): string => `${area.left} ${area.top}-${area.bottom}`;
      expect(chart.series.map(({ values, categories, properties }) => [properties["name"], at(values!.area), at(categories!.area), properties["chartType"], properties["format/line/lineStyle"], properties["markerStyle"]])).toEqual([
        ["Foundation", "1 2-4", "0 2-4", "ColumnStacked", undefined, undefined],
        ["Failure", "2 2-4", "0 2-4", "ColumnStacked", undefined, undefined],
        ["Total", "3 2-4", "0 2-4", "LineMarkers", "Continuous", "Circle"],
        ["Give or take", "4 2-4", "0 2-4", "Line", "Dash", "None"],
        ["High", "5 2-4", "0 2-4", "Line", "Dash", "None"],
        ["Tied", "6 2-4", "0 2-4", "LineMarkers", "None", "Diamond"],
      ]);
      expect(new Set(chart.series.slice(0, 2).map(({ properties }) => properties["format/fill/color"])).size).toBe(2);
    }));

  it("rules for what is typed: a list, a range, a number or a word, each with its words", () =>
    beside(async (form) => {
      await form.workbook.insertSheet(PLAN);
      const rules = new Map(form.excel.host.book.sheet("Costs").validations.map(({ area, properties }) => [area.left, properties]));
      expect(rules.size).toBe(3);
      expect(rules.get(0)).toMatchObject({ rule: { list: { inCellDropDown: true, source: "yes,no" } }, prompt: { message: "Yes or no." }, errorAlert: { style: "Stop", message: "Yes or no." } });
      expect(rules.get(1)).toMatchObject({ rule: { wholeNumber: { formula1: 1, formula2: 9, operator: "Between" } } });
      expect(rules.get(2)).toMatchObject({ rule: { custom: { formula: '=OR(IF(ISNUMBER(C7),AND(C7>=0),FALSE),TRIM(C7)="none")' } } });
    }));

  it("the site block's own rules are formulas that Excel can calculate, true for the template's values", () =>
    beside(async (form) => {
      await form.workbook.insertSheet(siteSheet());
      const { book } = form.excel.host;
      const block = book.sheet("Site");
      const custom = block.validations.flatMap(({ properties }) => ((properties["rule"] as { custom?: { formula: string } }).custom === undefined ? [] : [(properties["rule"] as { custom: { formula: string } }).custom.formula]));
      expect(custom.length).toBeGreaterThan(25);
      await form.excel.person(() => book.write(block, { top: 0, bottom: custom.length - 1, left: 10, right: 10 }, custom.map((formula) => [formula]), "person"));
      await form.settled();
      expect(custom.map((formula, row) => [formula, block.valueAt(row, 10)]).filter(([, value]) => value !== true)).toEqual([]);
      const price = block.validations.find(({ area }) => block.valueAt(area.top, 0) === "Price per hole")!;
      await form.excel.person(() => book.write(block, price.area, [["free"]], "person"));
      await form.settled();
      expect(custom.filter((_, row) => block.valueAt(row, 10) !== true)).toHaveLength(1);
    }));

  it("tables larger than one request, in several, each below the platform's limit", () =>
    beside(async (form) => {
      const rows = 4000;
      const cells = Array.from({ length: rows * 5 }, (_, k) => ({ row: Math.floor(k / 5), column: k % 5, value: k % 5 === 0 ? `remark number ${k} ${"x".repeat(400)}` : k }));
      let largest = 0;
      const { faults } = form.excel.host;
      const outright = faults.outright.bind(faults);
      faults.outright = (signs, waits) => {
        largest = Math.max(largest, signs);
        return outright(signs, waits);
      };
      await form.workbook.insertSheet({ name: "Large", cells });
      const sheet = form.excel.host.book.sheet("Large");
      expect(sheet.valueAt(0, 0)).toMatch(/^remark number 0/);
      expect([sheet.valueAt(rows - 1, 4), sheet.valueAt(1, 1)]).toEqual([rows * 5 - 1, 6]);
      expect(largest).toBeGreaterThan(500_000);
      expect(largest).toBeLessThan(1_500_000);
    }));

  it("keeps nothing of the workbook after it, and needs nothing that Excel 2021 has not got", () =>
    beside(async (form) => {
      await form.workbook.insertSheet(PLAN);
      await form.workbook.readSelection();
      await form.workbook.names();
      await form.excel.page.evaluate(() => window.repair());
      expect(form.excel.host.refused).toEqual([]);
      expect(form.excel.host.sets.ExcelApi).toBe("1.9");
      await expect.poll(() => form.excel.host.references.count).toBe(0);
      const watch = await form.watch();
      await expect.poll(() => form.excel.host.events.count).toBe(4);
      await watch.stop();
      await expect.poll(() => form.excel.host.events.count).toBe(0);
    }, "1.9"));
});

describe("when Excel refuses", () => {
  it("a protected structure: says so before anything is written", () =>
    beside(async (form) => {
      form.excel.host.book.isStructureProtected = true;
      const before = await form.cells();
      expect(await refusal(form, "insert")).toEqual({ name: "WorkbookRefusal", kind: "structure", message: "The structure of this workbook is protected, so no sheet can be added, and nothing was written. Take the protection away (Review, Protect Workbook), then try again." });
      expect(await form.cells()).toEqual(before);
      expect(await form.workbook.readName("Block")).toBeDefined();
    }));

  it("a cell that is being edited: waits for its end where Excel can, and says what to do where it cannot", () =>
    beside(async (form) => {
      const { faults, book } = form.excel.host;
      faults.startEdit();
      let isDone = false;
      const waiting = form.workbook.insertSheet(PLAN).then((made) => {
        isDone = true;
        return made;
      });
      await form.excel.page.waitForTimeout(500);
      expect([isDone, book.findSheet("Costs")]).toEqual([false, undefined]);
      faults.endEdit();
      expect(await waiting).toEqual({ sheet: "Costs", names: ["CostByCount"] });
      faults.failNext("cellEdit");
      expect(await refusal(form, "read")).toMatchObject({ kind: "editing", message: "A cell is being edited. Press Enter or Esc in the sheet, then try again." });
      expect(await form.workbook.readName("Block")).toBeDefined();
    }));

  it("too large: says what is too large, and reads nothing", () =>
    beside(async (form) => {
      const { book, faults } = form.excel.host;
      await form.excel.person(() => {
        const sheet = book.addSheet("Wide");
        book.write(sheet, { top: 20_000, bottom: 20_000, left: 9, right: 9 }, [[1]], "person");
        book.select(sheet, [{ top: 0, left: 0, bottom: 1_048_575, right: 20 }]);
      });
      expect(await refusal(form, "selection")).toMatchObject({ kind: "large", message: "Wide!A1:J20001 holds 200,010 cells, and no site block has more than 100,000. Select the site block alone." });
      faults.failNext("responseTooLarge");
      expect(await refusal(form, "read")).toMatchObject({ kind: "large", message: "That is more than Excel takes at once. Select fewer cells, or only the site block." });
    }));

  it("a closed workbook: every wish is refused with the way back, and nothing hangs", () =>
    beside(async (form) => {
      const watch = await form.watch();
      form.excel.host.faults.close();
      for (const act of ["insert", "read", "names", "selection", "repair"] as const) expect({ act, ...(await refusal(form, act)) }).toEqual({ act, name: "WorkbookRefusal", kind: "closed", message: "The workbook is no longer open beside this pane. Open it, then open the pane from its ribbon." });
      await watch.stop();
    }));

  it.each([
    ["while values are written", "Range.formulas"],
    ["while looks are given", "RangeFont.bold"],
    ["while rules are set", "DataValidation.rule"],
    ["while the page is laid", "PageLayout.setPrintArea"],
    ["while charts are drawn", "ChartSeries.chartType"],
    ["while names are given", "NamedItemCollection.add"],
  ])("half-way, %s: says which sheet is not whole and leaves the rest alone", (_, member) =>
    beside(async (form) => {
      const { faults, book } = form.excel.host;
      faults.meanwhile(member, () => faults.failAfter(0));
      const { kind, message } = await refusal(form, "insert");
      expect(kind).toBe("failed");
      expect(message).toBe("The new sheet Costs was added but could not be filled to the end. Excel could not do it and gave no reason. Try again; if it stays, save the workbook and start Excel again. What stands on Costs is not complete; delete that sheet. Nothing else was changed.");
      expect(book.findSheet("Costs")).toBeDefined();
      // the second try is whole
      expect(await form.workbook.insertSheet(PLAN)).toMatchObject({ sheet: "Costs (2)" });
    }));

  it("a sheet's or a table's name that is taken between the look and the writing is left to whoever took it", () =>
    beside(async (form) => {
      const { faults, book } = form.excel.host;
      faults.meanwhile("WorksheetCollection.add", () => book.write(book.addSheet("costs"), { top: 0, left: 0, bottom: 0, right: 0 }, [["theirs"]], "person"));
      faults.meanwhile("NamedItemCollection.add", () => book.addName("COSTBYCOUNT", { sheet: book.sheet("Data"), area: areaOf("A1") }, "=Data!$A$1", undefined));
      expect(await form.workbook.insertSheet(PLAN)).toEqual({ sheet: "Costs (2)", names: ["CostByCount2"] });
      expect(book.sheet("costs").valueAt(0, 0)).toBe("theirs");
      expect(await form.workbook.readName("CostByCount")).toMatchObject({ sheet: "Data", address: "A1" });
      expect(await form.workbook.readName("CostByCount2")).toMatchObject({ sheet: "Costs (2)", address: "A2:D5" });
    }));

  // The list is the platform's own, out of its types; "in words" means no code, a capital and a full stop.
  it("every code of Excel's becomes a sentence", () =>
    beside(async (form) => {
      const codes: string[] = await form.excel.page.evaluate(() => Object.values(Excel.ErrorCodes) as string[]);
      expect(codes.length).toBeGreaterThan(25);
      for (const code of [...codes, "ActivityLimitReached", "NoSuchCodeYet"]) {
        form.excel.host.faults.failAfter(0, code, "words of Excel's own");
        const { name, kind, message } = await refusal(form, "names");
        if (["InvalidReference", "InvalidArgument", "GeneralException", "ItemNotFound", "InvalidOperation"].includes(code) && name === "") continue;
        expect([code, name]).toEqual([code, "WorkbookRefusal"]);
        expect(kind).toMatch(/^(structure|sheet|editing|closed|large|missing|failed)$/);
        expect(message, code).toMatch(/^[A-Z].*\.$/s);
        if (code !== "NoSuchCodeYet") expect(message).not.toContain(code);
      }
    }));
});

describe("names", () => {
  it("finds those of a sheet, that of the sheet in front first, and prefers the workbook's own", () =>
    beside(async (form) => {
      const { book } = form.excel.host;
      await form.excel.person(() => {
        for (const [sheet, address] of [["Data", "B2"], ["It's other", "A1"]] as const) book.addName("Local", { sheet: book.sheet(sheet), area: areaOf(address) }, "=x", book.sheet(sheet));
        book.addName("block", { sheet: book.sheet("Data"), area: areaOf("B1") }, "=x", book.sheet("Data"));
        book.select(book.sheet("It's other"), [areaOf("A1")]);
      });
      expect(await form.workbook.readName("local")).toMatchObject({ sheet: "It's other", address: "A1" });
      await form.select("Data", "A1");
      expect(await form.workbook.readName("LOCAL")).toMatchObject({ sheet: "Data", address: "B2" });
      expect(await form.workbook.readName("Block")).toMatchObject({ address: "A1:B4" });
      expect(await form.workbook.names()).toEqual(["Alone", "Block", "Local", "wide"]);
      // a name that a sheet has is not taken by us for the workbook
      expect((await form.workbook.insertSheet({ name: "New", cells: [{ row: 0, column: 0, value: 1 }], names: [{ name: "Local", range: "A1" }] })).names).toEqual(["Local2"]);
    }));

  it("does not list names that are hidden, and reads the first of several selected areas", () =>
    beside(async (form) => {
      const { book } = form.excel.host;
      await form.excel.person(() => {
        book.addName("Secret", { sheet: book.sheet("Data"), area: areaOf("A1") }, "=Data!$A$1", undefined).visible = false;
        book.select(book.sheet("Data"), [areaOf("A2:B2"), areaOf("A1")]);
      });
      expect(await form.workbook.names()).not.toContain("Secret");
      expect(await form.workbook.readSelection()).toMatchObject({ address: "A2:B2" });
    }));
});

describe("repair", () => {
  const enter = (form: ExcelForm, sheet: string, address: string, formula: CellValue): Promise<void> => form.excel.person(({ book }) => book.write(book.sheet(sheet), areaOf(address), [[formula]], "person"));
  const said = (form: ExcelForm): Promise<string> => form.excel.page.evaluate(() => window.repair());

  it("enters stuck formulas again and puts mangled ones right, on every sheet, and leaves all others", () =>
    beside(async (form) => {
      const { book, calculator } = form.excel.host;
      await form.excel.person(() => {
        for (const name of ["Bid", "Old"]) book.addSheet(name);
      });
      await enter(form, "Bid", "A1", "=PROBEDEV.VERSION()");
      await enter(form, "Bid", "B7", "=PROBEDEV.VARIANCEFACTOR(1,2)");
      await enter(form, "Bid", "C9", "=[2]!_xldudf_PROBEDEV_VERSION()");
      await enter(form, "Old", "A1", "='C:\\old jobs\\Some.xla'!PROBEDEV.VERSION()&\" [2]!_xldudf_PROBEDEV_VERSION()\"");
      await enter(form, "Old", "A2", "=OTHERS.FUNCTION(1)");
      await enter(form, "Old", "A3", "=_xldudf_OTHERS_FUNCTION(1)");
      await enter(form, "Old", "A4", "=1/0");
      calculator.stick(book.sheet("Bid"), 0, 0, { shown: "#NAME?", cure: "enter" });
      calculator.stick(book.sheet("Bid"), 6, 1, { shown: "#BUSY!", cure: "enter" });
      await form.settled();
      expect([book.sheet("Bid").valueAt(0, 0), book.sheet("Bid").valueAt(6, 1)]).toEqual([new ErrorValue("#NAME?"), new ErrorValue("#BUSY!")]);
      expect(await said(form)).toBe("4 formulas were entered again: 3 on Bid, 1 on Old.");
      await form.settled();
      expect([book.sheet("Bid").valueAt(0, 0), book.sheet("Bid").valueAt(8, 2)]).toEqual(["Probeworth 0.1.0", "Probeworth 0.1.0"]);
      // gamma of a line of half the scale, Markov: 2 (1 - 1 + 1/e)
      expect(book.sheet("Bid").valueAt(6, 1)).toBeCloseTo(2 / Math.E, 12);
      expect(book.sheet("Old").enteredAt(0, 0)).toBe('=PROBEDEV.VERSION()&" [2]!_xldudf_PROBEDEV_VERSION()"');
      expect([1, 2, 3].map((row) => book.sheet("Old").enteredAt(row, 0))).toEqual(["=OTHERS.FUNCTION(1)", "=_xldudf_OTHERS_FUNCTION(1)", "=1/0"]);
      expect(await said(form)).toBe("Nothing needed repair: all 4 formulas of Probeworth are in order.");
    }));

  it("writes nothing into a protected sheet, and names it", () =>
    beside(async (form) => {
      const { book } = form.excel.host;
      await form.excel.person(() => void book.addSheet("Locked"));
      await enter(form, "Locked", "A1", "=_xldudf_PROBEDEV_VERSION()");
      book.sheet("Locked").protection = {};
      expect(await said(form)).toBe("No formula was entered again. Left alone because the sheet is protected: Locked. Take the protection away (Review, Unprotect Sheet) and repair again.");
      expect(book.sheet("Locked").enteredAt(0, 0)).toBe("=_xldudf_PROBEDEV_VERSION()");
    }));

  it("leaves a spilled table to its own first cell, and only what is refused undone", () =>
    beside(async (form) => {
      const { book, faults } = form.excel.host;
      await form.excel.person(() => void book.addSheet("Tables"));
      await enter(form, "Tables", "A1", "=PROBEDEV.METHODS()");
      await enter(form, "Tables", "J1", "=_xldudf_PROBEDEV_VERSION()");
      await enter(form, "Tables", "J2", "=_xldudf_PROBEDEV_VERSION()");
      await form.settled();
      const entries = book.sheet("Tables").entries.size;
      faults.meanwhile("Range.formulas", () => undefined);
      expect(await said(form)).toBe("2 formulas were entered again: 2 on Tables.");
      await form.settled();
      expect(book.sheet("Tables").entries.size).toBe(entries);
      expect(book.sheet("Tables").valueAt(1, 0)).not.toBeNull();
    }));

  it("says so where nothing of ours is in the workbook", () => beside(async (form) => expect(await said(form)).toBe("No formula of this workbook calls a function of Probeworth, so there was nothing to repair.")));
});
