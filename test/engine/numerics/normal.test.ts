import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { normalCentralChance, normalDensity, normalDistribution, normalQuantile, unitNormalLoss } from "../../../src/engine/numerics/normal.js";
import fixture from "../../fixtures/numerics/numerics.json";

const relative = (value: number, exact: number) => (exact === 0 ? Math.abs(value) : Math.abs(value / exact - 1));

describe("the normal law", () => {
  // Source: numerics.py, positive series in 800 decimal digits. At -38 the values are denormal and hold 7 digits.
  it.each(fixture.normal)("meets 40-digit references at x = $x", ({ x, density, distribution, central }) => {
    const tolerance = x < -37.5 ? 1e-6 : 1e-15;
    expect(relative(normalDensity(x), density)).toBeLessThan(tolerance);
    expect(relative(normalDistribution(x), distribution)).toBeLessThan(tolerance);
    expect(relative(normalCentralChance(x), central)).toBeLessThan(1e-15);
  });

  // Source: numerics.py, Newton's iteration on the same series.
  it.each(fixture.quantiles)("meets the quantile at p = $p", ({ p, x }) => {
    expect(relative(normalQuantile(p), x)).toBeLessThan(1e-15);
  });

  // Identity: a quantile's chance is its argument, closely spaced over all branches; compared on the logarithm.
  it("gives back the chance of a quantile", () => {
    for (let k = -690; k < 0; k++) {
      const p = Math.exp(k);
      expect(Math.abs(Math.log(normalDistribution(normalQuantile(p))) - Math.log(p))).toBeLessThan(1e-12); // the last digit of x is worth x^2 = 1400 of the last digits of p
    }
    for (let p = 0.001; p < 1; p += 0.001) expect(relative(normalDistribution(normalQuantile(p)), p)).toBeLessThan(1e-14);
  });

  it("keeps to 0, 1/2 and 1 far out", () => {
    expect(normalDistribution(-Infinity)).toBe(0);
    expect(normalDistribution(-1e9)).toBe(0);
    expect(normalDistribution(1e9)).toBe(1);
    expect(normalCentralChance(-Infinity)).toBe(-0.5);
    expect(normalDensity(1e200)).toBe(0);
  });

  it("refuses what has no answer", () => {
    for (const p of [0, 1, -0.1, 1.1, Number.NaN]) expect(() => normalQuantile(p)).toThrow(DomainError);
    expect(() => normalDistribution(Number.NaN)).toThrow(DomainError);
    expect(() => unitNormalLoss(Number.NaN)).toThrow(DomainError);
    expect(() => unitNormalLoss(Infinity)).toThrow(DomainError);
  });
});

describe("unitNormalLoss", () => {
  // Source: numerics.py, phi(u) - u (1 - Phi(u)) in 800 decimal digits.
  it.each(fixture.losses)("meets 40-digit references at u = $u", ({ u, loss }) => {
    expect(relative(unitNormalLoss(u), loss)).toBeLessThan(1e-14);
  });

  // Identity: G(-u) = G(u) + u.
  it("differs by u between -u and u", () => {
    for (let u = 0; u < 8; u += 0.1) expect(Math.abs(unitNormalLoss(-u) - unitNormalLoss(u) - u)).toBeLessThan(3e-15);
  });
});
