import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { lagrangeWeights } from "../../../src/engine/numerics/lagrange.js";

const grid = [0, 0.5, 1.2, 2, 3.3, 5, 8];
const interpolate = (f: (x: number) => number, x: number) => {
  const { start, weights } = lagrangeWeights(grid, x);
  return weights.reduce((sum, weight, k) => sum + weight * f(grid[start + k]), 0);
};

describe("lagrangeWeights", () => {
  // Identity: exact for cubics everywhere, and only for those.
  it("is exact for cubics and not for quartics", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 8, noNaN: true }), (x) => {
        const cubic = (t: number) => 2 - t + 0.5 * t ** 2 - 0.1 * t ** 3;
        expect(Math.abs(interpolate(cubic, x) - cubic(x))).toBeLessThan(1e-12);
      }),
      { seed: 1 },
    );
    // The remainder of t^4 between four points is the product of the distances to them.
    expect(interpolate((t) => t ** 4, 1.6)).toBeCloseTo(1.6 ** 4 - (1.6 - 0.5) * (1.6 - 1.2) * (1.6 - 2) * (1.6 - 3.3), 12);
  });

  it("returns grid values at grid points and takes two points on each side", () => {
    grid.forEach((x) => expect(interpolate(Math.exp, x)).toBeCloseTo(Math.exp(x), 9));
    expect(lagrangeWeights(grid, 2.5).start).toBe(2);
    expect(lagrangeWeights(grid, 0.1).start).toBe(0);
    expect(lagrangeWeights(grid, 7).start).toBe(3);
  });

  it("forgives rounding beyond an end and refuses more, and short grids", () => {
    expect(interpolate((t) => t, 8 + 1e-12)).toBeCloseTo(8, 10);
    for (const x of [-0.01, 8.01, Number.NaN]) expect(() => lagrangeWeights(grid, x)).toThrow(DomainError);
    expect(() => lagrangeWeights([0, 1, 2], 1)).toThrow(DomainError);
  });
});
