import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import { cheapestCount, assessCounts } from "../../src/engine/index.js";
import { ErrorValue } from "../../src/formula/cell-value.js";
import { parseSite, templateRows } from "../../src/inputs/index.js";
import { PRODUCT_VERSION } from "../../src/results/index.js";
import { launchBrowser } from "./harness/browser.js";
import { serveAddIn, type AddInSite } from "./excel-host/add-in-site.js";
import type { ExcelHost } from "./excel-host/excel-host.js";
import type { Blanks } from "./excel-host/function-arguments.js";
import { startExcel, type Excel as ExcelBeside } from "./excel-host/start-excel.js";

let browser: Browser;
let site: AddInSite;
beforeAll(async () => {
  [browser, site] = await Promise.all([launchBrowser(), serveAddIn()]);
});
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

const rows = templateRows().map((row) => Array.from({ length: 4 }, (_, k) => row[k] ?? ""));
const { problem } = parseSite(templateRows());

/** Puts the demonstration's site block onto the first sheet and formulas beside it. */
function fill({ book }: ExcelHost, formulas: readonly string[]): void {
  const sheet = book.active;
  sheet.name = "Inputs";
  const area = { top: 0, left: 0, bottom: rows.length - 1, right: 3 };
  book.write(sheet, area, rows, "person");
  book.addName("Site", { sheet, area }, "", undefined);
  book.write(sheet, { top: 0, left: 6, bottom: formulas.length - 1, right: 6 }, formulas.map((formula) => [formula]), "person");
}

async function opened(blanks: Blanks = 0): Promise<ExcelBeside> {
  const excel = await startExcel(browser, { ...site, blanks });
  await excel.page.evaluate(() => Office.onReady());
  return excel;
}

describe("the built add-in inside Excel", () => {
  it("binds a body to each function that Excel reads of, and to no other", async () => {
    const excel = await opened();
    const bound = await excel.page.evaluate(() => Object.keys((CustomFunctions as unknown as { _association: { mappings: object } })._association.mappings).sort());
    expect(bound).toEqual(site.metadata.functions.map(({ id }) => id));
    expect(excel.complaints).toEqual([]);
    await excel.close();
  });

  it.each([0, null] as const)("prices the demonstration in the cells as the engine does, blank cells arriving as %s", async (blanks) => {
    const excel = await opened(blanks);
    await excel.person((host) => fill(host, ["=PROBEDEV.TOTALCOST(Site,4)", '=PROBEDEV.TOTALCOST(Site,4,"Count",E1)', "=PROBEDEV.OPTIMALCOUNT(Site,6)", '=PROBEDEV.CONTINGENCY(Site,4,80)+0', "=PROBEDEV.TOTALCOST(Site,-1)", "=PROBEDEV.VERSION()", "=PROBE.VERSION()", "=_xldudf_PROBEDEV_VERSION()"]));
    await excel.calculated();
    const at = (row: number): unknown => excel.host.book.active.valueAt(row, 6);
    const counts = assessCounts(problem, [0, 1, 2, 3, 4, 5, 6]);
    // the engine runs here in another JavaScript engine than the page's, and gives the same bits
    expect(at(0)).toBe(counts[4]!.total);
    expect(at(2)).toBe(cheapestCount(counts));
    expect(at(4)).toEqual(new ErrorValue("#VALUE!"));
    expect(excel.host.calculator.reasonAt(excel.host.book.active, 4, 6)).toMatch(/-1/);
    expect(at(5)).toBe(`Probeworth ${PRODUCT_VERSION}`);
    // the namespace of the other build and the form in which files store a name mean nothing in a cell
    expect([at(6), at(7)]).toEqual([new ErrorValue("#NAME?"), new ErrorValue("#NAME?")]);
    expect([excel.host.functions.troubles, excel.complaints]).toEqual([[], []]);
    await excel.close();
  });

  it("does what the ribbon's buttons say, and brings the pane into sight", async () => {
    const excel = await opened();
    excel.host.paneState = "Background";
    await excel.command("InsertSiteBlock");
    expect(excel.host.paneState).toBe("Visible");
    expect(excel.host.book.sheets.length).toBe(2);
    expect(excel.host.book.names.map(({ name }) => name)).toContain("Site");
    await excel.command("OpenRun");
    expect(await excel.page.getByRole("tab", { name: "Run" }).getAttribute("aria-selected")).toBe("true");
    await expect(excel.command("Unheard")).rejects.toThrow("no action Unheard");
    expect([excel.host.refused, excel.complaints]).toEqual([[], []]);
    await excel.close();
  });
});
