import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import { ErrorValue } from "../../src/formula/cell-value.js";
import { launchBrowser } from "./harness/browser.js";
import { besideExcel } from "./excel-host/beside-excel.js";
import { serveScript, type ScriptSite } from "./excel-host/script-site.js";
import { startExcel, type Excel as ExcelBeside, type ExcelOptions } from "./excel-host/start-excel.js";

let browser: Browser;
let site: ScriptSite;
beforeAll(async () => {
  [browser, site] = await Promise.all([launchBrowser(), serveScript()]);
});
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

const beside = (test: (excel: ExcelBeside) => Promise<void>, options: Partial<ExcelOptions> = {}): Promise<void> => besideExcel(browser, { address: site.address, ...options }, test);

describe("the platform's own library beside the model of Excel", () => {
  it("is ready, and says that the host is Excel for Windows", () =>
    beside(async ({ page }) => {
      expect(await page.evaluate(() => Office.onReady())).toMatchObject({ host: "Excel", platform: "PC" });
      expect(await page.evaluate(() => Object.getPrototypeOf(window.external) === Object.prototype)).toBe(true);
    }));

  it("complains when the page asks anybody else for anything", async () => {
    const excel = await startExcel(browser, { address: site.address });
    await excel.page.evaluate(() => fetch("https://elsewhere.example.org/x").catch(() => undefined));
    expect(excel.complaints[0]).toBe("asked for https://elsewhere.example.org/x");
    await excel.close();
  });

  it("writes values and formulas, calculates them, and reads them back", () =>
    beside(async ({ page, host }) => {
      const read = await page.evaluate(() =>
        Excel.run(async (context) => {
          const range = context.workbook.worksheets.add("My bid").getRange("A1:B2");
          range.values = [["a", 1], [2, "=B1+A2"]];
          await context.sync();
          range.load("values,address,formulas,valueTypes");
          range.worksheet.load("name");
          await context.sync();
          return [range.values, range.formulas, range.valueTypes, range.address, range.worksheet.name];
        }),
      );
      expect(read).toEqual([[["a", 1], [2, 3]], [["a", 1], [2, "=B1+A2"]], [["String", "Double"], ["Double", "Double"]], "'My bid'!A1:B2", "My bid"]);
      expect(host.book.sheet("my BID").valueAt(1, 1)).toBe(3);
      // nothing is kept for a page that has let go
      await expect.poll(() => host.references.count).toBe(0);
    }));

  it("spills a table, and says #SPILL! where a cell is in its way", () =>
    beside(async ({ host, person }) => {
      const sheet = host.book.sheet("Sheet1");
      await person(({ book }) => book.write(sheet, { top: 0, left: 0, bottom: 0, right: 0 }, [["=SEQUENCE(2,2)"]], "person"));
      expect([sheet.valueAt(0, 0), sheet.valueAt(1, 1)]).toEqual([1, 4]);
      await person(({ book }) => book.write(sheet, { top: 1, left: 1, bottom: 1, right: 1 }, [["x"]], "person"));
      expect([sheet.valueAt(0, 0), sheet.valueAt(1, 0), sheet.valueAt(1, 1)]).toEqual([new ErrorValue("#SPILL!"), null, "x"]);
    }));

  it("makes of texts what Excel makes of them: numbers, dates, truths, errors, formulas", () =>
    beside(async ({ page, host }) => {
      await page.evaluate(() =>
        Excel.run(async (context) => {
          const sheet = context.workbook.worksheets.getActiveWorksheet();
          sheet.getRange("A1:G1").values = [["1,250.5", "8%", "1-2", "true", "#N/A", "'1-2", "plain"]];
          sheet.getRange("A2").numberFormat = [["@"]];
          sheet.getRange("A2").values = [["1-2"]];
          sheet.getRange("A3:B3").values = [[7, 7]];
          sheet.getRange("A3:B3").values = [["", null as unknown as string]];
          await context.sync();
        }),
      );
      const row = (at: number, length: number): unknown[] => Array.from({ length }, (_, column) => host.book.active.valueAt(at, column));
      expect(row(0, 7)).toEqual([1250.5, 0.08, 45_000, true, new ErrorValue("#N/A"), "1-2", "plain"]);
      expect(row(1, 1)).toEqual(["1-2"]);
      // "" empties a cell, null leaves it alone
      expect(row(2, 2)).toEqual([null, 7]);
    }));

  it("takes a large table in the parts that the library makes of it", () =>
    beside(async ({ page, host }) => {
      const counted = new Map<string, number>();
      const before = host.faults.beforeAction.bind(host.faults);
      host.faults.beforeAction = (member) => {
        counted.set(member, (counted.get(member) ?? 0) + 1);
        before(member);
      };
      await page.evaluate(() =>
        Excel.run(async (context) => {
          context.workbook.worksheets.getActiveWorksheet().getRange("A1:E1000").values = Array.from({ length: 1000 }, (_, row) => Array.from({ length: 5 }, (__, column) => row * 5 + column));
          await context.sync();
        }),
      );
      expect(host.book.active.valueAt(999, 4)).toBe(4999);
      expect(host.book.active.entries.size).toBe(5000);
      // 1,500 cells a part
      expect(counted.get("Range.values")).toBe(4);
      expect(counted.get("Range._ValidateArraySize")).toBe(1);
      const wrong = await page.evaluate(() =>
        window.attempt(async (context) => {
          context.workbook.worksheets.getActiveWorksheet().getRange("A1:E999").values = Array.from({ length: 1000 }, () => [1, 2, 3, 4, 5]);
          await context.sync();
        }),
      );
      expect(wrong).toMatchObject({ code: "InvalidArgument", isGenuine: true });
    }));
});

describe("refusals", () => {
  it("are the library's own errors: not loaded, not found, there already, not usable", () =>
    beside(async ({ page }) => {
      const codes = await page.evaluate(async () => {
        const tries: ((context: Excel.RequestContext) => Promise<unknown>)[] = [
          async (context) => context.workbook.worksheets.getActiveWorksheet().name,
          async (context) => context.workbook.worksheets.getItem("Nowhere").load("name"),
          async (context) => context.workbook.names.getItem("Nothing").load("name"),
          async (context) => context.workbook.worksheets.add("SHEET1"),
          async (context) => context.workbook.worksheets.add("a/b"),
          async (context) => context.workbook.worksheets.add("a name of more than thirty-one signs"),
          async (context) => context.workbook.names.add("A1", context.workbook.getSelectedRange()),
          async (context) => context.workbook.worksheets.getActiveWorksheet().getRange("A0"),
          async (context) => void (context.workbook.worksheets.getActiveWorksheet().getRange("A1:B2").values = [[1, 2, 3]]),
          async (context) => void (context.workbook.worksheets.getActiveWorksheet().getRange("A1").formulas = [["=SUM(A1"]]),
          async (context) => void (context.workbook.worksheets.getActiveWorksheet().getRange("A:A").values = [[1]]),
          async (context) => void (context.workbook.worksheets.getActiveWorksheet().getRange("A1").format.font.color = "not a colour!"),
          async (context) => {
            context.workbook.names.add("Site", context.workbook.getSelectedRange());
            context.workbook.names.add("SITE", context.workbook.getSelectedRange());
          },
        ];
        const got = [];
        for (const each of tries) got.push(await window.attempt(each));
        return got;
      });
      expect(codes.every(({ isGenuine }) => isGenuine === true)).toBe(true);
      const [notLoaded, ...others] = codes.map(({ code }) => code);
      expect(notLoaded).toBe("PropertyNotLoaded");
      expect(others).toEqual(["ItemNotFound", "ItemNotFound", "ItemAlreadyExists", ...Array.from({ length: 8 }, () => "InvalidArgument"), "ItemAlreadyExists"]);
    }));

  it("spare what may be missing: a null object, and whatever is asked of one", () =>
    beside(async ({ page }) => {
      const read = await page.evaluate(() =>
        Excel.run(async (context) => {
          const name = context.workbook.names.getItemOrNullObject("Site");
          const range = name.getRangeOrNullObject();
          const sheet = context.workbook.worksheets.getItemOrNullObject("Nowhere");
          const used = context.workbook.worksheets.getActiveWorksheet().getUsedRangeOrNullObject(true);
          for (const each of [name, range, sheet, used]) each.load("isNullObject");
          await context.sync();
          return [name.isNullObject, range.isNullObject, sheet.isNullObject, used.isNullObject];
        }),
      );
      expect(read).toEqual([true, true, true, true]);
    }));

  it("meet every member, property and argument that the model does not know", () =>
    beside(async ({ page, host }) => {
      const codes = await page.evaluate(async () => {
        const sheet = (context: Excel.RequestContext): Excel.Worksheet => context.workbook.worksheets.getActiveWorksheet();
        const tries: ((context: Excel.RequestContext) => Promise<unknown>)[] = [
          async (context) => sheet(context).shapes.addLine(0, 0, 1, 1),
          async (context) => sheet(context).getRange("A1").load("text"),
          async (context) => sheet(context).getRange("A1").load("format/fill/pattern"),
          async (context) => sheet(context).getRange("A1").removeDuplicates([0], false),
          async (context) => void (sheet(context).getRange("A1").format.fill.tintAndShade = 1),
          async (context) => sheet(context).protection.protect({}, "secret"),
          async (context) => sheet(context).protection.protect({ allowSort: true }),
          async (context) => void (sheet(context).getRange("A1").dataValidation.prompt = { showPrompt: true, message: "m", title: "t", colour: 1 } as never),
        ];
        const got = [];
        for (const each of tries) got.push(await window.attempt(each));
        return got;
      });
      expect(codes.map(({ code }) => code)).toEqual(codes.map(() => "ApiNotImplemented"));
      expect(host.refused[0]?.message).toBe("The model of Excel does not know Worksheet.shapes.");
    }));

  it("know the requirement sets: what came after Excel 2021's cannot be found there", async () => {
    const members = async ({ page }: ExcelBeside): Promise<unknown[]> =>
      page.evaluate(async () => {
        const first = (context: Excel.RequestContext): Excel.Range => context.workbook.worksheets.getActiveWorksheet().getRange("A1");
        const spill = await window.attempt(async (context) => {
          const parent = first(context).getSpillParentOrNullObject().load("isNullObject");
          await context.sync();
          return parent.isNullObject;
        });
        const has = await window.attempt(async (context) => void first(context).load("hasSpill"));
        const by = await window.attempt(async (context) => void context.workbook.worksheets.getActiveWorksheet().getRangeByIndexes(0, 0, 1, 1).load("address"));
        return [Office.context.requirements.isSetSupported("ExcelApi", "1.9"), Office.context.requirements.isSetSupported("ExcelApi", "1.10"), Office.context.requirements.isSetSupported("ExcelApi", "1.21"), spill.code ?? spill.value, has.code, by.code];
      });
    await beside(async (excel) => expect(await members(excel)).toEqual([true, false, false, "ApiNotFound", "ApiNotFound", undefined]), { excelApi: "1.9" });
    await beside(async (excel) => expect(await members(excel)).toEqual([true, true, false, true, undefined, undefined]));
  });
});

describe("events", () => {
  it("tell the page of what it and a person change, calculate, add, delete and rename, and of nothing after it has had enough", () =>
    beside(async ({ page, host, person }) => {
      await page.evaluate(() =>
        Excel.run(async (context) => {
          const { worksheets } = context.workbook;
          const told = (words: string) => async (): Promise<void> => void window.kept.push(words);
          const changed = worksheets.onChanged.add(async (event) => void window.kept.push(`changed ${event.address} ${event.triggerSource}`));
          worksheets.onCalculated.add(told("calculated"));
          worksheets.onAdded.add(told("added"));
          worksheets.onDeleted.add(told("deleted"));
          await context.sync();
          (window as unknown as { stop(): Promise<void> }).stop = () =>
            Excel.run(changed.context, async (again) => {
              changed.remove();
              await again.sync();
            });
        }),
      );
      const sheet = host.book.active;
      const write = (row: number, value: unknown): Promise<void> => person(({ book }) => book.write(sheet, { top: row, left: 0, bottom: row, right: 0 }, [[value]], "person"));
      /** What the page was told, once it was told that much and nothing more comes. */
      const told = async (count: number): Promise<unknown[]> => {
        await page.waitForFunction((least) => window.kept.length >= least, count);
        await page.waitForTimeout(50);
        return page.evaluate(() => window.kept.splice(0));
      };
      await write(0, 3);
      expect(await told(1)).toEqual(["changed A1 Unknown"]);
      await write(1, "=A1*2");
      expect(await told(2)).toEqual(["changed A2 Unknown", "calculated"]);
      await page.evaluate(() =>
        Excel.run(async (context) => {
          context.workbook.worksheets.getActiveWorksheet().getRange("A1:B1").values = [[4, 5]];
          context.workbook.worksheets.add("New");
          await context.sync();
        }),
      );
      expect(await told(3)).toEqual(["changed A1:B1 ThisLocalAddin", "added", "calculated"]);
      expect(sheet.valueAt(1, 0)).toBe(8);
      await person(({ book }) => book.deleteSheet(book.sheet("New")));
      expect(await told(1)).toEqual(["deleted"]);
      // Excel has no event for names
      await person(({ book }) => book.addName("Site", { sheet, area: { top: 0, left: 0, bottom: 1, right: 1 } }, "", undefined));
      await page.evaluate(() => (window as unknown as { stop(): Promise<void> }).stop());
      await write(5, 1);
      await write(0, 7);
      expect(await told(1)).toEqual(["calculated"]);
      expect(host.events.count).toBe(3);
    }));

  it("follow the selection, of several areas too", () =>
    beside(async ({ page, host, person }) => {
      await page.evaluate(() =>
        Excel.run(async (context) => {
          context.workbook.worksheets.onSelectionChanged.add(async ({ address }) => void window.kept.push(address));
          await context.sync();
        }),
      );
      const selected = (): Promise<unknown> =>
        page.evaluate(() =>
          window.attempt(async (context) => {
            const one = context.workbook.getSelectedRange().load("address");
            await context.sync();
            return one.address;
          }),
        );
      await person(({ book }) => book.select(host.book.active, [{ top: 1, left: 1, bottom: 2, right: 3 }]));
      await expect.poll(() => page.evaluate(() => window.kept.splice(0))).toEqual(["B2:D3"]);
      expect(await selected()).toEqual({ value: "Sheet1!B2:D3" });
      await person(({ book }) => book.select(host.book.active, [{ top: 0, left: 0, bottom: 0, right: 0 }, { top: 4, left: 4, bottom: 4, right: 4 }]));
      expect(await selected()).toMatchObject({ code: "InvalidSelection", isGenuine: true });
      const first = await page.evaluate(() =>
        window.attempt(async (context) => {
          const areas = context.workbook.getSelectedRanges();
          const range = areas.areas.getItemAt(1).load("address");
          areas.load("areaCount");
          await context.sync();
          return [areas.areaCount, range.address];
        }),
      );
      expect(first).toEqual({ value: [2, "Sheet1!E5"] });
    }));
});
