import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { choleskyInPlace, multiplyLower, solveLower, solveUpperTransposed } from "../../../src/engine/numerics/cholesky.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { stream } from "../../../src/engine/random/stream.js";
import fixture from "../../fixtures/numerics/numerics.json";

const { dense } = fixture;
const largest = (a: ArrayLike<number>, b: ArrayLike<number>) => Math.max(...Array.from(a, (value, i) => Math.abs(value - b[i])));

/** A A' of a random n x rank matrix. */
function gram(n: number, rank: number, seed: string): Float64Array {
  const random = stream(seed, n, rank);
  const a = Float64Array.from({ length: n * rank }, () => random.normal());
  return Float64Array.from({ length: n * n }, (_, at) => {
    let sum = 0;
    for (let k = 0; k < rank; k++) sum += a[Math.floor(at / n) * rank + k] * a[(at % n) * rank + k];
    return sum;
  });
}

function timesOwnTranspose(l: Float64Array, n: number): Float64Array {
  return Float64Array.from({ length: n * n }, (_, at) => {
    let sum = 0;
    for (let k = 0; k < n; k++) sum += l[Math.floor(at / n) * n + k] * l[(at % n) * n + k];
    return sum;
  });
}

describe("choleskyInPlace", () => {
  // Source: numerics.py, numpy.linalg.cholesky and scipy.linalg.cho_solve.
  it("meets numpy's factor and scipy's solution", () => {
    const l = Float64Array.from(dense.matrix);
    expect(choleskyInPlace(l, dense.n)).toBe(dense.n);
    expect(largest(l, dense.factor)).toBeLessThan(1e-14);
    const x = Float64Array.from(dense.rhs);
    solveLower(l, dense.n, x, 3);
    solveUpperTransposed(l, dense.n, x, 3);
    expect(largest(x, dense.solution)).toBeLessThan(1e-12);
  });

  // Identity: L L' = A, for orders that do and do not divide by the block of three.
  it("gives back the matrix at every order from 1 to 20", () => {
    for (let n = 1; n <= 20; n++) {
      const a = gram(n, n + 2, "orders");
      const l = a.slice();
      expect(choleskyInPlace(l, n)).toBe(n);
      expect(largest(timesOwnTranspose(l, n), a)).toBeLessThan(1e-12);
    }
  });

  // Identity: a matrix of lower rank is given back too, with as many pivots as its rank, in whatever order its rows stand.
  it("gives back matrices of any rank and names the rank", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 14 }), fc.integer({ min: 0, max: 14 }), fc.integer(), (n, rank, seed) => {
        const a = gram(n, rank, String(seed));
        const l = a.slice();
        expect(choleskyInPlace(l, n, 1e-10)).toBe(Math.min(n, rank));
        expect(largest(timesOwnTranspose(l, n), a)).toBeLessThan(1e-4 * (1 + Math.max(...a)));
      }),
      { seed: 7, numRuns: 200 },
    );
  });

  // Hand-made: two identical piles and one apart from them.
  it("zeroes the column of a repeated row", () => {
    const l = Float64Array.of(4, 0, 0, 4, 4, 0, 2, 2, 5);
    expect(choleskyInPlace(l, 3)).toBe(2);
    expect([...l]).toEqual([2, 0, 0, 2, 0, 0, 1, 0, 2]);
  });

  it("refuses an indefinite matrix, a number that is none, and a wrong shape", () => {
    expect(() => choleskyInPlace(Float64Array.of(1, 2, 2, 1), 2)).toThrow("not positive semi-definite at row 2");
    expect(() => choleskyInPlace(Float64Array.of(1, 0, 0, Number.NaN), 2)).toThrow(DomainError);
    expect(() => choleskyInPlace(Float64Array.of(Infinity), 1)).toThrow(DomainError);
    expect(() => choleskyInPlace(new Float64Array(3), 2)).toThrow(DomainError);
  });
});

describe("multiplyLower", () => {
  // Independent: the definition, entry by entry, on a block of columns in the middle of a wider table.
  it("multiplies a block of a table", () => {
    const random = stream("multiply");
    const n = 7, columns = 6, stride = 11, offset = 3;
    const l = Float64Array.from({ length: n * n }, (_, at) => (at % n <= Math.floor(at / n) ? random.normal() : 99));
    const z = Float64Array.from({ length: n * stride }, () => random.normal());
    const out = new Float64Array(n * columns);
    multiplyLower(l, n, z, out, columns, stride, offset);
    for (let i = 0; i < n; i++) {
      for (let c = 0; c < columns; c++) {
        let sum = 0;
        for (let k = 0; k <= i; k++) sum += l[i * n + k] * z[offset + k * stride + c];
        expect(out[i * columns + c]).toBeCloseTo(sum, 13);
      }
    }
  });

  // Identity: a triangular solution undoes the product.
  it("is undone by solveLower", () => {
    const random = stream("undone");
    const l = Float64Array.from(dense.factor);
    const z = Float64Array.from({ length: dense.n }, () => random.normal());
    const out = new Float64Array(dense.n);
    multiplyLower(l, dense.n, z, out);
    solveLower(l, dense.n, out);
    expect(largest(out, z)).toBeLessThan(1e-13);
  });

  it("refuses arrays that are too short", () => {
    const l = new Float64Array(4);
    expect(() => multiplyLower(l, 2, new Float64Array(3), new Float64Array(4), 2)).toThrow(DomainError);
    expect(() => solveLower(l, 2, new Float64Array(1))).toThrow(DomainError);
    expect(() => solveUpperTransposed(new Float64Array(3), 2, new Float64Array(2))).toThrow(DomainError);
  });
});

describe("triangular solutions with a zero pivot", () => {
  // Hand-made: the zero pivot's unknown is 0, the rest solve the remaining rows.
  it("leave the unknown of a zero pivot at 0", () => {
    const l = Float64Array.of(2, 0, 0, 2, 0, 0, 1, 0, 2);
    const b = Float64Array.of(2, 2, 5);
    solveLower(l, 3, b);
    expect([...b]).toEqual([1, 0, 2]);
    solveUpperTransposed(l, 3, b);
    expect([...b]).toEqual([0, 0, 1]);
  });
});
