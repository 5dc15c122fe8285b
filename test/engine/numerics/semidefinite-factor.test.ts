import { describe, expect, it } from "vitest";
import { factorSemidefinite } from "../../../src/engine/numerics/semidefinite-factor.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";

function product(l: Float64Array, n: number): Float64Array {
  return Float64Array.from({ length: n * n }, (_, at) => {
    let sum = 0;
    for (let k = 0; k < n; k++) sum += l[Math.floor(at / n) * n + k] * l[(at % n) * n + k];
    return sum;
  });
}

describe("factor of a nearly semi-definite covariance", () => {
  // Identity: the factor times its transpose is the matrix, where it is a covariance.
  it("is the Cholesky factor of a covariance", () => {
    const a = Float64Array.of(4, 2, 1, 2, 3, 0.5, 1, 0.5, 2);
    const l = Float64Array.from(a);
    factorSemidefinite(l, 3, 1e-12);
    product(l, 3).forEach((value, at) => expect(value).toBeCloseTo(a[at], 12));
    expect(l[1]).toBe(0);
  });

  // Higham (1988): the nearest semi-definite matrix sets negative eigenvalues to zero. Here the eigenvalues are 1.9999 and -0.0001 (by hand: 0.9999 +- 1).
  it("takes the nearest covariance of one that rounding spoilt", () => {
    const l = Float64Array.of(0.9999, 1, 1, 0.9999);
    factorSemidefinite(l, 2, 1e-9);
    product(l, 2).forEach((value) => expect(Math.abs(value - 0.99995)).toBeLessThan(1e-6));
  });

  // Higham (1988) again, in several dimensions: rank 3 in 9, spoilt by a few millionths either way. Rounding of the matrix that is rebuilt must not stop it.
  it("factors what is short of rank and a little spoilt, whatever the spoiling", () => {
    for (let seed = 1; seed <= 40; seed++) {
      let state = seed;
      const next = (): number => ((state = (state * 48271) % 2147483647) / 2147483647) - 0.5;
      const n = 9;
      const root = Float64Array.from({ length: n * 3 }, next);
      const sound = Float64Array.from({ length: n * n }, (_, at) => [0, 1, 2].reduce((sum, k) => sum + root[Math.floor(at / n) * 3 + k] * root[(at % n) * 3 + k], 0));
      const spoilt = Float64Array.from(sound);
      for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) spoilt[i * n + j] = spoilt[j * n + i] += 4e-6 * next();
      factorSemidefinite(spoilt, n, 1e-13);
      product(spoilt, n).forEach((value, at) => expect(Math.abs(value - sound[at])).toBeLessThan(3e-5));
    }
  });

  // By hand: [[a, b], [b, a]] has the eigenvalues a + b and a - b; here 1 and -0.09, or 1 and -0.11.
  it("takes a negative eigenvalue of up to a tenth of the largest, and no larger one", () => {
    const l = Float64Array.of(0.455, 0.545, 0.545, 0.455);
    factorSemidefinite(l, 2, 1e-9);
    product(l, 2).forEach((value) => expect(Math.abs(value - 0.5)).toBeLessThan(1e-6));
    expect(() => factorSemidefinite(Float64Array.of(0.445, 0.555, 0.555, 0.445), 2, 1e-9)).toThrow(DomainError);
  });

  it("refuses what is no covariance at all", () => {
    expect(() => factorSemidefinite(Float64Array.of(1, 2, 2, 1), 2, 1e-9)).toThrow(DomainError);
  });
});
