import { normalQuantile } from "../numerics/normal.js";

const nodeCount = 32;
/** Wider than the standard normal, so that the tails, where damage happens, are not starved. */
const spread = 1.4;

/** Design values to condition on, as deviations of the logarithm from its mean, and their weights, which sum to 1. */
export interface OuterNodes {
  readonly deviations: Float64Array;
  readonly weights: Float64Array;
}

/**
 * Rule over a normal variable: the quantiles of a wider normal law, each weighted by the ratio of the densities.
 *
 * @param variance  of the log design value; 0 gives the one node at the mean
 */
export function outerNodes(variance: number): OuterNodes {
  if (variance === 0) return { deviations: Float64Array.of(0), weights: Float64Array.of(1) };
  const z = Float64Array.from({ length: nodeCount }, (_, k) => spread * normalQuantile((k + 0.5) / nodeCount));
  const weights = z.map((value) => Math.exp(-(value ** 2) / 2 + (value / spread) ** 2 / 2));
  const sum = weights.reduce((total, value) => total + value, 0);
  return { deviations: z.map((value) => value * Math.sqrt(variance)), weights: weights.map((value) => value / sum) };
}
