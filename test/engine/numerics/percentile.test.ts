import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { percentile, weightedPercentile } from "../../../src/engine/numerics/percentile.js";
import fixture from "../../fixtures/numerics/numerics.json";

describe("percentile", () => {
  // Source: numerics.py, numpy.percentile (linear, which is type 7).
  it("meets numpy's", () => {
    const { values, p, results } = fixture.percentiles;
    p.forEach((each, k) => expect(percentile(values, each)).toBeCloseTo(results[k], 12));
  });

  it("leaves the values alone, takes a single one, and refuses none", () => {
    const values = [3, 1, 2];
    expect(percentile(values, 50)).toBe(2);
    expect(values).toEqual([3, 1, 2]);
    expect(percentile([7], 30)).toBe(7);
    expect(() => percentile([], 50)).toThrow(DomainError);
    for (const p of [-1, 101, Number.NaN]) expect(() => percentile(values, p)).toThrow(DomainError);
  });
});

describe("weightedPercentile", () => {
  // Identity: equal weights of any size give the plain percentile.
  it("equals percentile for equal weights", () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -1e3, max: 1e3, noNaN: true }), { minLength: 1, maxLength: 30 }), fc.double({ min: 0, max: 100, noNaN: true }), fc.double({ min: 0.01, max: 50, noNaN: true }), (values, p, weight) => {
        expect(weightedPercentile(values, values.map(() => weight), p)).toBeCloseTo(percentile(values, p), 8);
      }),
      { seed: 3 },
    );
  });

  // By hand: weights 1, 2, 1 stand at 0.5, 2, 3.5, that is at 0, 50 and 100; halfway to the middle one is 25.
  it("puts each value at the middle of its weight", () => {
    expect(weightedPercentile([10, 20, 40], [1, 2, 1], 25)).toBeCloseTo(15, 12);
    expect(weightedPercentile([40, 10, 20], [1, 1, 2], 75)).toBeCloseTo(30, 12);
    expect(weightedPercentile([1, 2, 3], [1, 1, 6], 50)).toBeCloseTo(2 + 1.25 / 3.5, 12); // at 0.5, 1.5 and 5; the place is 2.75
  });

  it("gives a value of weight 0 no influence", () => {
    expect(weightedPercentile([-99, 1, 2, 99], [0, 3, 3, 0], 100)).toBe(2);
    expect(weightedPercentile([5, 8], [0, 1], 20)).toBe(8);
  });

  it("refuses weights that are negative, missing or all 0", () => {
    expect(() => weightedPercentile([1, 2], [1, -1], 50)).toThrow(DomainError);
    expect(() => weightedPercentile([1, 2], [1], 50)).toThrow(DomainError);
    expect(() => weightedPercentile([1, 2], [0, 0], 50)).toThrow(DomainError);
    expect(() => weightedPercentile([1, 2], [1, 1], 100.1)).toThrow(DomainError);
    expect(() => weightedPercentile([1, 2], [1, Number.NaN], 50)).toThrow(DomainError);
  });
});
