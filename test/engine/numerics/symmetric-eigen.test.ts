import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { symmetricEigen } from "../../../src/engine/numerics/symmetric-eigen.js";
import { stream } from "../../../src/engine/random/stream.js";
import fixture from "../../fixtures/numerics/numerics.json";

/** Largest residuals of A v = value v and of V V' = I, and whether the values increase. */
function residuals(a: Float64Array, n: number) {
  const { values, vectors } = symmetricEigen(a, n);
  let equation = 0;
  let orthogonality = 0;
  for (let k = 0; k < n; k++) {
    for (let i = 0; i < n; i++) {
      let image = 0;
      let inner = 0;
      for (let j = 0; j < n; j++) {
        image += a[Math.max(i, j) * n + Math.min(i, j)] * vectors[k * n + j];
        inner += vectors[k * n + j] * vectors[i * n + j];
      }
      equation = Math.max(equation, Math.abs(image - values[k] * vectors[k * n + i]));
      orthogonality = Math.max(orthogonality, Math.abs(inner - (i === k ? 1 : 0)));
    }
  }
  return { equation, orthogonality, sorted: values.every((value, k) => k === 0 || values[k - 1] <= value) };
}

describe("symmetricEigen", () => {
  // Source: numerics.py, numpy.linalg.eigvalsh.
  it("meets numpy's eigenvalues of an indefinite matrix", () => {
    const { values } = symmetricEigen(Float64Array.from(fixture.eigen.matrix), fixture.eigen.n);
    fixture.eigen.values.forEach((value, k) => expect(Math.abs(values[k] - value)).toBeLessThan(1e-13));
  });

  // Identity, for random matrices of any order, of low rank and with repeated values too.
  it("solves the eigenvalue equation with orthonormal vectors", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 18 }), fc.integer({ min: 0, max: 18 }), fc.double({ min: 1e-150, max: 1e150, noNaN: true }), fc.integer(), (n, rank, size, seed) => {
        const random = stream(String(seed));
        const a = new Float64Array(n * n);
        for (let k = 0; k < rank; k++) {
          const v = Float64Array.from({ length: n }, () => Math.round(2 * random.normal()));
          for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) a[i * n + j] += (k % 2 === 0 ? 1 : -1) * size * v[i] * v[j];
        }
        const { equation, orthogonality, sorted } = residuals(a, n);
        expect(equation).toBeLessThan(1e-12 * size * (1 + n * rank));
        expect(orthogonality).toBeLessThan(1e-13);
        expect(sorted).toBe(true);
      }),
      { seed: 5, numRuns: 200 },
    );
  });

  // Closed form: the second-difference matrix has values 2 - 2 cos(k pi / (n + 1)).
  it("meets the closed form of the second-difference matrix", () => {
    const n = 60;
    const a = new Float64Array(n * n);
    for (let i = 0; i < n; i++) {
      a[i * n + i] = 2;
      if (i > 0) a[i * n + i - 1] = -1;
    }
    const { values } = symmetricEigen(a, n);
    values.forEach((value, k) => expect(Math.abs(value - (2 - 2 * Math.cos(((k + 1) * Math.PI) / (n + 1))))).toBeLessThan(1e-14));
  });

  // Identity: ground that does not vary in some cells gives rows of zeros; the others keep the eigenvalues that they have alone.
  it("keeps the eigenvalues of a block beside rows of zeros", () => {
    const n = 72;
    const alive = Array.from({ length: n }, (_, i) => i).filter((i) => i % 18 > 13);
    const whole = new Float64Array(n * n);
    const block = new Float64Array(alive.length ** 2);
    alive.forEach((i, a) => alive.forEach((j, b) => (whole[i * n + j] = block[a * alive.length + b] = Math.exp(-0.37 * Math.abs(i - j)) * (1 + 0.01 * ((i * j) % 7)))));
    const found = symmetricEigen(whole, n);
    const alone = symmetricEigen(block, alive.length);
    expect(found.vectors.every(Number.isFinite)).toBe(true);
    for (let k = 1; k <= 5; k++) expect(found.values[n - k]).toBeCloseTo(alone.values[alive.length - k], 10);
  });

  it("leaves its argument alone and refuses what is not a matrix", () => {
    const a = Float64Array.of(2, 0, 1, 3);
    symmetricEigen(a, 2);
    expect([...a]).toEqual([2, 0, 1, 3]);
    expect(() => symmetricEigen(a, 3)).toThrow(DomainError);
    expect(() => symmetricEigen(Float64Array.of(1, 0, Number.NaN, 1), 2)).toThrow(DomainError);
    expect(() => symmetricEigen(Float64Array.of(Infinity), 1)).toThrow(DomainError);
  });
});
