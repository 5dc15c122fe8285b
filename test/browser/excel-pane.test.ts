import { mkdir } from "node:fs/promises";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser, Page } from "playwright-core";
import { templateRows } from "../../src/inputs/index.js";
import { PRODUCT_VERSION } from "../../src/results/index.js";
import { serveAddIn, type AddInSite } from "./excel-host/add-in-site.js";
import { startExcel, type Excel as ExcelBeside, type ExcelOptions } from "./excel-host/start-excel.js";
import { launchBrowser } from "./harness/browser.js";

// a run on a machine that is busy with other tests takes minutes
const WAIT = 90_000;
const OUT = fileURLToPath(new URL("out/", import.meta.url));

let browser: Browser;
let site: AddInSite;
beforeAll(async () => {
  [browser, site] = await Promise.all([launchBrowser(), serveAddIn()]);
  await mkdir(OUT, { recursive: true });
});
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

async function opened(options: Partial<ExcelOptions> = {}): Promise<ExcelBeside> {
  const excel = await startExcel(browser, { ...site, ...options });
  await excel.page.locator(".probeworth").waitFor();
  return excel;
}
const status = (page: Page) => page.locator(".probeworth .status");
const tab = async (page: Page, name: string): Promise<void> => {
  await page.getByRole("tab", { name, exact: true }).click();
  await page.getByRole("tabpanel", { name }).waitFor();
};
/** Keeps a picture of the whole pane for the eye. */
async function picture(page: Page, name: string): Promise<void> {
  const hidden = await page.evaluate(() => {
    const main = document.querySelector(".probeworth .main")!;
    return main.scrollHeight - main.clientHeight;
  });
  const size = page.viewportSize()!;
  await page.setViewportSize({ width: size.width, height: Math.min(size.height + hidden, 6000) });
  await page.screenshot({ path: `${OUT}excel-${name}.png` });
  await page.setViewportSize(size);
}
const row = (label: string): number => templateRows().findIndex(([name]) => name === label);

describe.each(["light", "dark"] as const)("the built pane beside Excel, %s", (colorScheme) => {
  let excel: ExcelBeside;
  let page: Page;
  beforeAll(async () => {
    excel = await opened({ colorScheme });
    page = excel.page;
  });
  afterAll(() => excel?.close());

  it("inserts the site block with rules and name, reads it and follows what the person types", { timeout: WAIT }, async () => {
    await excel.command("InsertSiteBlock");
    await expect.poll(() => status(page).textContent()).toBe("The template stands on the new sheet Site under the name Site. Replace its figures with your own.");
    const sheet = excel.host.book.sheet("Site");
    expect(sheet.validations.length).toBeGreaterThan(35);
    await expect.poll(() => page.locator(".probeworth .verdict").first().textContent()).not.toMatch(/refus/i);
    const price = row("Price per hole");
    await excel.person(({ book }) => book.write(sheet, { top: price, bottom: price, left: 1, right: 1 }, [[""]], "person"));
    await page.getByText(new RegExp(`Price per hole \\(row ${price + 1}`)).first().waitFor();
    await picture(page, `site-refused-${colorScheme}`);
    await excel.person(({ book }) => book.write(sheet, { top: price, bottom: price, left: 1, right: 1 }, [[650]], "person"));
    await expect.poll(() => page.getByText(new RegExp(`Price per hole \\(row ${price + 1}`)).count()).toBe(0);
    await picture(page, `site-${colorScheme}`);
  });

  it("runs a short simulation and writes tables and brief with native charts, over nothing", { timeout: 2 * WAIT }, async () => {
    const before = JSON.stringify([...excel.host.book.sheet("Site").entries]);
    await excel.command("OpenRun");
    await page.getByLabel("Numbers of holes").fill("0, 2, 4");
    await page.getByLabel("Number of grounds analysed by finite elements").fill("6");
    await page.getByRole("button", { name: "Start the run" }).click();
    await expect.poll(() => page.locator(".control .run-words").textContent(), { timeout: WAIT }).toMatch(/^Finished: 6 grounds/);
    await picture(page, `run-${colorScheme}`);
    await tab(page, "Results");
    const simulated = page.getByRole("region", { name: "By simulation" });
    await simulated.waitFor();
    await simulated.getByRole("button", { name: "Write the tables" }).click();
    await expect.poll(() => status(page).textContent(), { timeout: WAIT }).toBe("Written on the new sheet Simulation.");
    const tables = excel.host.book.sheet("Simulation");
    expect(tables.charts.map(({ properties }) => properties["title/text"])).toEqual(["Expected cost by number of holes", "Mean pile length that the design may ask for"]);
    const [costs, lengths] = tables.charts;
    // the series hold the numbers of the table: the total of the chart is its parts, and the table's own total
    const column = (at: { readonly area: { readonly top: number; readonly bottom: number; readonly left: number } }): unknown[] => Array.from({ length: at.area.bottom - at.area.top + 1 }, (_, k) => tables.valueAt(at.area.top + k, at.area.left));
    const values = costs!.series.map((series) => column(series.values!));
    expect(column(costs!.series[0]!.categories!)).toEqual([0, 2, 4]);
    values[4]!.forEach((total, k) => expect(values.slice(0, 4).reduce((sum, part) => sum + Number(part[k]), 0) / Number(total)).toBeCloseTo(1, 10));
    const named = excel.host.book.names.find(({ name }) => name === "SimulatedCosts")!.range!;
    const head = Array.from({ length: 20 }, (_, k) => String(tables.valueAt(named.area.top, k)));
    const totals = head.findIndex((word) => word.startsWith("Total"));
    expect(values[4]).toEqual([1, 2, 3].map((k) => tables.valueAt(named.area.top + k, totals)));
    expect(lengths!.series.length).toBeGreaterThan(1);
    await simulated.getByLabel("Holes your client proposes").fill("0");
    await simulated.getByRole("button", { name: "Write the client brief" }).click();
    await expect.poll(() => status(page).textContent(), { timeout: WAIT }).toBe("Written on the new sheet Client brief.");
    const brief = excel.host.book.sheet("Client brief");
    expect(brief.charts).toHaveLength(1);
    expect(brief.page).toMatchObject({ orientation: "Portrait", zoom: { horizontalFitToPages: 1, verticalFitToPages: 1 } });
    expect(brief.printArea).toMatchObject({ top: 0, left: 0, right: 8 });
    await simulated.getByRole("button", { name: "Write the client brief" }).click();
    await expect.poll(() => status(page).textContent(), { timeout: WAIT }).toBe("Written on the new sheet Client brief (2).");
    expect(JSON.stringify([...excel.host.book.sheet("Site").entries])).toBe(before);
    await picture(page, `results-${colorScheme}`);
  });

  it("keeps working when the workbook refuses, and says why", { timeout: WAIT }, async () => {
    excel.host.book.isStructureProtected = true;
    await page.getByRole("button", { name: "Write the tables" }).click();
    await expect.poll(() => status(page).textContent()).toContain("The structure of this workbook is protected, so no sheet can be added, and nothing was written.");
    await picture(page, `refused-${colorScheme}`);
    excel.host.book.isStructureProtected = false;
    excel.host.faults.startEdit();
    await page.getByRole("button", { name: "Write the tables" }).click();
    await expect.poll(() => status(page).textContent(), { timeout: 10_000 }).toMatch(/Enter or Esc/).finally(() => excel.host.faults.endEdit());
    await expect.poll(() => status(page).textContent(), { timeout: WAIT }).toBe("Written on the new sheet Simulation (2).");
  });

  it("repairs from the ribbon and from the Help view, and states both versions", { timeout: WAIT }, async () => {
    const { book } = excel.host;
    await excel.person(() => book.write(book.sheet("Site"), { top: 0, bottom: 0, left: 8, right: 8 }, [["=[2]!_xldudf_PROBEDEV_TOTALCOST(Site,2)"]], "person"));
    await excel.calculated();
    await excel.command("Repair");
    await expect.poll(() => status(page).textContent()).toBe("1 formula was entered again: 1 on Site.");
    await excel.calculated();
    expect(book.sheet("Site").valueAt(0, 8)).toBeGreaterThan(0);
    expect(await page.getByRole("tab", { name: "Help" }).getAttribute("aria-selected")).toBe("true");
    await page.getByRole("button", { name: "Repair formulas" }).click();
    await expect.poll(() => status(page).textContent()).toMatch(/^Nothing needed repair: the one formula of Probeworth is in order\./);
    const versions = page.getByRole("region", { name: "Versions" });
    expect(await versions.textContent()).toBe(`VersionsPane${PRODUCT_VERSION}Cell functions${PRODUCT_VERSION}`);
    await picture(page, `help-${colorScheme}`);
    expect([excel.host.refused.map(({ code }) => code), excel.complaints]).toEqual([[], []]);
  });
});

describe("the built pane elsewhere", () => {
  it("explains a version of the functions that is older than the page", { timeout: WAIT }, async () => {
    const excel = await opened();
    await excel.page.route("**/functions.js*", async (route) => {
      const answer = await route.fetch();
      await route.fulfill({ response: answer, body: (await answer.text()).replace(/(probeworthFunctions:\s*)[^}]+/, '$1"0.0.9"') });
    });
    await excel.page.reload();
    await excel.page.locator(".probeworth").waitFor();
    await tab(excel.page, "Help");
    const versions = excel.page.getByRole("region", { name: "Versions" });
    expect(await versions.textContent()).toContain(`The cell functions are of version 0.0.9, this pane of version ${PRODUCT_VERSION}. After an update Excel may keep the old functions for up to 24 hours`);
    await picture(excel.page, "versions-light");
    await excel.close();
  });

  it.each([
    ["opened as a plain page", undefined, "This page was opened outside Excel, so only the help is shown. Open Excel and choose Price boreholes on the Home tab."],
    ["without the platform's library", "abort", "The library that connects this page with Excel could not be loaded, so only the help is shown. Check the connection to the network, then open the pane again."],
  ] as const)("%s shows the help alone and says so", async (name, library, sentence) => {
    const page = await (await browser.newContext({ viewport: { width: 320, height: 900 } })).newPage();
    const uncaught: string[] = [];
    page.on("pageerror", (error) => uncaught.push(error.message));
    const { libraryFile } = await import("./excel-host/library.js");
    await page.route("**/office-js/**", (route) => (library === "abort" ? route.abort() : route.fulfill({ path: libraryFile(new URL(route.request().url()).pathname.replace(/^.*\/office-js\//, "")) })));
    await page.goto(site.address);
    await page.getByText(sentence).waitFor();
    expect(await page.getByRole("tab").allTextContents()).toEqual(["Help"]);
    await page.getByText("22 functions").waitFor();
    await picture(page, `outside-${name.split(" ")[0]!}`);
    expect(uncaught).toEqual([]);
    await page.context().close();
  });

  it("in an Excel that is too old shows the help alone and says so", async () => {
    const excel = await opened({ excelApi: "1.8" });
    await excel.page.getByText("This version of Excel is too old for the pane, so only the help is shown.").waitFor();
    expect(await excel.page.getByRole("tab").allTextContents()).toEqual(["Help"]);
    await excel.close();
  });

  it("works in the oldest Excel that the manifest admits", { timeout: WAIT }, async () => {
    const excel = await opened({ excelApi: "1.9" });
    await excel.command("InsertSiteBlock");
    await excel.page.locator(".probeworth .verdict").first().waitFor();
    await excel.command("Repair");
    await expect.poll(() => status(excel.page).textContent()).toMatch(/nothing to repair/);
    expect([excel.host.refused, excel.complaints]).toEqual([[], []]);
    await excel.close();
  });
});
