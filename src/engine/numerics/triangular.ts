import { requireDomain } from "./domain-error.js";

/**
 * Solves L x = b in place.
 *
 * @param l  lower factor of `choleskyInPlace`, n x n, row by row; an unknown whose pivot is zero becomes 0
 * @param n  order
 * @param b  right-hand sides, n x columns, the columns contiguous in a row; on return x
 * @param columns  number of right-hand sides, > 0
 * @throws {DomainError} an array is too short
 */
export function solveLower(l: Float64Array, n: number, b: Float64Array, columns = 1): void {
  requireShapes(l, n, b, columns);
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < i; k++) subtractRow(b, i, k, columns, l[i * n + k]);
    scaleRow(b, i, columns, l[i * n + i]);
  }
}

/**
 * Solves L' x = b in place, L' being the transposed factor.
 *
 * @param l  lower factor of `choleskyInPlace`, n x n, row by row; an unknown whose pivot is zero becomes 0
 * @param n  order
 * @param b  right-hand sides, n x columns, the columns contiguous in a row; on return x
 * @param columns  number of right-hand sides, > 0
 * @throws {DomainError} an array is too short
 */
export function solveUpperTransposed(l: Float64Array, n: number, b: Float64Array, columns = 1): void {
  requireShapes(l, n, b, columns);
  for (let i = n - 1; i >= 0; i--) {
    scaleRow(b, i, columns, l[i * n + i]);
    for (let k = 0; k < i; k++) subtractRow(b, k, i, columns, l[i * n + k]);
  }
}

/**
 * Product L z of a lower triangular matrix, for one vector or for a block of columns of a wider table.
 *
 * @param l  lower triangle, n x n, row by row
 * @param n  order
 * @param z  table whose entry (i, c) stands at `z[offset + i * stride + c]`
 * @param out  product, n x columns, the columns contiguous in a row; not the same array as z
 * @param columns  number of columns, > 0
 * @param stride  length of a row of z
 * @param offset  place of the block's first entry in z
 * @throws {DomainError} an array is too short
 */
export function multiplyLower(
  l: Float64Array, n: number, z: Float64Array, out: Float64Array, columns = 1, stride = columns, offset = 0,
): void {
  requireShapes(l, n, out, columns);
  requireDomain(z.length >= offset + (n - 1) * stride + columns, "Length of the table", z.length, "long enough for its rows");
  const fours = columns - (columns % 4);
  for (let i = 0; i < n; i++) {
    const row = i * n;
    for (let c = 0; c < fours; c += 4) {
      let s0 = 0, s1 = 0, s2 = 0, s3 = 0;
      for (let k = 0, q = offset + c; k <= i; k++, q += stride) {
        const factor = l[row + k];
        s0 += factor * z[q]; s1 += factor * z[q + 1]; s2 += factor * z[q + 2]; s3 += factor * z[q + 3];
      }
      const p = i * columns + c;
      out[p] = s0; out[p + 1] = s1; out[p + 2] = s2; out[p + 3] = s3;
    }
    for (let c = fours; c < columns; c++) {
      let sum = 0;
      for (let k = 0, q = offset + c; k <= i; k++, q += stride) sum += l[row + k] * z[q];
      out[i * columns + c] = sum;
    }
  }
}

function requireShapes(l: Float64Array, n: number, b: Float64Array, columns: number): void {
  requireDomain(Number.isInteger(n) && n > 0 && l.length >= n * n, "Order of the matrix", n, "a whole number above 0 that fits the array");
  requireDomain(Number.isInteger(columns) && columns > 0 && b.length >= n * columns, "Number of columns", columns, "a whole number above 0 that fits the array");
}

function subtractRow(b: Float64Array, to: number, from: number, columns: number, factor: number): void {
  for (let p = to * columns, q = from * columns, end = p + columns; p < end; p++, q++) b[p] -= factor * b[q];
}

function scaleRow(b: Float64Array, row: number, columns: number, pivot: number): void {
  const factor = pivot === 0 ? 0 : 1 / pivot;
  for (let p = row * columns, end = p + columns; p < end; p++) b[p] *= factor;
}
