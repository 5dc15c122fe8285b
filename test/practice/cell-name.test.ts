import { expect, it } from "vitest";
import { cellName } from "../../src/practice/cell-name.js";

// Source: the worksheet's own limits, last column XFD = 16,384 and last row 1,048,576; the others counted by hand.
it.each([
  [0, 0, "A1"],
  [9, 25, "Z10"],
  [0, 26, "AA1"],
  [0, 51, "AZ1"],
  [0, 52, "BA1"],
  [0, 701, "ZZ1"],
  [0, 702, "AAA1"],
  [1048575, 16383, "XFD1048576"],
])("names row %i, column %i as %s", (row, column, name) => {
  expect(cellName(row, column)).toBe(name);
});
