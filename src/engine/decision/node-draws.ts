import type { DamagePoint } from "../costs/damage.js";
import { kernels } from "../numerics/chosen-kernels.js";
import { exponential } from "../numerics/exponential.js";
import type { Kernels, Room } from "../numerics/kernels.js";
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

/** Draws that are looked at together: their rows stay in the nearest memory. */
const together = 128;
/** Places of the rows that the kernel `settle` reads: the rest's, a pile's and four neighbours'. */
const placesWidth = 6;
/** Its numbers: load, residual, and the quadratic, whose constant is with the mean. */
const numbersWidth = 2 + quadraticWidth;

/**
 * Loops run along the draws, because there the numbers lie next to each other.
 *
 * @param block  draws a block, even
 * @param using  the kernels
 */
export function distortionDraws(plan: Plan, block: number, using: Kernels = kernels()): DistortionDraws {
  const n = plan.piles.length;
  const distortion = new Float64Array(block);
  const foundDistortion = new Float64Array(block);
  const surprises = new Float64Array(block);
  const places = new Float64Array(n * Math.min(block, together));
  return {
    distortion,
    foundDistortion,
    surprises,
    draw(moments, values, found, interaction) {
      const factors = interaction?.factors(moments.lengths);
      surprises.fill(0);
      for (let from = 0; from < block; from += together) {
        const draws = Math.min(block - from, together);
        const at = layOut(n, plan.pairs.length, draws);
        const room = using.room(at.end);
        const { doubles } = room;
        if (draws === block) doubles.set(values, at.values);
        else for (let d = 0; d < 2 * n; d++) doubles.set(values.subarray(d * block + from, d * block + from + draws), at.values + d * draws);
        doubles.set(moments.factor, at.factors);
        doubles.fill(0, at.ground, at.ground + n * draws);
        for (let i = 0; i < n; i++) using.addRows(at.ground + i * draws, at.factors + i * n, i + 1, at.values, draws);
        writeTables(room, at, plan, moments, draws);
        const ofDraws = surprises.subarray(from);
        for (let i = 0; i < n; i++) {
          using.settle(at.ln, at.settlement + i * draws, at.numbers + i * numbersWidth, at.places + (i * placesWidth) / 2, draws);
          if (found === undefined) continue;
          if (interaction !== undefined) places.fill(found.designPlace(i), i * draws, (i + 1) * draws);
          lengthen(doubles, at, i, draws, plan.piles[i].load, found, ofDraws, interaction === undefined ? undefined : places);
        }
        let settled = at.settlement;
        if (factors !== undefined) {
          doubles.set(factors, at.factors);
          doubles.fill(0, at.grouped, at.grouped + n * draws);
          for (let i = 0; i < n; i++) using.addRows(at.grouped + i * draws, at.factors + i * n, n, at.settlement, draws);
          settled = at.grouped;
        }
        using.largestDistortion(at.largest, settled, at.pairs, plan.pairs.length, draws);
        distortion.set(doubles.subarray(at.largest, at.largest + draws), from);
        if (found === undefined) continue;
        settled = at.lengthened;
        if (interaction !== undefined) {
          const rows = n * draws;
          interaction.settleDraws(doubles.subarray(settled, settled + rows), places, draws, doubles.subarray(at.grouped, at.grouped + rows));
          settled = at.grouped;
        }
        using.largestDistortion(at.largest, settled, at.pairs, plan.pairs.length, draws);
        foundDistortion.set(doubles.subarray(at.largest, at.largest + draws), from);
      }
    },
  };
}

/** Where everything stands in the kernels' memory, behind one another. */
interface Places {
  readonly values: number;
  readonly factors: number;
  readonly ground: number;
  readonly numbers: number;
  readonly places: number;
  readonly pairs: number;
  readonly ln: number;
  readonly settlement: number;
  readonly lengthened: number;
  readonly grouped: number;
  readonly largest: number;
  readonly end: number;
}

function layOut(n: number, pairs: number, draws: number): Places {
  const rows = n * draws;
  const factors = 2 * rows;
  const ground = factors + n * n;
  const numbers = ground + rows;
  const places = numbers + n * numbersWidth;
  const ofPairs = places + (n * placesWidth) / 2;
  const ln = ofPairs + 2 * pairs;
  const settlement = ln + draws;
  const lengthened = settlement + rows;
  const grouped = lengthened + rows;
  const largest = grouped + rows;
  return { values: 0, factors, ground, numbers, places, pairs: ofPairs, ln, settlement, lengthened, grouped, largest, end: largest + draws };
}

/** What the kernels are told of each pile and each pair. */
function writeTables({ doubles, ints }: Room, at: Places, plan: Plan, { means, quadratic, residual }: NodeMoments, draws: number): void {
  const n = means.length;
  for (let i = 0; i < n; i++) {
    const number = at.numbers + i * numbersWidth;
    doubles[number] = plan.piles[i].load;
    doubles[number + 1] = residual[i];
    for (let k = 0, q = i * quadraticWidth; k < quadraticWidth; k++) doubles[number + 2 + k] = quadratic[q + k];
    doubles[number + 2] += means[i];
    doubles[number + 3] += 1; // the pile is the first of its neighbours: its own deviation itself
    const place = 2 * at.places + i * placesWidth;
    ints[place] = at.values + (n + i) * draws;
    // Where a neighbour is missing the pile stands in for it, times zero.
    for (let a = 0; a < placesWidth - 1; a++) ints[place + 1 + a] = at.ground + (plan.nearby[i][a] ?? i) * draws;
  }
  plan.pairs.forEach(({ first, second, distance }, k) => {
    ints[2 * (at.pairs + 2 * k)] = first;
    ints[2 * (at.pairs + 2 * k) + 1] = second;
    doubles[at.pairs + 2 * k + 1] = 1 / distance;
  });
}

/** Settlements of a pile with its surprises lengthened until the settlement is allowable, or to the longest length where that is not enough. */
function lengthen(
  doubles: Float64Array, at: Places, pile: number, draws: number, load: number, found: FoundSurprises, surprises: Float64Array, places: Float64Array | undefined,
): void {
  const row = pile * draws;
  const { ln: lnAt, settlement, lengthened } = at;
  const needed = found.needed[pile];
  const toTolerance = found.toTolerance[pile];
  const toLongest = found.toLongest[pile];
  doubles.copyWithin(lengthened + row, settlement + row, settlement + row + draws);
  for (let m = 0; m < draws; m++) {
    const ln = doubles[lnAt + m];
    if (ln + toTolerance >= needed) continue;
    doubles[lengthened + row + m] = load * exponential(-Math.min(needed, ln + toLongest));
    if (places !== undefined) places[row + m] = found.builtPlace(pile, ln);
    surprises[m]++;
  }
}

/** Smallest distortion at which something is lost; Infinity where nothing ever is. */
export function damageThreshold(damage: readonly DamagePoint[]): number {
  for (let k = 0; k < damage.length; k++) {
    if (damage[k].share > 0) return k === 0 || damage[k - 1].share > 0 ? damage[k].distortion : damage[k - 1].distortion;
  }
  return Infinity;
}
