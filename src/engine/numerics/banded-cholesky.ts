import { placeInEnvelope, tileEdge, type BandEnvelope } from "./band-envelope.js";
import { kernels } from "./chosen-kernels.js";
import { DomainError, requireDomain } from "./domain-error.js";
import type { Kernels, Room } from "./kernels.js";

// Rows of the factor are made from the top. Each entry takes off its products in the order of their columns and is then multiplied by the
// reciprocal of its column's pivot: an order of sums that does not hang on how many entries a kernel works on at once.

/**
 * Cholesky factor of a symmetric positive definite matrix inside an envelope, in place.
 *
 * @param matrix  lower triangle, by `placeInEnvelope`; on return the factor, with the reciprocals of its pivots on the diagonal
 * @param envelope  where entries stand
 * @param using  the kernels
 * @throws {DomainError} the matrix is not positive definite (the row is named), or the array is too short
 */
export function factorBanded(matrix: Float64Array, envelope: BandEnvelope, using: Kernels = kernels()): void {
  requireLength(matrix, envelope);
  const { size } = envelope;
  const room = layOut(envelope, 0, using);
  room.doubles.set(matrix.length === size ? matrix : matrix.subarray(0, size));
  factorInRoom(room, envelope, using);
  matrix.set(room.doubles.subarray(0, size));
}

/**
 * Solves with the factor of `factorBanded`, in place, many right-hand sides at once.
 *
 * @param factor  as `factorBanded` leaves it
 * @param envelope  of the matrix
 * @param right  right-hand sides, rows x columns, row by row, from unknown `from` on; on return the solutions
 * @param columns  number of right-hand sides, > 0
 * @param from  first unknown, a multiple of the tile's edge: those above it are eliminated already, and what is left has the same displacements
 * @param using  the kernels
 * @throws {DomainError} an array is too short, or a number is out of range
 */
export function solveBanded(factor: Float64Array, envelope: BandEnvelope, right: Float64Array, columns = 1, from = 0, using: Kernels = kernels()): void {
  const { unknowns, tileRows, size } = envelope;
  requireLength(factor, envelope);
  requireDomain(Number.isInteger(columns) && columns > 0, "Number of right-hand sides", columns, "a whole number above 0");
  requireDomain(from >= 0 && from < unknowns && from % tileEdge === 0, "First unknown", from, `a multiple of ${tileEdge} below the number of unknowns`);
  const numbers = (unknowns - from) * columns;
  requireDomain(right.length >= numbers, "Length of the right-hand sides", right.length, `at least ${numbers}`);
  const width = columns + (columns % 2); // kernels take columns in pairs
  const firstRow = from / tileEdge;
  const rows = (tileRows - firstRow) * tileEdge;
  const room = layOut(envelope, rows * width, using);
  const { doubles } = room;
  const at = rightAt(envelope);
  doubles.set(factor.length === size ? factor : factor.subarray(0, size));
  doubles.fill(0, at, at + rows * width);
  if (width === columns) doubles.set(right.subarray(0, numbers), at);
  else for (let i = 0, k = 0; k < numbers; i++) for (let c = 0; c < columns; c++, k++) doubles[at + i * width + c] = right[k];
  using.forward(0, size, tileRows, firstRow, at, width);
  using.backward(0, size, tileRows, firstRow, at, width);
  if (width === columns) right.set(doubles.subarray(at, at + numbers));
  else for (let i = 0, k = 0; k < numbers; i++) for (let c = 0; c < columns; c++, k++) right[k] = doubles[at + i * width + c];
}

/**
 * f' K^-1 f of a load f on a matrix K: what the load moves itself. One forward pass gives it, and K is never copied.
 *
 * @param envelope  of the matrix
 * @param add  adds the matrix, by `placeInEnvelope`, to the zeros that it is given; they are lent for as long as it runs
 * @param load  f, one an unknown
 * @param using  the kernels
 * @throws {DomainError} the matrix is not positive definite (the row is named), or the load is too short
 */
export function complianceBanded(envelope: BandEnvelope, add: (matrix: Float64Array) => void, load: Float64Array, using: Kernels = kernels()): number {
  const { unknowns, tileRows, size } = envelope;
  requireDomain(load.length >= unknowns, "Length of the load", load.length, `at least ${unknowns}`);
  const rows = tileRows * tileEdge;
  const room = layOut(envelope, 2 * rows, using);
  const { doubles } = room;
  doubles.fill(0, 0, size);
  add(doubles);
  factorInRoom(room, envelope, using);
  const at = rightAt(envelope);
  doubles.fill(0, at, at + 2 * rows);
  for (let i = 0; i < unknowns; i++) doubles[at + 2 * i] = load[i];
  using.forward(0, size, tileRows, 0, at, 2);
  let compliance = 0;
  for (let i = 0; i < unknowns; i++) compliance += doubles[at + 2 * i] ** 2;
  return compliance;
}

/** Where right-hand sides stand in the room: behind the tiles and the table of rows. */
function rightAt({ size, tileRows }: BandEnvelope): number {
  return size + tileRows + (tileRows % 2);
}

/** Room for the tiles, the table of rows and right-hand sides, one behind the other, with the table filled in. */
function layOut(envelope: BandEnvelope, right: number, using: Kernels): Room {
  const room = using.room(rightAt(envelope) + right);
  room.ints.set(envelope.rows, 2 * envelope.size);
  return room;
}

function factorInRoom({ doubles }: Room, envelope: BandEnvelope, using: Kernels): void {
  const { unknowns, tileRows, size } = envelope;
  for (let i = unknowns; i < tileRows * tileEdge; i++) doubles[placeInEnvelope(envelope, i, i)] = 1; // unknowns that fill up the last tile
  const failed = using.factor(0, size, tileRows);
  if (failed > 0) throw new DomainError(`The band matrix is not positive definite at row ${failed}.`);
}

function requireLength(matrix: Float64Array, { size }: BandEnvelope): void {
  requireDomain(matrix.length >= size, "Length of the band", matrix.length, `at least ${size}`);
}
