import { requireDomain } from "./domain-error.js";

/**
 * Solves with the factor of `factorBanded`, in place, one right-hand side.
 *
 * @param band  factor, n x (h + 1), as `factorBanded` leaves it
 * @param n  number of unknowns
 * @param halfBandwidth  h
 * @param rhs  right-hand side, n; on return the solution
 * @throws {DomainError} an array is too short
 */
export function solveBanded(band: Float64Array, n: number, halfBandwidth: number, rhs: Float64Array): void {
  solveBandedMany(band, n, halfBandwidth, rhs, 1);
}

/**
 * Solves with the factor of `factorBanded`, in place, many right-hand sides at once.
 *
 * Three unknowns of four right-hand sides are kept in registers, so each entry of the factor is loaded once for four
 * products; what is left over by four goes one right-hand side at a time.
 *
 * @param band  factor, n x (h + 1), as `factorBanded` leaves it
 * @param n  number of unknowns
 * @param halfBandwidth  h
 * @param rhs  right-hand sides, n x columns, the columns contiguous in a row; on return the solutions
 * @param columns  number of right-hand sides, > 0
 * @throws {DomainError} an array is too short
 */
export function solveBandedMany(band: Float64Array, n: number, halfBandwidth: number, rhs: Float64Array, columns: number): void {
  requireDomain(Number.isInteger(columns) && columns > 0, "Number of right-hand sides", columns, "a whole number above 0");
  requireDomain(band.length >= n * (halfBandwidth + 1), "Length of the band", band.length, `at least ${n * (halfBandwidth + 1)}`);
  requireDomain(rhs.length >= n * columns, "Length of the right-hand sides", rhs.length, `at least ${n * columns}`);
  const fours = columns - (columns % 4);
  for (let c = 0; c < fours; c += 4) {
    forwardFour(band, n, halfBandwidth, rhs, columns, c);
    backwardFour(band, n, halfBandwidth, rhs, columns, c);
  }
  for (let c = fours; c < columns; c++) {
    forwardOne(band, n, halfBandwidth, rhs, columns, c);
    backwardOne(band, n, halfBandwidth, rhs, columns, c);
  }
}

function forwardOne(band: Float64Array, n: number, h: number, x: Float64Array, columns: number, c: number): void {
  for (let i = 0; i < n; i++) {
    const row = i * h + h;
    let even = x[i * columns + c];
    let odd = 0; // a second sum halves the wait for each addition
    let k = i < h ? 0 : i - h;
    let p = k * columns + c;
    for (; k + 1 < i; k += 2, p += 2 * columns) {
      even -= band[row + k] * x[p];
      odd -= band[row + k + 1] * x[p + columns];
    }
    if (k < i) even -= band[row + k] * x[p];
    x[i * columns + c] = (even + odd) / band[row + i];
  }
}

function backwardOne(band: Float64Array, n: number, h: number, x: Float64Array, columns: number, c: number): void {
  for (let i = n - 1; i >= 0; i--) {
    const row = i * h + h;
    const value = x[i * columns + c] / band[row + i];
    x[i * columns + c] = value;
    const first = i < h ? 0 : i - h;
    for (let k = first, p = first * columns + c; k < i; k++, p += columns) x[p] -= band[row + k] * value;
  }
}

/** Takes `factor` times row `from` off row `to`, four columns. */
function subtractFour(x: Float64Array, to: number, from: number, factor: number): void {
  x[to] -= factor * x[from];
  x[to + 1] -= factor * x[from + 1];
  x[to + 2] -= factor * x[from + 2];
  x[to + 3] -= factor * x[from + 3];
}

function divideFour(x: Float64Array, at: number, divisor: number): void {
  const v = 1 / divisor;
  x[at] *= v; x[at + 1] *= v; x[at + 2] *= v; x[at + 3] *= v;
}

/** Rows in threes from the top; bands too narrow for that, and the last rows, one by one. */
function forwardFour(band: Float64Array, n: number, h: number, x: Float64Array, columns: number, c: number): void {
  const threes = h < 3 ? 0 : n - (n % 3);
  for (let i = 0; i < threes; i += 3) {
    const r0 = i * h + h, r1 = r0 + h, r2 = r1 + h; // band[r0 + k] is entry (i, k)
    const p0 = i * columns + c, p1 = p0 + columns, p2 = p1 + columns;
    const first = i + 2 < h ? 0 : i + 2 - h; // the first column that all three rows have
    for (let k = i < h ? 0 : i - h; k < first; k++) subtractFour(x, p0, k * columns + c, band[r0 + k]);
    for (let k = i + 1 < h ? 0 : i + 1 - h; k < first; k++) subtractFour(x, p1, k * columns + c, band[r1 + k]);
    let a0 = x[p0], a1 = x[p0 + 1], a2 = x[p0 + 2], a3 = x[p0 + 3];
    let b0 = x[p1], b1 = x[p1 + 1], b2 = x[p1 + 2], b3 = x[p1 + 3];
    let c0 = x[p2], c1 = x[p2 + 1], c2 = x[p2 + 2], c3 = x[p2 + 3];
    for (let k = first, q = first * columns + c; k < i; k++, q += columns) {
      const x0 = x[q], x1 = x[q + 1], x2 = x[q + 2], x3 = x[q + 3];
      const l0 = band[r0 + k];
      a0 -= l0 * x0; a1 -= l0 * x1; a2 -= l0 * x2; a3 -= l0 * x3;
      const l1 = band[r1 + k];
      b0 -= l1 * x0; b1 -= l1 * x1; b2 -= l1 * x2; b3 -= l1 * x3;
      const l2 = band[r2 + k];
      c0 -= l2 * x0; c1 -= l2 * x1; c2 -= l2 * x2; c3 -= l2 * x3;
    }
    x[p0] = a0; x[p0 + 1] = a1; x[p0 + 2] = a2; x[p0 + 3] = a3;
    x[p1] = b0; x[p1 + 1] = b1; x[p1 + 2] = b2; x[p1 + 3] = b3;
    x[p2] = c0; x[p2 + 1] = c1; x[p2 + 2] = c2; x[p2 + 3] = c3;
    divideFour(x, p0, band[r0 + i]);
    subtractFour(x, p1, p0, band[r1 + i]);
    divideFour(x, p1, band[r1 + i + 1]);
    subtractFour(x, p2, p0, band[r2 + i]);
    subtractFour(x, p2, p1, band[r2 + i + 1]);
    divideFour(x, p2, band[r2 + i + 2]);
  }
  for (let i = threes; i < n; i++) {
    const row = i * h + h;
    for (let k = i < h ? 0 : i - h; k < i; k++) subtractFour(x, i * columns + c, k * columns + c, band[row + k]);
    divideFour(x, i * columns + c, band[row + i]);
  }
}

/** As `forwardFour` with the transposed factor, from the bottom; entry (k, i) stands at band[k * h + h + i]. */
function backwardFour(band: Float64Array, n: number, h: number, x: Float64Array, columns: number, c: number): void {
  const threes = h < 3 ? 0 : n - (n % 3);
  for (let i = n - 1; i >= threes; i--) {
    for (let k = i + 1; k <= i + h && k < n; k++) subtractFour(x, i * columns + c, k * columns + c, band[k * h + h + i]);
    divideFour(x, i * columns + c, band[i * h + h + i]);
  }
  for (let i = threes - 3; i >= 0; i -= 3) {
    const p0 = i * columns + c, p1 = p0 + columns, p2 = p1 + columns;
    const end = i + h + 1 < n ? i + h + 1 : n; // below this row all three columns of the factor are inside the band
    for (let k = end; k <= i + 1 + h && k < n; k++) subtractFour(x, p1, k * columns + c, band[k * h + h + i + 1]);
    for (let k = end; k <= i + 2 + h && k < n; k++) subtractFour(x, p2, k * columns + c, band[k * h + h + i + 2]);
    let a0 = x[p0], a1 = x[p0 + 1], a2 = x[p0 + 2], a3 = x[p0 + 3];
    let b0 = x[p1], b1 = x[p1 + 1], b2 = x[p1 + 2], b3 = x[p1 + 3];
    let c0 = x[p2], c1 = x[p2 + 1], c2 = x[p2 + 2], c3 = x[p2 + 3];
    for (let k = i + 3, q = k * columns + c, l = k * h + h + i; k < end; k++, q += columns, l += h) {
      const x0 = x[q], x1 = x[q + 1], x2 = x[q + 2], x3 = x[q + 3];
      const l0 = band[l];
      a0 -= l0 * x0; a1 -= l0 * x1; a2 -= l0 * x2; a3 -= l0 * x3;
      const l1 = band[l + 1];
      b0 -= l1 * x0; b1 -= l1 * x1; b2 -= l1 * x2; b3 -= l1 * x3;
      const l2 = band[l + 2];
      c0 -= l2 * x0; c1 -= l2 * x1; c2 -= l2 * x2; c3 -= l2 * x3;
    }
    x[p0] = a0; x[p0 + 1] = a1; x[p0 + 2] = a2; x[p0 + 3] = a3;
    x[p1] = b0; x[p1 + 1] = b1; x[p1 + 2] = b2; x[p1 + 3] = b3;
    x[p2] = c0; x[p2 + 1] = c1; x[p2 + 2] = c2; x[p2 + 3] = c3;
    const row1 = (i + 1) * h + h, row2 = row1 + h;
    divideFour(x, p2, band[row2 + i + 2]);
    subtractFour(x, p1, p2, band[row2 + i + 1]);
    divideFour(x, p1, band[row1 + i + 1]);
    subtractFour(x, p0, p2, band[row2 + i]);
    subtractFour(x, p0, p1, band[row1 + i]);
    divideFour(x, p0, band[i * h + h + i]);
  }
}
