import { describe, expect, it } from "vitest";
import { lengthTable, layoutTable, tableCells } from "../../src/results/index.js";
import { metres } from "../../src/units/quantities.js";

const LENGTHS = {
  percentiles: [5, 95],
  groups: [
    { load: 1000, piles: 1, lengths: [5, 12] },
    { load: 750, piles: 4, lengths: [4, 9.5] },
  ],
  meanLength: [4.2, 10],
  totalMetres: [21, 50],
};

describe("the table of pile lengths as cells", () => {
  it("says how many piles each column speaks of and in which unit", () => {
    expect(tableCells(lengthTable(LENGTHS, "SI"))).toEqual([
      ["Percentile (%)", "1000 kN, 1 pile (m)", "750 kN, 4 piles (m)", "Mean length (m)", "Total length (m)"],
      [5, 5, 4, 4.2, 21],
      [95, 12, 9.5, 10, 50],
    ]);
  });

  it("is in feet for those who asked for US units, the percentile untouched", () => {
    const cells = tableCells(lengthTable(LENGTHS, "US"));
    // 1 kip = 4.448 221 615 260 5 kN exactly (0.453 592 37 kg x 9.806 65 m/s2)
    expect(cells[0]).toEqual(["Percentile (%)", "224.809 kip, 1 pile (ft)", "168.607 kip, 4 piles (ft)", "Mean length (ft)", "Total length (ft)"]);
    // 1 ft = 0.3048 m exactly (international yard and pound agreement, 1959)
    expect(cells[2]?.map((value) => (value as number) * 0.3048)).toEqual([95 * 0.3048, 12, 9.5, 10, 50].map((value) => expect.closeTo(value, 10) as number));
  });
});

describe("the places of holes as cells", () => {
  it("are in the unit that the head names", () => {
    const holes = [{ x: metres(0), y: metres(3.048) }];
    expect(tableCells(layoutTable(holes, "SI"))).toEqual([["x (m)", "y (m)"], [0, 3.048]]);
    expect(tableCells(layoutTable(holes, "US"))).toEqual([["x (ft)", "y (ft)"], [0, expect.closeTo(10, 12)]]);
  });
});
