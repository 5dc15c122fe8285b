import { expect, it } from "vitest";
import type { PlannedChart } from "../../src/host/workbook.js";
import { chartValues } from "../../src/practice/drawn-chart.js";

const chart: PlannedChart = {
  title: "Costs", words: "Costs.", place: "H1:N9", categories: "A2:A3", categoryTitle: "Holes", valueTitle: "Cost", valueLook: "money",
  series: [{ kind: "part", name: "Failure", values: "B2:B3" }, { kind: "line", name: "Total", values: "C2:C3" }, { kind: "mark", name: "Least", values: "D2:D3" }],
};
type Columns = Record<string, (string | number | null)[]>;
const cells: Columns = { "A2:A3": [0, 2], "B2:B3": [9, 4], "C2:C3": [9, 7], "D2:D3": ["", 7] };
const read = (change: Columns = {}) => chartValues(chart, (range) => ({ ...cells, ...change })[range]!);

it("reads each series from its own cells, and a mark only where there is a number", () => {
  expect(read()).toEqual({ categories: [0, 2], series: [[9, 4], [9, 7], [undefined, 7]] });
  expect(read({ "A2:A3": ["none", "two"] })?.categories).toEqual(["none", "two"]);
});

it.each([
  ["an error value", { "C2:C3": ["#VALUE!", 7] }],
  ["a blank cell", { "B2:B3": [9, ""] }],
  ["a blank category", { "A2:A3": [0, ""] }],
  ["nothing", { "A2:A3": [null, null] }],
] satisfies [string, Columns][])("draws nothing from %s", (_, change) => expect(read(change)).toBeUndefined());
