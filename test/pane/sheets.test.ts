import { describe, expect, it } from "vitest";
import { simulationSheet } from "../../src/host/simulation-sheet.js";
import type { CellValue, SheetPlan } from "../../src/host/workbook.js";
import { PRODUCT_VERSION } from "../../src/results/index.js";
import { inputsHash } from "../../src/jobs/inputs-hash.js";
import { numberWriter } from "../../src/pane/model/numbers.js";
import { briefInWords, briefSheet } from "../../src/pane/sheets/brief-sheet.js";
import { inLines } from "../../src/pane/sheets/cells.js";
import { contentOf, type SimulationReport } from "../../src/pane/sheets/simulation-report.js";
import { reportOf } from "../../src/pane/run-report.js";
import type { RunState } from "../../src/pane/run-store.js";
import { orderOfDemonstration, simulatedRow, simulatedTable } from "./simulated-rows.js";

const writer = numberWriter("en-GB");
const rows = [
  simulatedRow(0, 52_000, { failure: 8000 }),
  simulatedRow(2, 41_000, { chanceWithin: 0.8, chanceCheapest: 0.8, investigation: 6000, notDistinguishable: true }),
  simulatedRow(4, 41_010, { investigation: 9000, notDistinguishable: true, chanceCheapest: 0.2 }),
];
const order = orderOfDemonstration();
const state = (change: Partial<RunState> = {}): RunState => ({
  phase: "ended", order, inputs: inputsHash(order.task), progress: undefined, end: "done", message: "", table: simulatedTable(rows),
  used: { elements: 24, form: 600 }, before: { elements: 0, form: 0 }, note: "", isKept: true, changed: false, ...change,
});
const report = (change: Partial<RunState> = {}): SimulationReport => reportOf(state(change), new Date(Date.UTC(2026, 2, 14, 9, 20)))!;

/** The plan as rows of values. */
function grid({ cells }: SheetPlan): CellValue[][] {
  const lines: CellValue[][] = [];
  for (const { row, column, value } of cells) (lines[row] ??= [])[column] = value ?? "";
  return Array.from(lines, (line) => Array.from(line ?? [], (value) => value ?? ""));
}
/** What a defined name of a plan stands over. */
function named(plan: SheetPlan, name: string): CellValue[][] {
  const [, left, top, right, bottom] = /^([A-Z])(\d+):([A-Z])(\d+)$/.exec(plan.names!.find((each) => each.name === name)!.range)!;
  return grid(plan).slice(Number(top) - 1, Number(bottom)).map((line) => line.slice(left!.charCodeAt(0) - 65, right!.charCodeAt(0) - 64));
}
const text = (plan: SheetPlan): string => grid(plan).map((line) => line.join(" ")).join("\n");

describe("the sheet of all figures", () => {
  it("bears a stamp from which it can be made again", () => {
    const words = text(simulationSheet(contentOf(report())));
    for (const part of [PRODUCT_VERSION, inputsHash(order.task), "2026-03-14 09:20", /Seed\s+7/, /finite elements\s+24/, /alone\s+600/]) expect(words).toMatch(part);
  });

  it("holds every row unrounded under the name SimulatedCosts, and every length", () => {
    const plan = simulationSheet(contentOf(report()));
    const [head, ...body] = named(plan, "SimulatedCosts");
    const column = (label: RegExp): CellValue[] => body.map((line) => line[head!.findIndex((each) => label.test(String(each)))]!);
    expect(body.length).toBe(3);
    expect(column(/^Count/)).toEqual([0, 2, 4]);
    expect(column(/^Total \(EUR\)/)).toEqual([52_000, 41_000, 41_010]);
    expect(column(/^Failure/)).toEqual([8000, 0, 0]);
    expect(grid(plan).filter((line) => line[0] === 95)).toEqual([[95, 14.5, 14.5, 14.5]]);
  });

  it("stands no value over another", () => {
    for (const plan of [simulationSheet(contentOf(report({ end: "cancelled", changed: true }))), briefSheet(report(), 0, 4, writer)]) {
      const places = plan.cells.map(({ row, column }) => `${row} ${column}`);
      expect(new Set(places).size).toBe(places.length);
    }
  });

  it("says first when the run was not finished or the block has changed", () => {
    const warned = grid(simulationSheet(contentOf(report({ end: "cancelled", changed: true }))));
    expect(warned[1]![0]).toMatch(/^This run was not finished/);
    expect(warned[2]![0]).toMatch(/^The site block has changed since/);
    expect(text(simulationSheet(contentOf(report())))).not.toMatch(/not finished|has changed/);
    const few = simulatedTable(rows, { elements: 9, form: 2000 });
    expect(report({ table: few }).warnings).toEqual(["This rests on few grounds: the errors of so few are themselves not well known, and usually stated too small."]);
    expect(report({ table: simulatedTable(rows, { elements: 24, form: 399 }) }).warnings.length).toBe(1);
    expect(report().warnings).toEqual([]);
    const [variant] = order.task.variants;
    const settling = { ...order, task: { ...order.task, variants: [{ ...variant!, problem: { ...variant!.problem, piles: { ...variant!.problem.piles, groupInteraction: true } } }] } };
    expect(report({ order: settling }).warnings).toEqual(["Piles settle their neighbours in these figures (group interaction is on)."]);
    expect(report({ phase: "running" }).warnings.join(" ")).toMatch(/not finished/);
    expect(reportOf(state({ table: undefined }), new Date())).toBeUndefined();
  });
});

describe("the client brief", () => {
  it("says in one paragraph what is recommended and what it saves over the client's count", () => {
    // 52,000 less 41,000; the investigation costs 6,000 more than none
    expect(briefInWords(report(), 0, 0, writer)).toBe(
      "For this foundation of 12 piles, two holes (Cone) are expected to cost least: 41,000\u00a0EUR in all, give or take 20, for the investigation, the foundation, repair of damage and delay together. Against buying none, as proposed, this saves 11,000\u00a0EUR in expectation, although the investigation costs 6,000\u00a0EUR more. Four holes cannot be told from it at this accuracy. With these holes the chance of any damage to the building is 20\u00a0%, and 1.3 of the 12 piles are expected to need more length than was built.",
    );
  });

  it("states no saving where there is none to state", () => {
    expect(briefInWords(report(), 0, 4, writer)).toContain("Against the four holes proposed, this is 10\u00a0EUR less in expectation, but the difference is within its own error, so at this accuracy the two cannot be told apart.");
    expect(briefInWords(report(), 0, 4, writer)).not.toMatch(/Four holes cannot/);
    expect(briefInWords(report(), 0, 2, writer)).toMatch(/That is the number proposed\./);
    expect(briefInWords(report(), 0, 7, writer)).toMatch(/Seven holes, as proposed, are not among the counts compared/);
    expect(briefInWords(report(), 0, undefined, writer)).toMatch(/chance of being the cheapest of the counts compared is 80/);
  });

  it("gives a bound where nobody saw damage", () => {
    const unseen = simulatedTable(rows.map((row) => ({ ...row, failureChanceAtMost: 0.005 })));
    expect(briefInWords({ run: order, table: unseen }, 0, undefined, writer)).toMatch(/No realised ground saw damage to the building, so its chance is below 0\.5\u00a0%/);
  });

  it("puts the picture's cells under their name, and cautions and stamp below", () => {
    const plan = briefSheet(report(), 0, 0, writer);
    expect(plan.onePage).toBe(true);
    const [head, ...body] = named(plan, "CostByCount");
    expect(head).toEqual(["Holes", "Investigation", "Foundation", "Failure", "Delay", "Total (EUR)"]);
    expect(body.map((line) => [line[0], line[5]])).toEqual([[0, 52_000], [2, 41_000], [4, 41_010]]);
    const words = text(plan).replaceAll(/\s+/g, " ");
    expect(words).toMatch(/Not a foundation design/);
    expect(words).toContain(inputsHash(order.task));
  });

  it("breaks its paragraphs into lines that fit, losing no word", () => {
    const paragraph = briefInWords(report(), 0, 0, writer);
    const lines = inLines(paragraph, 40);
    expect(lines.join(" ")).toBe(paragraph);
    expect(Math.max(...lines.map((line) => line.length))).toBeLessThanOrEqual(40);
    expect(inLines("", 10)).toEqual([]);
    expect(inLines("a-word-that-is-longer-than-a-line", 10)).toEqual(["a-word-that-is-longer-than-a-line"]);
  });
});
