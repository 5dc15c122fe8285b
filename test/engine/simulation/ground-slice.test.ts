import { describe, expect, it } from "vitest";
import { groundSlice, type Problem } from "../../../src/engine/index.js";
import { parseSite, templateRows } from "../../../src/inputs/index.js";

const { problem } = parseSite(templateRows());
const scales = { horizontalScale: problem.ground.horizontalScale, verticalScale: problem.ground.verticalScale };
const withGround = (change: Partial<Problem["ground"]>): Problem => ({ ...problem, ground: { ...problem.ground, ...change } });

/** Sums over many slices of ln modulus at two points. */
function moments(of: Problem, grid: Parameters<typeof groundSlice>[2], i: number, j: number, count: number): { mean: number; variance: number; covariance: number } {
  let a = 0, b = 0, aa = 0, ab = 0;
  for (let k = 0; k < count; k++) {
    const slice = groundSlice(of, k, grid);
    const [u, v] = [Math.log(slice[i]!), Math.log(slice[j]!)];
    a += u; b += v; aa += u * u; ab += u * v;
  }
  return { mean: a / count, variance: aa / count - (a / count) ** 2, covariance: ab / count - (a / count) * (b / count) };
}

describe("a slice of one realised ground", () => {
  const grid = { x: Float64Array.of(0, 3), depths: Float64Array.of(1, 5) };
  const count = 4000;
  // five standard deviations of each estimate: chance alone fails this less than once in a million
  const within = (variance: number): { mean: number; variance: number } => ({ mean: 5 * Math.sqrt(variance / count), variance: 5 * variance * Math.sqrt(2 / count) });

  it.each(["markov", "ellipsoidal"] as const)("has the mean, variance and correlation of the ground, %s", (correlation) => {
    const site = withGround({ correlation, regionalCov: 0 });
    const { cov, mean } = site.ground.layers[0]!;
    // Source: lognormal field, sigma^2 = ln(1 + COV^2), median = mean exp(-sigma^2 / 2); Markov correlation exp(-2 r / scale)
    const sigma2 = Math.log(1 + cov ** 2);
    const [h, v] = [(2 * 3) / scales.horizontalScale, (2 * 4) / scales.verticalScale];
    const rho = correlation === "markov" ? Math.exp(-h) * Math.exp(-v) : Math.exp(-Math.hypot(h, v));
    const found = moments(site, grid, 0, 3, count);
    const tolerance = within(sigma2);
    expect(Math.abs(found.mean - (Math.log(mean) - sigma2 / 2))).toBeLessThan(tolerance.mean);
    expect(Math.abs(found.variance - sigma2)).toBeLessThan(tolerance.variance);
    expect(Math.abs(found.covariance - rho * sigma2)).toBeLessThan(tolerance.variance);
    // two points of one row: rows and columns are not taken for one another
    expect(Math.abs(moments(site, grid, 0, 1, count).covariance - Math.exp(-h) * sigma2)).toBeLessThan(tolerance.variance);
  });

  it("moves as a whole with the regional level", () => {
    // Source: the level adds ln(1 + COV^2) to every covariance
    const found = moments(withGround({ regionalCov: 0.5, layers: [{ ...problem.ground.layers[0]!, cov: 0 }] }), grid, 0, 3, count);
    const level = Math.log(1.25);
    expect(Math.abs(found.covariance - level)).toBeLessThan(within(level).variance);
    expect(Math.abs(found.covariance / found.variance - 1)).toBeLessThan(1e-9);
  });

  it("is fixed by seed and number, and refuses a number that is none", () => {
    expect(groundSlice(problem, 3, grid)).toEqual(groundSlice(problem, 3, grid));
    expect(groundSlice(problem, 4, grid)).not.toEqual(groundSlice(problem, 3, grid));
    expect(groundSlice({ ...problem, seed: "another" }, 3, grid)).not.toEqual(groundSlice(problem, 3, grid));
    expect(() => groundSlice(problem, -1, grid)).toThrow(/whole number/);
    expect(() => groundSlice(problem, 0, { x: new Float64Array(0), depths: grid.depths })).toThrow(/at least 1/);
  });
});
