import { expect, it } from "vitest";
import { CellReasons } from "../../src/practice/cell-reasons.js";

it("keeps the sentences of all functions of a cell, each once, and of no other cell", () => {
  const reasons = new CellReasons();
  reasons.calculating("a", 1, 2);
  reasons.add("a", 1, 2, "First.");
  reasons.calculating("a", 1, 2);
  reasons.add("a", 1, 2, "Second.");
  reasons.add("a", 1, 2, "First.");
  expect(reasons.at("a", 1, 2)).toEqual(["First.", "Second."]);
  reasons.add("a", 12, 3, "Row 13.");
  for (const [sheet, row, column] of [["b", 1, 2], ["a", 2, 1], ["a", 1, 23]] as const) expect(reasons.at(sheet, row, column)).toEqual([]);
});

it("drops a cell's sentences when the next run calculates it, and keeps those of a cell that the run leaves alone", () => {
  const reasons = new CellReasons();
  reasons.add("a", 0, 0, "Old.");
  reasons.add("a", 0, 1, "Still true.");
  reasons.startRun();
  reasons.calculating("a", 0, 0);
  expect(reasons.at("a", 0, 0)).toEqual([]);
  reasons.add("a", 0, 0, "New.");
  reasons.calculating("a", 0, 0);
  expect(reasons.at("a", 0, 0)).toEqual(["New."]);
  expect(reasons.at("a", 0, 1)).toEqual(["Still true."]);
});
