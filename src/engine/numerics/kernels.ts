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
  /**
   * Adds to a row of draws the rows of a table times as many factors, four at a time.
   *
   * @param out      place of the row
   * @param factors  place of the factors
   * @param count    number of factors
   * @param table    place of the table, count x draws
   * @param draws    even
   */
  addRows(out: number, factors: number, count: number, table: number, draws: number): void;
  /**
   * ln stiffness and settlement of a pile in each draw: constant + residual z + linear' x + x' quadratic x, and load times e to its negative.
   *
   * @param ln          place of a row for ln stiffness
   * @param settlement  place of a row for settlement
   * @param numbers     place of load, residual, constant, 5 linear and 15 quadratic coefficients (row by row of the lower triangle)
   * @param places      place of the table of 6 ints: the places of the rows z and x of the pile and its neighbours
   * @param draws       even
   */
  settle(ln: number, settlement: number, numbers: number, places: number, draws: number): void;
  /**
   * Largest angular distortion in each draw.
   *
   * @param out         place of a row
   * @param settlement  place of the settlements, piles x draws
   * @param pairs       place of the table of pairs: two ints, the numbers of the piles, and a double, one over their distance
   * @param count       number of pairs
   * @param draws       even
   */
  largestDistortion(out: number, settlement: number, pairs: number, count: number, draws: number): void;
}
