import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { factorBanded, solveBanded, solveBandedMany } from "../../../src/engine/numerics/banded-cholesky.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { stream } from "../../../src/engine/random/stream.js";
import fixture from "../../fixtures/numerics/numerics.json";

const largest = (a: ArrayLike<number>, b: ArrayLike<number>) => Math.max(0, ...Array.from(a, (value, i) => Math.abs(value - b[i])));

describe("factorBanded and solveBanded", () => {
  // Source: numerics.py, scipy.linalg.cholesky_banded and solveh_banded (LAPACK).
  it.each(fixture.bands)("meet scipy's factor and solutions, n = $n, half bandwidth $halfBandwidth", ({ n, halfBandwidth: h, columns, ...given }) => {
    const band = Float64Array.from(given.band);
    factorBanded(band, n, h);
    for (let i = 0; i < n; i++) for (let j = Math.max(0, i - h); j <= i; j++) expect(band[i * (h + 1) + j - i + h]).toBeCloseTo(given.factor[i * (h + 1) + j - i + h], 13);
    const many = Float64Array.from(given.rhs);
    solveBandedMany(band, n, h, many, columns);
    expect(largest(many, given.solution)).toBeLessThan(1e-14);
    const one = Float64Array.from({ length: n }, (_, i) => given.rhs[i * columns]);
    solveBanded(band, n, h, one);
    expect(largest(one, given.solution.filter((_, at) => at % columns === 0))).toBeLessThan(1e-14);
  });

  // Manufactured: a right-hand side made from a known solution, at every shape, so that no block and no leftover is missed.
  it("give back a known solution at any order, bandwidth and number of columns", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 24 }), fc.integer({ min: 0, max: 23 }), fc.integer({ min: 1, max: 9 }), fc.integer(), (n, wide, columns, seed) => {
        const h = Math.min(wide, n - 1);
        const random = stream(String(seed));
        const band = Float64Array.from({ length: n * (h + 1) }, (_, at) => (at % (h + 1) === h ? 2 * h + 1 : 2 * random.uniform() - 1));
        const x = Float64Array.from({ length: n * columns }, () => random.normal());
        const b = new Float64Array(n * columns);
        for (let i = 0; i < n; i++) {
          for (let j = Math.max(0, i - h); j <= i; j++) {
            const value = band[i * (h + 1) + j - i + h];
            for (let c = 0; c < columns; c++) {
              b[i * columns + c] += value * x[j * columns + c];
              if (j < i) b[j * columns + c] += value * x[i * columns + c];
            }
          }
        }
        factorBanded(band, n, h);
        solveBandedMany(band, n, h, b, columns);
        expect(largest(b, x)).toBeLessThan(1e-12);
      }),
      { seed: 11, numRuns: 400 },
    );
  });

  it("name the row where a matrix is not positive definite", () => {
    expect(() => factorBanded(Float64Array.of(0, 1, 2, 1, 0, 5), 3, 1)).toThrow("not positive definite at row 2");
    expect(() => factorBanded(Float64Array.of(0, 1, 0, 1, 0, Number.NaN), 3, 1)).toThrow("row 3");
    expect(() => factorBanded(Float64Array.of(0, 1, 0, Infinity), 2, 1)).toThrow("row 2");
  });

  // A workspace is kept between calls: what a larger matrix left there must not reach a smaller one.
  it("forget the matrix before", () => {
    const small = () => Float64Array.of(0, 0, 4, 0, 1, 5, 0, 1, 6, 0, 1, 7);
    const alone = small();
    factorBanded(alone, 4, 2);
    factorBanded(Float64Array.from({ length: 60 * 12 }, (_, at) => (at % 12 === 11 ? 30 : 1)), 60, 11);
    const after = small();
    factorBanded(after, 4, 2);
    expect([...after]).toEqual([...alone]);
  });

  it("refuse wrong shapes", () => {
    const band = new Float64Array(6).fill(1);
    expect(() => factorBanded(band, 0, 0)).toThrow(DomainError);
    expect(() => factorBanded(band, 3, 3)).toThrow(DomainError);
    expect(() => factorBanded(band, 7, 1)).toThrow(DomainError);
    expect(() => solveBanded(band, 4, 1, new Float64Array(4))).toThrow(DomainError);
    expect(() => solveBandedMany(band, 3, 1, new Float64Array(5), 2)).toThrow(DomainError);
    expect(() => solveBandedMany(band, 3, 1, new Float64Array(6), 0)).toThrow(DomainError);
  });
});
