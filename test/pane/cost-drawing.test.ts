import { describe, expect, it } from "vitest";
import { costDrawing, describeCosts } from "../../src/pane/model/cost-drawing.js";
import { numberWriter } from "../../src/pane/model/numbers.js";
import { countRow } from "./tables.js";

const near = { notDistinguishable: true };
const rows = [
  countRow(0, 1000, { foundation: 300, failure: 650, delay: 50, investigation: 0 }),
  countRow(1, 500, { foundation: 300, failure: 120, delay: 30, investigation: 50 }),
  countRow(2, 480, { foundation: 300, failure: 60, delay: 20, investigation: 100, ...near }),
  countRow(3, 482, { foundation: 300, failure: 20, delay: 12, investigation: 150, ...near }),
  countRow(4, 520, { foundation: 300, failure: 12, delay: 8, investigation: 200 }),
];

// Expected values: by hand from the table above.
describe("the picture of cost against count", () => {
  it("stacks the parts without gaps up to the total", () => {
    const { blocks, parts } = costDrawing(rows, 2);
    expect(parts).toEqual(["Foundation", "Failure", "Delay", "Investigation"]);
    for (const row of rows) {
      const stack = blocks.filter((block) => block.count === row.count);
      expect(stack[0]!.from).toBe(0);
      for (let k = 1; k < stack.length; k++) expect(stack[k]!.from).toBe(stack[k - 1]!.to);
      expect(stack.at(-1)!.to).toBeCloseTo(row.total, 9);
    }
    expect(blocks.find((block) => block.count === 1 && block.part === "Failure")).toEqual({ count: 1, part: "Failure", from: 300, to: 420 });
  });

  it("leaves out a part that nobody pays for", () => {
    expect(costDrawing(rows.map((row) => ({ ...row, delay: 0 })), 2).parts).toEqual(["Foundation", "Failure", "Investigation"]);
  });

  it("marks the cheapest and the set that cannot be told from it, the cheapest included", () => {
    const { points } = costDrawing(rows.map((row) => (row.count === 2 ? { ...row, notDistinguishable: false } : row)), 2);
    expect(points.filter((point) => point.inSet).map((point) => point.count)).toEqual([2, 3]);
    expect(points.filter((point) => point.cheapest).map((point) => point.count)).toEqual([2]);
  });

  it("draws two standard errors either way", () => {
    const point = costDrawing(rows, 2).points[3]!;
    expect([point.low, point.high]).toEqual([462, 502]);
  });

  it("cuts off one hopeless count, says so, and keeps all others inside the axis", () => {
    // excess over 480: 0, 2, 20, 40, 520; the middle one is 20, so the axis ends 80 above the least and a margin
    const { points, totalAxis } = costDrawing(rows, 2);
    expect(points.map((point) => point.above)).toEqual([true, false, false, false, false]);
    expect(points[0]!.total).toBe(totalAxis[1]);
    expect(totalAxis[1]).toBeLessThan(600);
    for (const point of points.slice(1)) {
      expect(point.low).toBeGreaterThan(totalAxis[0]);
      expect(point.high).toBeLessThan(totalAxis[1]);
    }
  });

  it("keeps everything in sight when no count stands out, and survives a single count or no cost at all", () => {
    expect(costDrawing(rows.slice(1), 2).points.some((point) => point.above)).toBe(false);
    const flat = costDrawing([countRow(0, 0, { standardError: 0 })], 0);
    expect(flat.totalAxis[1]).toBeGreaterThan(flat.totalAxis[0]);
    expect(flat.partAxis).toEqual([0, 1]);
    expect(flat.parts).toEqual([]);
  });

  it("is described in words", () => {
    expect(describeCosts(rows, 2, numberWriter("en-GB"))).toBe(
      "Expected total cost against number of holes: 1,000 at 0, 480 at 2, 520 at 4. Marked as not to be told apart: 2 and 3. All figures are in the table below the picture.",
    );
  });
});
