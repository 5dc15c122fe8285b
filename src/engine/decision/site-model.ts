import { lagrangeWeights } from "../numerics/lagrange.js";
import { regressionSlope } from "../piles/slope-loss.js";
import { rowAtDistance } from "./distance-interpolation.js";
import { nodeStep, type PileFamily } from "./pile-family.js";
import type { Plan } from "./plan.js";
import { ranks, type StructureTables } from "./structure-tables.js";

/** One node of ground stiffness with its tables, looked up at the plan's own distances. */
export interface NodeTables {
  readonly tables: StructureTables;
  /** distance classes of the plan x lengths x lengths, unit field */
  readonly pairs: Float64Array;
  /** distance classes x forms x ranks x lengths, unit field */
  readonly curvePairs: Float64Array;
}

/** Looks the tables up at the distances of a plan. */
export function nodeTables(tables: StructureTables, plan: Plan, family: PileFamily): NodeTables {
  const lengths = family.lengths.length;
  const forms = family.formIndices.length;
  const pairs = new Float64Array(plan.distances.length * lengths * lengths);
  const curvePairs = new Float64Array(plan.distances.length * forms * ranks * lengths);
  plan.distances.forEach((distance, d) => {
    rowAtDistance(tables.coordinates, tables.pairs, lengths * lengths, distance, pairs, d * lengths * lengths);
    rowAtDistance(tables.coordinates, tables.curvePairs, forms * ranks * lengths, distance, curvePairs, d * forms * ranks * lengths);
  });
  return { tables, pairs, curvePairs };
}

/**
 * The ground under the piles as normal variables in the units of ln stiffness. For a pile of length k
 *   ln K = lnStiffness[k] + Z_k + Q_k,
 * with Z the linear term (own ground and site level) and Q the second-order one.
 */
export interface SiteModel {
  readonly plan: Plan;
  readonly family: PileFamily;
  /** the softer and the stiffer node, and the share of the latter */
  readonly nodes: readonly [NodeTables, NodeTables];
  readonly shares: readonly [number, number];
  readonly groundVariance: number;
  readonly regionalVariance: number;
  /** one a length */
  readonly lnStiffness: Float64Array;
  readonly slopes: Float64Array;
  readonly weightSums: Float64Array;
  /** Cov(Z_k, Z_l) at the plan's distances: classes x lengths x lengths */
  readonly covariance: Float64Array;
  /** per node, Cov(v, Z_k) at the plan's distances, v in the units of the log ground: classes x forms x ranks x lengths */
  readonly curveCovariance: readonly [Float64Array, Float64Array];
}

/** What the model needs of one problem's ground, the variances of logarithms. */
export interface GroundLevel {
  /** median reference modulus, kPa */
  readonly modulus: number;
  readonly groundVariance: number;
  readonly regionalVariance: number;
}

/** Scales the unit tables to one problem. Sums and products only: this is what a change of COV or mean costs. */
export function siteModel(plan: Plan, family: PileFamily, nodes: readonly [NodeTables, NodeTables], fraction: number, level: GroundLevel): SiteModel {
  const { groundVariance, regionalVariance } = level;
  const lengths = family.lengths.length;
  const { j } = family.locate(level.modulus);
  const soft = family.node(j);
  const stiff = family.node(j - 1);
  const shares: [number, number] = [1 - fraction, fraction];
  const lnStiffness = new Float64Array(lengths);
  const weightSums = new Float64Array(lengths);
  const slopes = new Float64Array(lengths);
  for (let k = 0; k < lengths; k++) {
    const a = soft.responses[k];
    const b = stiff.responses[k];
    lnStiffness[k] = hermite(a.lnStiffness, b.lnStiffness, a.weightSum * nodeStep, b.weightSum * nodeStep, fraction);
    weightSums[k] = shares[0] * a.weightSum + shares[1] * b.weightSum;
    const form = lagrangeWeights(family.formLogLengths, family.logLengths[k]).weights;
    let loss = 0;
    for (let f = 0; f < form.length; f++) loss += form[f] * (shares[0] * nodes[0].tables.slopeLosses[f] + shares[1] * nodes[1].tables.slopeLosses[f]);
    slopes[k] = regressionSlope(loss, groundVariance);
  }
  const classes = plan.distances.length;
  const covariance = new Float64Array(classes * lengths * lengths);
  for (let d = 0; d < classes; d++) {
    for (let k = 0; k < lengths; k++) {
      for (let l = 0; l < lengths; l++) {
        const at = (d * lengths + k) * lengths + l;
        const unit = shares[0] * nodes[0].pairs[at] + shares[1] * nodes[1].pairs[at];
        covariance[at] = groundVariance * slopes[k] * slopes[l] * unit + regionalVariance * weightSums[k] * weightSums[l];
      }
    }
  }
  const curveCovariance = nodes.map((node) => {
    const forms = family.formIndices.length;
    return node.curvePairs.map((unit, at) => {
      const k = at % lengths;
      const part = Math.floor(at / lengths) % (forms * ranks);
      return groundVariance * slopes[k] * unit + regionalVariance * weightSums[k] * node.tables.curveSums[part];
    });
  }) as unknown as [Float64Array, Float64Array];
  return { plan, family, nodes, shares, groundVariance, regionalVariance, lnStiffness, slopes, weightSums, covariance, curveCovariance };
}

/** Cubic Hermite value between two nodes with known slopes (per step), at a fraction of the step. */
function hermite(a: number, b: number, slopeA: number, slopeB: number, t: number): number {
  const u = 1 - t;
  return u * u * (1 + 2 * t) * a + t * t * (1 + 2 * u) * b + t * u * u * slopeA - t * t * u * slopeB;
}
