import { describe, expect, it } from "vitest";
import { siteSheet } from "../../src/host/site-sheet.js";
import type { CellValidation, CellValue } from "../../src/host/workbook.js";
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

/** Whether a cell would be taken, by the words of the interface. */
function accepts(validation: CellValidation, value: CellValue): boolean {
  if (validation.kind === "choice") return validation.choices.includes(String(value));
  const { least = -Infinity, most = Infinity, whole = false, orWords = [] } = validation;
  return typeof value === "number" ? value >= least && value <= most && (!whole || Number.isInteger(value)) : orWords.includes(String(value).toLowerCase());
}

// The reader of the block is the reference: what it takes may be typed, within the words and numbers that a rule can state.
describe("what may be typed into the block", () => {
  const ruled = sheet.cells.filter(({ validation }) => validation !== undefined);
  const labelled = (label: string): CellValidation => sheet.cells.find(({ row, column }) => column === 1 && at(row, 0)?.value === label)!.validation!;

  it("takes every value of the template", () => {
    expect(ruled.length).toBeGreaterThan(35);
    for (const { value, validation, row } of ruled) expect(accepts(validation!, value!), String(at(row, 0)?.value)).toBe(true);
  });

  it("stands for Excel's limits: lists without commas, words that fit beside a cell and are whole sentences", () => {
    for (const { validation } of ruled) {
      expect(validation!.words.length).toBeLessThanOrEqual(255);
      expect(validation!.words).toMatch(/^[A-Z].*[.]$/s);
      if (validation!.kind === "choice") for (const choice of validation!.choices) expect(choice).not.toMatch(/[,"]/);
    }
  });

  it("offers every choice that the reader knows", () => {
    for (const entry of CATALOGUE.filter(({ kind }) => kind === "choice")) {
      const found = ruled.find(({ row }) => at(row, 0)?.value === entry.label);
      expect(found?.validation).toMatchObject({ kind: "choice", choices: entry.choices!.map(({ text }) => text) });
    }
  });

  it.each([
    ["Piles along x", 2.5, false],
    ["Piles along x", 0, false],
    ["Piles along x", 3, true],
    ["Price per hole", -1, false],
    ["Price per hole", "none", true],
    ["Price per hole", "free", false],
    ["Mean stiffness", "12 MPa", false],
    ["Mean stiffness", 12_000, true],
    ["Stiffness COV", 65, true],
    ["Reading COV", "from the method", true],
    ["Design rule", "whatever", false],
  ] as const)("%s: %s", (label, value, isTaken) => expect(accepts(labelled(label), value)).toBe(isTaken));

  it("says what is accepted before it says what the input is", () => {
    expect(labelled("Piles along x").words).toMatch(/^A whole number from 1 to 100\./);
    expect(labelled("Mean stiffness").words).toMatch(/^A number from 0\.05 to 20,000 MPa\. Mean Young's modulus/);
    expect(labelled("Price per hole").words).toMatch(/^A price above zero, or none if it costs nothing\./);
  });
});
