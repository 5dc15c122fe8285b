import { build } from "esbuild";
import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import { servePractice } from "../../src/build/practice-server.js";
import { Calculation } from "../../src/formula/calculation.js";
import { ErrorValue, type CellValue } from "../../src/formula/cell-value.js";
import { demonstrationBook } from "../../src/formula/demonstration.js";
import { demonstrationWorkbook } from "../../src/host/demonstration-workbook.js";
import { gridFunctions } from "../../src/practice/grid-functions.js";
import { launchBrowser } from "./harness/browser.js";
import { serveAddIn, type AddInSite } from "./excel-host/add-in-site.js";
import { loadBook } from "./excel-host/load-book.js";
import { startExcel } from "./excel-host/start-excel.js";

type Answer = string | number | boolean | null;
/** Every cell that a formula of the demonstration fills, by "Sheet!row,column". */
type Answers = ReadonlyMap<string, Answer>;

const plans = demonstrationWorkbook();
let browser: Browser;
let line: Answers;
let grid: Answers;
/** by what blank cells reach the functions as */
let excel: { readonly zero: Answers; readonly null: Answers };

beforeAll(async () => {
  browser = await launchBrowser();
  line = ofFormulaLine();
  grid = await ofGrid();
  const site = await serveAddIn();
  excel = { zero: await ofExcel(site, 0), null: await ofExcel(site, null) };
  await site.close();
}, 300_000);

afterAll(() => browser?.close());

const plain = (value: CellValue | undefined): Answer => (value instanceof ErrorValue ? value.code : value === undefined || value === null ? "" : value);

function ofFormulaLine(): Answers {
  const calculation = new Calculation(demonstrationBook(), gridFunctions);
  const found = new Map<string, Answer>();
  plans.forEach(({ name, cells }, sheet) => {
    for (const { row, column, formula } of cells) {
      if (formula === undefined) continue;
      calculation.cell({ sheet, row, column })!.values.forEach((values, r) => values.forEach((value, c) => found.set(`${name}!${row + r},${column + c}`, plain(value))));
    }
  });
  calculation.dispose();
  return found;
}

async function ofGrid(): Promise<Answers> {
  const folder = await mkdtemp(join(tmpdir(), "same-answers-"));
  await build({
    bundle: true, format: "esm", target: "es2022", outdir: folder, logLevel: "warning", minify: true, charset: "utf8",
    define: { "process.env.NODE_ENV": '"production"' }, entryPoints: { page: fileURLToPath(new URL("same-answers/grid-page.ts", import.meta.url)) },
  });
  await writeFile(join(folder, "page.html"), '<!doctype html><html lang="en"><head><meta charset="utf-8" /><title>Grid</title><link rel="stylesheet" href="page.css" /></head><body><div id="grid" style="height: 600px"></div><script type="module" src="page.js"></script></body></html>');
  const server = await servePractice(folder, 0);
  const page = await (await browser.newContext()).newPage();
  await page.goto(`${server.address}page.html`);
  await page.locator("body[data-state=ready]").waitFor({ timeout: 120_000 });
  const cells = await page.evaluate(() => window.gridCells());
  await page.context().close();
  await server.close();
  await rm(folder, { recursive: true });
  return places((sheet, row, column) => cells[sheet]?.[row]?.[column] ?? "");
}

async function ofExcel(site: AddInSite, blanks: 0 | null): Promise<Answers> {
  const beside = await startExcel(browser, { ...site, blanks });
  await beside.page.evaluate(() => Office.onReady());
  await beside.person((host) => loadBook(host, demonstrationBook(), site.namespace));
  // a busy machine takes longer than the model waits at once
  for (let tries = 0; beside.host.functions.waiting > 0 || tries === 0; tries++) {
    try {
      await beside.calculated();
    } catch (reason) {
      if (tries > 8) throw reason;
    }
  }
  const found = places((sheet, row, column) => plain(beside.host.book.findSheet(sheet)!.valueAt(row, column)));
  expect([beside.complaints, beside.host.functions.troubles]).toEqual([[], []]);
  await beside.close();
  return found;
}

/** The same cells as the formula line fills, read elsewhere. */
function places(at: (sheet: string, row: number, column: number) => Answer): Answers {
  return new Map([...line.keys()].map((place) => {
    const [, sheet, row, column] = /^(.+)!(\d+),(\d+)$/.exec(place)!;
    return [place, at(sheet!, Number(row), Number(column))];
  }));
}

const differing = (one: Answers, other: Answers): string[] => [...one].filter(([place, value]) => !Object.is(value, other.get(place))).map(([place, value]) => `${place}: ${String(value)} and ${String(other.get(place))}`);

describe("the demonstration workbook gives the same answers, bit for bit, in every cell that a formula fills", () => {
  it("holds every formula cell and what its tables spill, without an error", () => {
    expect(line.size).toBeGreaterThan(500);
    expect([...line.values()].filter((value) => typeof value === "number").length).toBeGreaterThan(300);
    expect([...line].filter(([, value]) => typeof value === "string" && value.startsWith("#"))).toEqual([]);
  });
  it("through Excel's functions runtime with blank cells as zero, as on the desktop, and as null, as on the web", () => {
    expect(differing(excel.zero, excel.null)).toEqual([]);
  });
  it("in the practice grid", () => {
    expect(differing(excel.zero, grid)).toEqual([]);
  });
  it("on the formula line, which another JavaScript engine runs", () => {
    expect(differing(excel.zero, line)).toEqual([]);
  });
});
