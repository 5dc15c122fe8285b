import type { DamagePoint } from "../costs/damage.js";
import type { Plan } from "./plan.js";
import { quadraticWidth, type NodeMoments } from "./node-moments.js";

/** Independent numbers for a block of draws, dimension by dimension: `values[dimension * count + draw]`. */
export interface DrawBlock {
  readonly values: Float64Array;
  /** draws in all, the stride of a dimension */
  readonly count: number;
  /** first draw of the block and number of draws in it */
  readonly first: number;
  readonly size: number;
}

/** What happens to surprises that are found while piling. */
export interface FoundSurprises {
  readonly share: number;
  /** ln stiffness that makes the settlement allowable, one a pile */
  readonly needed: Float64Array;
  /** gain of E ln K from the design length to design length plus tolerance, and to the longest length, one a pile */
  readonly toTolerance: Float64Array;
  readonly toLongest: Float64Array;
  /** dimension at which the numbers (uniform) that decide finding begin */
  readonly dimension: number;
}

/**
 * Largest angular distortion of each draw, and how many surprises were found in it.
 *
 * @param plan       loads and neighbours
 * @param moments    of the piles at the design value
 * @param draws      standard normals: one a pile for the ground, then one a pile for the rest of the second-order term
 * @param found      undefined where no surprise is found
 * @param distortion receives one value a draw
 * @param foundCount receives one value a draw; untouched where `found` is undefined
 */
export function drawDistortions(
  plan: Plan, moments: NodeMoments, draws: DrawBlock, found: FoundSurprises | undefined, distortion: Float64Array, foundCount: Float64Array,
): void {
  const n = plan.piles.length;
  const { means, factor, quadratic, residual } = moments;
  const { values, count, first, size } = draws;
  const xi = new Float64Array(n);
  const settlement = new Float64Array(n);
  const loads = Float64Array.from(plan.piles, (p) => p.load);
  const near = flatten(plan);
  const { pairFirst, pairSecond, inverseDistance } = flatPairs(plan);
  for (let draw = 0; draw < size; draw++) {
    const column = first + draw;
    for (let i = 0; i < n; i++) {
      let sum = 0;
      for (let k = 0, at = column, row = i * n; k <= i; k++, at += count) sum += factor[row + k] * values[at];
      xi[i] = sum;
    }
    let foundHere = 0;
    for (let i = 0; i < n; i++) {
      const at = i * quadraticWidth;
      let second = quadratic[at];
      let next = at + 6;
      for (let a = 0, p = i * 5; a < 5 && near[p] >= 0; a++, p++) {
        const xa = xi[near[p]];
        let row = quadratic[at + 1 + a];
        for (let e = 0, q = i * 5; e <= a; e++, q++) row += quadratic[next++] * xi[near[q]];
        second += row * xa;
      }
      const lnStiffness = means[i] + xi[i] + second + residual[i] * values[(n + i) * count + column];
      let s = loads[i] * Math.exp(-lnStiffness);
      if (found !== undefined && lnStiffness + found.toTolerance[i] < found.needed[i] && values[(found.dimension + i) * count + column] < found.share) {
        // Lengthened until the settlement is allowable, or to the longest length where that is not enough.
        s = loads[i] * Math.exp(-Math.min(found.needed[i], lnStiffness + found.toLongest[i]));
        foundHere++;
      }
      settlement[i] = s;
    }
    let largest = 0;
    for (let p = 0; p < pairFirst.length; p++) {
      const d = Math.abs(settlement[pairFirst[p]] - settlement[pairSecond[p]]) * inverseDistance[p];
      if (d > largest) largest = d;
    }
    distortion[draw] = largest;
    if (found !== undefined) foundCount[draw] = foundHere;
  }
}

function flatten(plan: Plan): Int32Array {
  const near = new Int32Array(plan.piles.length * 5).fill(-1);
  plan.nearby.forEach((list, i) => list.forEach((j, a) => (near[i * 5 + a] = j)));
  return near;
}

function flatPairs(plan: Plan): { pairFirst: Int32Array; pairSecond: Int32Array; inverseDistance: Float64Array } {
  return {
    pairFirst: Int32Array.from(plan.pairs, (p) => p.first),
    pairSecond: Int32Array.from(plan.pairs, (p) => p.second),
    inverseDistance: Float64Array.from(plan.pairs, (p) => 1 / p.distance),
  };
}

/** Smallest distortion at which something is lost; Infinity where nothing ever is. */
export function damageThreshold(damage: readonly DamagePoint[]): number {
  for (let k = 0; k < damage.length; k++) {
    if (damage[k].share > 0) return k === 0 || damage[k - 1].share > 0 ? damage[k].distortion : damage[k - 1].distortion;
  }
  return Infinity;
}
