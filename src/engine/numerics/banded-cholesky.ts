import { DomainError, requireDomain } from "./domain-error.js";
export { solveBanded, solveBandedMany } from "./banded-solve.js";

/** Tile edge: nine sums and six operands are what the registers hold without spilling; 2 is slower by a fifth, 4 no faster. */
const TILE = 3;
const TILE_SIZE = TILE * TILE;

/** Room for the tiled copy, kept between calls because a fresh megabyte costs as much as a tenth of the work. */
let workspace = new Float64Array(0);

/**
 * Cholesky factor of a symmetric positive definite band matrix, in place.
 *
 * Row i of the lower triangle holds columns i - h ... i, so that entry (i, j) stands at `band[i * (h + 1) + j - i + h]`;
 * places left of column 0 are neither read nor written. The band is copied into 3 x 3 tiles padded with zeros, where the
 * inner loop makes nine products from six loads, and copied back.
 *
 * @param band  lower triangle of the matrix, n x (h + 1), row by row; on return the lower factor in the same places
 * @param n  number of unknowns, > 0
 * @param halfBandwidth  h, number of places left of the diagonal, 0 to n - 1
 * @throws {DomainError} the matrix is not positive definite (the row is named), or its shape is wrong
 */
export function factorBanded(band: Float64Array, n: number, halfBandwidth: number): void {
  const h = halfBandwidth;
  requireDomain(Number.isInteger(n) && n > 0, "Number of unknowns", n, "a whole number above 0");
  requireDomain(Number.isInteger(h) && h >= 0 && h < n, "Half bandwidth", h, "a whole number from 0 to below the number of unknowns");
  requireDomain(band.length >= n * (h + 1), "Length of the band", band.length, `at least ${n * (h + 1)}`);
  const tileRows = Math.ceil(n / TILE);
  const tilesPerRow = Math.ceil(h / TILE) + 1;
  const size = tileRows * tilesPerRow * TILE_SIZE;
  if (workspace.length < size) workspace = new Float64Array(size);
  else workspace.fill(0, 0, size);
  const tiles = workspace;
  const inverse = new Float64Array(tileRows * TILE);
  copyBand(band, tiles, n, h, tilesPerRow, true);
  for (let i = n; i < tileRows * TILE; i++) tiles[tileOrigin(i, tilesPerRow) + i * TILE] = 1; // identity below the last row
  for (let row = 0; row < tileRows; row++) factorTileRow(tiles, inverse, row, tilesPerRow);
  copyBand(band, tiles, n, h, tilesPerRow, false);
}

/** Place of (i, column 0) in the tiles, were it inside the band; column k follows k * TILE further on. */
function tileOrigin(i: number, tilesPerRow: number): number {
  const row = (i / TILE) | 0;
  return row * tilesPerRow * TILE_SIZE + (tilesPerRow - 1 - row) * TILE_SIZE + (i - row * TILE);
}

function copyBand(band: Float64Array, tiles: Float64Array, n: number, h: number, tilesPerRow: number, intoTiles: boolean): void {
  for (let i = 0; i < n; i++) {
    const first = i < h ? 0 : i - h;
    let t = tileOrigin(i, tilesPerRow) + first * TILE;
    let b = i * h + h + first;
    if (intoTiles) for (let k = first; k <= i; k++, t += TILE) tiles[t] = band[b++];
    else for (let k = first; k <= i; k++, t += TILE) band[b++] = tiles[t];
  }
}

/** Computes one row of tiles of the factor from the rows above it. Inside a tile entries run column by column. */
function factorTileRow(tiles: Float64Array, inverse: Float64Array, row: number, tilesPerRow: number): void {
  const first = row < tilesPerRow ? 0 : row - tilesPerRow + 1;
  const own = (row * tilesPerRow + tilesPerRow - 1 - row) * TILE_SIZE;
  for (let column = first; column <= row; column++) {
    const other = (column * tilesPerRow + tilesPerRow - 1 - column) * TILE_SIZE;
    const t = own + column * TILE_SIZE;
    let s00 = tiles[t], s10 = tiles[t + 1], s20 = tiles[t + 2];
    let s01 = tiles[t + 3], s11 = tiles[t + 4], s21 = tiles[t + 5];
    let s02 = tiles[t + 6], s12 = tiles[t + 7], s22 = tiles[t + 8];
    for (let p = own + first * TILE_SIZE, q = other + first * TILE_SIZE; p < t; p += TILE, q += TILE) {
      const b0 = tiles[q], b1 = tiles[q + 1], b2 = tiles[q + 2];
      const a0 = tiles[p];
      s00 -= a0 * b0; s01 -= a0 * b1; s02 -= a0 * b2;
      const a1 = tiles[p + 1];
      s10 -= a1 * b0; s11 -= a1 * b1; s12 -= a1 * b2;
      const a2 = tiles[p + 2];
      s20 -= a2 * b0; s21 -= a2 * b1; s22 -= a2 * b2;
    }
    const i0 = column * TILE;
    if (column === row) {
      const d0 = pivot(s00, i0);
      s10 /= d0; s20 /= d0;
      const d1 = pivot(s11 - s10 * s10, i0 + 1);
      s21 = (s21 - s20 * s10) / d1;
      const d2 = pivot(s22 - s20 * s20 - s21 * s21, i0 + 2);
      inverse[i0] = 1 / d0; inverse[i0 + 1] = 1 / d1; inverse[i0 + 2] = 1 / d2;
      tiles[t] = d0; tiles[t + 1] = s10; tiles[t + 2] = s20;
      tiles[t + 4] = d1; tiles[t + 5] = s21; tiles[t + 8] = d2;
    } else {
      const d = other + column * TILE_SIZE;
      const l10 = tiles[d + 1], l20 = tiles[d + 2], l21 = tiles[d + 5];
      const v0 = inverse[i0], v1 = inverse[i0 + 1], v2 = inverse[i0 + 2];
      s00 *= v0; s10 *= v0; s20 *= v0;
      s01 = (s01 - s00 * l10) * v1; s11 = (s11 - s10 * l10) * v1; s21 = (s21 - s20 * l10) * v1;
      tiles[t] = s00; tiles[t + 1] = s10; tiles[t + 2] = s20;
      tiles[t + 3] = s01; tiles[t + 4] = s11; tiles[t + 5] = s21;
      tiles[t + 6] = (s02 - s00 * l20 - s01 * l21) * v2;
      tiles[t + 7] = (s12 - s10 * l20 - s11 * l21) * v2;
      tiles[t + 8] = (s22 - s20 * l20 - s21 * l21) * v2;
    }
  }
}

function pivot(square: number, row: number): number {
  if (!(square > 0 && square < Infinity)) throw new DomainError(`The band matrix is not positive definite at row ${row + 1}.`);
  return Math.sqrt(square);
}
