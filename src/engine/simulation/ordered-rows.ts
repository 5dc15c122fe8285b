import type { SparseRows } from "./covariance-root.js";

/** Some rows of a matrix, written out, in the order of their last entry: what lies beyond it need not be multiplied. */
export interface OrderedRows {
  /** place of each row among those given */
  readonly order: Int32Array;
  /** one past the last entry of each row, not falling */
  readonly ends: Int32Array;
  readonly columns: number;
  /** rows x columns */
  readonly values: Float64Array;
}

/**
 * Writes rows of a sparse matrix out.
 *
 * @param rows     the matrix
 * @param from     first row taken
 * @param to       one past the last
 * @param columns  columns of the matrix that these rows may use
 */
export function orderedRows({ starts, columns: at, values }: SparseRows, from: number, to: number, columns: number): OrderedRows {
  const endOf = (row: number): number => (starts[row + 1] > starts[row] ? at[starts[row + 1] - 1] + 1 : 0);
  const order = Int32Array.from({ length: to - from }, (_, i) => i).sort((i, j) => endOf(from + i) - endOf(from + j) || i - j);
  const out = new Float64Array(order.length * columns);
  order.forEach((row, t) => {
    for (let k = starts[from + row]; k < starts[from + row + 1]; k++) out[t * columns + at[k]] = values[k];
  });
  return { order, ends: Int32Array.from(order, (row) => endOf(from + row)), columns, values: out };
}

/**
 * Takes rows that hold an entry everywhere.
 *
 * @param values  rows x columns, kept as they are
 */
export function fullRows(values: Float64Array, rows: number, columns: number): OrderedRows {
  return { order: Int32Array.from({ length: rows }, (_, i) => i), ends: new Int32Array(rows).fill(columns), columns, values };
}

/** Share of the multiplied places that hold an entry, 0 to 1. */
export function fullness({ ends, values }: OrderedRows): number {
  const places = ends.reduce((sum, end) => sum + end, 0);
  return places === 0 ? 1 : values.reduce((sum, value) => sum + (value === 0 ? 0 : 1), 0) / places;
}

/**
 * Adds the products of rows with the rows of a table, scaled: out[row, j] += scale x sum over k of rows[row, k] table[j, k].
 * Three rows by three at a time: nine products from six loads, half of what a plain dot product asks of the memory.
 *
 * @param table   count rows of `stride` numbers
 * @param out     rows x count, rows in their given order
 */
export function addRowProducts(rows: OrderedRows, table: Float64Array, count: number, stride: number, scale: number, out: Float64Array): void {
  const { order, ends, columns, values } = rows;
  const n = order.length;
  for (let t = 0; t < n; t += 3) {
    const last = Math.min(t + 2, n - 1);
    const end = ends[last];
    const r0 = t * columns, r1 = Math.min(t + 1, n - 1) * columns, r2 = last * columns;
    for (let j = 0; j < count; j += 3) {
      // At the edges a row stands in for one that is not there; what it gives is dropped.
      const j1 = Math.min(j + 1, count - 1), j2 = Math.min(j + 2, count - 1);
      const q0 = j * stride, q1 = j1 * stride, q2 = j2 * stride;
      let s00 = 0, s01 = 0, s02 = 0, s10 = 0, s11 = 0, s12 = 0, s20 = 0, s21 = 0, s22 = 0;
      for (let k = 0; k < end; k++) {
        const b0 = table[q0 + k], b1 = table[q1 + k], b2 = table[q2 + k];
        const a0 = values[r0 + k];
        s00 += a0 * b0; s01 += a0 * b1; s02 += a0 * b2;
        const a1 = values[r1 + k];
        s10 += a1 * b0; s11 += a1 * b1; s12 += a1 * b2;
        const a2 = values[r2 + k];
        s20 += a2 * b0; s21 += a2 * b1; s22 += a2 * b2;
      }
      const o0 = order[t] * count;
      out[o0 + j] += scale * s00;
      if (j + 1 < count) out[o0 + j1] += scale * s01;
      if (j + 2 < count) out[o0 + j2] += scale * s02;
      if (t + 1 < n) {
        const o1 = order[t + 1] * count;
        out[o1 + j] += scale * s10;
        if (j + 1 < count) out[o1 + j1] += scale * s11;
        if (j + 2 < count) out[o1 + j2] += scale * s12;
      }
      if (t + 2 < n) {
        const o2 = order[last] * count;
        out[o2 + j] += scale * s20;
        if (j + 1 < count) out[o2 + j1] += scale * s21;
        if (j + 2 < count) out[o2 + j2] += scale * s22;
      }
    }
  }
}
