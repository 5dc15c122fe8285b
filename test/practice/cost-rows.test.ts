import { expect, it } from "vitest";
import { costRows } from "../../src/practice/cost-chart.js";

const cells = (values: (string | number | boolean)[][]) => ({ sheet: "Counts", address: "A4:D6", values });

it("reads counts, parts and totals by their places", () => {
  expect(costRows(cells([["Holes", "Investigation", "Failure", "Total"], [0, 0, 9, 9], [2, 3, 4, 7]]))).toEqual({
    parts: ["Investigation", "Failure"],
    rows: [
      { count: 0, parts: [0, 9], total: 9 },
      { count: 2, parts: [3, 4], total: 7 },
    ],
  });
});

it.each([
  ["an error value", [["Holes", "Failure", "Total"], [0, "#VALUE!", "#VALUE!"]]],
  ["a blank cell", [["Holes", "Failure", "Total"], [0, "", 3]]],
  ["no rows", [["Holes", "Failure", "Total"]]],
  ["too few columns", [["Holes", "Total"], [0, 3]]],
  ["nothing", []],
])("draws nothing from %s", (_, values) => {
  expect(costRows(cells(values))).toBeUndefined();
});
