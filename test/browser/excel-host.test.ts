import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import { launchBrowser } from "./harness/browser.js";
import { startExcel } from "./excel-host/start-excel.js";
import { serveScript, type ScriptSite } from "./excel-host/script-site.js";

let browser: Browser;
let site: ScriptSite;
beforeAll(async () => {
  [browser, site] = await Promise.all([launchBrowser(), serveScript()]);
});
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

describe("the library beside the model", () => {
  it("is ready and says that the host is Excel", async () => {
    const excel = await startExcel(browser, { address: site.address });
    expect(await excel.page.evaluate(() => Office.onReady())).toMatchObject({ host: "Excel", platform: "PC" });
    const read = await excel.page.evaluate(() =>
      Excel.run(async (context) => {
        const sheet = context.workbook.worksheets.add("Bid");
        const range = sheet.getRange("A1:B2");
        range.values = [["a", 1], [2, "=B1+A2"]];
        range.format.font.bold = true;
        await context.sync();
        range.load("values,address,formulas");
        sheet.load("name");
        await context.sync();
        return [range.values, range.address, range.formulas, sheet.name];
      }),
    );
    expect(read).toEqual([[["a", 1], [2, 3]], "Bid!A1:B2", [["a", 1], [2, "=B1+A2"]], "Bid"]);
    expect(excel.complaints).toEqual([]);
    await excel.close();
  });
});
