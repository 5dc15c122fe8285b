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

  it("refuses what is no covariance at all", () => {
    expect(() => factorSemidefinite(Float64Array.of(1, 2, 2, 1), 2, 1e-9)).toThrow(DomainError);
  });
});
