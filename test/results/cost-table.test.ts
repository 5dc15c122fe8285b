import { describe, expect, it } from "vitest";
import { costTable, tableCells } from "../../src/results/index.js";
import { ROWS } from "./rows.js";

describe("the table of counts as cells", () => {
  it("has one head and one row a count, in the order given and not rounded", () => {
    const cells = tableCells(costTable([...ROWS].reverse(), "SI"));
    expect(cells[0]).toEqual(["Count (holes)", "Investigation", "Foundation", "Failure", "Delay", "Total", "Standard error", "Chance cheapest (0 to 1)", "Carbon (kg CO2e)"]);
    expect(cells.slice(1).map((row) => row[0])).toEqual([2, 1, 0]);
    expect(cells[3]).toEqual([0, 0, 81_234.5, 120_400, 3_210, 204_844.5, 1_049, 0, 34_567.8]);
    expect(cells.every((row) => row.length === 9)).toBe(true);
  });

  it("gives the carbon in pounds to those who asked for US units, and says so", () => {
    const cells = tableCells(costTable(ROWS, "US"));
    expect(cells[0]?.[8]).toBe("Carbon (lb CO2e)");
    // 1 lb = 0.453 592 37 kg exactly (international yard and pound agreement, 1959)
    expect(cells[1]?.[8]).toBeCloseTo(34_567.8 / 0.45359237, 6);
    expect(cells[1]?.[5]).toBe(204_844.5); // money has no unit to convert
  });
});
