import { expect, it } from "vitest";
import { differing } from "../same-digits/differing.js";
import { digitsScript } from "../same-digits/digits-script.js";
import { engineDigits, type Digits } from "../same-digits/engine-digits.js";
import { launchBrowser } from "./harness/browser.js";

// The real browser is years younger than Node's engine.
it("the browser makes the same figures as Node: functions, cells of three sites, realisations and their table", async () => {
  const browser = await launchBrowser();
  const page = await browser.newPage();
  await page.addScriptTag({ content: await digitsScript() });
  const there = JSON.parse(await page.evaluate(() => (globalThis as unknown as { work(count: number, thorough: boolean): string }).work(20_000, true))) as Digits;
  await browser.close();
  const here = engineDigits(20_000, true);
  expect(differing(here.ours, there.ours)).toEqual({});
  expect(here.ours.elements.some((value) => value > 0) && here.ours.sites.every(Number.isFinite)).toBe(true);
  // were its own functions alike too, this test could not tell anything
  expect(Object.keys(differing(here.its, there.its))).toContain("cube");
});
