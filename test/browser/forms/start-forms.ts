import { build } from "esbuild";
import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import type { Browser, Page } from "playwright-core";
import { functionsMetadata, type FunctionsJson } from "../../../src/build/metadata.js";
import { servePractice } from "../../../src/build/practice-server.js";
import { readReference } from "../../../src/formula/addresses.js";
import { ErrorValue } from "../../../src/formula/cell-value.js";
import type { CellValue, SheetPlan } from "../../../src/host/workbook.js";
import type { ExcelHost } from "../excel-host/excel-host.js";
import { LIBRARY_ADDRESS } from "../excel-host/library.js";
import { startExcel, type Excel } from "../excel-host/start-excel.js";
import { STARTING_NAMES, STARTING_SHEETS } from "./starting-book.js";
import type { Watch, WorkbookForm } from "./workbook-form.js";

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

/** The pages of all forms on one server. */
export interface FormSite {
  readonly address: string;
  readonly metadata: FunctionsJson;
  close(): Promise<void>;
}

/** Bundles the forms' pages and serves them. */
export async function serveForms(): Promise<FormSite> {
  const folder = await mkdtemp(join(tmpdir(), "forms-"));
  await build({
    bundle: true, format: "esm", target: "es2022", outdir: folder, logLevel: "warning", minify: true, charset: "utf8",
    define: { "process.env.NODE_ENV": '"production"' }, entryPoints: { excel: here("excel-form-page.ts"), practice: here("practice-form-page.ts") },
  });
  const page = (body: string): string => `<!doctype html><html lang="en"><head><meta charset="utf-8" /><title>Forms</title><link rel="icon" href="data:," />${body}</body></html>`;
  await writeFile(join(folder, "excel.html"), page(`<script src="${LIBRARY_ADDRESS}office.js"></script><script type="module" src="excel.js"></script></head><body>`));
  await writeFile(join(folder, "practice.html"), page('<link rel="stylesheet" href="practice.css" /><style>#grid { height: 600px; }</style></head><body><div id="grid"></div><script type="module" src="practice.js"></script>'));
  const server = await servePractice(folder, 0);
  return {
    address: server.address,
    metadata: await functionsMetadata(),
    close: async () => {
      await server.close();
      await rm(folder, { recursive: true });
    },
  };
}

function workbookOf(page: Page): WorkbookForm["workbook"] {
  return {
    readName: (name) => page.evaluate((each) => window.form.workbook.readName(each), name),
    readSelection: () => page.evaluate(() => window.form.workbook.readSelection()),
    names: () => page.evaluate(() => window.form.workbook.names()),
    insertSheet: (plan) => page.evaluate((each) => window.form.workbook.insertSheet(each as SheetPlan), plan as unknown),
  };
}

async function watch(page: Page): Promise<Watch> {
  const k = await page.evaluate(() => {
    const { workbook, counts, stops } = window.form;
    const number = counts.push(0) - 1;
    stops.push(workbook.onChanged(() => counts[number]!++));
    return number;
  });
  return { count: () => page.evaluate((number) => window.form.counts[number]!, k), stop: () => page.evaluate((number) => window.form.stops[number]!(), k) };
}

/** The practice page's grid. */
export async function startPracticeForm(browser: Browser, site: FormSite): Promise<WorkbookForm> {
  const page = await (await browser.newContext({ viewport: { width: 1000, height: 700 } })).newPage();
  await page.goto(`${site.address}practice.html`);
  await page.locator("body[data-state=ready]").waitFor();
  const settled = (): Promise<void> => page.waitForTimeout(600); // the grid gathers changes for 100 ms, the form waits 150 ms more
  return {
    workbook: workbookOf(page),
    cells: () => page.evaluate(() => window.grid.cells()),
    type: async (...what) => {
      await page.evaluate((each) => window.grid.type(...each), what);
      await settled();
    },
    select: (...what) => page.evaluate((each) => window.grid.select(...each), what),
    addSheet: (name) => page.evaluate((each) => window.grid.addSheet(each), name),
    settled,
    watch: () => watch(page),
    close: () => page.context().close(),
  };
}

/** Excel, with the model of it for what only a test of Excel asks. */
export interface ExcelForm extends WorkbookForm {
  readonly excel: Excel;
}

/** Excel's form over the real library beside the model of Excel. @param excelApi  how far ExcelApi goes */
export async function startExcelForm(browser: Browser, site: FormSite, excelApi?: string): Promise<ExcelForm> {
  const excel = await startExcel(browser, { address: `${site.address}excel.html`, metadata: site.metadata, ...(excelApi === undefined ? {} : { excelApi }) });
  await excel.page.evaluate(() => Office.onReady());
  const { host, page } = excel;
  const settled = async (): Promise<void> => {
    await excel.calculated();
    await page.waitForTimeout(350); // the form waits 200 ms for the sheets to come to rest
  };
  await excel.person(start);
  await settled();
  return {
    excel,
    workbook: workbookOf(page),
    cells: async () => shown(host),
    type: async (sheet, address, value) => {
      await excel.person(({ book }) => book.write(book.sheet(sheet), readReference(address)!, [[value]], "person"));
      await settled();
    },
    select: (sheet, address) => excel.person(({ book }) => book.select(book.sheet(sheet), [readReference(address)!])),
    addSheet: (name) => excel.person(({ book }) => void book.addSheet(name)),
    settled,
    watch: () => watch(page),
    close: () => excel.close(),
  };
}

function start({ book }: ExcelHost): void {
  const empty = book.active;
  for (const { name, rows } of STARTING_SHEETS) {
    const sheet = book.addSheet(name);
    rows.forEach((row, r) => book.write(sheet, { top: r, bottom: r, left: 0, right: row.length - 1 }, [row], "person"));
  }
  book.activate(book.sheets[1]!);
  book.deleteSheet(empty);
  for (const { name, meaning } of STARTING_NAMES) {
    const match = /^=(?:'((?:[^']|'')+)'|(\w+))!([^,]+)$/.exec(meaning);
    const area = match === null ? undefined : readReference(match[3]!);
    book.addName(name, area === undefined ? undefined : { sheet: book.sheet((match![1] ?? match![2]!).replaceAll("''", "'")), area }, meaning, undefined);
  }
}

function shown({ book }: ExcelHost): Record<string, CellValue[][]> {
  return Object.fromEntries(
    book.sheets.map((sheet) => {
      const { bottom, right } = sheet.used(true) ?? { bottom: 0, right: 0 };
      return [sheet.name, Array.from({ length: bottom + 1 }, (_, row) => Array.from({ length: right + 1 }, (__, column) => plain(sheet.valueAt(row, column))))];
    }),
  );
}

function plain(value: unknown): CellValue {
  return value instanceof ErrorValue ? value.code : ((value ?? "") as CellValue);
}
