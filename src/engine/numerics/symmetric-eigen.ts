import { DomainError, requireDomain } from "./domain-error.js";

/** Eigenvalues in increasing order; row k of `vectors` is the unit eigenvector of `values[k]`. */
export interface Eigen {
  readonly values: Float64Array;
  /** n x n, row by row, one eigenvector a row */
  readonly vectors: Float64Array;
}

/**
 * Eigenvalues and eigenvectors of a symmetric matrix.
 *
 * @param a  n x n, row by row, finite; the lower triangle is read; not changed
 * @param n  order, > 0
 * @returns values with an absolute error of a few units in the last place of the largest, and orthonormal vectors
 * @throws {DomainError} the shape is wrong or an entry is not finite
 * @source Householder reduction and implicit QL: Martin, Reinsch & Wilkinson (1968) and Dubrulle, Martin & Wilkinson (1968),
 *   Numer. Math. 11 and 12. Vectors are kept as rows, so that every rotation runs along memory.
 */
export function symmetricEigen(a: Float64Array, n: number): Eigen {
  requireDomain(Number.isInteger(n) && n > 0 && a.length >= n * n, "Order of the matrix", n, "a whole number above 0 that fits the array");
  let largest = 0;
  for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) largest = Math.max(largest, Math.abs(a[i * n + j]));
  requireDomain(largest < Infinity, "Largest entry of the matrix", largest, "finite");
  const scale = largest === 0 ? 1 : largest; // squares of scaled entries neither overflow nor vanish together
  const work = new Float64Array(n * n);
  for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) work[i * n + j] = work[j * n + i] = a[i * n + j] / scale;
  const diagonal = new Float64Array(n);
  const beside = new Float64Array(n);
  const rows = tridiagonalise(work, n, diagonal, beside);
  implicitQl(diagonal, beside, rows, n);
  const order = Array.from({ length: n }, (_, k) => k).sort((i, j) => diagonal[i] - diagonal[j]);
  const vectors = new Float64Array(n * n);
  order.forEach((from, k) => vectors.set(rows.subarray(from * n, from * n + n), k * n));
  return { values: Float64Array.from(order, (k) => diagonal[k] * scale), vectors };
}

/** Reduces `a` (destroyed) to a tridiagonal matrix; returns the transposed product of the reflections. */
function tridiagonalise(a: Float64Array, n: number, diagonal: Float64Array, beside: Float64Array): Float64Array {
  const factor = new Float64Array(n);
  const p = new Float64Array(n);
  for (let k = 0; k < n - 1; k++) {
    // The reflection's vector stays in row k, right of the diagonal, for the product below.
    const v = k * n;
    let square = 0;
    for (let j = k + 1; j < n; j++) square += a[v + j] * a[v + j];
    const first = a[v + k + 1];
    const norm = first > 0 ? -Math.sqrt(square) : Math.sqrt(square);
    diagonal[k] = a[v + k];
    beside[k] = norm;
    // Entries of size 1e-30 beside a largest of 1 are rounding of zeros; reflecting them divides by squares that vanish.
    if (square < 1e-60 || k === n - 2) {
      beside[k] = k === n - 2 ? first : 0;
      continue;
    }
    a[v + k + 1] = first - norm;
    const beta = (factor[k] = 1 / (square - first * norm));
    let inner = 0;
    for (let i = k + 1; i < n; i++) {
      let sum = 0;
      for (let j = k + 1; j < n; j++) sum += a[i * n + j] * a[v + j];
      p[i] = beta * sum;
      inner += p[i] * a[v + i];
    }
    for (let i = k + 1; i < n; i++) p[i] -= 0.5 * beta * inner * a[v + i];
    for (let i = k + 1; i < n; i++) {
      const vi = a[v + i], pi = p[i];
      for (let j = k + 1; j < n; j++) a[i * n + j] -= vi * p[j] + pi * a[v + j];
    }
  }
  diagonal[n - 1] = a[n * n - 1];
  const rows = new Float64Array(n * n);
  for (let i = 0; i < n; i++) rows[i * n + i] = 1;
  for (let k = n - 3; k >= 0; k--) {
    if (factor[k] === 0) continue;
    for (let i = k + 1; i < n; i++) {
      let sum = 0;
      for (let j = k + 1; j < n; j++) sum += rows[i * n + j] * a[k * n + j];
      sum *= factor[k];
      for (let j = k + 1; j < n; j++) rows[i * n + j] -= sum * a[k * n + j];
    }
  }
  return rows;
}

function implicitQl(d: Float64Array, e: Float64Array, rows: Float64Array, n: number): void {
  for (let l = 0; l < n; l++) {
    for (let sweep = 0; ; sweep++) {
      let m = l;
      while (m < n - 1 && Math.abs(e[m]) > Number.EPSILON * (Math.abs(d[m]) + Math.abs(d[m + 1])) && Math.abs(e[m]) > 1e-300) m++;
      if (m === l) break;
      if (sweep === 100) throw new DomainError("The eigenvalues of the matrix could not be found.");
      let g = (d[l + 1] - d[l]) / (2 * e[l]);
      const r0 = Math.sqrt(g * g + 1);
      g = d[m] - d[l] + e[l] / (g + (g >= 0 ? r0 : -r0));
      let s = 1, c = 1, shift = 0;
      let i = m - 1;
      for (; i >= l; i--) {
        const f = s * e[i], b = c * e[i];
        const r = Math.sqrt(f * f + g * g);
        e[i + 1] = r;
        if (r === 0) {
          d[i + 1] -= shift;
          e[m] = 0;
          break;
        }
        s = f / r;
        c = g / r;
        g = d[i + 1] - shift;
        const t = (d[i] - g) * s + 2 * c * b;
        shift = s * t;
        d[i + 1] = g + shift;
        g = c * t - b;
        rotate(rows, n, i, c, s);
      }
      if (i >= l) continue;
      d[l] -= shift;
      e[l] = g;
      e[m] = 0;
    }
  }
}

function rotate(rows: Float64Array, n: number, i: number, c: number, s: number): void {
  for (let p = i * n, q = p + n, end = q; p < end; p++, q++) {
    const low = rows[p], high = rows[q];
    rows[q] = s * low + c * high;
    rows[p] = c * low - s * high;
  }
}
