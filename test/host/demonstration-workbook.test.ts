import { afterAll, beforeAll, expect, it } from "vitest";
import { Calculation } from "../../src/formula/calculation.js";
import { ErrorValue } from "../../src/formula/cell-value.js";
import { demonstrationBook } from "../../src/formula/demonstration.js";
import { demonstrationWorkbook, LARGEST_COUNT } from "../../src/host/demonstration-workbook.js";
import { gridFunctions } from "../../src/practice/grid-functions.js";

let calculation: Calculation;
const sheets = demonstrationWorkbook();

beforeAll(() => {
  calculation = new Calculation(demonstrationBook(), gridFunctions);
});

afterAll(() => calculation.dispose());

const value = (formula: string) => calculation.formula(formula, 0).values[0]![0];
const number = (formula: string) => {
  const found = value(formula);
  if (typeof found !== "number") throw new Error(`${formula} gives ${String(found)}`);
  return found;
};

it("plans each cell once, and each name over planned cells", () => {
  for (const { cells, names } of sheets) {
    const places = cells.map(({ row, column }) => `${row}:${column}`);
    expect(new Set(places).size).toBe(places.length);
    for (const { range } of names ?? []) {
      const [first] = range.match(/^[A-Z]+(\d+)/)!.slice(1);
      expect(cells.some(({ row }) => row === Number(first) - 1)).toBe(true);
    }
  }
});

it("calculates every formula without an error", { timeout: 60_000 }, () => {
  let formulas = 0;
  sheets.forEach(({ name, cells }, sheet) => {
    for (const { row, column, formula } of cells) {
      if (formula === undefined) continue;
      const outcome = calculation.cell({ sheet, row, column })!;
      expect(outcome.values.flat().filter((each) => each instanceof ErrorValue), `${name} row ${row + 1} column ${column + 1}: ${formula}: ${outcome.reason ?? ""}`).toEqual([]);
      formulas++;
    }
  });
  expect(formulas).toBeGreaterThan(150);
});

it("has its cheapest count inside the range, with differences that a person would act on", () => {
  const cheapest = number("=Cheapest");
  expect(cheapest).toBeGreaterThan(0);
  expect(cheapest).toBeLessThan(LARGEST_COUNT);
  const best = number(`=PROBE.TOTALCOST(Site,${cheapest})`);
  for (const other of [0, LARGEST_COUNT]) expect(number(`=PROBE.TOTALCOST(Site,${other})`) / best - 1).toBeGreaterThan(0.05);
});

it("leaves no pile at its shortest or longest length in the median case", () => {
  const piles = number('=VLOOKUP("Piles along x",Site,2,FALSE)*VLOOKUP("Piles along y",Site,2,FALSE)');
  for (let pile = 1; pile <= piles; pile++) {
    const length = number(`=PROBE.PILELENGTH(Site,Cheapest,50,"Pile",${pile})`);
    expect(length).toBeGreaterThan(number('=VLOOKUP("Shortest length",Site,2,FALSE)'));
    expect(length).toBeLessThan(number('=VLOOKUP("Longest length",Site,2,FALSE)'));
  }
});

// Identities of the bill: quantity times rate, sums, and the parts of a total.
it("adds up: the bill, the parts of each total, and the table's own column of the site's COV", () => {
  expect(number("=Bid!E17")).toBeCloseTo(number("=(Bid!E9+Bid!E10+Bid!E11+Bid!E12+Bid!E14)*(1+Bid!B6)"), 6);
  expect(number("=Bid!E12")).toBeCloseTo(number('=Bid!B11*PROBE.PILELENGTH(Site,Cheapest,50)*VLOOKUP("Price per metre of pile",Site,2,FALSE)'), 6);
  for (const row of [5, 7, 17]) expect(number(`=Counts!F${row}`)).toBeCloseTo(number(`=SUM(Counts!B${row}:E${row})`), 6);
  const own = number('=VLOOKUP("Stiffness COV",Site,2,FALSE)');
  const column = "BCDEFG"[[2, 3, 4, 5, 6, 7].findIndex((k) => number(`=INDEX(Sensitivity!A4:G4,1,${k})`) === own)];
  expect(column).toBeDefined();
  for (const row of [5, 7, 17]) expect(number(`=Sensitivity!${column}${row}`)).toBeCloseTo(number(`=Counts!F${row}`), 6);
});
