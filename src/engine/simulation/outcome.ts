import { damageShare } from "../costs/damage.js";
import { foundationCost } from "../costs/prices.js";
import type { Interaction } from "../decision/group-interaction.js";
import type { Plan } from "../decision/plan.js";
import type { Problem } from "../decision/problem.js";
import { exponential } from "../numerics/exponential.js";
import { logarithm } from "../numerics/logarithm.js";
import { lnStiffnessAt } from "./stiffness-curve.js";

/**
 * What one realisation gives for one variant and count. Costs are money without the investigation, which is the same every time;
 * overDesign: metres beyond what the ground needed, of all piles; damaged: chance of any damage, since surprises are found or not;
 * tooShort: 1 or 0.
 */
export const outcomeColumns = ["foundation", "failure", "delay", "surprises", "overDesign", "totalMetres", "damaged", "tooShort"] as const;

/** The piles as one realised ground has them. */
export interface RealisedPiles {
  readonly logLengths: Float64Array;
  /** ln head stiffness, piles x lengths */
  readonly lnStiffness: Float64Array;
  /** ln of the shortest length that is stiff enough, one a pile; Infinity where none is */
  readonly neededLog: Float64Array;
}

/** What is built. */
export interface BuiltPiles {
  /** m, one a pile */
  readonly lengths: Float64Array;
  readonly metres: number;
  /** whether the predicted settlement is allowable for all */
  readonly allowable: boolean;
}

/**
 * Prices one realisation of one variant and count.
 *
 * A pile whose needed length exceeds the built one by more than the tolerance is a surprise. Surprises are found together, by the chance
 * `foundShare`, or not at all; found ones are lengthened until their settlement is allowable, or to the longest length. Both cases are priced and
 * weighed. Piles at the longest length cannot be lengthened: nothing on site tells them from the others.
 *
 * @param interaction  how piles settle each other, or undefined where each stands alone
 * @param out          receives the columns from `at` on
 */
export function priceOutcome(
  { building, delay, prices, piles }: Problem, plan: Plan, built: BuiltPiles, realised: RealisedPiles, interaction: Pick<Interaction, "settle"> | undefined, out: Float64Array, at: number,
): void {
  const { logLengths, lnStiffness, neededLog } = realised;
  const n = built.lengths.length;
  const settlements = new Float64Array(n);
  const lengthened = new Float64Array(n);
  const lengths = Float64Array.from(built.lengths);
  let delayCost = 0;
  let surprises = 0;
  let overDesign = 0;
  for (let i = 0; i < n; i++) {
    const { load } = plan.piles[i];
    const length = built.lengths[i];
    const needed = exponential(neededLog[i]);
    const trial = length + delay.surpriseTolerance;
    const needs = logarithm(load / building.allowableSettlement);
    if (needed < length) overDesign += length - needed;
    settlements[i] = lengthened[i] = load * exponential(-lnStiffnessAt(logLengths, lnStiffness, i, logarithm(length)));
    if (trial >= piles.longest || lnStiffnessAt(logLengths, lnStiffness, i, logarithm(trial)) >= needs) continue;
    surprises++;
    // Softer than needed at the trial length yet stiff enough at a shorter one: the curve dips, and the rig goes on to the end.
    lengths[i] = needed > trial && needed <= piles.longest ? needed : piles.longest;
    lengthened[i] = load * exponential(-lnStiffnessAt(logLengths, lnStiffness, i, logarithm(lengths[i])));
    delayCost += delay.daysPerSurprise * delay.dayCost + (lengths[i] - length) * prices.perPileMetre;
  }
  const found = surprises > 0 ? delay.foundShare : 0;
  const loss = (alone: Float64Array, builtLengths: Float64Array): number => {
    const settled = interaction === undefined ? alone : interaction.settle(alone, builtLengths);
    let distortion = 0;
    for (const { first, second, distance } of plan.pairs) distortion = Math.max(distortion, Math.abs(settled[first] - settled[second]) / distance);
    return building.value * damageShare(building.damage, distortion);
  };
  const left = loss(settlements, built.lengths);
  const putRight = found > 0 ? loss(lengthened, lengths) : 0;
  const failure = (1 - found) * left + found * putRight;
  out[at] = foundationCost(prices, n, built.metres);
  out[at + 1] = failure;
  out[at + 2] = found * delayCost;
  out[at + 3] = surprises;
  out[at + 4] = overDesign;
  out[at + 5] = built.metres;
  out[at + 6] = (left > 0 ? 1 - found : 0) + (putRight > 0 ? found : 0);
  out[at + 7] = built.allowable ? 0 : 1;
}
