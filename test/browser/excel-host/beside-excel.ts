import { expect } from "vitest";
import type { Browser } from "playwright-core";
import { startExcel, type Excel, type ExcelOptions } from "./start-excel.js";

/** Runs a test beside an Excel of its own; the page must not have complained of anything. */
export async function besideExcel(browser: Browser, options: ExcelOptions, test: (excel: Excel) => Promise<void>): Promise<void> {
  const excel = await startExcel(browser, options);
  await excel.page.evaluate(() => Office.onReady());
  await test(excel);
  expect(excel.complaints).toEqual([]);
  await excel.close();
}
