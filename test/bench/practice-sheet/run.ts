import { build } from "esbuild";
import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { servePractice } from "../../../src/build/practice-server.js";
import { launchBrowser } from "../../browser/harness/browser.js";
import { PracticePage, startPractice } from "../../browser/harness/practice-page.js";
import type { SheetBench } from "./page.js";

// Times the practice workbook in a real browser: its opening, and a full recalculation of 500 sensitivity cells.

const ROUNDS = 5;
const RECALCULATION_TARGET = 2500;
const ENGINE_TARGET = 1300;
const OPENING_TARGET = 5000;

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;
const told = (name: string, times: readonly number[], target: number): string =>
  `${name.padEnd(52)} ${median(times).toFixed(0).padStart(6)} ms (${Math.min(...times).toFixed(0)}-${Math.max(...times).toFixed(0)}), ${((100 * median(times)) / target).toFixed(0)} % of ${target} ms\n`;

const practice = await startPractice();
const openings: number[] = [];
for (let round = 0; round < ROUNDS; round++) {
  const begun = performance.now();
  const page = await PracticePage.open(practice);
  openings.push(performance.now() - begun);
  await page.close();
}
await practice.close();
process.stdout.write(told("Practice workbook open, all sheets calculated", openings, OPENING_TARGET));

const folder = await mkdtemp(join(tmpdir(), "sheet-bench-"));
await build({
  entryPoints: { main: fileURLToPath(new URL("page.ts", import.meta.url)) },
  bundle: true, minify: true, splitting: true, charset: "utf8", format: "esm", target: "es2022", outdir: folder, logLevel: "warning",
  define: { "process.env.NODE_ENV": '"production"' },
});
await writeFile(join(folder, "index.html"), '<!doctype html><link rel="stylesheet" href="main.css"><div id="grid" style="height:800px"></div><script type="module" src="main.js"></script>');
const server = await servePractice(folder, 0);
const browser = await launchBrowser();
const page = await browser.newPage();
await page.goto(server.address);
await page.locator("body[data-state=ready]").waitFor({ timeout: 120_000 });
const whole: number[] = [];
const alone: number[] = [];
for (let round = 0; round < ROUNDS; round++) {
  // the stiffnesses differ, so that nothing remembered answers
  whole.push(await page.evaluate((stiffness) => (globalThis as unknown as { bench: SheetBench }).bench.recalculate(stiffness), 11.3 + 0.1 * round));
  alone.push(await page.evaluate((stiffness) => (globalThis as unknown as { bench: SheetBench }).bench.engineAlone(stiffness), 13.05 + 0.1 * round));
}
const worst = await page.evaluate((stiffness) => (globalThis as unknown as { bench: SheetBench }).bench.worstDifference(stiffness), 11.3 + 0.1 * (ROUNDS - 1));
if (!(worst < 1e-12)) throw new Error(`The cells differ from the calls alone by ${worst}.`);
await browser.close();
await server.close();
await rm(folder, { recursive: true });
process.stdout.write(told("500 sensitivity cells, one input changed", whole, RECALCULATION_TARGET));
process.stdout.write(told("the same 500 calls without the grid", alone, ENGINE_TARGET));
