import { describe, expect, it } from "vitest";
import type { PilePoint, Point } from "../../src/engine/index.js";
import { numberWriter } from "../../src/pane/model/numbers.js";
import { describePlan, footprintCorners, pileRadius, planFrame, PLAN_MARGIN } from "../../src/pane/model/plan.js";

const writer = numberWriter("en-GB");
const pile = (x: number, y: number, load: number): PilePoint => ({ x, y, load }) as PilePoint;
const hole = (x: number, y: number): Point => ({ x, y }) as Point;

// Expected values: by hand.
describe("the plan", () => {
  const shapes: [string, { x: number; y: number }[]][] = [
    ["square", [{ x: 0, y: 0 }, { x: 12, y: 12 }]],
    ["long in x", [{ x: 0, y: 0 }, { x: 200, y: 6 }]],
    ["long in y", [{ x: 0, y: 0 }, { x: 3, y: 400 }]],
    ["one row", [{ x: 0, y: 5 }, { x: 30, y: 5 }]],
    ["one pile far from the origin", [{ x: 512_345.5, y: 6_123_456.25 }]],
  ];
  it.each(shapes)("a metre is as long in x as in y and everything is inside: %s", (_name, points) => {
    const frame = planFrame(points, 290, 330);
    const innerWidth = frame.width - PLAN_MARGIN.left - PLAN_MARGIN.right;
    const innerHeight = frame.height - PLAN_MARGIN.top - PLAN_MARGIN.bottom;
    const across = innerWidth / (frame.x[1] - frame.x[0]);
    expect(innerHeight / (frame.y[1] - frame.y[0]) / across).toBeCloseTo(1, 6);
    expect(frame.height).toBeLessThanOrEqual(330);
    expect(innerHeight).toBeGreaterThanOrEqual(90);
    for (const { x, y } of points) {
      expect(x).toBeGreaterThan(frame.x[0]);
      expect(x).toBeLessThan(frame.x[1]);
      expect(y).toBeGreaterThan(frame.y[0]);
      expect(y).toBeLessThan(frame.y[1]);
    }
  });

  it("the footprint is centred on the bounding box of the piles, not on their mean", () => {
    const piles = [pile(0, 0, 1), pile(10, 4, 1), pile(10, 0, 1)];
    expect(footprintCorners(piles, { length: 12, width: 8 })).toEqual([
      { x: -1, y: -2 },
      { x: 11, y: 6 },
    ]);
  });

  it("the area of a dot goes with the load, and no pile vanishes", () => {
    expect(pileRadius(1000, 1000)).toBe(6);
    expect(pileRadius(250, 1000)).toBe(3);
    expect(pileRadius(1, 1000)).toBe(2.5);
    expect(pileRadius(0, 0)).toBe(4);
  });

  it("is described in words", () => {
    const piles = [pile(0, 0, 750), pile(6, 0, 1000)];
    expect(describePlan(piles, [hole(1, 2), hole(-3.75, 0)], true, writer)).toBe(
      "Plan: 2 piles, 750 to 1,000 kN; two holes placed automatically, in metres at (1; 2) and (\u22123.75; 0).",
    );
    expect(describePlan([pile(0, 0, 900)], [], false, writer)).toBe("Plan: 1 pile, 900 kN each; no holes.");
    const many = Array.from({ length: 14 }, (_, k) => hole(k, 0));
    expect(describePlan(piles, many, false, writer)).toContain("14 holes from the hole list");
    expect(describePlan(piles, many, false, writer)).toMatch(/\(11; 0\) and 2 more\.$/);
  });
});
