import { exponentialLessOne } from "../numerics/exponential-less-one.js";
import { logarithm } from "../numerics/logarithm.js";
import { factorSemidefinite } from "../numerics/semidefinite-factor.js";
import { lagrangeWeights } from "../numerics/lagrange.js";
import type { HoleCovariance } from "./hole-covariance.js";
import type { SiteModel } from "./site-model.js";
import { secondOrderTerms } from "./second-order-terms.js";

/** The piles at one node: moments of Z and the quadratic that stands for Q, all given the design values. */
export interface NodeMoments {
  /** design length of each pile, m */
  readonly lengths: Float64Array;
  /** E ln K without the second-order term, one a pile */
  readonly means: Float64Array;
  /** conditional covariance of Z, piles x piles */
  readonly covariance: Float64Array;
  /** its lower Cholesky factor */
  readonly factor: Float64Array;
  /** second-order term given the deviations xi of the pile and its neighbours: constant, linear, quadratic (piles x `quadraticWidth`) */
  readonly quadratic: Float64Array;
  /** standard deviation of what the quadratic leaves out, one a pile */
  readonly residual: Float64Array;
}

/**
 * Moments of all piles given the design values.
 *
 * @param model    ground under the piles
 * @param holes    what the design values say of it
 * @param normals  the normals behind the design values, at this node
 * @param lengths  design length of each pile, m
 * @param bend     spread-based rules: the bend of the covariance times the deviation over its variance; else 0
 */
export function nodeMoments(model: SiteModel, holes: HoleCovariance, normals: Float64Array, lengths: Float64Array, bend: number): NodeMoments {
  const { plan, family } = model;
  const n = plan.piles.length;
  const count = family.lengths.length;
  const { size } = holes;
  const starts = new Int32Array(n);
  const weights = new Float64Array(n * 4);
  interpolation(family.logLengths, lengths, starts, weights);
  const means = new Float64Array(n);
  const c = new Float64Array(n * size);
  for (let i = 0; i < n; i++) {
    for (let q = 0; q < 4; q++) {
      const k = starts[i] + q;
      means[i] += weights[i * 4 + q] * model.lnStiffness[k];
      for (let s = 0; s < size; s++) c[i * size + s] += weights[i * 4 + q] * holes.design[(i * count + k) * size + s];
    }
    for (let s = 0; s < size; s++) means[i] += c[i * size + s] * normals[s];
  }
  const covariance = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      const base = plan.distanceOf[i * n + j] * count * count;
      let sum = 0;
      for (let p = 0; p < 4; p++) {
        const row = base + (starts[i] + p) * count + starts[j];
        let inner = 0;
        for (let q = 0; q < 4; q++) inner += weights[j * 4 + q] * model.covariance[row + q];
        sum += weights[i * 4 + p] * inner;
      }
      for (let s = 0; s < size; s++) sum -= c[i * size + s] * c[j * size + s];
      covariance[i * n + j] = covariance[j * n + i] = sum;
    }
  }
  if (bend !== 0) bendCovariance(covariance, holes, bend, starts, weights, n, count);
  const factor = Float64Array.from(covariance);
  factorSemidefinite(factor, n, 1e-9);
  const { quadratic, residual } = secondOrderTerms(model, holes, { lengths, starts, weights, toNormals: c, normals, covariance });
  return { lengths, means, covariance, factor, quadratic, residual };
}

function interpolation(grid: Float64Array, lengths: Float64Array, starts: Int32Array, weights: Float64Array): void {
  let last = NaN;
  for (let i = 0; i < lengths.length; i++) {
    if (lengths[i] === last) {
      starts[i] = starts[i - 1];
      weights.copyWithin(i * 4, (i - 1) * 4, i * 4);
      continue;
    }
    const found = lagrangeWeights(grid, Math.min(Math.max(logarithm(lengths[i]), grid[0]), grid[grid.length - 1]));
    starts[i] = found.start;
    weights.set(found.weights, i * 4);
    last = lengths[i];
  }
}

/**
 * Rules that look at the spread of the readings make the ground's covariance depend on the design value. The exact first-order term
 * -q G is replaced by -G (1 - exp(-lambda q))/lambda, which agrees for small q and stays positive.
 */
function bendCovariance(covariance: Float64Array, holes: HoleCovariance, q: number, starts: Int32Array, weights: Float64Array, n: number, count: number): void {
  const columns = holes.columnShares.length;
  const seen = new Float64Array(n * columns);
  for (let i = 0; i < n; i++) {
    for (let p = 0; p < 4; p++) {
      const row = (i * count + starts[i] + p) * columns;
      for (let g = 0; g < columns; g++) seen[i * columns + g] += weights[i * 4 + p] * holes.beyond[row + g];
    }
  }
  const gram = new Float64Array(n * n);
  let lambda = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (let g = 0; g < columns; g++) sum += holes.columnShares[g] * seen[i * columns + g] * seen[j * columns + g];
      gram[i * n + j] = sum;
    }
    if (covariance[i * n + i] > 0) lambda = Math.max(lambda, gram[i * n + i] / covariance[i * n + i]);
  }
  const scale = lambda > 0 ? -exponentialLessOne(-lambda * q) / lambda : q;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      covariance[i * n + j] -= scale * gram[i * n + j];
      covariance[j * n + i] = covariance[i * n + j];
    }
  }
}
