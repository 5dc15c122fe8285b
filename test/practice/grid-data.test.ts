import { expect, it } from "vitest";
import { reference, sheetData, workbookData } from "../../src/practice/grid-data.js";

it.each([
  ["Site", "A1:D60", "Site!$A$1:$D$60"],
  ["Site (2)", "A1:D60", "'Site (2)'!$A$1:$D$60"],
  ["Joe's", "AB12", "'Joe''s'!$AB$12"],
  ["2nd", "B2", "'2nd'!$B$2"],
])("refers to sheet %s, range %s as %s", (sheet, range, words) => {
  expect(reference(sheet, range)).toBe(words);
});

it("keeps a text that looks like a number or a fraction as text, and a truth value as one", () => {
  const { cellData } = sheetData("s", { name: "S", cells: [
    { row: 0, column: 0, value: "1/500" },
    { row: 0, column: 1, value: "007" },
    { row: 1, column: 0, value: true },
    { row: 1, column: 1, value: 2.5, look: "money" },
    { row: 2, column: 0, formula: "=1+1", value: 9 },
    { row: 2, column: 1, style: "head" },
  ] });
  // 1 text, 2 number, 3 truth value in the grid's own form
  expect(cellData![0]![0]).toMatchObject({ v: "1/500", t: 1 });
  expect(cellData![0]![1]).toMatchObject({ v: "007", t: 1 });
  expect(cellData![1]![0]).toMatchObject({ v: 1, t: 3 });
  expect(cellData![1]![1]).toMatchObject({ v: 2.5, t: 2, s: { n: { pattern: "#,##0" } } });
  expect(cellData![2]![0]).toMatchObject({ f: "=1+1" });
  expect(cellData![2]![0]).not.toHaveProperty("v");
  expect(cellData![2]![1]).not.toHaveProperty("v");
});

it("hands over each defined name with its place", () => {
  const { resources, sheetOrder, sheets } = workbookData("w", [
    { name: "One", cells: [] },
    { name: "Two", cells: [], names: [{ name: "Here", range: "B2:C3" }] },
  ]);
  expect(sheetOrder.map((id) => sheets[id]!.name)).toEqual(["One", "Two"]);
  expect(Object.values(JSON.parse(resources![0]!.data!) as object)).toMatchObject([{ name: "Here", formulaOrRefString: "Two!$B$2:$C$3" }]);
});
