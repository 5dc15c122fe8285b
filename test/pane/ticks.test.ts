import { describe, expect, it } from "vitest";
import { countTicks, niceStep, niceTicks, scaleBarLength } from "../../src/pane/model/ticks.js";

// Expected values: by hand, from the rule "1, 2 or 5 times a power of ten, no more intervals than fit".
describe("ticks of an axis", () => {
  it("steps are the smallest of 1, 2, 5 times a power of ten that fit", () => {
    expect(niceStep(10, 5)).toBe(2);
    expect(niceStep(10.1, 5)).toBe(5);
    expect(niceStep(0.7, 7)).toBeCloseTo(0.1, 12);
    expect(niceStep(90000, 4)).toBe(50000);
    expect(niceStep(6, 1)).toBe(10);
  });

  it("ticks lie inside the interval and carry no binary crumbs", () => {
    expect(niceTicks(0, 0.5, 5)).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5]);
    expect(niceTicks(-3.2, 7.9, 5)).toEqual([0, 5]);
    expect(niceTicks(-5, 5, 4)).toEqual([-5, 0, 5]);
  });

  it("an axis without a span gets a step and never a hang", () => {
    expect(niceStep(0, 5)).toBe(1);
    expect(niceStep(Infinity, 5)).toBe(1);
    expect(niceTicks(4, 4, 5)).toEqual([4]);
  });

  it("a scale bar is the longest round length within a third of the plan", () => {
    expect(scaleBarLength(18)).toBe(5);
    expect(scaleBarLength(14.9)).toBe(2);
    expect(scaleBarLength(3)).toBe(1);
    expect(scaleBarLength(2.9)).toBe(0.5);
    expect(scaleBarLength(400)).toBe(100);
  });

  it("counts are all labelled while they fit, then every second, fifth and so on", () => {
    expect(countTicks([0, 1, 2, 3], 4)).toEqual([0, 1, 2, 3]);
    expect(countTicks([0, 3, 7], 3)).toEqual([0, 3, 7]);
    expect(countTicks([0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12], 10)).toEqual([0, 2, 4, 6, 8, 10, 12]);
    expect(countTicks([1, 2, 3, 4, 5, 6], 3)).toEqual([5]);
  });
});
