// AssemblyScript. The twin of src/engine/numerics/scalar-banded.ts: the same products and sums in the same order, so that both give the
// same bits. A lane holds one sum from its first term to its last; nothing is added across lanes. Places count doubles from the start of memory.

/** Binary logarithms of bytes: a double, a tile of 4 x 4. */
const DOUBLE: usize = 3;
const TILE: usize = 7;
/** Bytes of a tile's column of four. */
const COLUMN: usize = 32;

/** First tile of a row. */
function firstOf(rows: usize, row: i32): i32 {
  return load<i32>(rows + ((<usize>row) << DOUBLE));
}

/** Address of tile 0 of a row, were it inside the envelope. */
function rowOf(tiles: usize, rows: usize, row: i32): usize {
  return tiles + ((<usize>load<i32>(rows + ((<usize>row) << DOUBLE), 4)) << TILE);
}

/** See `Kernels.factor`. */
export function factor(tilesAt: i32, rowsAt: i32, tileRows: i32): i32 {
  const tiles = (<usize>tilesAt) << DOUBLE;
  const rows = (<usize>rowsAt) << DOUBLE;
  for (let row = 0; row < tileRows; row++) {
    const own = rowOf(tiles, rows, row);
    const first = firstOf(rows, row);
    for (let column = first; column <= row; column++) {
      const other = rowOf(tiles, rows, column);
      const t = own + ((<usize>column) << TILE);
      const begin = (<usize>max(first, firstOf(rows, column))) << TILE;
      // Column j of the tile: rows 0 and 1 in s, 2 and 3 in r.
      let s0 = v128.load(t), r0 = v128.load(t, 16);
      let s1 = v128.load(t, 32), r1 = v128.load(t, 48);
      let s2 = v128.load(t, 64), r2 = v128.load(t, 80);
      let s3 = v128.load(t, 96), r3 = v128.load(t, 112);
      for (let p = own + begin, q = other + begin; p < t; p += COLUMN, q += COLUMN) {
        const a = v128.load(p), c = v128.load(p, 16);
        let b = v128.load_splat<f64>(q);
        s0 = f64x2.sub(s0, f64x2.mul(a, b));
        r0 = f64x2.sub(r0, f64x2.mul(c, b));
        b = v128.load_splat<f64>(q, 8);
        s1 = f64x2.sub(s1, f64x2.mul(a, b));
        r1 = f64x2.sub(r1, f64x2.mul(c, b));
        b = v128.load_splat<f64>(q, 16);
        s2 = f64x2.sub(s2, f64x2.mul(a, b));
        r2 = f64x2.sub(r2, f64x2.mul(c, b));
        b = v128.load_splat<f64>(q, 24);
        s3 = f64x2.sub(s3, f64x2.mul(a, b));
        r3 = f64x2.sub(r3, f64x2.mul(c, b));
      }
      if (column === row) {
        const failed = factorDiagonal(t, s0, r0, s1, r1, r2, r3);
        if (failed > 0) return 4 * row + failed;
        continue;
      }
      const d = other + ((<usize>column) << TILE);
      let l = v128.load_splat<f64>(d);
      s0 = f64x2.mul(s0, l);
      r0 = f64x2.mul(r0, l);
      l = v128.load_splat<f64>(d, 8);
      s1 = f64x2.sub(s1, f64x2.mul(s0, l));
      r1 = f64x2.sub(r1, f64x2.mul(r0, l));
      l = v128.load_splat<f64>(d, 40);
      s1 = f64x2.mul(s1, l);
      r1 = f64x2.mul(r1, l);
      l = v128.load_splat<f64>(d, 16);
      s2 = f64x2.sub(s2, f64x2.mul(s0, l));
      r2 = f64x2.sub(r2, f64x2.mul(r0, l));
      l = v128.load_splat<f64>(d, 48);
      s2 = f64x2.sub(s2, f64x2.mul(s1, l));
      r2 = f64x2.sub(r2, f64x2.mul(r1, l));
      l = v128.load_splat<f64>(d, 80);
      s2 = f64x2.mul(s2, l);
      r2 = f64x2.mul(r2, l);
      l = v128.load_splat<f64>(d, 24);
      s3 = f64x2.sub(s3, f64x2.mul(s0, l));
      r3 = f64x2.sub(r3, f64x2.mul(r0, l));
      l = v128.load_splat<f64>(d, 56);
      s3 = f64x2.sub(s3, f64x2.mul(s1, l));
      r3 = f64x2.sub(r3, f64x2.mul(r1, l));
      l = v128.load_splat<f64>(d, 88);
      s3 = f64x2.sub(s3, f64x2.mul(s2, l));
      r3 = f64x2.sub(r3, f64x2.mul(r2, l));
      l = v128.load_splat<f64>(d, 120);
      v128.store(t, s0);
      v128.store(t, r0, 16);
      v128.store(t, s1, 32);
      v128.store(t, r1, 48);
      v128.store(t, s2, 64);
      v128.store(t, r2, 80);
      v128.store(t, f64x2.mul(s3, l), 96);
      v128.store(t, f64x2.mul(r3, l), 112);
    }
  }
  return 0;
}

/** Factors the lower triangle of a tile from its sums; its diagonal receives reciprocals. Gives 0, or the number (from 1) of the row that fails. */
function factorDiagonal(t: usize, s0: v128, r0: v128, s1: v128, r1: v128, r2: v128, r3: v128): i32 {
  let square = f64x2.extract_lane(s0, 0);
  if (!(square > 0 && square < Infinity)) return 1;
  const v0 = 1 / sqrt(square);
  const l10 = f64x2.extract_lane(s0, 1) * v0;
  const l20 = f64x2.extract_lane(r0, 0) * v0;
  const l30 = f64x2.extract_lane(r0, 1) * v0;
  square = f64x2.extract_lane(s1, 1) - l10 * l10;
  if (!(square > 0 && square < Infinity)) return 2;
  const v1 = 1 / sqrt(square);
  const l21 = (f64x2.extract_lane(r1, 0) - l20 * l10) * v1;
  const l31 = (f64x2.extract_lane(r1, 1) - l30 * l10) * v1;
  square = f64x2.extract_lane(r2, 0) - l20 * l20 - l21 * l21;
  if (!(square > 0 && square < Infinity)) return 3;
  const v2 = 1 / sqrt(square);
  const l32 = (f64x2.extract_lane(r2, 1) - l30 * l20 - l31 * l21) * v2;
  square = f64x2.extract_lane(r3, 1) - l30 * l30 - l31 * l31 - l32 * l32;
  if (!(square > 0 && square < Infinity)) return 4;
  store<f64>(t, v0);
  store<f64>(t, l10, 8);
  store<f64>(t, l20, 16);
  store<f64>(t, l30, 24);
  store<f64>(t, 0, 32);
  store<f64>(t, v1, 40);
  store<f64>(t, l21, 48);
  store<f64>(t, l31, 56);
  store<f64>(t, 0, 64);
  store<f64>(t, 0, 72);
  store<f64>(t, v2, 80);
  store<f64>(t, l32, 88);
  store<f64>(t, 0, 96);
  store<f64>(t, 0, 104);
  store<f64>(t, 0, 112);
  store<f64>(t, 1 / sqrt(square), 120);
  return 0;
}

/** See `Kernels.forward`. */
export function forward(tilesAt: i32, rowsAt: i32, tileRows: i32, firstRow: i32, rightAt: i32, columns: i32): void {
  const tiles = (<usize>tilesAt) << DOUBLE;
  const rows = (<usize>rowsAt) << DOUBLE;
  const right = (<usize>rightAt) << DOUBLE;
  const step = (<usize>columns) << DOUBLE;
  for (let row = firstRow; row < tileRows; row++) {
    const own = rowOf(tiles, rows, row);
    const from = max(firstOf(rows, row), firstRow);
    const begin = own + ((<usize>from) << TILE);
    const t = own + ((<usize>row) << TILE);
    const above = right + (<usize>(4 * (from - firstRow))) * step;
    const x0 = right + (<usize>(4 * (row - firstRow))) * step;
    const x1 = x0 + step, x2 = x1 + step, x3 = x2 + step;
    for (let c: usize = 0; c < step; c += 16) {
      let s0 = v128.load(x0 + c), s1 = v128.load(x1 + c), s2 = v128.load(x2 + c), s3 = v128.load(x3 + c);
      for (let p = begin, q = above + c; p < t; p += COLUMN, q += step) {
        const x = v128.load(q);
        s0 = f64x2.sub(s0, f64x2.mul(v128.load_splat<f64>(p), x));
        s1 = f64x2.sub(s1, f64x2.mul(v128.load_splat<f64>(p, 8), x));
        s2 = f64x2.sub(s2, f64x2.mul(v128.load_splat<f64>(p, 16), x));
        s3 = f64x2.sub(s3, f64x2.mul(v128.load_splat<f64>(p, 24), x));
      }
      s0 = f64x2.mul(s0, v128.load_splat<f64>(t));
      s1 = f64x2.sub(s1, f64x2.mul(v128.load_splat<f64>(t, 8), s0));
      s1 = f64x2.mul(s1, v128.load_splat<f64>(t, 40));
      s2 = f64x2.sub(s2, f64x2.mul(v128.load_splat<f64>(t, 16), s0));
      s2 = f64x2.sub(s2, f64x2.mul(v128.load_splat<f64>(t, 48), s1));
      s2 = f64x2.mul(s2, v128.load_splat<f64>(t, 80));
      s3 = f64x2.sub(s3, f64x2.mul(v128.load_splat<f64>(t, 24), s0));
      s3 = f64x2.sub(s3, f64x2.mul(v128.load_splat<f64>(t, 56), s1));
      s3 = f64x2.sub(s3, f64x2.mul(v128.load_splat<f64>(t, 88), s2));
      s3 = f64x2.mul(s3, v128.load_splat<f64>(t, 120));
      v128.store(x0 + c, s0);
      v128.store(x1 + c, s1);
      v128.store(x2 + c, s2);
      v128.store(x3 + c, s3);
    }
  }
}

/** See `Kernels.backward`. */
export function backward(tilesAt: i32, rowsAt: i32, tileRows: i32, firstRow: i32, rightAt: i32, columns: i32): void {
  const tiles = (<usize>tilesAt) << DOUBLE;
  const rows = (<usize>rowsAt) << DOUBLE;
  const right = (<usize>rightAt) << DOUBLE;
  const step = (<usize>columns) << DOUBLE;
  for (let row = tileRows - 1; row >= firstRow; row--) {
    const own = rowOf(tiles, rows, row);
    const from = max(firstOf(rows, row), firstRow);
    const begin = own + ((<usize>from) << TILE);
    const t = own + ((<usize>row) << TILE);
    const above = right + (<usize>(4 * (from - firstRow))) * step;
    const x0 = right + (<usize>(4 * (row - firstRow))) * step;
    const x1 = x0 + step, x2 = x1 + step, x3 = x2 + step;
    for (let c: usize = 0; c < step; c += 16) {
      const s3 = f64x2.mul(v128.load(x3 + c), v128.load_splat<f64>(t, 120));
      let s2 = f64x2.sub(v128.load(x2 + c), f64x2.mul(v128.load_splat<f64>(t, 88), s3));
      s2 = f64x2.mul(s2, v128.load_splat<f64>(t, 80));
      let s1 = f64x2.sub(v128.load(x1 + c), f64x2.mul(v128.load_splat<f64>(t, 56), s3));
      s1 = f64x2.sub(s1, f64x2.mul(v128.load_splat<f64>(t, 48), s2));
      s1 = f64x2.mul(s1, v128.load_splat<f64>(t, 40));
      let s0 = f64x2.sub(v128.load(x0 + c), f64x2.mul(v128.load_splat<f64>(t, 24), s3));
      s0 = f64x2.sub(s0, f64x2.mul(v128.load_splat<f64>(t, 16), s2));
      s0 = f64x2.sub(s0, f64x2.mul(v128.load_splat<f64>(t, 8), s1));
      s0 = f64x2.mul(s0, v128.load_splat<f64>(t));
      v128.store(x0 + c, s0);
      v128.store(x1 + c, s1);
      v128.store(x2 + c, s2);
      v128.store(x3 + c, s3);
      for (let p = begin, q = above + c; p < t; p += COLUMN, q += step) {
        let x = f64x2.sub(v128.load(q), f64x2.mul(v128.load_splat<f64>(p, 24), s3));
        x = f64x2.sub(x, f64x2.mul(v128.load_splat<f64>(p, 16), s2));
        x = f64x2.sub(x, f64x2.mul(v128.load_splat<f64>(p, 8), s1));
        v128.store(q, f64x2.sub(x, f64x2.mul(v128.load_splat<f64>(p), s0)));
      }
    }
  }
}
