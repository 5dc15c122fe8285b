import { describe, expect, it } from "vitest";
import { callFunction } from "../../src/functions/registry.js";
import { demonstration } from "./demonstration.js";
import { refusal } from "./refusal.js";

const site = demonstration();
const length = (...args: unknown[]): number => callFunction("PILELENGTH", [site, ...args]) as number;
const PILES = 12; // 4 x 3, the demonstration's grid

describe("PILELENGTH", () => {
  it("is the mean of the single piles, so that it times their number is the job's total", () => {
    const each = Array.from({ length: PILES }, (_, k) => length(4, 80, "Pile", k + 1));
    expect(length(4, 80)).toBeCloseTo(each.reduce((sum, one) => sum + one, 0) / PILES, 9);
    expect(new Set(each).size).toBe(3); // interior, edge and corner loads
  });

  it("grows with the percentile", () => {
    const lengths = [5, 25, 50, 75, 95].map((percentile) => length(4, percentile));
    expect(lengths).toEqual([...lengths].sort((a, b) => a - b));
    expect(lengths[4]).toBeGreaterThan(lengths[0]);
  });

  it("takes the pile from its own pair and the rest as inputs", () => {
    expect(length(4, 80, "Pile", 1, "Stiffness COV", 0.4)).toBe(length(4, 80, "Stiffness COV", 0.4, "pile", [[1]]));
    expect(length(4, 80, "Pile", 1, "Interior load", 1500)).not.toBe(length(4, 80, "Pile", 1));
  });

  it.each([
    [[4, 80, "Pile", 0], "Pile is 0; it must be a whole number from 1 to 12, the number of piles."],
    [[4, 80, "Pile", 13], "Pile is 13; it must be a whole number from 1 to 12, the number of piles."],
    [[4, 80, "Pile", 1.5], "Pile is 1.5; it must be a whole number from 1 to 12, the number of piles."],
    [[4, 80, "Pile", ""], "Pile is blank; it must be a whole number from 1 to 12, the number of piles."],
    [[4, 80, "Pile", "A1"], 'Pile is "A1", which is text; it must be a whole number from 1 to 12, the number of piles.'],
    [[4, 0], "Percentile is 0; it must be a percentile above 0 and below 100."],
    [[4, "80"], 'Percentile is "80", which is a number stored as text; it must be a percentile above 0 and below 100.'],
  ])("refuses %j", (args, sentence) => {
    expect(refusal(() => length(...args))).toEqual(["#VALUE!", sentence]);
  });

  it("is the only function that knows a pile by number", () => {
    expect(refusal(() => callFunction("TOTALCOST", [site, 4, "Pile", 1]))[1]).toContain("Pile");
  });
});

describe("LENGTHTABLE", () => {
  it("says what PILELENGTH says, with a column for each load, the mean and the total", () => {
    const [head, ...body] = callFunction("LENGTHTABLE", [site, 4]) as (string | number)[][];
    expect(head).toEqual(["Percentile (%)", "1800 kN, 2 piles (m)", "1530 kN, 6 piles (m)", "1260 kN, 4 piles (m)", "Mean length (m)", "Total length (m)"]); // 1800, 0.85 and 0.7 of it
    expect(body.map((row) => row[0])).toEqual([5, 10, 25, 50, 75, 90, 95]);
    for (const [percentile, interior, edge, corner, mean, total] of body as number[][]) {
      expect(mean).toBe(length(4, percentile));
      expect(total).toBeCloseTo(2 * interior + 6 * edge + 4 * corner, 9);
      expect(total).toBeCloseTo(PILES * mean, 9);
      expect([corner, edge, interior]).toEqual([corner, edge, interior].sort((a, b) => a - b)); // more load, no shorter pile
    }
  });
});

describe("LAYOUT", () => {
  it("places as many holes as asked for, inside the footprint", () => {
    const [head, ...holes] = callFunction("LAYOUT", [site, 5]) as (string | number)[][];
    expect(head).toEqual(["x (m)", "y (m)"]);
    expect(holes).toHaveLength(5);
    // piles from (0, 0) to (19.5, 12) at 6.5 m by 6 m; the footprint reaches half a spacing further
    for (const [x, y] of holes as number[][]) {
      expect(Math.abs(x - 9.75)).toBeLessThanOrEqual(9.75 + 3.25);
      expect(Math.abs(y - 6)).toBeLessThanOrEqual(6 + 3);
    }
  });

  it("gives the first rows of a hole list", () => {
    const block = demonstration({ "Hole list": "", Counts: "0 to 3" });
    const at = block.findIndex((row) => row[0] === "Hole list");
    block.splice(at + 1, 0, ["x", "y", "", ""], [1, 2, "", ""], [3, 4, "", ""], [5, 6, "", ""]);
    expect(callFunction("LAYOUT", [block, 2])).toEqual([["x (m)", "y (m)"], [1, 2], [3, 4]]);
    expect(refusal(() => callFunction("LAYOUT", [block, 4]))[1]).toContain("Count is 4, but the hole list holds 3 holes");
  });

  it("has nothing to place for no holes, which is no mistake of the inputs", () => {
    expect(refusal(() => callFunction("LAYOUT", [site, 0]))).toEqual(["#N/A", "A count of 0 has no holes to place."]);
  });
});
