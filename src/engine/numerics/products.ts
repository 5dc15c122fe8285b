/** A (n x m) times B (m x p). */
export function times(a: Float64Array, b: Float64Array, n: number, m: number, p: number): Float64Array {
  const out = new Float64Array(n * p);
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < m; k++) {
      const factor = a[i * m + k];
      if (factor === 0) continue;
      for (let j = 0; j < p; j++) out[i * p + j] += factor * b[k * p + j];
    }
  }
  return out;
}

/** A (n x m) times the transpose of B (p x m). */
export function timesTransposed(a: Float64Array, b: Float64Array, n: number, p: number, m: number): Float64Array {
  const out = new Float64Array(n * p);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < p; j++) {
      let sum = 0;
      for (let k = 0; k < m; k++) sum += a[i * m + k] * b[j * m + k];
      out[i * p + j] = sum;
    }
  }
  return out;
}

/** Sum of the elementwise product of a block of a table and a matrix. */
export function contract(table: Float64Array, offset: number, stride: number, matrix: Float64Array, rows: number, columns: number): number {
  let sum = 0;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) sum += table[offset + i * stride + j] * matrix[i * columns + j];
  }
  return sum;
}
