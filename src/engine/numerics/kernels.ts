/** Memory that kernels work on: two views of the same bytes, valid until more room is asked for. */
export interface Room {
  readonly doubles: Float64Array;
  readonly ints: Int32Array;
}

/**
 * The loops that most of the time goes into, over memory of their own. Places count doubles from its start. Whatever makes them, their answers
 * are the same to the last bit: each result is one sum whose terms come in a stated order.
 */
export interface Kernels {
  /** Room for at least so many doubles; what stood there before stays, and is anybody's. */
  room(doubles: number): Room;
  /**
   * Cholesky factor of a matrix in an envelope, in place.
   *
   * @param tiles  place of the tiles
   * @param rows   place of the envelope's table of rows
   * @returns      0, or the number (from 1) of the row where the matrix is not positive definite
   */
  factor(tiles: number, rows: number, tileRows: number): number;
  /**
   * Takes the first half of a solution: right-hand sides times the inverse of the factor.
   *
   * @param firstRow  row of tiles at which the right-hand sides start
   * @param right     place of the right-hand sides, unknowns x columns
   * @param columns   even
   */
  forward(tiles: number, rows: number, tileRows: number, firstRow: number, right: number, columns: number): void;
  /** The second half: times the inverse of the factor's transpose. */
  backward(tiles: number, rows: number, tileRows: number, firstRow: number, right: number, columns: number): void;
}
