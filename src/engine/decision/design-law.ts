import { exponential } from "../numerics/exponential.js";
import { factorSemidefinite } from "../numerics/semidefinite-factor.js";
import { normalQuantile } from "../numerics/normal.js";
import { sobolNormals } from "../numerics/sobol.js";
import { stream } from "../random/stream.js";
import type { DesignDistribution } from "../investigation/design-distribution.js";

/** Joint law of the design values: one for all piles, or one a hole. ln D = mean + root e, with e independent standard normals. */
export interface DesignLaw {
  /** number of design values; 0 where nothing is random */
  readonly size: number;
  readonly mean: number;
  /** size x size, lower */
  readonly root: Float64Array;
  /** which design value each pile follows */
  readonly ofPile: Int32Array;
  readonly gain: number;
  /** see `DesignDistribution`; 0 for more than one design value */
  readonly bend: number;
}

/** Values of the normals to condition on, nodes x size, and the nodes' weights, which sum to 1. */
export interface OuterNodes {
  readonly normals: Float64Array;
  readonly weights: Float64Array;
  readonly drawsPerNode: number;
}

/** Draws in all, whatever the number of nodes. */
export const totalDraws = 4096;
const commonNodes = 32;
const nearestNodes = 256;
/** Wider than the standard normal, so that the tails, where damage happens, are not starved. */
const spread = 1.4;

/** One design value for all piles. */
export function commonLaw(design: DesignDistribution, piles: number): DesignLaw {
  const size = design.variance > 0 ? 1 : 0;
  return { size, mean: design.mean, root: Float64Array.of(Math.sqrt(design.variance)), ofPile: new Int32Array(piles), gain: design.gain, bend: design.bend };
}

/**
 * One design value a hole, each pile following the nearest one.
 *
 * @param single      distribution of the design value of a single hole
 * @param between     covariance of the log design values of two holes, holes x holes; its diagonal is replaced by the single variance
 * @param ofPile      nearest hole of each pile
 */
export function nearestLaw(single: DesignDistribution, between: Float64Array, holes: number, ofPile: Int32Array): DesignLaw {
  const root = Float64Array.from(between);
  for (let h = 0; h < holes; h++) root[h * holes + h] = single.variance;
  factorSemidefinite(root, holes, 1e-12);
  // Spread-based rules bend the covariance too, but for one value a hole that is left out: it is a small part of a small part.
  return { size: holes, mean: single.mean, root, ofPile, gain: single.gain, bend: 0 };
}

/**
 * Nodes to condition on. For one design value the quantiles of a wider normal law, each weighted by the ratio of the densities;
 * for several a quasi-random set.
 */
export function outerNodes(law: DesignLaw, seed: string): OuterNodes {
  if (law.size === 0) return { normals: new Float64Array(0), weights: Float64Array.of(1), drawsPerNode: totalDraws };
  if (law.size === 1) {
    const normals = Float64Array.from({ length: commonNodes }, (_, k) => spread * normalQuantile((k + 0.5) / commonNodes));
    const weights = normals.map((value) => exponential(-(value ** 2) / 2 + (value / spread) ** 2 / 2));
    const sum = weights.reduce((total, value) => total + value, 0);
    return { normals, weights: weights.map((value) => value / sum), drawsPerNode: totalDraws / commonNodes };
  }
  const columns = sobolNormals(law.size, nearestNodes, stream(seed, 3));
  const normals = Float64Array.from({ length: nearestNodes * law.size }, (_, at) => columns[(at % law.size) * nearestNodes + Math.floor(at / law.size)]);
  return { normals, weights: new Float64Array(nearestNodes).fill(1 / nearestNodes), drawsPerNode: totalDraws / nearestNodes };
}

/** Log design values at a node. */
export function lnDesignValues(law: DesignLaw, normals: Float64Array): Float64Array {
  if (law.size === 0) return Float64Array.of(law.mean);
  const values = new Float64Array(law.size);
  for (let s = 0; s < law.size; s++) {
    values[s] = law.mean;
    for (let p = 0; p <= s; p++) values[s] += law.root[s * law.size + p] * normals[p];
  }
  return values;
}
