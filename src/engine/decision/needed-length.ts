import { logarithm } from "../numerics/logarithm.js";
import { normalDistribution } from "../numerics/normal.js";
import { lagrangeWeights } from "../numerics/lagrange.js";
import type { HoleCovariance } from "./hole-covariance.js";
import type { SiteModel } from "./site-model.js";
import { ranks } from "./structure-tables.js";

/**
 * Law of the head stiffness of one pile by trial length: ln K = base + Z + curve (Var Z - Z^2) + rest, with Z and rest normal.
 * Kept on lengths in even steps of the logarithm; all piles are alike, only what the holes say of them differs.
 */
export interface LengthLaws {
  readonly logLengths: Float64Array;
  readonly base: Float64Array;
  readonly variance: Float64Array;
  readonly curve: Float64Array;
  readonly restVariance: Float64Array;
}

const steps = 33;

/** Laws over the family's range of lengths. */
export function lengthLaws(model: SiteModel): LengthLaws {
  const { family } = model;
  const count = family.lengths.length;
  const first = family.logLengths[0];
  const step = (family.logLengths[count - 1] - first) / (steps - 1);
  const laws: LengthLaws = {
    logLengths: Float64Array.from({ length: steps }, (_, s) => Math.min(first + s * step, family.logLengths[count - 1])),
    base: new Float64Array(steps), variance: new Float64Array(steps), curve: new Float64Array(steps), restVariance: new Float64Array(steps),
  };
  for (let s = 0; s < steps; s++) lawAt(model, laws, s);
  return laws;
}

function lawAt(model: SiteModel, laws: LengthLaws, s: number): void {
  const { family } = model;
  const count = family.lengths.length;
  const forms = family.formIndices.length;
  const x = laws.logLengths[s];
  const { start, weights } = lagrangeWeights(family.logLengths, x);
  for (let p = 0; p < 4; p++) {
    laws.base[s] += weights[p] * model.lnStiffness[start + p];
    for (let q = 0; q < 4; q++) laws.variance[s] += weights[p] * weights[q] * model.covariance[(start + p) * count + start + q];
  }
  const variance = laws.variance[s];
  const form = lagrangeWeights(family.formLogLengths, x);
  for (let b = 0; b < 2; b++) {
    const { tables } = model.nodes[b];
    for (let f = 0; f < forms; f++) {
      const share = model.shares[b] * form.weights[f];
      laws.base[s] += share * (model.groundVariance * tables.traces[f] + model.regionalVariance * tables.uniformForms[f]);
      laws.restVariance[s] += share * model.groundVariance ** 2 * tables.restVariances[f];
      for (let r = 0; r < ranks; r++) {
        const at = f * ranks + r;
        const value = tables.values[at];
        const own = model.groundVariance + model.regionalVariance * tables.curveSums[at] ** 2;
        let withZ = 0;
        for (let q = 0; q < 4; q++) withZ += weights[q] * model.curveCovariance[b][at * count + start + q];
        const slope = variance > 0 ? withZ / variance : 0;
        laws.curve[s] += share * value * slope ** 2;
        laws.restVariance[s] += share * 2 * value ** 2 * (own ** 2 - (slope * withZ) ** 2);
      }
    }
  }
  laws.restVariance[s] = Math.max(laws.restVariance[s], 0);
  laws.curve[s] = -laws.curve[s];
}

/** E ln K at a length, the second-order term's mean included. */
export function expectedLnStiffness(laws: LengthLaws, length: number): number {
  const { at, t } = place(laws, length);
  return between(laws.base, at, t);
}

/** Place of a length among the laws' lengths, 0 for the first. */
export function placeOfLength(laws: LengthLaws, length: number): number {
  const { at, t } = place(laws, length);
  return at + t;
}

/** The law at one trial length, with the place of the length among the family's. */
export interface TrialLength {
  readonly start: number;
  readonly weights: Float64Array;
  /** ln stiffness at which the pile would be just right, in terms of Z; NaN-free: -Infinity where none is needed, Infinity where none is enough */
  readonly threshold: number;
  readonly variance: number;
  readonly restVariance: number;
}

/**
 * The law at a trial length against a needed stiffness; the same for all piles of one load.
 *
 * @param laws    of the site
 * @param model   ground under the piles
 * @param length  trial length, m
 * @param needed  ln stiffness that makes the settlement allowable
 */
export function trialLength(laws: LengthLaws, model: SiteModel, length: number, needed: number): TrialLength {
  const { at, t } = place(laws, length);
  const variance = between(laws.variance, at, t);
  const curve = between(laws.curve, at, t);
  const gap = needed - between(laws.base, at, t) - curve * variance;
  let threshold = gap;
  if (Math.abs(curve) > 1e-9) {
    // Lower root of gap = z - curve z^2: beyond the parabola's top no ground is stiff enough.
    const root = 1 - 4 * curve * gap;
    threshold = root <= 0 ? (curve > 0 ? Infinity : -Infinity) : (1 - Math.sqrt(root)) / (2 * curve);
  }
  const grid = model.family.logLengths;
  const { start, weights } = lagrangeWeights(grid, clamp(logarithm(length), grid[0], grid[grid.length - 1]));
  return { start, weights, threshold, variance, restVariance: between(laws.restVariance, at, t) };
}

/**
 * Chance that a pile is softer than needed at a trial length, given the design values.
 *
 * @param trial    of `trialLength`
 * @param lengths  number of lengths of the family
 * @param holes    what the design values say of the ground
 * @param pile     index of the pile
 * @param normals  the normals behind the design values
 */
export function chanceTooSoft(trial: TrialLength, lengths: number, holes: HoleCovariance, pile: number, normals: Float64Array): number {
  const { size } = holes;
  let mean = 0;
  let variance = trial.variance;
  for (let s = 0; s < size; s++) {
    let toNormal = 0;
    for (let q = 0; q < 4; q++) toNormal += trial.weights[q] * holes.design[(pile * lengths + trial.start + q) * size + s];
    mean += toNormal * normals[s];
    variance -= toNormal ** 2;
  }
  const spread = Math.sqrt(Math.max(variance, 0) + trial.restVariance);
  if (spread === 0 || !Number.isFinite(trial.threshold)) return mean < trial.threshold ? 1 : 0;
  return normalDistribution((trial.threshold - mean) / spread);
}

function place(laws: LengthLaws, length: number): { at: number; t: number } {
  const first = laws.logLengths[0];
  const step = laws.logLengths[1] - first;
  const x = clamp((logarithm(length) - first) / step, 0, steps - 1);
  const at = Math.min(Math.floor(x), steps - 2);
  return { at, t: x - at };
}

function between(values: Float64Array, at: number, t: number): number {
  return (1 - t) * values[at] + t * values[at + 1];
}

function clamp(x: number, low: number, high: number): number {
  return Math.min(Math.max(x, low), high);
}
