import { groundProfile } from "../decision/ground-profile.js";
import type { Problem } from "../decision/problem.js";
import { separableTerms } from "../ground/separable-terms.js";
import { requireDomain } from "../numerics/domain-error.js";
import { exponential } from "../numerics/exponential.js";
import { stream } from "../random/stream.js";
import { addProduct, covarianceRoot } from "./covariance-root.js";

/** First number of a slice's stream: apart from the realisations that are priced. */
const sliceKind = 2;
const levelPart = 1;

/** Where a vertical section is looked at, in metres: middles of its columns and of its rows. */
export interface SliceGrid {
  readonly x: Float64Array;
  readonly depths: Float64Array;
}

/**
 * Young's modulus on a vertical section of one realised ground: a picture of what the inputs allow.
 *
 * field = sum over terms of root(weight) B Z A', with A A' the covariance along the section and B B' that of the depths, which is
 * exact for a sum of products of a plan and a depth part. Values are those at the points, not means about them.
 *
 * @param problem  whose ground is realised
 * @param index    number of the realisation, whole, from 0; with the seed of the problem it fixes the picture
 * @param grid     at least one column and one row
 * @returns        kPa, rows x columns, from the top
 * @throws {DomainError} the index is none or the grid is empty
 */
export function groundSlice({ ground, seed }: Problem, index: number, { x, depths }: SliceGrid): Float64Array {
  requireDomain(Number.isInteger(index) && index >= 0, "Number of the realisation", index, "a whole number, 0 or above");
  requireDomain(x.length > 0 && depths.length > 0, "Points of the section", x.length * depths.length, "at least 1");
  const profile = groundProfile(ground);
  const width = x.length;
  const field = new Float64Array(width * depths.length);
  const turned = new Float64Array(width * depths.length);
  const numbers = stream(seed, sliceKind, index, 0);
  for (const term of separableTerms(ground)) {
    const along = covarianceRoot(covarianceOf(x, (lag) => term.plan(Math.abs(lag))), width, width);
    const down = covarianceRoot(covarianceOf(depths, (lag) => term.vertical(lag)), depths.length, depths.length);
    const normals = Float64Array.from({ length: along.columnCount * down.columnCount }, () => numbers.normal());
    const byRow = new Float64Array(depths.length * along.columnCount);
    addProduct(down, 0, depths.length, normals, along.columnCount, Math.sqrt(term.weight), byRow, along.columnCount);
    const byColumn = transposed(byRow, depths.length, along.columnCount);
    addProduct(along, 0, width, byColumn, depths.length, 1, turned, depths.length);
  }
  field.set(transposed(turned, width, depths.length));
  const level = Math.sqrt(profile.regionalVariance) * stream(seed, sliceKind, index, levelPart).normal();
  const sd = Math.sqrt(profile.groundVariance);
  return field.map((value, k) => {
    const depth = depths[Math.floor(k / width)];
    return exponential(profile.logMedian(depth) + level + sd * profile.relativeSd(depth) * value);
  });
}

function covarianceOf(places: Float64Array, correlation: (lag: number) => number): Float64Array {
  const n = places.length;
  return Float64Array.from({ length: n * n }, (_, k) => correlation(places[Math.floor(k / n)] - places[k % n]));
}

function transposed(table: Float64Array, rows: number, columns: number): Float64Array {
  return Float64Array.from({ length: rows * columns }, (_, k) => table[(k % rows) * columns + Math.floor(k / rows)]);
}
