import { choleskyInPlace } from "../numerics/cholesky.js";
import { lagrangeWeights } from "../numerics/lagrange.js";
import type { DesignDistribution } from "../investigation/design-distribution.js";
import type { LayoutTables } from "./layout.js";
import type { SiteModel } from "./site-model.js";
import { ranks } from "./structure-tables.js";

/** What the holes say of each pile's ground, in the units of ln stiffness, gain and slope included. */
export interface HoleCovariance {
  /** Cov(Z of pile i at length k, design value): piles x lengths */
  readonly design: Float64Array;
  /** per node, Cov(v of form f and rank r under pile i, design value): piles x forms x ranks */
  readonly curves: readonly [Float64Array, Float64Array];
  /** what each group of readings tells beyond the mean: piles x lengths x groups; empty where the rule is linear */
  readonly beyond: Float64Array;
  readonly groupShares: Float64Array;
}

/** Scales the hole tables of the two nodes to the problem; without holes all is zero. */
export function holeCovariance(model: SiteModel, tables: readonly [LayoutTables, LayoutTables] | undefined, design: DesignDistribution): HoleCovariance {
  const { groundVariance, regionalVariance, slopes, weightSums, shares, nodes } = model;
  const piles = model.plan.piles.length;
  const lengths = slopes.length;
  const forms = model.family.formIndices.length;
  if (tables === undefined || design.variance === 0) {
    const none = new Float64Array(piles * forms * ranks);
    return { design: new Float64Array(piles * lengths), curves: [none, none], beyond: new Float64Array(0), groupShares: new Float64Array(0) };
  }
  const blend = (at: number): number => shares[0] * tables[0].mean[at] + shares[1] * tables[1].mean[at];
  const mean = Float64Array.from({ length: piles * lengths }, (_, at) => {
    const k = at % lengths;
    return design.gain * (groundVariance * slopes[k] * blend(at) + regionalVariance * weightSums[k]);
  });
  const curves = tables.map((t, b) =>
    t.curves.map((unit, at) => design.gain * (groundVariance * unit + regionalVariance * nodes[b].tables.curveSums[at % (forms * ranks)])),
  ) as unknown as [Float64Array, Float64Array];
  const columns = tables[0].groupCount;
  const beyond = design.bend === 0 ? new Float64Array(0) : new Float64Array(piles * lengths * columns);
  for (let at = 0; at < beyond.length; at++) {
    const row = Math.floor(at / columns);
    const unit = shares[0] * tables[0].groups[at] + shares[1] * tables[1].groups[at];
    beyond[at] = groundVariance * slopes[row % lengths] * (unit - blend(row));
  }
  return { design: mean, curves, beyond, groupShares: tables[0].groupShares };
}

/** The piles at one design value: moments of Z and the quadratic that stands for Q, all given the design value. */
export interface NodeMoments {
  /** design length of each pile, m */
  readonly lengths: Float64Array;
  /** E ln K without the second-order term, one a pile */
  readonly means: Float64Array;
  /** conditional covariance of Z, piles x piles */
  readonly covariance: Float64Array;
  /** its lower Cholesky factor */
  readonly factor: Float64Array;
  /** second-order term given the deviations xi of the pile and its neighbours: constant, linear, quadratic (see `quadraticWidth`) */
  readonly quadratic: Float64Array;
  /** standard deviation of what the quadratic leaves out, one a pile */
  readonly residual: Float64Array;
}

/** A pile and up to four neighbours: 1 + 5 + 15 coefficients. */
export const quadraticWidth = 21;

/**
 * Moments of all piles given the design value.
 *
 * @param model      ground under the piles
 * @param holes      what the holes say of it
 * @param design     distribution of the design value
 * @param deviation  ln design value less its mean
 * @param lengths    design length of each pile, m
 */
export function nodeMoments(model: SiteModel, holes: HoleCovariance, design: DesignDistribution, deviation: number, lengths: Float64Array): NodeMoments {
  const { plan, family } = model;
  const n = plan.piles.length;
  const count = family.lengths.length;
  const starts = new Int32Array(n);
  const weights = new Float64Array(n * 4);
  interpolation(family.logLengths, lengths, starts, weights);
  const means = new Float64Array(n);
  const c = new Float64Array(n);
  const perVariance = design.variance > 0 ? 1 / design.variance : 0;
  for (let i = 0; i < n; i++) {
    let stiffness = 0;
    for (let q = 0; q < 4; q++) {
      const k = starts[i] + q;
      stiffness += weights[i * 4 + q] * model.lnStiffness[k];
      c[i] += weights[i * 4 + q] * holes.design[i * count + k];
    }
    means[i] = stiffness + c[i] * deviation * perVariance;
  }
  const covariance = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      const base = plan.distanceOf[i * n + j] * count * count;
      let sum = 0;
      for (let p = 0; p < 4; p++) {
        const row = base + (starts[i] + p) * count + starts[j];
        const wp = weights[i * 4 + p];
        for (let q = 0; q < 4; q++) sum += wp * weights[j * 4 + q] * model.covariance[row + q];
      }
      covariance[i * n + j] = covariance[j * n + i] = sum - c[i] * c[j] * perVariance;
    }
  }
  if (design.bend !== 0 && perVariance > 0) bendCovariance(covariance, holes, design.bend * deviation * perVariance, starts, weights, n, count);
  const factor = Float64Array.from(covariance);
  choleskyInPlace(factor, n, 1e-9);
  const { quadratic, residual } = secondOrder(model, holes, lengths, starts, weights, c, covariance, deviation, perVariance);
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
    const found = lagrangeWeights(grid, Math.min(Math.max(Math.log(lengths[i]), grid[0]), grid[grid.length - 1]));
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
  const columns = holes.groupShares.length;
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
      for (let g = 0; g < columns; g++) sum += holes.groupShares[g] * seen[i * columns + g] * seen[j * columns + g];
      gram[i * n + j] = sum;
    }
    if (covariance[i * n + i] > 0) lambda = Math.max(lambda, gram[i * n + i] / covariance[i * n + i]);
  }
  const scale = lambda > 0 ? -Math.expm1(-lambda * q) / lambda : q;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      covariance[i * n + j] -= scale * gram[i * n + j];
      covariance[j * n + i] = covariance[i * n + j];
    }
  }
}

/** E[Q | deviations of the pile and its neighbours, design value] as a quadratic, and the standard deviation of the rest. */
function secondOrder(
  model: SiteModel, holes: HoleCovariance, lengths: Float64Array, starts: Int32Array, weights: Float64Array,
  c: Float64Array, covariance: Float64Array, deviation: number, perVariance: number,
): { quadratic: Float64Array; residual: Float64Array } {
  const { plan, family } = model;
  const n = plan.piles.length;
  const count = family.lengths.length;
  const forms = family.formIndices.length;
  const quadratic = new Float64Array(n * quadraticWidth);
  const residual = new Float64Array(n);
  const formGrid = family.formLogLengths;
  for (let i = 0; i < n; i++) {
    const near = plan.nearby[i];
    const m = near.length;
    const local = new Float64Array(m * m);
    for (let a = 0; a < m; a++) for (let b = 0; b <= a; b++) local[a * m + b] = covariance[near[a] * n + near[b]];
    choleskyInPlace(local, m, 1e-9);
    const form = lagrangeWeights(formGrid, Math.min(Math.max(Math.log(lengths[i]), formGrid[0]), formGrid[forms - 1]));
    const at = i * quadraticWidth;
    let restVariance = 0;
    const t = new Float64Array(m);
    for (let b = 0; b < 2; b++) {
      const { tables } = model.nodes[b];
      const cross = model.curveCovariance[b];
      for (let f = 0; f < forms; f++) {
        const share = model.shares[b] * form.weights[f];
        let rest = model.groundVariance * tables.traces[f] + model.regionalVariance * tables.uniformForms[f];
        restVariance += share * model.groundVariance ** 2 * tables.restVariances[f];
        for (let r = 0; r < ranks; r++) {
          const value = tables.values[f * ranks + r];
          const sum = tables.curveSums[f * ranks + r];
          const own = model.groundVariance + model.regionalVariance * sum ** 2;
          rest -= value * own;
          const toDesign = holes.curves[b][(i * forms + f) * ranks + r];
          for (let a = 0; a < m; a++) {
            const j = near[a];
            const base = ((plan.distanceOf[i * n + j] * forms + f) * ranks + r) * count + starts[j];
            let covarianceWithZ = 0;
            for (let q = 0; q < 4; q++) covarianceWithZ += weights[j * 4 + q] * cross[base + q];
            t[a] = covarianceWithZ - toDesign * c[j] * perVariance;
          }
          const explained = solveInPlace(local, m, t);
          const left = Math.max(own - toDesign ** 2 * perVariance - explained, 0);
          const shift = toDesign * deviation * perVariance;
          const factor = share * value;
          quadratic[at] += factor * (shift ** 2 + left);
          let next = at + 6;
          for (let a = 0; a < m; a++) {
            quadratic[at + 1 + a] += 2 * factor * shift * t[a];
            for (let e = 0; e < a; e++) quadratic[next++] += 2 * factor * t[a] * t[e];
            quadratic[next++] += factor * t[a] ** 2;
          }
          restVariance += share * value ** 2 * (2 * left ** 2 + 4 * left * Math.max(own - left, 0));
        }
        quadratic[at] += share * rest;
      }
    }
    residual[i] = Math.sqrt(Math.max(restVariance, 0));
  }
  return { quadratic, residual };
}

/** Replaces t by A^-1 t with A's factor (zero pivots give zero) and returns t' A^-1 t. */
function solveInPlace(factor: Float64Array, m: number, t: Float64Array): number {
  let explained = 0;
  for (let a = 0; a < m; a++) {
    let sum = t[a];
    for (let e = 0; e < a; e++) sum -= factor[a * m + e] * t[e];
    const pivot = factor[a * m + a];
    t[a] = pivot > 0 ? sum / pivot : 0;
    explained += t[a] ** 2;
  }
  for (let a = m - 1; a >= 0; a--) {
    let sum = t[a];
    for (let e = a + 1; e < m; e++) sum -= factor[e * m + a] * t[e];
    const pivot = factor[a * m + a];
    t[a] = pivot > 0 ? sum / pivot : 0;
  }
  return explained;
}
