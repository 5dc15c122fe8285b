import { damageShare } from "../costs/damage.js";
import { foundationCost } from "../costs/prices.js";
import { hypotenuse } from "../numerics/hypotenuse.js";
import type { DrawnOutcome } from "./drawn-outcome.js";
import { damageThreshold } from "./node-draws.js";
import type { Problem } from "./problem.js";

/** Blocks of draws, and of nodes where these are sampled too, whose scatter gives the standard error. */
const replicates = 4;

/** Expected outcome of one count in money, apart from the investigation itself. */
export interface PricedOutcome {
  readonly foundation: number;
  readonly failure: number;
  readonly delay: number;
  readonly failureChance: number;
  readonly surprises: number;
  readonly totalMetres: number;
  /** standard error from the scatter of the draws: of the failure cost, and where design values are sampled of all costs; money */
  readonly samplingError: number;
}

/** Puts prices, building value and damage list to what happened: sums only. */
export function pricedOutcome(problem: Problem, drawn: DrawnOutcome): PricedOutcome {
  const { building } = problem;
  const { weights, drawsPerNode } = drawn;
  const threshold = damageThreshold(building.damage);
  const found = problem.delay.foundShare;
  const sum = { foundation: 0, failure: 0, delay: 0, failureChance: 0, surprises: 0, metres: 0 };
  const byDraws = new Float64Array(replicates);
  const byNodes = new Float64Array(replicates);
  for (let node = 0; node < weights.length; node++) {
    const weight = weights[node];
    const foundation = foundationCost(problem.prices, building.piles.length, drawn.metres[node]);
    const delay = delayAt(problem, drawn, node);
    sum.foundation += weight * foundation;
    sum.metres += weight * drawn.metres[node];
    sum.surprises += weight * drawn.surprises[node];
    sum.delay += weight * delay;
    const share = weight / drawsPerNode;
    const nodeBlock = Math.floor((node * replicates) / weights.length);
    byNodes[nodeBlock] += replicates * weight * (foundation + delay);
    const lose = (part: number, distortion: number, m: number): void => {
      if (part === 0 || distortion <= threshold) return;
      const loss = building.value * damageShare(building.damage, distortion) * part * share;
      sum.failure += loss;
      sum.failureChance += part * share;
      byDraws[Math.floor((m * replicates) / drawsPerNode)] += replicates * loss;
      byNodes[nodeBlock] += replicates * loss;
    };
    for (let m = 0, at = node * drawsPerNode; m < drawsPerNode; m++, at++) {
      lose(1 - found, drawn.distortion[at], m);
      if (found > 0) lose(found, drawn.foundDistortion[at], m);
    }
  }
  return {
    foundation: sum.foundation, failure: sum.failure, delay: sum.delay, failureChance: Math.min(sum.failureChance, 1),
    surprises: sum.surprises, totalMetres: sum.metres, samplingError: hypotenuse(errorOfMean(byDraws), drawn.isSampled ? errorOfMean(byNodes) : 0),
  };
}

function errorOfMean(values: Float64Array): number {
  const mean = values.reduce((total, value) => total + value, 0) / values.length;
  return Math.sqrt(values.reduce((total, value) => total + (value - mean) ** 2, 0) / (values.length * (values.length - 1)));
}

/** Foundation, failure and delay cost of each draw and its weight: each draw once with its surprises found, once without. */
export function outcomeCosts(problem: Problem, drawn: DrawnOutcome): { costs: Float64Array; weights: Float64Array } {
  const { building } = problem;
  const { drawsPerNode } = drawn;
  const found = problem.delay.foundShare;
  const draws = drawn.distortion.length;
  const costs = new Float64Array(found > 0 ? 2 * draws : draws);
  const weights = new Float64Array(costs.length);
  for (let node = 0; node < drawn.weights.length; node++) {
    const foundation = foundationCost(problem.prices, building.piles.length, drawn.metres[node]);
    const expected = found * drawn.surprises[node];
    const each = expected > 0 ? delayAt(problem, drawn, node) / expected : 0;
    for (let m = 0, at = node * drawsPerNode; m < drawsPerNode; m++, at++) {
      const share = drawn.weights[node] / drawsPerNode;
      costs[at] = foundation + building.value * damageShare(building.damage, drawn.distortion[at]);
      weights[at] = (1 - found) * share;
      if (found === 0) continue;
      costs[draws + at] = foundation + building.value * damageShare(building.damage, drawn.foundDistortion[at]) + drawn.drawnSurprises[at] * each;
      weights[draws + at] = found * share;
    }
  }
  return { costs, weights };
}

/** Expected delay cost at a node: days and lengthening of the surprises that are found. */
function delayAt(problem: Problem, drawn: DrawnOutcome, node: number): number {
  const { delay, prices } = problem;
  return delay.foundShare * (drawn.surprises[node] * delay.daysPerSurprise * delay.dayCost + drawn.extensions[node] * prices.perPileMetre);
}
