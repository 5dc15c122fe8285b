import { exponential } from "../numerics/exponential.js";
import { gaussLegendre } from "../numerics/gauss-legendre.js";
import { lagrangeWeights } from "../numerics/lagrange.js";
import { logarithm } from "../numerics/logarithm.js";
import { interactionFactor, type InteractingPile } from "../piles/interaction-factor.js";
import { groundProfile } from "./ground-profile.js";
import type { Plan } from "./plan.js";
import type { Problem } from "./problem.js";

/** How the piles of a plan settle each other: s_i = sum over j of alpha_ij P_j / K_j, with alpha_ii = 1. */
export interface Interaction {
  /**
   * Factors of all pairs.
   *
   * @param lengths  of the piles, m
   * @returns        alpha, piles x piles; symmetric, as reciprocity wants it, with ones on the diagonal
   */
  factors(lengths: Float64Array): Float64Array;
  /**
   * Settlements with what the other piles add.
   *
   * @param alone    settlement of each pile by its own load, m
   * @param lengths  of the piles, m
   * @returns        m; a new array
   */
  settle(alone: Float64Array, lengths: Float64Array): Float64Array;
  /**
   * The same for a block of draws in each of which piles have lengths of their own.
   *
   * @param alone   settlements, m, piles x block
   * @param places  of the lengths among those of the table, 0 for the first, piles x block
   * @param block   draws
   * @param out     receives the settlements, m, piles x block
   */
  settleDraws(alone: Float64Array, places: Float64Array, block: number, out: Float64Array): void;
}

/** The tip stands in the ground above it where a layer ends there. */
const aboveTip = 1 - 1e-9;

/**
 * Interaction of the piles of a problem, whether it asks for it or not. The factors are those of the median ground: they are ratios
 * of settlements, which the ground's variation about it changes little. Design lengths know nothing of it: a pile is designed, and found
 * too short, by its own settlement, as a load test would show it, and the group is added to that.
 *
 * @param problem     ground, piles
 * @param plan        of the problem's piles
 * @param logLengths  ln of lengths in m, even, at least 4, over all lengths that are asked for
 */
export function interactionOf({ ground, piles }: Problem, plan: Plan, logLengths: Float64Array): Interaction {
  const { poissonRatio: poisson } = ground;
  const radius = piles.diameter / 2;
  const profile = groundProfile(ground);
  const shear = (depth: number): number => (profile.modulus * profile.shape(depth)) / (2 * (1 + poisson));
  const { nodes, weights } = gaussLegendre(12);
  const average = (length: number): number => nodes.reduce((sum, node, q) => sum + weights[q] * shear(length * node), 0);
  const pileOf = (length: number): InteractingPile => {
    const tipShearModulus = shear(length * aboveTip);
    // A tip held by a thin stiff layer would put the reach of the shaft inside the pile.
    const least = (2 * radius) / (2.5 * (1 - poisson) * length);
    return { length, radius, tipShearModulus, averageRatio: Math.max(average(length) / tipShearModulus, least), poisson, pileModulus: piles.modulus };
  };
  return groupInteraction(logLengths, pileOf, plan.distances, plan.distanceOf);
}

/**
 * Interaction of all piles of a plan by superposing pairs. A pair of unequal lengths takes the factor of the length half way between in
 * the logarithm.
 *
 * @param logLengths  even in the logarithm, at least 4
 * @param pileOf      the pile at a length, m
 * @param distances   distinct distances of the plan, m, 0 first
 * @param distanceOf  class of each ordered pair, piles x piles
 * @source Poulos & Davis (1980), Pile foundation analysis and design: superposition of interaction factors
 */
export function groupInteraction(logLengths: Float64Array, pileOf: (length: number) => InteractingPile, distances: Float64Array, distanceOf: Int32Array): Interaction {
  const count = logLengths.length;
  const table = new Float64Array(distances.length * count);
  for (let k = 0; k < count; k++) {
    const pile = pileOf(exponential(logLengths[k]));
    // Piles that touch may stand a rounding nearer than they can.
    for (let d = 1; d < distances.length; d++) table[d * count + k] = interactionFactor(pile, Math.max(distances[d], 2 * pile.radius));
  }
  const eachPair = (lengths: Float64Array, use: (i: number, j: number, alpha: number) => void): void => {
    const n = lengths.length;
    const logs = lengths.map(logarithm);
    let last = Number.NaN;
    let start = 0;
    let weights: Float64Array = new Float64Array(4);
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < i; j++) {
        const between = (logs[i] + logs[j]) / 2;
        if (between !== last) {
          ({ start, weights } = lagrangeWeights(logLengths, between));
          last = between;
        }
        const at = distanceOf[i * n + j] * count + start;
        use(i, j, weights[0] * table[at] + weights[1] * table[at + 1] + weights[2] * table[at + 2] + weights[3] * table[at + 3]);
      }
    }
  };
  return {
    factors(lengths) {
      const n = lengths.length;
      const out = new Float64Array(n * n);
      for (let i = 0; i < n; i++) out[i * n + i] = 1;
      eachPair(lengths, (i, j, alpha) => {
        out[i * n + j] = out[j * n + i] = alpha;
      });
      return out;
    },
    settle(alone, lengths) {
      const settled = Float64Array.from(alone);
      eachPair(lengths, (i, j, alpha) => {
        settled[i] += alpha * alone[j];
        settled[j] += alpha * alone[i];
      });
      return settled;
    },
    settleDraws(alone, places, block, out) {
      const n = alone.length / block;
      out.set(alone);
      for (let i = 0; i < n; i++) {
        for (let j = 0; j < i; j++) {
          const row = distanceOf[i * n + j] * count;
          for (let m = 0, a = i * block, b = j * block; m < block; m++, a++, b++) {
            const between = Math.min((places[a] + places[b]) / 2, count - 1.000001);
            const k = Math.floor(between);
            const low = table[row + k];
            const alpha = low + (between - k) * (table[row + k + 1] - low);
            out[a] += alpha * alone[b];
            out[b] += alpha * alone[a];
          }
        }
      }
    },
  };
}
