import { lagrangeWeights } from "../numerics/lagrange.js";
import type { HoleCovariance } from "./hole-covariance.js";
import type { SiteModel } from "./site-model.js";
import { ranks } from "./structure-tables.js";

/** Coefficients for a pile and up to four neighbours: constant, 5 linear, 15 quadratic (row by row of the lower triangle). */
export const quadraticWidth = 21;
const most = 5;

/** The piles at one node, as far as the second-order term needs them. */
export interface PilesAtNode {
  /** design lengths, m, and their four-point weights in the family's lengths */
  readonly lengths: Float64Array;
  readonly starts: Int32Array;
  readonly weights: Float64Array;
  /** covariances of Z with the normals behind the design values, piles x size, and the normals here */
  readonly toNormals: Float64Array;
  readonly normals: Float64Array;
  /** conditional covariance of Z, piles x piles */
  readonly covariance: Float64Array;
}

/**
 * E[Q | deviations of the pile and its neighbours, design values] as a quadratic, and the standard deviation of the rest.
 *
 * Q of one pile depends on its neighbours' ground too; leaving them out loses 3-5 % of the failure cost under cautious rules.
 *
 * @returns  quadratic: piles x quadraticWidth; residual: one a pile, in the units of ln stiffness
 */
export function secondOrderTerms(model: SiteModel, holes: HoleCovariance, at: PilesAtNode): { quadratic: Float64Array; residual: Float64Array } {
  const { plan, family, groundVariance, regionalVariance } = model;
  const { size } = holes;
  const n = plan.piles.length;
  const count = family.lengths.length;
  const forms = family.formIndices.length;
  const grid = family.formLogLengths;
  const quadratic = new Float64Array(n * quadraticWidth);
  const residual = new Float64Array(n);
  const inverse = new Float64Array(most * most);
  const root = new Float64Array(most * most);
  const t = new Float64Array(most);
  const s = new Float64Array(most);
  const bases = new Int32Array(most);
  const formWeights = new Float64Array(n * forms);
  let last = -1;
  for (let i = 0; i < n; i++) {
    // Piles of one load share their length, and mostly stand next to each other in the list.
    if (last >= 0 && at.lengths[i] === at.lengths[last]) formWeights.copyWithin(i * forms, last * forms, (last + 1) * forms);
    else formWeights.set(lagrangeWeights(grid, Math.min(Math.max(Math.log(at.lengths[i]), grid[0]), grid[forms - 1])).weights, i * forms);
    last = i;
  }
  for (let i = 0; i < n; i++) {
    const near = plan.nearby[i];
    const m = near.length;
    invert(at.covariance, n, near, root, inverse);
    const out = i * quadraticWidth;
    let restVariance = 0;
    for (let b = 0; b < 2; b++) {
      if (model.shares[b] === 0) continue;
      const { tables } = model.nodes[b];
      const cross = model.curveCovariance[b];
      const curves = holes.curves[b];
      for (let f = 0; f < forms; f++) {
        const share = model.shares[b] * formWeights[i * forms + f];
        let rest = groundVariance * tables.traces[f] + regionalVariance * tables.uniformForms[f];
        restVariance += share * groundVariance ** 2 * tables.restVariances[f];
        for (let a = 0; a < m; a++) bases[a] = (plan.distanceOf[i * n + near[a]] * forms + f) * ranks * count + at.starts[near[a]];
        for (let r = 0; r < ranks; r++) {
          const value = tables.values[f * ranks + r];
          const own = groundVariance + regionalVariance * tables.curveSums[f * ranks + r] ** 2;
          rest -= value * own;
          const curve = ((i * forms + f) * ranks + r) * size;
          let shift = 0;
          let known = 0;
          for (let k = 0; k < size; k++) {
            shift += curves[curve + k] * at.normals[k];
            known += curves[curve + k] ** 2;
          }
          for (let a = 0; a < m; a++) {
            const j = near[a];
            const w = j * 4;
            const p = bases[a] + r * count;
            let sum = at.weights[w] * cross[p] + at.weights[w + 1] * cross[p + 1] + at.weights[w + 2] * cross[p + 2] + at.weights[w + 3] * cross[p + 3];
            for (let k = 0; k < size; k++) sum -= curves[curve + k] * at.toNormals[j * size + k];
            t[a] = sum;
          }
          let explained = 0;
          for (let a = 0; a < m; a++) {
            let sum = 0;
            for (let e = 0; e < m; e++) sum += inverse[a * most + e] * t[e];
            s[a] = sum;
            explained += sum * t[a];
          }
          const left = Math.max(own - known - explained, 0);
          const factor = share * value;
          quadratic[out] += factor * (shift * shift + left);
          let next = out + 6;
          for (let a = 0; a < m; a++) {
            const fs = factor * s[a];
            quadratic[out + 1 + a] += 2 * fs * shift;
            for (let e = 0; e < a; e++) quadratic[next++] += 2 * fs * s[e];
            quadratic[next++] += fs * s[a];
          }
          restVariance += share * value * value * (2 * left * left + 4 * left * Math.max(own - left, 0));
        }
        quadratic[out] += share * rest;
      }
    }
    residual[i] = Math.sqrt(Math.max(restVariance, 0));
  }
  return { quadratic, residual };
}

/**
 * Inverse of the covariance of a pile and its neighbours, most x most; a pile that tells nothing new is left out. Written out here,
 * because it runs for every pile at every node and must not allocate.
 *
 * @param root  room for most x most
 */
function invert(covariance: Float64Array, n: number, near: readonly number[], root: Float64Array, inverse: Float64Array): void {
  const m = near.length;
  // Rows of the inverse of the lower factor, made one after the other: row a is the part of pile a that the piles before do not explain.
  for (let a = 0; a < m; a++) {
    const row = a * most;
    for (let c = 0; c < most; c++) root[row + c] = c === a ? 1 : 0;
    const own = covariance[near[a] * n + near[a]];
    let left = own;
    for (let e = 0; e < a; e++) {
      let product = 0;
      for (let c = 0; c <= e; c++) product += root[e * most + c] * covariance[near[a] * n + near[c]];
      left -= product * product;
      for (let c = 0; c <= e; c++) root[row + c] -= product * root[e * most + c];
    }
    const scale = left > 1e-9 * own ? 1 / Math.sqrt(left) : 0;
    for (let c = 0; c <= a; c++) root[row + c] *= scale;
  }
  for (let a = 0; a < m; a++) {
    for (let b = 0; b <= a; b++) {
      let sum = 0;
      for (let e = a; e < m; e++) sum += root[e * most + a] * root[e * most + b];
      inverse[a * most + b] = inverse[b * most + a] = sum;
    }
  }
}
