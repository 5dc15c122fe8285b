/**
 * Products of the rows of two tables: out[i, j] = sum over k of a[i, k] b[j, k]. Three rows by three at a time: nine products
 * from six loads, half of what a plain dot product asks of the memory.
 *
 * @param a    n x m, row by row
 * @param b    p x m, row by row
 * @param out  receives n x p
 */
export function rowProducts(a: Float64Array, n: number, b: Float64Array, p: number, m: number, out: Float64Array): void {
  let i = 0;
  for (; i + 2 < n; i += 3) {
    let j = 0;
    for (; j + 2 < p; j += 3) nineProducts(a, i * m, b, j * m, m, out, i * p + j, p);
    for (; j < p; j++) for (let r = i; r < i + 3; r++) out[r * p + j] = product(a, r * m, b, j * m, m);
  }
  for (; i < n; i++) for (let j = 0; j < p; j++) out[i * p + j] = product(a, i * m, b, j * m, m);
}

function product(a: Float64Array, i: number, b: Float64Array, j: number, m: number): number {
  let sum = 0;
  for (let k = 0; k < m; k++) sum += a[i + k] * b[j + k];
  return sum;
}

function nineProducts(a: Float64Array, i0: number, b: Float64Array, j0: number, m: number, out: Float64Array, at: number, p: number): void {
  const i1 = i0 + m, i2 = i1 + m, j1 = j0 + m, j2 = j1 + m;
  let s00 = 0, s01 = 0, s02 = 0, s10 = 0, s11 = 0, s12 = 0, s20 = 0, s21 = 0, s22 = 0;
  for (let k = 0; k < m; k++) {
    const b0 = b[j0 + k], b1 = b[j1 + k], b2 = b[j2 + k];
    const a0 = a[i0 + k];
    s00 += a0 * b0; s01 += a0 * b1; s02 += a0 * b2;
    const a1 = a[i1 + k];
    s10 += a1 * b0; s11 += a1 * b1; s12 += a1 * b2;
    const a2 = a[i2 + k];
    s20 += a2 * b0; s21 += a2 * b1; s22 += a2 * b2;
  }
  out[at] = s00; out[at + 1] = s01; out[at + 2] = s02;
  out[at + p] = s10; out[at + p + 1] = s11; out[at + p + 2] = s12;
  out[at + 2 * p] = s20; out[at + 2 * p + 1] = s21; out[at + 2 * p + 2] = s22;
}
