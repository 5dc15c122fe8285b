import { requireDomain } from "./domain-error.js";

/** Edge of a tile. */
export const tileEdge = 4;
const tileSize = tileEdge * tileEdge;

/**
 * Where the entries of a symmetric matrix stand whose rows each start at a column of their own: in 4 x 4 tiles of its lower triangle, row of
 * tiles by row of tiles, each from the first tile that holds an entry to the diagonal. Inside a tile entries run column by column.
 */
export interface BandEnvelope {
  readonly unknowns: number;
  readonly tileRows: number;
  /** tile rows x 2: the first tile, and the place of tile 0, in tiles, were it stored */
  readonly rows: Int32Array;
  /** numbers in all tiles */
  readonly size: number;
}

/**
 * The envelope of a symmetric matrix.
 *
 * @param first  first column with an entry in each row, from 0 to the row's own number
 * @returns the envelope; the last tiles are filled up with unknowns of their own where the order is no multiple of four
 * @throws {DomainError} there is no row, or a first column is out of range
 */
export function bandEnvelope(first: ArrayLike<number>): BandEnvelope {
  const unknowns = first.length;
  requireDomain(unknowns > 0, "Number of unknowns", unknowns, "above 0");
  const tileRows = Math.ceil(unknowns / tileEdge);
  const rows = new Int32Array(2 * tileRows);
  let tiles = 0;
  for (let row = 0; row < tileRows; row++) {
    let least = row * tileEdge;
    for (let i = row * tileEdge; i < Math.min((row + 1) * tileEdge, unknowns); i++) {
      requireDomain(Number.isInteger(first[i]) && first[i] >= 0 && first[i] <= i, `First column of row ${i + 1}`, first[i], "a whole number from 0 to that of the row");
      least = Math.min(least, first[i]);
    }
    rows[2 * row] = Math.floor(least / tileEdge);
    rows[2 * row + 1] = tiles - rows[2 * row];
    tiles += row + 1 - rows[2 * row];
  }
  return { unknowns, tileRows, rows, size: tiles * tileSize };
}

/**
 * Place of an entry among the numbers of an envelope.
 *
 * @param i  row
 * @param j  column, from the first of row i to i
 */
export function placeInEnvelope({ rows }: BandEnvelope, i: number, j: number): number {
  const row = Math.floor(i / tileEdge);
  return (rows[2 * row + 1] + Math.floor(j / tileEdge)) * tileSize + (j % tileEdge) * tileEdge + (i % tileEdge);
}
