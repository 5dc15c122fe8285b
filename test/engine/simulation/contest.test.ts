import { describe, expect, it } from "vitest";
import { normalDensity, normalDistribution } from "../../../src/engine/numerics/normal.js";
import { contest } from "../../../src/engine/simulation/contest.js";

describe("contest", () => {
  // Closed form for two alternatives: the difference is normal, the regret its unit normal loss.
  it.each([[0, 1, 1, 0], [1, 1, 2, 0.5], [3, 4, 1, -0.9], [2, 1, 1, 0.99]])("of two is the normal law's: difference %d, errors %d and %d, correlation %d", (difference, a, b, rho) => {
    const { chances, regrets } = contest(Float64Array.of(10, 10 + difference), Float64Array.of(a * a, rho * a * b, rho * a * b, b * b));
    const s = Math.sqrt(a * a + b * b - 2 * rho * a * b);
    const z = difference / s;
    expect(Math.abs(chances[0] - normalDistribution(z))).toBeLessThan(0.003);
    expect(chances[0] + chances[1]).toBeCloseTo(1, 9);
    expect(Math.abs(regrets[0] - s * (normalDensity(z) - z * normalDistribution(-z)))).toBeLessThan(0.003 * s);
    expect(Math.abs(regrets[1] - regrets[0] - difference)).toBeLessThan(0.005 * s);
  });

  // Symmetry: alternatives of equal cost and equal, independent errors.
  it("shares equally among equals, however many", () => {
    for (const k of [3, 20, 150]) {
      const covariance = new Float64Array(k * k);
      for (let i = 0; i < k; i++) covariance[i * k + i] = 4;
      const { chances, regrets } = contest(new Float64Array(k), covariance);
      chances.forEach((chance) => expect(Math.abs(chance - 1 / k)).toBeLessThan(0.004 + 0.6 / k));
      expect(Math.max(...regrets) / Math.min(...regrets)).toBeLessThan(1.1);
    }
  });

  it("cancels errors that all share", () => {
    const { chances, regrets } = contest(Float64Array.of(1, 2, 3), new Float64Array(9).fill(100));
    expect([...chances]).toEqual([1, 0, 0]);
    expect(regrets[0]).toBe(0);
    expect(regrets[2]).toBeCloseTo(2, 9);
  });

  it("takes the earlier of sure equals", () => {
    const { chances, regrets } = contest(Float64Array.of(5, 4, 4), new Float64Array(9));
    expect([...chances]).toEqual([0, 1, 0]);
    expect([...regrets].map((r) => Math.round(r * 1e9) / 1e9)).toEqual([1, 0, 0]);
  });
});
