import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { ErrorValue } from "../../src/formula/cell-value.js";
import { readXlsx } from "../../src/formula/xlsx/read-book.js";
import { calculationOf } from "./cells.js";

// Source: fixtures/make_ordinary.py, LibreOffice 7.4.7.2: the formula in column A as typed, in column B as stored with its value.
const { book } = readXlsx(readFileSync(new URL("fixtures/ordinary.xlsx", import.meta.url)));
const calculation = calculationOf(book);

/** Where the other program departs from the xlsx format's own program, what that one gives. */
const DEPARTURES: Readonly<Record<string, unknown>> = {
  // texts are compared without regard to case; the other program has a setting for it
  '"a"="A"': true,
  // it stores truth values of formulas as numbers
  "VLOOKUP(46372,Data!E2:F8,2,TRUE())": false,
  // it reads the text of INDIRECT in its own way of writing references: B4 of the sheet Data holds 30, B2:B5 sum to 57.2
  'INDIRECT("Data!B4")': 30,
  'SUM(INDIRECT("Data!B2:B5"))': 57.2,
  // it stores its own error for a root of a negative number, which the format calls #NUM!
  "SQRT(-1)": "#NUM!",
};

describe("ordinary formulas give what a spreadsheet program gave", () => {
  const cells = book.sheets[1]!.cells.filter(({ formula }) => formula !== undefined);

  it("holds the two hundred formulas of the script", () => {
    expect(cells).toHaveLength(200);
  });

  it.each(cells.map((cell) => [cell.formula!, cell] as const))("%s", (formula, cell) => {
    const outcome = calculation.cell({ sheet: 1, row: cell.row, column: cell.column })!;
    const stored = formula in DEPARTURES ? DEPARTURES[formula] : cell.value instanceof ErrorValue ? cell.value.code : cell.value;
    const value = outcome.values[0]![0]!;
    expect(outcome.isKept).toBe(false);
    // statistical functions agree to some eight digits, for which each program has its own series
    if (typeof stored === "number") expect(Math.abs((value as number) - stored)).toBeLessThanOrEqual(1e-8 * Math.abs(stored));
    else expect(value instanceof ErrorValue ? value.code : value).toBe(stored);
  });
});
