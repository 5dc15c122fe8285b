import { lagrangeWeights } from "../numerics/lagrange.js";
import { logarithm } from "../numerics/logarithm.js";
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
  const forms = family.formIndices.length;
  const quadratic = new Float64Array(n * quadraticWidth);
  const residual = new Float64Array(n);
  const root = new Float64Array(most * most);
  const sums = new Float64Array(quadraticWidth);
  const formWeights = weightsOfForms(model, at.lengths);
  const seenAt = interpolated(model, at);
  const { normals, toNormals } = at;
  for (let i = 0; i < n; i++) {
    const near = plan.nearby[i];
    const m = near.length;
    invertRoot(at.covariance, n, near, root);
    const r00 = root[0], r10 = root[5], r11 = root[6], r20 = root[10], r21 = root[11], r22 = root[12];
    const r30 = root[15], r31 = root[16], r32 = root[17], r33 = root[18], r40 = root[20], r41 = root[21], r42 = root[22], r43 = root[23], r44 = root[24];
    // Where a neighbour is missing the pile stands in for it: its row of the root is zero.
    const p0 = i, p1 = m > 1 ? near[1] : i, p2 = m > 2 ? near[2] : i, p3 = m > 3 ? near[3] : i, p4 = m > 4 ? near[4] : i;
    const row = i * n;
    const seen0 = seenAt(p0, plan.distanceOf[row + p0]), seen1 = seenAt(p1, plan.distanceOf[row + p1]), seen2 = seenAt(p2, plan.distanceOf[row + p2]);
    const seen3 = seenAt(p3, plan.distanceOf[row + p3]), seen4 = seenAt(p4, plan.distanceOf[row + p4]);
    sums.fill(0);
    let restVariance = 0;
    for (let b = 0; b < 2; b++) {
      if (model.shares[b] === 0) continue;
      const { tables } = model.nodes[b];
      const curves = holes.curves[b];
      for (let f = 0; f < forms; f++) {
        const share = model.shares[b] * formWeights[i * forms + f];
        let rest = groundVariance * tables.traces[f] + regionalVariance * tables.uniformForms[f];
        restVariance += share * groundVariance ** 2 * tables.restVariances[f];
        for (let r = 0, part = (b * forms + f) * ranks; r < ranks; r++, part++) {
          const value = tables.values[f * ranks + r];
          const own = groundVariance + regionalVariance * tables.curveSums[f * ranks + r] ** 2;
          rest -= value * own;
          const curve = ((i * forms + f) * ranks + r) * size;
          let shift = 0;
          let known = 0;
          let t0 = seen0[part], t1 = seen1[part], t2 = seen2[part], t3 = seen3[part], t4 = seen4[part];
          for (let k = 0; k < size; k++) {
            const c = curves[curve + k];
            shift += c * normals[k];
            known += c * c;
            t0 -= c * toNormals[p0 * size + k];
            t1 -= c * toNormals[p1 * size + k];
            t2 -= c * toNormals[p2 * size + k];
            t3 -= c * toNormals[p3 * size + k];
            t4 -= c * toNormals[p4 * size + k];
          }
          // In the directions that the piles one after the other add, each of variance 1, what they explain is a sum of squares.
          const u0 = r00 * t0;
          const u1 = r10 * t0 + r11 * t1;
          const u2 = r20 * t0 + r21 * t1 + r22 * t2;
          const u3 = r30 * t0 + r31 * t1 + r32 * t2 + r33 * t3;
          const u4 = r40 * t0 + r41 * t1 + r42 * t2 + r43 * t3 + r44 * t4;
          const left = Math.max(own - known - (u0 * u0 + u1 * u1 + u2 * u2 + u3 * u3 + u4 * u4), 0);
          const factor = share * value;
          const v0 = factor * u0, v1 = factor * u1, v2 = factor * u2, v3 = factor * u3, v4 = factor * u4;
          sums[0] += factor * (shift * shift + left);
          sums[1] += v0 * shift; sums[2] += v1 * shift; sums[3] += v2 * shift; sums[4] += v3 * shift; sums[5] += v4 * shift;
          sums[6] += v0 * u0;
          sums[7] += v1 * u0; sums[8] += v1 * u1;
          sums[9] += v2 * u0; sums[10] += v2 * u1; sums[11] += v2 * u2;
          sums[12] += v3 * u0; sums[13] += v3 * u1; sums[14] += v3 * u2; sums[15] += v3 * u3;
          sums[16] += v4 * u0; sums[17] += v4 * u1; sums[18] += v4 * u2; sums[19] += v4 * u3; sums[20] += v4 * u4;
          restVariance += share * value * value * (2 * left * left + 4 * left * Math.max(own - left, 0));
        }
        sums[0] += share * rest;
      }
    }
    inDeviations(sums, root, m, quadratic, i * quadraticWidth);
    residual[i] = Math.sqrt(Math.max(restVariance, 0));
  }
  return { quadratic, residual };
}

/** Weights of the forms at each pile's length, piles x forms. */
function weightsOfForms({ family }: SiteModel, lengths: Float64Array): Float64Array {
  const forms = family.formIndices.length;
  const grid = family.formLogLengths;
  const weights = new Float64Array(lengths.length * forms);
  for (let i = 0; i < lengths.length; i++) {
    // Piles of one load share their length, and mostly stand next to each other in the list.
    if (i > 0 && lengths[i] === lengths[i - 1]) weights.copyWithin(i * forms, (i - 1) * forms, i * forms);
    else weights.set(lagrangeWeights(grid, Math.min(Math.max(logarithm(lengths[i]), grid[0]), grid[forms - 1])).weights, i * forms);
  }
  return weights;
}

/**
 * Covariances of a pile's Z with all parts of a form at a distance, both structures' one after the other, forms x ranks. Piles of one length
 * share them, so that a plan needs few.
 */
function interpolated({ plan, family, curveCovariance }: SiteModel, at: PilesAtNode): (pile: number, distance: number) => Float64Array {
  const count = family.lengths.length;
  const parts = family.formIndices.length * ranks;
  const distances = plan.distances.length;
  const first = new Map<number, number>();
  const ofLength = Int32Array.from(at.lengths, (length, j) => {
    if (!first.has(length)) first.set(length, j);
    return first.get(length)!;
  });
  const known = new Map<number, Float64Array>();
  return (pile, distance) => {
    const key = ofLength[pile] * distances + distance;
    let found = known.get(key);
    if (found === undefined) {
      found = new Float64Array(2 * parts);
      const w = pile * 4;
      for (let b = 0; b < 2; b++) {
        const cross = curveCovariance[b];
        for (let part = 0; part < parts; part++) {
          const p = (distance * parts + part) * count + at.starts[pile];
          found[b * parts + part] = at.weights[w] * cross[p] + at.weights[w + 1] * cross[p + 1] + at.weights[w + 2] * cross[p + 2] + at.weights[w + 3] * cross[p + 3];
        }
      }
      known.set(key, found);
    }
    return found;
  };
}

/** Turns a quadratic in directions u = root (deviations) into one in the deviations themselves: constant, linear, lower triangle. */
function inDeviations(sums: Float64Array, root: Float64Array, m: number, out: Float64Array, at: number): void {
  out[at] = sums[0];
  for (let a = 0, next = at + 1 + most; a < m; a++) {
    let linear = 0;
    for (let p = a; p < m; p++) linear += root[p * most + a] * sums[1 + p];
    out[at + 1 + a] = 2 * linear;
    for (let e = 0; e <= a; e++) {
      let sum = 0;
      for (let p = a; p < m; p++) {
        let inner = 0;
        for (let q = e; q < m; q++) inner += root[q * most + e] * sums[1 + most + (p >= q ? (p * (p + 1)) / 2 + q : (q * (q + 1)) / 2 + p)];
        sum += root[p * most + a] * inner;
      }
      out[next++] = a === e ? sum : 2 * sum;
    }
  }
}

/**
 * Root of the inverse of the covariance of a pile and its neighbours, most x most, lower: row a is the part of pile a that the piles before
 * do not explain, over its standard deviation. A pile that tells nothing new is left out. Written out here, because it runs for every pile
 * at every node and must not allocate.
 */
function invertRoot(covariance: Float64Array, n: number, near: readonly number[], root: Float64Array): void {
  root.fill(0);
  for (let a = 0; a < near.length; a++) {
    const row = a * most;
    root[row + a] = 1;
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
}
