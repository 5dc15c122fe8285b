// The twin of src/kernels/banded.ts: the same products and sums in the same order, so that both give the same bits. Indices inside the loops
// are written with | 0: it tells the compiler that they stay whole numbers of 32 bits, which saves a third of the time.

/**
 * Factors the rows of tiles one after the other.
 *
 * @param d     the memory
 * @param rows  place of the table of rows, in ints
 * @returns     0, or the number (from 1) of the row that fails
 */
export function factorTiles(d: Float64Array, ints: Int32Array, tiles: number, rows: number, tileRows: number): number {
  for (let row = 0; row < tileRows; row++) {
    const own = tiles + ints[rows + 2 * row + 1] * 16;
    const first = ints[rows + 2 * row];
    for (let column = first; column <= row; column++) {
      const other = tiles + ints[rows + 2 * column + 1] * 16;
      const begin = Math.max(first, ints[rows + 2 * column]) * 16;
      const t = own + column * 16;
      subtractProducts(d, t, own + begin, other + begin, t);
      subtractProducts(d, t + 8, own + begin, other + begin + 2, t);
      if (column < row) {
        divideTile(d, t, other + column * 16);
        continue;
      }
      const failed = factorDiagonal(d, t);
      if (failed > 0) return 4 * row + failed;
    }
  }
  return 0;
}

/** Takes off two columns of a tile the products of the entries left of it: eight sums, as many as registers hold with what feeds them. */
function subtractProducts(d: Float64Array, t: number, from: number, other: number, end: number): void {
  let s00 = d[t], s10 = d[t + 1], s20 = d[t + 2], s30 = d[t + 3];
  let s01 = d[t + 4], s11 = d[t + 5], s21 = d[t + 6], s31 = d[t + 7];
  for (let p = from, q = other; p < end; p = (p + 4) | 0, q = (q + 4) | 0) {
    const b0 = d[q], b1 = d[(q + 1) | 0];
    const a0 = d[p];
    s00 -= a0 * b0; s01 -= a0 * b1;
    const a1 = d[(p + 1) | 0];
    s10 -= a1 * b0; s11 -= a1 * b1;
    const a2 = d[(p + 2) | 0];
    s20 -= a2 * b0; s21 -= a2 * b1;
    const a3 = d[(p + 3) | 0];
    s30 -= a3 * b0; s31 -= a3 * b1;
  }
  d[t] = s00; d[t + 1] = s10; d[t + 2] = s20; d[t + 3] = s30;
  d[t + 4] = s01; d[t + 5] = s11; d[t + 6] = s21; d[t + 7] = s31;
}

/** Times the inverse of the transposed diagonal tile at `by`. */
function divideTile(d: Float64Array, t: number, by: number): void {
  const v0 = d[by], l10 = d[by + 1], l20 = d[by + 2], l30 = d[by + 3];
  const v1 = d[by + 5], l21 = d[by + 6], l31 = d[by + 7];
  const v2 = d[by + 10], l32 = d[by + 11], v3 = d[by + 15];
  for (let r = t; r < t + 4; r++) {
    const s0 = d[r] * v0;
    const s1 = (d[r + 4] - s0 * l10) * v1;
    const s2 = (d[r + 8] - s0 * l20 - s1 * l21) * v2;
    d[r] = s0;
    d[r + 4] = s1;
    d[r + 8] = s2;
    d[r + 12] = (d[r + 12] - s0 * l30 - s1 * l31 - s2 * l32) * v3;
  }
}

/** Factors the lower triangle of a tile; its diagonal receives reciprocals. Gives 0, or the number (from 1) of the row that fails. */
function factorDiagonal(d: Float64Array, t: number): number {
  let square = d[t];
  if (!(square > 0 && square < Infinity)) return 1;
  const v0 = 1 / Math.sqrt(square);
  const l10 = d[t + 1] * v0, l20 = d[t + 2] * v0, l30 = d[t + 3] * v0;
  square = d[t + 5] - l10 * l10;
  if (!(square > 0 && square < Infinity)) return 2;
  const v1 = 1 / Math.sqrt(square);
  const l21 = (d[t + 6] - l20 * l10) * v1, l31 = (d[t + 7] - l30 * l10) * v1;
  square = d[t + 10] - l20 * l20 - l21 * l21;
  if (!(square > 0 && square < Infinity)) return 3;
  const v2 = 1 / Math.sqrt(square);
  const l32 = (d[t + 11] - l30 * l20 - l31 * l21) * v2;
  square = d[t + 15] - l30 * l30 - l31 * l31 - l32 * l32;
  if (!(square > 0 && square < Infinity)) return 4;
  d[t] = v0; d[t + 1] = l10; d[t + 2] = l20; d[t + 3] = l30;
  d[t + 4] = 0; d[t + 5] = v1; d[t + 6] = l21; d[t + 7] = l31;
  d[t + 8] = 0; d[t + 9] = 0; d[t + 10] = v2; d[t + 11] = l32;
  d[t + 12] = 0; d[t + 13] = 0; d[t + 14] = 0; d[t + 15] = 1 / Math.sqrt(square);
  return 0;
}

/** See `Kernels.forward`; places in ints and doubles as in `factorTiles`. */
export function forwardTiles(d: Float64Array, ints: Int32Array, tiles: number, rows: number, tileRows: number, firstRow: number, right: number, columns: number): void {
  for (let row = firstRow; row < tileRows; row++) {
    const own = tiles + ints[rows + 2 * row + 1] * 16;
    const from = Math.max(ints[rows + 2 * row], firstRow);
    const t = own + row * 16;
    const v0 = d[t], l10 = d[t + 1], l20 = d[t + 2], l30 = d[t + 3], v1 = d[t + 5], l21 = d[t + 6], l31 = d[t + 7], v2 = d[t + 10], l32 = d[t + 11], v3 = d[t + 15];
    for (let c = 0; c < columns; c += 2) {
      const x0 = right + 4 * (row - firstRow) * columns + c, x1 = x0 + columns, x2 = x1 + columns, x3 = x2 + columns;
      let s00 = d[x0], s01 = d[x0 + 1], s10 = d[x1], s11 = d[x1 + 1];
      let s20 = d[x2], s21 = d[x2 + 1], s30 = d[x3], s31 = d[x3 + 1];
      for (let p = own + from * 16, q = right + 4 * (from - firstRow) * columns + c; p < t; p = (p + 4) | 0, q = (q + columns) | 0) {
        const b0 = d[q], b1 = d[(q + 1) | 0];
        const a0 = d[p];
        s00 -= a0 * b0; s01 -= a0 * b1;
        const a1 = d[(p + 1) | 0];
        s10 -= a1 * b0; s11 -= a1 * b1;
        const a2 = d[(p + 2) | 0];
        s20 -= a2 * b0; s21 -= a2 * b1;
        const a3 = d[(p + 3) | 0];
        s30 -= a3 * b0; s31 -= a3 * b1;
      }
      s00 *= v0; s01 *= v0;
      s10 = (s10 - l10 * s00) * v1; s11 = (s11 - l10 * s01) * v1;
      s20 = (s20 - l20 * s00 - l21 * s10) * v2; s21 = (s21 - l20 * s01 - l21 * s11) * v2;
      d[x0] = s00; d[x0 + 1] = s01; d[x1] = s10; d[x1 + 1] = s11;
      d[x2] = s20; d[x2 + 1] = s21;
      d[x3] = (s30 - l30 * s00 - l31 * s10 - l32 * s20) * v3; d[x3 + 1] = (s31 - l30 * s01 - l31 * s11 - l32 * s21) * v3;
    }
  }
}

/** See `Kernels.backward`. */
export function backwardTiles(d: Float64Array, ints: Int32Array, tiles: number, rows: number, tileRows: number, firstRow: number, right: number, columns: number): void {
  for (let row = tileRows - 1; row >= firstRow; row--) {
    const own = tiles + ints[rows + 2 * row + 1] * 16;
    const from = Math.max(ints[rows + 2 * row], firstRow);
    const t = own + row * 16;
    const v0 = d[t], l10 = d[t + 1], l20 = d[t + 2], l30 = d[t + 3], v1 = d[t + 5], l21 = d[t + 6], l31 = d[t + 7], v2 = d[t + 10], l32 = d[t + 11], v3 = d[t + 15];
    for (let c = 0; c < columns; c += 2) {
      const x0 = right + 4 * (row - firstRow) * columns + c, x1 = x0 + columns, x2 = x1 + columns, x3 = x2 + columns;
      const s30 = d[x3] * v3, s31 = d[x3 + 1] * v3;
      const s20 = (d[x2] - l32 * s30) * v2, s21 = (d[x2 + 1] - l32 * s31) * v2;
      const s10 = (d[x1] - l31 * s30 - l21 * s20) * v1, s11 = (d[x1 + 1] - l31 * s31 - l21 * s21) * v1;
      const s00 = (d[x0] - l30 * s30 - l20 * s20 - l10 * s10) * v0, s01 = (d[x0 + 1] - l30 * s31 - l20 * s21 - l10 * s11) * v0;
      d[x0] = s00; d[x0 + 1] = s01; d[x1] = s10; d[x1 + 1] = s11;
      d[x2] = s20; d[x2 + 1] = s21; d[x3] = s30; d[x3 + 1] = s31;
      for (let p = own + from * 16, q = right + 4 * (from - firstRow) * columns + c; p < t; p = (p + 4) | 0, q = (q + columns) | 0) {
        const a3 = d[(p + 3) | 0], a2 = d[(p + 2) | 0], a1 = d[(p + 1) | 0], a0 = d[p];
        d[q] = d[q] - a3 * s30 - a2 * s20 - a1 * s10 - a0 * s00;
        d[(q + 1) | 0] = d[(q + 1) | 0] - a3 * s31 - a2 * s21 - a1 * s11 - a0 * s01;
      }
    }
  }
}
