import { requireDomain } from "../numerics/domain-error.js";

/** A sparse matrix by rows: entries of row i stand from starts[i] to starts[i + 1]. */
export interface SparseRows {
  readonly starts: Int32Array;
  readonly columns: Int32Array;
  readonly values: Float64Array;
}

/** Root A of a covariance, A A' = covariance. The first rows use the first columns only. */
export interface CovarianceRoot extends SparseRows {
  readonly columnCount: number;
  /** columns that the first rows use; the others belong to the rest */
  readonly firstColumns: number;
}

/**
 * A pivot at or below this share of the largest variance ends the factor. Tabulated ring means are exact to about 1e-4: smaller
 * pivots are what their errors leave, and dividing by them makes the errors three times larger.
 */
const NEGLIGIBLE = 1e-5;
/** Entries below this change no variance by more than 1e-12: short correlations give nearly empty factors. */
const EMPTY = 1e-9;

/**
 * Root of a covariance matrix by pivoted Cholesky factors, of as low a rank as the matrix has.
 *
 * Pivots are taken from the first rows until nothing is left of them, so that what these rows become does not depend on the
 * others. Errors of the tables of ring means leave smooth correlations slightly indefinite: the factor stops before it meets them.
 *
 * @param covariance  n x n, symmetric, row by row; not changed
 * @param n           order, > 0
 * @param first       number of first rows, 0 to n
 * @returns           the root; its product differs from an exact covariance by less than 1e-5 of the largest variance, else by about the errors of the given one
 * @source pivoted Cholesky factors: Harbrecht, Peters & Schneider (2012), Appl. Numer. Math. 62 (method only)
 */
export function covarianceRoot(covariance: Float64Array, n: number, first: number): CovarianceRoot {
  requireDomain(n > 0 && covariance.length >= n * n, "Order of the covariance", n, "above 0 and fitting the array");
  const left = Float64Array.from({ length: n }, (_, i) => covariance[i * n + i]);
  const least = NEGLIGIBLE * left.reduce((most, value) => Math.max(most, value), 0);
  const columns: Float64Array[] = [];
  let firstColumns = 0;
  for (const [from, to] of [[0, first], [first, n]]) {
    for (;;) {
      let pivot = -1;
      for (let i = from; i < to; i++) if (left[i] > least && (pivot < 0 || left[i] > left[pivot])) pivot = i;
      if (pivot < 0) break;
      columns.push(nextColumn(covariance, n, from, columns, pivot, left));
    }
    if (to === first) firstColumns = columns.length;
  }
  return { ...byRows(columns, n), columnCount: columns.length, firstColumns };
}

/** The next column of the factor, from a pivot; takes what it explains off the variances left. Rows before `from` are done with. */
function nextColumn(covariance: Float64Array, n: number, from: number, columns: readonly Float64Array[], pivot: number, left: Float64Array): Float64Array {
  const column = covariance.slice(pivot * n, (pivot + 1) * n);
  column.fill(0, 0, from);
  for (const other of columns) {
    const factor = other[pivot];
    if (factor === 0) continue;
    for (let i = from; i < n; i++) column[i] -= factor * other[i];
  }
  const scale = 1 / Math.sqrt(left[pivot]);
  for (let i = from; i < n; i++) {
    // Rows that were pivots have no variance left; what rounding leaves there must not come back.
    column[i] = left[i] === 0 ? 0 : column[i] * scale;
    left[i] = Math.max(left[i] - column[i] ** 2, 0);
  }
  left[pivot] = 0;
  return column;
}

function byRows(dense: readonly Float64Array[], n: number): SparseRows {
  const starts = new Int32Array(n + 1);
  const columns: number[] = [];
  const values: number[] = [];
  for (let i = 0; i < n; i++) {
    dense.forEach((column, q) => {
      if (Math.abs(column[i]) <= EMPTY) return;
      columns.push(q);
      values.push(column[i]);
    });
    starts[i + 1] = columns.length;
  }
  return { starts, columns: Int32Array.from(columns), values: Float64Array.from(values) };
}

/**
 * Adds rows of a sparse matrix times a dense table, scaled, to a dense table.
 *
 * @param rows    the sparse matrix
 * @param from    first of its rows that are used
 * @param to      one past the last
 * @param table   dense, one row a column of the sparse matrix
 * @param stride  length of a row of the table
 * @param scale   factor on the product
 * @param out     receives (to - from) rows of `width` numbers, from its start
 * @param width   numbers taken of each row of the table, from its start
 */
export function addProduct(
  rows: SparseRows, from: number, to: number, table: Float64Array, stride: number, scale: number, out: Float64Array, width: number,
): void {
  const { starts, columns, values } = rows;
  for (let i = from; i < to; i++) {
    const at = (i - from) * width;
    const end = starts[i + 1];
    let k = starts[i];
    // Four rows at a time: each pass over the numbers costs more than its sums.
    for (; k + 3 < end; k += 4) {
      const f0 = scale * values[k], f1 = scale * values[k + 1], f2 = scale * values[k + 2], f3 = scale * values[k + 3];
      const t0 = columns[k] * stride, t1 = columns[k + 1] * stride, t2 = columns[k + 2] * stride, t3 = columns[k + 3] * stride;
      for (let c = 0; c < width; c++) out[at + c] += f0 * table[t0 + c] + f1 * table[t1 + c] + f2 * table[t2 + c] + f3 * table[t3 + c];
    }
    for (; k < end; k++) {
      const f = scale * values[k];
      for (let c = 0, t = columns[k] * stride; c < width; c++, t++) out[at + c] += f * table[t];
    }
  }
}
