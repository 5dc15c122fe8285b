import type { DamagePoint } from "../costs/damage.js";
import type { Plan } from "./plan.js";
import { quadraticWidth } from "./second-order-terms.js";
import type { NodeMoments } from "./node-moments.js";

/** What happens to surprises that are found while piling. */
export interface FoundSurprises {
  readonly share: number;
  /** ln stiffness that makes the settlement allowable, one a pile */
  readonly needed: Float64Array;
  /** gain of E ln K from the design length to design length plus tolerance, and to the longest length, one a pile */
  readonly toTolerance: Float64Array;
  readonly toLongest: Float64Array;
}

/** Draws the largest angular distortion of a plan, one block of draws after another, in room that is made once. */
export interface DistortionDraws {
  /** largest distortion of each draw of the last block */
  readonly distortion: Float64Array;
  /** how many surprises were found in each draw of the last block; zero where none is looked for */
  readonly foundCount: Float64Array;
  /**
   * Draws a block.
   *
   * @param moments  of the piles at the design values
   * @param values   dimensions x block: a standard normal a pile for the ground, one a pile for the rest of the second-order term,
   *   and where surprises are found a uniform a pile
   * @param found    undefined where no surprise is found
   */
  draw(moments: NodeMoments, values: Float64Array, found: FoundSurprises | undefined): void;
}

/** Loops run along the draws of a block, because there the numbers lie next to each other. */
export function distortionDraws(plan: Plan, block: number): DistortionDraws {
  const n = plan.piles.length;
  const xi = new Float64Array(n * block);
  const lnStiffness = new Float64Array(block);
  const row = new Float64Array(block);
  const settlement = new Float64Array(n * block);
  const distortion = new Float64Array(block);
  const foundCount = new Float64Array(block);
  return {
    distortion,
    foundCount,
    draw(moments, values, found) {
      const { means, factor, residual } = moments;
      foundCount.fill(0);
      for (let i = 0; i < n; i++) {
        const out = xi.fill(0, i * block, (i + 1) * block).subarray(i * block, (i + 1) * block);
        for (let k = 0; k <= i; k++) addScaled(out, factor[i * n + k], values, k * block);
      }
      for (let i = 0; i < n; i++) {
        lnStiffness.fill(means[i]);
        addScaled(lnStiffness, 1, xi, i * block);
        addScaled(lnStiffness, residual[i], values, (n + i) * block);
        addQuadratic(lnStiffness, row, moments.quadratic, i, plan.nearby[i], xi);
        const { load } = plan.piles[i];
        const at = i * block;
        for (let m = 0; m < block; m++) settlement[at + m] = load * Math.exp(-lnStiffness[m]);
        if (found === undefined) continue;
        for (let m = 0; m < block; m++) {
          if (lnStiffness[m] + found.toTolerance[i] >= found.needed[i] || values[(2 * n + i) * block + m] >= found.share) continue;
          // Lengthened until the settlement is allowable, or to the longest length where that is not enough.
          settlement[at + m] = load * Math.exp(-Math.min(found.needed[i], lnStiffness[m] + found.toLongest[i]));
          foundCount[m]++;
        }
      }
      distortion.fill(0);
      for (const pair of plan.pairs) {
        const a = pair.first * block;
        const b = pair.second * block;
        const inverse = 1 / pair.distance;
        for (let m = 0; m < block; m++) {
          const d = Math.abs(settlement[a + m] - settlement[b + m]) * inverse;
          if (d > distortion[m]) distortion[m] = d;
        }
      }
    },
  };
}

function addScaled(out: Float64Array, scale: number, values: Float64Array, from: number): void {
  for (let m = 0; m < out.length; m++) out[m] += scale * values[from + m];
}

/** Adds the quadratic of a pile's and its neighbours' deviations. */
function addQuadratic(out: Float64Array, row: Float64Array, quadratic: Float64Array, pile: number, near: readonly number[], xi: Float64Array): void {
  const block = out.length;
  const at = pile * quadraticWidth;
  let next = at + 6;
  const constant = quadratic[at];
  for (let m = 0; m < block; m++) out[m] += constant;
  for (let a = 0; a < near.length; a++) {
    row.fill(quadratic[at + 1 + a]);
    for (let e = 0; e <= a; e++) addScaled(row, quadratic[next++], xi, near[e] * block);
    const from = near[a] * block;
    for (let m = 0; m < block; m++) out[m] += row[m] * xi[from + m];
  }
}

/** Smallest distortion at which something is lost; Infinity where nothing ever is. */
export function damageThreshold(damage: readonly DamagePoint[]): number {
  for (let k = 0; k < damage.length; k++) {
    if (damage[k].share > 0) return k === 0 || damage[k - 1].share > 0 ? damage[k].distortion : damage[k - 1].distortion;
  }
  return Infinity;
}
