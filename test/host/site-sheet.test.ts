import { expect, it } from "vitest";
import { siteSheet } from "../../src/host/site-sheet.js";
import { CATALOGUE, checkSite, parseSite, templateRows } from "../../src/inputs/index.js";

const sheet = siteSheet();
const at = (row: number, column: number) => sheet.cells.find((cell) => cell.row === row && cell.column === column);

it("holds the template's rows where the name Site says they are, from the first row on", () => {
  const rows = templateRows();
  expect(sheet.names).toEqual([{ name: "Site", range: `A1:D${rows.length}` }]);
  rows.forEach((row, k) => row.forEach((value, column) => expect(at(k, column)?.value ?? "").toBe(value)));
});

it("can be priced as it stands, every input read without complaint", () => {
  const rows = templateRows().map((row, k) => row.map((_, column) => at(k, column)?.value ?? ""));
  expect(checkSite(rows).filter(({ ok }) => !ok)).toEqual([]);
  expect(parseSite(rows).problem).toEqual(parseSite(templateRows()).problem);
});

it("marks as inputs the cells that the person fills in, and no label, unit or note", () => {
  const labels = new Map(CATALOGUE.map(({ label, kind }) => [label, kind]));
  let marked = 0;
  for (const { row, column, value, style } of sheet.cells) {
    if (column !== 0 || typeof value !== "string" || !labels.has(value)) continue;
    expect(style).toBe("label");
    const beside = at(row, 1);
    if (labels.get(value) === "list" && (beside?.value ?? "") === "") continue;
    expect(beside?.style, value).toBe("input");
    expect(at(row, 2)?.style ?? "note").toBe("note");
    marked++;
  }
  expect(marked).toBeGreaterThan(40);
  for (const section of ["Ground", "Prices"]) expect(sheet.cells.find(({ value }) => value === section)?.style).toBe("section");
  // the rows of a list: its head in words, then inputs
  const distortion = sheet.cells.find(({ value }) => value === "Distortion")!;
  expect(distortion.style).toBe("head");
  expect(at(distortion.row + 1, 0)).toMatchObject({ value: "1/500", style: "input" });
  expect(at(distortion.row + 1, 1)).toMatchObject({ value: 0, style: "input" });
});
