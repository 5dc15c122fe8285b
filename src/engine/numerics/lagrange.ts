import { requireDomain } from "./domain-error.js";

/** Weights of four neighbouring grid points: value at x = sum over k of weights[k] * table[start + k]. */
export interface InterpolationWeights {
  readonly start: number;
  readonly weights: Float64Array;
}

/**
 * Cubic interpolation weights on a sorted grid: the two grid points on each side of x, or the four nearest the end.
 *
 * @param grid  increasing, at least 4 points
 * @param x  from the first to the last grid point; rounding beyond an end is forgiven
 * @returns first grid point and four weights that sum to 1; exact for cubics
 * @throws {DomainError} the grid has fewer than 4 points, or x lies outside it
 */
export function lagrangeWeights(grid: ArrayLike<number>, x: number): InterpolationWeights {
  const n = grid.length;
  requireDomain(n >= 4, "Number of grid points", n, "at least 4");
  const slack = 1e-9 * (grid[n - 1] - grid[0]);
  requireDomain(x >= grid[0] - slack && x <= grid[n - 1] + slack, "Place to interpolate at", x, `from ${grid[0]} to ${grid[n - 1]}`);
  let low = 0;
  let high = n - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (grid[middle] <= x) low = middle;
    else high = middle;
  }
  const start = Math.min(Math.max(low - 1, 0), n - 4);
  const weights = new Float64Array(4);
  for (let k = 0; k < 4; k++) {
    let weight = 1;
    for (let m = 0; m < 4; m++) if (m !== k) weight *= (x - grid[start + m]) / (grid[start + k] - grid[start + m]);
    weights[k] = weight;
  }
  return { start, weights };
}
