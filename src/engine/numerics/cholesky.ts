import { DomainError, requireDomain } from "./domain-error.js";
export { multiplyLower, solveLower, solveUpperTransposed } from "./triangular.js";

/**
 * Cholesky factor of a symmetric positive semi-definite matrix, in place.
 *
 * A pivot that is zero to within the tolerance sets its column of the factor to zero: identical piles give identical rows,
 * and the factor then still reproduces the matrix.
 *
 * @param a  n x n, row by row, lower triangle read; on return the lower factor, with zeros above the diagonal
 * @param n  order, > 0
 * @param tolerance  a pivot at or below this share of its own diagonal entry counts as zero
 * @returns the rank: number of pivots that are not zero
 * @throws {DomainError} a pivot is negative by more than a millionth of its diagonal entry, or is not a number
 */
export function choleskyInPlace(a: Float64Array, n: number, tolerance = 1e-12): number {
  requireDomain(Number.isInteger(n) && n > 0 && a.length >= n * n, "Order of the matrix", n, "a whole number above 0 that fits the array");
  const inverse = new Float64Array(n);
  const diagonal = Float64Array.from({ length: n }, (_, i) => a[i * n + i]);
  const threes = n - (n % 3);
  let rank = 0;
  for (let start = 0; start < n; ) {
    const rows = start < threes ? 3 : 1;
    for (let j = 0; j + 2 < start; j += 3) {
      if (rows === 3) nineEntries(a, n, inverse, start, j);
      else for (let k = j; k < j + 3; k++) oneEntry(a, n, inverse, start, k);
    }
    for (let i = start; i < start + rows; i++) {
      for (let j = Math.min(start, threes); j < i; j++) oneEntry(a, n, inverse, i, j);
      let square = a[i * n + i];
      for (let k = i * n; k < i * n + i; k++) square -= a[k] * a[k];
      if (!(square >= -1e-6 * Math.abs(diagonal[i])) || diagonal[i] === Infinity) {
        throw new DomainError(`The covariance matrix is not positive semi-definite at row ${i + 1}.`);
      }
      const positive = square > tolerance * diagonal[i];
      a[i * n + i] = positive ? Math.sqrt(square) : 0;
      inverse[i] = positive ? 1 / a[i * n + i] : 0; // 0 sets the column below to zero
      if (positive) rank++;
      a.fill(0, i * n + i + 1, (i + 1) * n);
    }
    start += rows;
  }
  return rank;
}

function oneEntry(a: Float64Array, n: number, inverse: Float64Array, i: number, j: number): void {
  let sum = a[i * n + j];
  for (let k = 0, p = i * n, q = j * n; k < j; k++) sum -= a[p++] * a[q++];
  a[i * n + j] = sum * inverse[j];
}

/** Entries of rows i ... i + 2 in columns j ... j + 2, all left of the diagonal: nine products from six loads. */
function nineEntries(a: Float64Array, n: number, inverse: Float64Array, i: number, j: number): void {
  const p0 = i * n, p1 = p0 + n, p2 = p1 + n;
  const q0 = j * n, q1 = q0 + n, q2 = q1 + n;
  let s00 = a[p0 + j], s01 = a[p0 + j + 1], s02 = a[p0 + j + 2];
  let s10 = a[p1 + j], s11 = a[p1 + j + 1], s12 = a[p1 + j + 2];
  let s20 = a[p2 + j], s21 = a[p2 + j + 1], s22 = a[p2 + j + 2];
  for (let k = 0; k < j; k++) {
    const b0 = a[q0 + k], b1 = a[q1 + k], b2 = a[q2 + k];
    const a0 = a[p0 + k];
    s00 -= a0 * b0; s01 -= a0 * b1; s02 -= a0 * b2;
    const a1 = a[p1 + k];
    s10 -= a1 * b0; s11 -= a1 * b1; s12 -= a1 * b2;
    const a2 = a[p2 + k];
    s20 -= a2 * b0; s21 -= a2 * b1; s22 -= a2 * b2;
  }
  const l10 = a[q1 + j], l20 = a[q2 + j], l21 = a[q2 + j + 1];
  const v0 = inverse[j], v1 = inverse[j + 1], v2 = inverse[j + 2];
  s00 *= v0; s10 *= v0; s20 *= v0;
  s01 = (s01 - s00 * l10) * v1; s11 = (s11 - s10 * l10) * v1; s21 = (s21 - s20 * l10) * v1;
  a[p0 + j] = s00; a[p1 + j] = s10; a[p2 + j] = s20;
  a[p0 + j + 1] = s01; a[p1 + j + 1] = s11; a[p2 + j + 1] = s21;
  a[p0 + j + 2] = (s02 - s00 * l20 - s01 * l21) * v2;
  a[p1 + j + 2] = (s12 - s10 * l20 - s11 * l21) * v2;
  a[p2 + j + 2] = (s22 - s20 * l20 - s21 * l21) * v2;
}
