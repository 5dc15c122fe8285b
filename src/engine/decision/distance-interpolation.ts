import { lagrangeWeights } from "../numerics/lagrange.js";
import { distanceCoordinate } from "./distance-grid.js";

/**
 * A row of a table whose leading index is a distance, at any distance.
 *
 * @param coordinates  the table's distances in the even coordinate
 * @param table        distances x width
 * @param distance     m; beyond the last node the last row is returned
 * @param out          receives the row
 * @param at           where in out it starts
 */
export function rowAtDistance(coordinates: Float64Array, table: Float64Array, width: number, distance: number, out: Float64Array, at = 0): void {
  const last = coordinates[coordinates.length - 1];
  const { start, weights } = lagrangeWeights(coordinates, Math.min(distanceCoordinate(distance), last));
  for (let i = 0; i < width; i++) {
    let sum = 0;
    for (let q = 0; q < 4; q++) sum += weights[q] * table[(start + q) * width + i];
    out[at + i] = sum;
  }
}
