import type { DamagePoint } from "../costs/damage.js";
import type { Interaction } from "./group-interaction.js";
import type { Plan } from "./plan.js";
import { quadraticWidth } from "./second-order-terms.js";
import type { NodeMoments } from "./node-moments.js";

/**
 * What happens to surprises where they are found while piling: all of them are lengthened. Found one by one, each by its own chance, they would
 * stand beside neighbours left to settle, and finding more would triple the damage before it lowers it: crews that see one short pile look at the rest.
 */
export interface FoundSurprises {
  /** ln stiffness that makes the settlement allowable, one a pile */
  readonly needed: Float64Array;
  /** gain of E ln K from the design length to design length plus tolerance, and to the longest length, one a pile */
  readonly toTolerance: Float64Array;
  readonly toLongest: Float64Array;
  /** place of a pile's length among those of the interaction's table: as designed, and lengthened where ln K is this at the design length */
  designPlace(pile: number): number;
  builtPlace(pile: number, lnStiffness: number): number;
}

/** Draws the largest angular distortion of a plan, one block of draws after another, in room that is made once. */
export interface DistortionDraws {
  /** largest distortion of each draw of the last block, nothing found */
  readonly distortion: Float64Array;
  /** the same with all surprises found and lengthened, and how many they were; stale where none is looked for */
  readonly foundDistortion: Float64Array;
  readonly surprises: Float64Array;
  /**
   * Draws a block.
   *
   * @param moments      of the piles at the design values
   * @param values       dimensions x block: a standard normal a pile for the ground, one a pile for the rest of the second-order term
   * @param found        undefined where no surprise is looked for
   * @param interaction  how piles settle each other; left out where each stands alone
   */
  draw(moments: NodeMoments, values: Float64Array, found: FoundSurprises | undefined, interaction?: Interaction): void;
}

/** Loops run along the draws of a block, because there the numbers lie next to each other. */
export function distortionDraws(plan: Plan, block: number): DistortionDraws {
  const n = plan.piles.length;
  const xi = new Float64Array(n * block);
  const lnStiffness = new Float64Array(block);
  const row = new Float64Array(block);
  const settlement = new Float64Array(n * block);
  const lengthened = new Float64Array(n * block);
  const together = new Float64Array(n * block);
  const places = new Float64Array(n * block);
  const distortion = new Float64Array(block);
  const foundDistortion = new Float64Array(block);
  const surprises = new Float64Array(block);
  return {
    distortion,
    foundDistortion,
    surprises,
    draw(moments, values, found, interaction) {
      const { means, factor, residual } = moments;
      surprises.fill(0);
      xi.fill(0);
      for (let i = 0; i < n; i++) addRows(xi, i * block, factor, i * n, i + 1, values, block);
      for (let i = 0; i < n; i++) {
        const constant = means[i] + moments.quadratic[i * quadraticWidth];
        for (let m = 0, a = i * block, z = (n + i) * block; m < block; m++, a++, z++) lnStiffness[m] = constant + xi[a] + residual[i] * values[z];
        addQuadratic(lnStiffness, row, moments, i, plan.nearby[i], xi);
        const { load } = plan.piles[i];
        const at = i * block;
        for (let m = 0; m < block; m++) settlement[at + m] = load * Math.exp(-lnStiffness[m]);
        if (found === undefined) continue;
        if (interaction !== undefined) places.fill(found.designPlace(i), at, at + block);
        for (let m = 0; m < block; m++) {
          lengthened[at + m] = settlement[at + m];
          if (lnStiffness[m] + found.toTolerance[i] >= found.needed[i]) continue;
          // Lengthened until the settlement is allowable, or to the longest length where that is not enough.
          lengthened[at + m] = load * Math.exp(-Math.min(found.needed[i], lnStiffness[m] + found.toLongest[i]));
          if (interaction !== undefined) places[at + m] = found.builtPlace(i, lnStiffness[m]);
          surprises[m]++;
        }
      }
      if (interaction === undefined) {
        largestDistortion(plan, settlement, block, distortion);
        if (found !== undefined) largestDistortion(plan, lengthened, block, foundDistortion);
        return;
      }
      const factors = interaction.factors(moments.lengths);
      together.fill(0);
      for (let i = 0; i < n; i++) addRows(together, i * block, factors, i * n, n, settlement, block);
      largestDistortion(plan, together, block, distortion);
      if (found === undefined) return;
      interaction.settleDraws(lengthened, places, block, together);
      largestDistortion(plan, together, block, foundDistortion);
    },
  };
}

function largestDistortion(plan: Plan, settlement: Float64Array, block: number, out: Float64Array): void {
  out.fill(0);
  for (const pair of plan.pairs) {
    const a = pair.first * block;
    const b = pair.second * block;
    const inverse = 1 / pair.distance;
    for (let m = 0; m < block; m++) {
      const d = Math.abs(settlement[a + m] - settlement[b + m]) * inverse;
      if (d > out[m]) out[m] = d;
    }
  }
}

/** Adds to a row of draws the rows of a table times as many factors, four at a time: each pass over the draws costs more than its sums. */
function addRows(out: Float64Array, to: number, factors: Float64Array, first: number, count: number, table: Float64Array, block: number): void {
  let k = 0;
  for (; k + 3 < count; k += 4) {
    const f0 = factors[first + k], f1 = factors[first + k + 1], f2 = factors[first + k + 2], f3 = factors[first + k + 3];
    const z0 = k * block, z1 = z0 + block, z2 = z1 + block, z3 = z2 + block;
    for (let m = 0; m < block; m++) out[to + m] += f0 * table[z0 + m] + f1 * table[z1 + m] + f2 * table[z2 + m] + f3 * table[z3 + m];
  }
  for (; k < count; k++) {
    const f = factors[first + k];
    for (let m = 0, z = k * block; m < block; m++) out[to + m] += f * table[z + m];
  }
}

/** A term of the quadratic whose typical size is below this changes a settlement by less than 0.01 %. */
const negligible = 1e-4;

/** Adds the linear and quadratic terms of a pile's and its neighbours' deviations. */
function addQuadratic(out: Float64Array, row: Float64Array, moments: NodeMoments, pile: number, near: readonly number[], xi: Float64Array): void {
  const { quadratic, covariance, means } = moments;
  const n = means.length;
  const block = out.length;
  const at = pile * quadraticWidth;
  let next = at + 6;
  for (let a = 0; a < near.length; a++) {
    const variance = covariance[near[a] * n + near[a]];
    const linear = quadratic[at + 1 + a];
    let used = Math.abs(linear) * Math.sqrt(variance) > negligible;
    row.fill(linear);
    for (let e = 0; e <= a; e++) {
      const factor = quadratic[next++];
      if (Math.abs(factor) * Math.sqrt(variance * covariance[near[e] * n + near[e]]) <= negligible) continue;
      used = true;
      for (let m = 0, x = near[e] * block; m < block; m++, x++) row[m] += factor * xi[x];
    }
    if (!used) continue;
    for (let m = 0, x = near[a] * block; m < block; m++, x++) out[m] += row[m] * xi[x];
  }
}

/** Smallest distortion at which something is lost; Infinity where nothing ever is. */
export function damageThreshold(damage: readonly DamagePoint[]): number {
  for (let k = 0; k < damage.length; k++) {
    if (damage[k].share > 0) return k === 0 || damage[k - 1].share > 0 ? damage[k].distortion : damage[k - 1].distortion;
  }
  return Infinity;
}
