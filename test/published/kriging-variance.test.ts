import { describe, expect, it } from "vitest";
import { correlation } from "../../src/engine/ground/correlation.js";
import { choleskyInPlace, solveLower } from "../../src/engine/numerics/cholesky.js";

// Source: stored outputs of the tests of the R package gstat 2.1-0: spherical model of sill 1 and range 1 (a scale of fluctuation of
// 0.75): covariances at h = 0, 0.2 ... 1, and ordinary kriging at the origin from the points (+-0.5, +-0.5).
const SCALE = 0.75;
const POINTS = [[-0.5, -0.5], [-0.5, 0.5], [0.5, -0.5], [0.5, 0.5]];

/** Ordinary kriging variance at the origin: C(0) - c' C^-1 c + (1 - 1' C^-1 c)^2 / (1' C^-1 1). */
function krigingVariance(points: number[][]): number {
  const n = points.length;
  const c = Float64Array.from({ length: n * n }, (_, at) => {
    const [p, q] = [points[Math.floor(at / n)], points[at % n]];
    return correlation("spherical", Math.hypot(p[0] - q[0], p[1] - q[1]), SCALE);
  });
  choleskyInPlace(c, n);
  const sides = Float64Array.from(points.flatMap(([x, y]) => [correlation("spherical", Math.hypot(x, y), SCALE), 1]));
  solveLower(c, n, sides, 2);
  const inner = (a: number, b: number) => Array.from({ length: n }, (_, i) => sides[2 * i + a] * sides[2 * i + b]).reduce((x, y) => x + y);
  return 1 - inner(0, 0) + (1 - inner(0, 1)) ** 2 / inner(1, 1);
}

describe("the spherical correlation of gstat's tests", () => {
  it.each([[0, 1], [0.2, 0.704], [0.4, 0.432], [0.6, 0.208], [0.8, 0.056], [1, 0]])("at h = %d is %d", (h, value) => {
    expect(correlation("spherical", h, SCALE)).toBeCloseTo(value, 14);
  });

  it("gives the ordinary kriging variances printed there", () => {
    expect(Math.abs(krigingVariance(POINTS) - 1.017767)).toBeLessThan(5.1e-7);
    expect(Math.abs(krigingVariance(POINTS.slice(0, 2)) - 1.267767)).toBeLessThan(5.1e-7);
  });
});
