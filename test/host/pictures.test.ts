import { describe, expect, it } from "vitest";
import { lengthPercentiles } from "../../src/engine/index.js";
import { areaOf } from "../../src/host/addresses.js";
import { demonstrationWorkbook } from "../../src/host/demonstration-workbook.js";
import { simulationSheet } from "../../src/host/simulation-sheet.js";
import type { PlannedChart, SheetPlan } from "../../src/host/workbook.js";
import { numberWriter } from "../../src/pane/model/numbers.js";
import { briefSheet } from "../../src/pane/sheets/brief-sheet.js";
import { orderOfDemonstration, simulatedRow, simulatedTable } from "../pane/simulated-rows.js";

// Invented figures with round sums: each part differs from every other, so that a series of the wrong column is seen.
const rows = [
  simulatedRow(0, 52_000, { investigation: 0, foundation: 30_000, failure: 20_000, delay: 2000, standardError: 500 }),
  simulatedRow(2, 41_000, { investigation: 6000, foundation: 31_000, failure: 3000, delay: 1000, standardError: 300, notDistinguishable: true }),
  simulatedRow(4, 41_100, { investigation: 9000, foundation: 30_500, failure: 1100, delay: 500, standardError: 310, notDistinguishable: true }),
  simulatedRow(1, 41_050, { variant: 1, name: "Other", notDistinguishable: true }),
];
const table = simulatedTable(rows);
const stamp = { version: "1", seed: "7", inputs: "ab", elements: 24, form: 600, date: new Date(0) };
const tables = simulationSheet({ table, stamp, units: "SI", money: "EUR", warnings: [] });
const run = orderOfDemonstration();
const brief = briefSheet({ run: { ...run, task: { ...run.task, variants: [run.task.variants[0]!, { ...run.task.variants[0]!, name: "Other" }] } }, table: simulatedTable(rows.slice(0, 3)), stamp, warnings: [] }, 0, undefined, numberWriter("en-GB"));

/** The values of a column of cells; undefined for a cell that the plan leaves empty. */
function column(plan: SheetPlan, range: string): unknown[] {
  const { top, left, bottom, right } = areaOf(range);
  expect(left).toBe(right);
  return Array.from({ length: bottom - top + 1 }, (_, k) => plan.cells.find((cell) => cell.row === top + k && cell.column === left)?.value);
}
const series = (plan: SheetPlan, chart: PlannedChart): Record<string, unknown[]> => Object.fromEntries(chart.series.map(({ name, values }) => [name, column(plan, values)]));

describe.each([["tables", tables], ["brief", brief]] as const)("the picture of costs on the sheet of the %s", (_, plan) => {
  const chart = plan.charts![0]!;
  it("draws one method's parts, total, edges of the error and marks", () => {
    expect(column(plan, chart.categories)).toEqual([0, 2, 4]);
    expect(series(plan, chart)).toEqual({
      Foundation: [30_000, 31_000, 30_500],
      Failure: [20_000, 3000, 1100],
      Delay: [2000, 1000, 500],
      Investigation: [0, 6000, 9000],
      Total: [52_000, 41_000, 41_100],
      "Give or take two standard errors": [51_000, 40_400, 40_480],
      "Upper edge": [53_000, 41_600, 41_720],
      "Cheapest, or cannot be told from it": [undefined, 41_000, 41_100],
    });
  });
  it("says the same in words, in the plan and under the picture", () => {
    expect(chart.words).toBe("Expected cost of 0 to 4 holes, by parts. Cheapest: 2 holes, 41,000 EUR in all, give or take 600 EUR. Cannot be told from it: 4.");
    expect(plan.cells.map(({ value }) => String(value)).join(" ")).toContain("give or take 600 EUR. Cannot be told from it: 4.");
  });
});

it("draws lengths of the fewest, the cheapest and the most holes out of the table's own cells", () => {
  const chart = tables.charts![1]!;
  expect(column(tables, chart.categories)).toEqual(lengthPercentiles);
  expect(series(tables, chart)).toEqual(Object.fromEntries([0, 1, 2].map((k) => [`${rows[k]!.count} holes`, rows[k]!.meanLengths])));
  expect(chart.words).toContain("10.0 with 0 holes");
});

it("covers no cell that holds anything, neither of another picture nor of the plan", () => {
  for (const plan of [tables, brief, ...demonstrationWorkbook()]) {
    const covered = new Set<string>();
    for (const { place } of plan.charts ?? []) {
      const { top, left, bottom, right } = areaOf(place);
      for (let row = top; row <= bottom; row++) {
        for (let k = left; k <= right; k++) {
          expect(covered.has(`${row} ${k}`)).toBe(false);
          covered.add(`${row} ${k}`);
        }
      }
    }
    for (const { row, column: k, value, formula } of plan.cells) if ((value ?? "") !== "" || formula !== undefined) expect(covered.has(`${row} ${k}`), `${plan.name} ${row} ${k}`).toBe(false);
  }
});

it("prints the brief alone, not the numbers beside it", () => {
  expect(brief).toMatchObject({ onePage: true, standing: true });
  const page = areaOf(brief.printed!);
  const picture = areaOf(brief.charts![0]!.place);
  expect(picture.right).toBeLessThanOrEqual(page.right);
  expect(picture.bottom).toBeLessThan(page.bottom);
  expect(areaOf(brief.charts![0]!.categories).left).toBeGreaterThan(page.right);
  for (const { row, column: k } of brief.cells) if (k <= page.right) expect(row).toBeLessThanOrEqual(page.bottom);
});
