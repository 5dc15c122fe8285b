import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import { launchBrowser } from "./harness/browser.js";
import { besideExcel } from "./excel-host/beside-excel.js";
import { validationAt } from "./excel-host/kinds/data-validation-kind.js";
import { serveScript, type Outcome, type ScriptSite } from "./excel-host/script-site.js";
import type { Excel as ExcelBeside } from "./excel-host/start-excel.js";

let browser: Browser;
let site: ScriptSite;
beforeAll(async () => {
  [browser, site] = await Promise.all([launchBrowser(), serveScript()]);
});
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

const beside = (test: (excel: ExcelBeside) => Promise<void>): Promise<void> => besideExcel(browser, { address: site.address }, test);

/** Writes 1 into A1 of the active sheet. */
const write = ({ page }: ExcelBeside, delayForCellEdit = false): Promise<Outcome> =>
  page.evaluate(
    (delay) =>
      window.attempt(async (context) => {
        context.workbook.worksheets.getActiveWorksheet().getRange("A1").values = [[1]];
        await context.sync();
      }, { delayForCellEdit: delay }),
    delayForCellEdit,
  );

describe("what a page puts onto a sheet", () => {
  it("stands in the model: looks, widths, rules, names, frozen rows, printing", () =>
    beside(async ({ page, host }) => {
      await page.evaluate(() =>
        Excel.run(async (context) => {
          const sheet = context.workbook.worksheets.add("Inputs");
          const range = sheet.getRange("B2:C3");
          range.numberFormat = [["#,##0"]] as never;
          range.format.set({ font: { bold: true, color: "#0b6f7c" }, fill: { color: "#FFF2CC" }, horizontalAlignment: "Right", columnWidth: 90 });
          range.format.borders.getItem("EdgeBottom").style = "Continuous";
          range.dataValidation.rule = { list: { inCellDropDown: true, source: "off,on" } };
          range.dataValidation.errorAlert = { message: "off or on", title: "Input", style: "Stop", showAlert: true };
          sheet.freezePanes.freezeRows(1);
          sheet.pageLayout.orientation = "Landscape";
          sheet.pageLayout.zoom = { horizontalFitToPages: 1, verticalFitToPages: 1 };
          sheet.pageLayout.setPrintArea("A1:F20");
          context.workbook.names.add("Site", range, "inputs");
          sheet.tables.add("E1:F4", true).name = "Costs";
          sheet.activate();
          await context.sync();
        }),
      );
      const { book } = host;
      const sheet = book.sheet("Inputs");
      expect(sheet.looks.get(2 * 16_384 + 2)).toEqual({ numberFormat: "#,##0", "font/bold": true, "font/color": "#0B6F7C", "fill/color": "#FFF2CC", horizontalAlignment: "Right", "borders/EdgeBottom/style": "Continuous" });
      expect([...sheet.columnWidths]).toEqual([[1, 90], [2, 90]]);
      expect(validationAt(sheet, 1, 1)).toEqual({ rule: { list: { inCellDropDown: true, source: "off,on" } }, errorAlert: { message: "off or on", title: "Input", style: "Stop", showAlert: true } });
      expect([sheet.frozen?.bottom, sheet.page.orientation, sheet.printArea]).toEqual([0, "Landscape", { top: 0, left: 0, bottom: 19, right: 5 }]);
      expect(book.names.map(({ name, range, comment }) => [name, range?.sheet.name, comment])).toEqual([["Site", "Inputs", "inputs"]]);
      expect(sheet.tables.map(({ name, area }) => [name, area.right])).toEqual([["Costs", 5]]);
      expect(book.active.name).toBe("Inputs");
      expect(sheet.used(true)).toBe(undefined);
      expect(sheet.used(false)).toEqual({ top: 1, left: 1, bottom: 2, right: 2 });
    }));

  it("draws charts: the series that Excel would make, and what is set of them", () =>
    beside(async ({ page, host }) => {
      const read = await page.evaluate(() =>
        Excel.run(async (context) => {
          const sheet = context.workbook.worksheets.getActiveWorksheet();
          sheet.getRange("A1:C3").values = [["Count", "Foundation", "Failure"], [0, 10, 20], [1, 11, 9]];
          const chart = sheet.charts.add("ColumnStacked", sheet.getRange("B1:C3"), "Columns");
          chart.set({ name: "Cost", title: { text: "Cost against count" }, legend: { position: "Bottom" } });
          chart.setPosition("E2", "K20");
          chart.axes.valueAxis.title.text = "money";
          chart.axes.valueAxis.majorGridlines.format.line.color = "#DDDDDD";
          const series = chart.series.getItemAt(0);
          series.setXAxisValues(sheet.getRange("A2:A3"));
          series.format.fill.setSolidColor("#0B6F7C");
          const line = chart.series.add("Total");
          line.set({ chartType: "Line", markerStyle: "Circle", markerSize: 7 });
          line.setValues(sheet.getRange("C2:C3"));
          chart.legend.legendEntries.getItemAt(2).visible = false;
          chart.series.load("items/name");
          await context.sync();
          return chart.series.items.map(({ name }) => name);
        }),
      );
      expect(read).toEqual(["Foundation", "Failure", "Total"]);
      const [chart] = host.book.active.charts;
      expect(chart?.properties).toMatchObject({ name: "Cost", chartType: "ColumnStacked", "title/text": "Cost against count", "legend/position": "Bottom", "axes/valueAxis/title/text": "money", "legend/legendEntries/2/visible": false });
      expect(chart?.position).toEqual({ top: 1, left: 4, bottom: 19, right: 10 });
      expect(chart?.series[0]).toMatchObject({ categories: { area: { top: 1, bottom: 2, left: 0, right: 0 } }, properties: { "format/fill/color": "#0B6F7C" } });
      expect(chart?.series[2]).toMatchObject({ values: { area: { left: 2 } }, properties: { chartType: "Line", markerSize: 7 } });
      expect(await page.evaluate(() => window.attempt(async (context) => void (context.workbook.worksheets.getActiveWorksheet().charts.getItemAt(0).series.getItemAt(0).markerSize = 200)))).toMatchObject({ code: "InvalidArgument" });
    }));
});

describe("faults on order", () => {
  it("a protected sheet refuses values, looks, rules and charts, and leaves unlocked cells open", () =>
    beside(async ({ page, host }) => {
      host.book.active.setLook(0, 0, "protection/locked", false);
      host.book.active.protection = {};
      const outcomes = await page.evaluate(async () => {
        const range = (context: Excel.RequestContext, address: string): Excel.Range => context.workbook.worksheets.getActiveWorksheet().getRange(address);
        const tries: ((context: Excel.RequestContext) => Promise<unknown>)[] = [
          async (context) => void (range(context, "A1").values = [[1]]),
          async (context) => void (range(context, "A1:B1").values = [[1, 2]]),
          async (context) => void (range(context, "B1").format.font.bold = true),
          async (context) => void (range(context, "B1").numberFormat = [["0"]]),
          async (context) => void (range(context, "B1").dataValidation.rule = { custom: { formula: "=TRUE" } }),
          async (context) => context.workbook.worksheets.getActiveWorksheet().charts.add("Line", range(context, "A1:B2")),
          async (context) => context.workbook.worksheets.add("Another"),
        ];
        const got = [];
        for (const each of tries) got.push(await window.attempt(each));
        return got;
      });
      expect(outcomes.map(({ code }) => code)).toEqual([undefined, ...Array.from({ length: 5 }, () => "AccessDenied"), undefined]);
      expect(outcomes[1]).toMatchObject({ isGenuine: true, location: "Range.values" });
      expect(host.book.active.valueAt(0, 1)).toBe(null);
    }));

  it("a protected structure refuses new, renamed and deleted sheets, and says so when asked", () =>
    beside(async ({ page, host }) => {
      host.book.isStructureProtected = true;
      const outcomes = await page.evaluate(async () => [
        await window.attempt(async ({ workbook }) => workbook.worksheets.add("Another")),
        await window.attempt(async ({ workbook }) => void (workbook.worksheets.getActiveWorksheet().name = "Other")),
        await window.attempt(async ({ workbook }) => workbook.worksheets.getActiveWorksheet().delete()),
        await window.attempt(async (context) => {
          context.workbook.protection.load("protected");
          await context.sync();
          return context.workbook.protection.protected;
        }),
      ]);
      expect(outcomes.map(({ code, value }) => code ?? value)).toEqual(["AccessDenied", "AccessDenied", "AccessDenied", true]);
    }));

  it("a cell that is being typed into refuses a request, or holds it until the person is done", () =>
    beside(async (excel) => {
      const { host } = excel;
      host.faults.startEdit();
      expect(await write(excel)).toMatchObject({ code: "InvalidOperationInCellEditMode", isGenuine: true });
      let isDone = false;
      const held = write(excel, true).then((outcome) => {
        isDone = true;
        return outcome;
      });
      await excel.page.waitForTimeout(300);
      expect([isDone, host.book.active.valueAt(0, 0)]).toEqual([false, null]);
      host.faults.endEdit();
      expect(await held).toEqual({});
      expect(host.book.active.valueAt(0, 0)).toBe(1);
    }));

  it("a request of more than 5 MB is refused whole, one just under it is taken", () =>
    beside(async ({ page, host }) => {
      const texts = (signs: number): Promise<Outcome> =>
        page.evaluate(
          (length) =>
            window.attempt(async (context) => {
              const sheet = context.workbook.worksheets.getActiveWorksheet();
              sheet.getRange("A1:A1000").values = Array.from({ length: 1000 }, () => ["x".repeat(length)]);
              sheet.getRange("C1").values = [["after"]];
              await context.sync();
            }),
          signs,
        );
      expect(await texts(5_300)).toMatchObject({ code: "RequestPayloadSizeLimitExceeded", isGenuine: true });
      expect(host.book.active.valueAt(0, 2)).toBe(null);
      expect(await texts(5_000)).toEqual({});
      const back = await page.evaluate(() =>
        window.attempt(async (context) => {
          const range = context.workbook.worksheets.getActiveWorksheet().getRange("A1:B1000").load("values,formulas");
          await context.sync();
          return range.values.length;
        }),
      );
      expect(back).toMatchObject({ code: "ResponsePayloadSizeLimitExceeded", isGenuine: true });
    }));

  it("a synchronisation that fails half-way keeps what it had done, and names the member", () =>
    beside(async ({ page, host }) => {
      host.faults.meanwhile("RangeFont.bold", () => host.faults.failAfter(0));
      const outcome = await page.evaluate(() =>
        window.attempt(async (context) => {
          const sheet = context.workbook.worksheets.add("Half");
          sheet.getRange("A1").values = [[1]];
          sheet.getRange("A1").format.font.bold = true;
          sheet.getRange("A2").values = [[2]];
          await context.sync();
        }),
      );
      expect(outcome).toMatchObject({ code: "GeneralException", isGenuine: true, location: "RangeFont.bold" });
      const sheet = host.book.sheet("Half");
      expect([sheet.valueAt(0, 0), sheet.valueAt(1, 0), sheet.lookAt(0, 0, "font/bold")]).toEqual([1, null, undefined]);
      host.faults.failAfter(2, "InactiveWorkbook");
      const counted = await page.evaluate(() =>
        window.attempt(async (context) => {
          for (const row of [3, 4, 5, 6]) context.workbook.worksheets.getItem("Half").getRange(`A${row}`).values = [[row]];
          await context.sync();
        }),
      );
      expect(counted).toMatchObject({ code: "InactiveWorkbook" });
      expect([2, 3, 4, 5].map((row) => sheet.valueAt(row, 0)).filter((value) => value !== null).length).toBeLessThan(2);
    }));

  it("a name that is taken in the meantime is there already", () =>
    beside(async ({ page, host }) => {
      host.faults.meanwhile("WorksheetCollection.add", () => host.book.addSheet("Bid"));
      host.faults.meanwhile("NamedItemCollection.add", () => host.book.addName("Site", undefined, "=1", undefined));
      const outcomes = await page.evaluate(async () => {
        const free = await window.attempt(async (context) => {
          const [sheet, name] = [context.workbook.worksheets.getItemOrNullObject("Bid"), context.workbook.names.getItemOrNullObject("Site")];
          await context.sync();
          return [sheet.isNullObject, name.isNullObject];
        });
        return [
          free,
          await window.attempt(async ({ workbook }) => workbook.worksheets.add("Bid")),
          await window.attempt(async ({ workbook }) => workbook.worksheets.add("Bid (2)")),
          await window.attempt(async ({ workbook }) => workbook.names.add("Site", workbook.getSelectedRange())),
        ];
      });
      expect(outcomes.map(({ code, value }) => code ?? value)).toEqual([[true, true], "ItemAlreadyExists", undefined, "ItemAlreadyExists"]);
    }));

  it("a busy Excel refuses once, a closed workbook for good", () =>
    beside(async (excel) => {
      excel.host.faults.failNext("activityLimit");
      expect(await write(excel)).toMatchObject({ code: "ActivityLimitReached", isGenuine: true });
      expect(await write(excel)).toEqual({});
      excel.host.faults.close();
      for (let k = 0; k < 2; k++) expect(await write(excel)).toMatchObject({ code: "InvalidOrTimedOutSession", isGenuine: true });
    }));
});
