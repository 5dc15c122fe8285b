import { describe, expect, it } from "vitest";
import { lengthTexts } from "../../src/pane/model/lengths.js";
import { moneyAxis } from "../../src/pane/model/money-axis.js";
import { numberWriter } from "../../src/pane/model/numbers.js";

const writer = numberWriter("en-GB");
const table = { percentiles: [5, 50], groups: [{ load: 1000, piles: 4, lengths: [3.048, 10.14] }], meanLength: [3.048, 10.14], totalMetres: [12.192, 40.56] };

describe("the table of pile lengths", () => {
  it("has a row a group and one for all piles, in metres or feet", () => {
    expect(lengthTexts(table, "SI", writer)).toEqual({
      head: ["Piles", "5\u00a0%", "50\u00a0%"],
      rows: [
        ["1000 kN, 4 piles", "3", "10.1"],
        ["All piles together", "12", "41"],
      ],
    });
    // 1 ft = 0.3048 m exactly (international yard and pound agreement, 1959); 1 kip = 4.448 221 615 260 5 kN exactly
    expect(lengthTexts(table, "US", writer).rows).toEqual([
      [expect.stringMatching(/^224\.8\d* kip, 4 piles$/), "10", "33.3"],
      ["All piles together", "40", "133"],
    ]);
  });
});

// Expected values: by hand.
describe("an axis of money", () => {
  it("counts in ones, thousands or millions, so that labels stay short", () => {
    expect([moneyAxis(19_999, writer), moneyAxis(20_000, writer), moneyAxis(19_999_999, writer), moneyAxis(2e7, writer)].map((axis) => axis.unit)).toEqual(["", "thousands", "thousands", "millions"]);
    expect(moneyAxis(500_000, writer).write(425_000)).toBe("425");
    expect(moneyAxis(5e8, writer).write(2.5e6)).toBe("2.5");
    expect(moneyAxis(900, writer).write(425.5)).toBe("425.5");
  });
});
