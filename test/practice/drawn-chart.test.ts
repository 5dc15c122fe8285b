// @vitest-environment jsdom
import { beforeEach, describe, expect, it } from "vitest";
import { areaOf } from "../../src/host/addresses.js";
import { simulationSheet } from "../../src/host/simulation-sheet.js";
import { chartValues, drawChart } from "../../src/practice/drawn-chart.js";
import { simulatedRow, simulatedTable } from "../pane/simulated-rows.js";

// Invented figures: three counts, of which the last two cannot be told apart.
const rows = [simulatedRow(0, 52_000), simulatedRow(2, 41_000, { notDistinguishable: true }), simulatedRow(4, 41_010, { notDistinguishable: true })];
const plan = simulationSheet({ table: simulatedTable(rows), stamp: { version: "1", seed: "1", inputs: "a", elements: 9, form: 9, date: new Date(0) }, units: "SI", money: "EUR", warnings: [] });
const column = (range: string) => {
  const { top, bottom, left } = areaOf(range);
  return Array.from({ length: bottom - top + 1 }, (_, k) => plan.cells.find((cell) => cell.row === top + k && cell.column === left)?.value ?? "");
};
let figure: HTMLElement;
beforeEach(() => {
  figure = document.createElement("figure");
  document.body.replaceChildren(figure);
});
const titles = (selector: string): string[] => [...figure.querySelectorAll(`${selector} title`)].map(({ textContent }) => textContent ?? "");

describe("the pictures of a simulation beside the practice sheets", () => {
  it("stacks the parts, draws the total with its band and rings what cannot be told apart", () => {
    const [costs] = plan.charts!;
    drawChart(figure, costs!, chartValues(costs!, column), plan.name);
    expect(figure.querySelectorAll("rect")).toHaveLength(4 * 3);
    expect(titles("rect")).toContain("Failure, 0: 0");
    expect(titles("circle").filter((words) => words.startsWith("Total"))).toEqual(["Total, 0: 52,000", "Total, 2: 41,000", "Total, 4: 41,010"]);
    expect(titles("circle").filter((words) => words.startsWith("Cheapest"))).toHaveLength(2);
    expect(figure.querySelectorAll("[aria-label=area] path")).toHaveLength(1);
    expect(figure.querySelector("svg")!.getAttribute("aria-label")).toBe(`Expected cost by number of holes; cheapest 2. ${costs!.words}`);
    expect(figure.textContent).toContain("Give or take two standard errors");
    expect(figure.textContent).not.toContain("Upper edge");
  });

  it("draws lengths as lines, each in a colour of its own", () => {
    const lengths = plan.charts![1]!;
    drawChart(figure, lengths, chartValues(lengths, column), plan.name);
    const paths = [...figure.querySelectorAll("[aria-label=line]")];
    expect(paths).toHaveLength(3);
    expect(new Set(paths.map((path) => path.getAttribute("stroke"))).size).toBe(3);
    expect(figure.textContent).toContain("Mean pile length (m)");
  });

  it("says which cells it waits for", () => {
    const [costs] = plan.charts!;
    drawChart(figure, costs!, undefined, plan.name);
    expect(figure.textContent).toBe(`The chart waits for numbers in Simulation!${costs!.series[0]!.values}.`);
    expect(figure.querySelector("svg")).toBeNull();
  });
});
