import { describe, expect, it } from "vitest";
import { lengthBoxes, lengthsInWords } from "../../src/pane/model/length-drawing.js";
import { numberWriter } from "../../src/pane/model/numbers.js";
import { simulatedRow } from "./simulated-rows.js";

const writer = numberWriter("en-GB");

describe("the picture of pile lengths", () => {
  // the rows' percentile p is 5 + p / 10 metres by construction
  it("shows nine outcomes of ten, half of them and their middle", () => {
    expect(lengthBoxes([simulatedRow(3, 1)], "SI")).toEqual([{ count: 3, least: 5.5, low: 7.5, middle: 10, high: 12.5, most: 14.5 }]);
    expect(lengthBoxes([simulatedRow(3, 1)], "US")[0]!.middle).toBeCloseTo(10 / 0.3048, 10);
  });

  it("is told in words, with surprises and over-design", () => {
    expect(lengthsInWords(simulatedRow(2, 1), 12, "SI", writer)).toBe(
      "With two holes the mean pile length comes to between 5.5 and 14.5\u00a0m in nine outcomes of ten, and to less than 10\u00a0m in half of them. Surprises: 1.3 of the 12 piles are expected to need more length than was built, by more than the tolerance. Over-design: 12 of 100\u00a0m of pile are expected to stand beyond what the ground needed.",
    );
    expect(lengthsInWords(simulatedRow(0, 1, { meanLengths: simulatedRow(0, 1).meanLengths.map(() => 8) }), 12, "SI", writer)).toMatch(/^Without holes the piles are 8\u00a0m long on average, whatever the ground is\. Surprises/);
  });
});
