import { damageShare } from "../costs/damage.js";
import { foundationCost } from "../costs/prices.js";
import { gaussLegendre } from "../numerics/gauss-legendre.js";
import { lnDesignValues, outerNodes, totalDraws, type DesignLaw } from "./design-law.js";
import type { HoleCovariance } from "./hole-covariance.js";
import { nodeMoments } from "./node-moments.js";
import { chanceTooSoft, expectedLnStiffness, lengthLaws, type LengthLaws } from "./needed-length.js";
import { damageThreshold, drawDistortions, type FoundSurprises } from "./node-draws.js";
import { designLengths } from "./design-lengths.js";
import type { Problem } from "./problem.js";
import type { SiteModel } from "./site-model.js";

/** Blocks of draws whose scatter gives the standard error. */
const replicates = 4;

/** Expected outcome of one count, apart from the investigation itself. */
export interface Outcome {
  readonly foundation: number;
  readonly failure: number;
  readonly delay: number;
  readonly failureChance: number;
  readonly surprises: number;
  readonly tooShortChance: number;
  readonly totalMetres: number;
  /** standard error of failure and delay together from the scatter of the draws, money */
  readonly samplingError: number;
  /** foundation + failure + delay of each draw and its weight; empty unless asked for */
  readonly costs: Float64Array;
  readonly weights: Float64Array;
}

/**
 * Expected outcome by conditioning on the design value: an outer rule over it, and inside it the piles' ground by quasi-random draws.
 *
 * @param problem  prices, damage, loads
 * @param model    ground under the piles
 * @param holes    what the design values say of it
 * @param law      of the design values
 * @param draws    standard normals, dimension by dimension: 2 a pile, then uniforms, 1 a pile, where surprises are found
 * @param keep     whether each draw's cost is kept
 */
export function expectedOutcome(
  problem: Problem, model: SiteModel, holes: HoleCovariance, law: DesignLaw, draws: Float64Array, keep: boolean,
): Outcome {
  const { plan } = model;
  const n = plan.piles.length;
  const { building, delay, prices } = problem;
  const nodes = outerNodes(law, problem.seed);
  const { drawsPerNode } = nodes;
  const kept = keep ? nodes.weights.length * drawsPerNode : 0;
  const costs = new Float64Array(kept);
  const weights = new Float64Array(kept);
  const distortion = new Float64Array(drawsPerNode);
  const foundCount = new Float64Array(drawsPerNode);
  const threshold = damageThreshold(building.damage);
  const needed = Float64Array.from(plan.piles, (p) => Math.log(p.load / building.allowableSettlement));
  const sum = { foundation: 0, failure: 0, delay: 0, failureChance: 0, surprises: 0, tooShort: 0, metres: 0 };
  const replicate = new Float64Array(replicates);
  const laws = lengthLaws(model);
  for (let node = 0; node < nodes.weights.length; node++) {
    const weight = nodes.weights[node];
    const normals = nodes.normals.subarray(node * law.size, (node + 1) * law.size);
    const { lengths, metres, allowable } = designLengths(problem, plan, lnDesignValues(law, normals), law.ofPile);
    const bend = law.bend === 0 ? 0 : (law.bend * normals[0]) / law.root[0];
    const moments = nodeMoments(model, holes, normals, lengths, bend);
    const foundation = foundationCost(prices, n, metres);
    sum.foundation += weight * foundation;
    sum.metres += weight * metres;
    if (!allowable) sum.tooShort += weight;
    let surprises = 0;
    let extension = 0;
    for (let i = 0; i < n; i++) {
      const at = surpriseOf(problem, lengths[i], (length) => chanceTooSoft(laws, model, holes, i, length, normals, needed[i]));
      surprises += at.chance;
      extension += at.extension;
    }
    sum.surprises += weight * surprises;
    const perFound = delay.daysPerSurprise * delay.dayCost;
    const nodeDelay = delay.foundShare * (surprises * perFound + extension * prices.perPileMetre);
    sum.delay += weight * nodeDelay;
    const found = delay.foundShare > 0 ? foundSurprises(problem, moments.lengths, laws, needed) : undefined;
    drawDistortions(plan, moments, { values: draws, count: totalDraws, first: node * drawsPerNode, size: drawsPerNode }, found, distortion, foundCount);
    const each = surprises > 0 ? nodeDelay / (delay.foundShare * surprises || 1) : 0;
    for (let m = 0; m < drawsPerNode; m++) {
      const loss = distortion[m] > threshold ? building.value * damageShare(building.damage, distortion[m]) : 0;
      const share = weight / drawsPerNode;
      sum.failure += share * loss;
      if (loss > 0) sum.failureChance += share;
      replicate[Math.floor((m * replicates) / drawsPerNode)] += share * replicates * loss;
      if (keep) {
        costs[node * drawsPerNode + m] = foundation + loss + (found === undefined ? 0 : foundCount[m] * each);
        weights[node * drawsPerNode + m] = share;
      }
    }
  }
  const mean = replicate.reduce((total, value) => total + value, 0) / replicates;
  const scatter = replicate.reduce((total, value) => total + (value - mean) ** 2, 0) / (replicates * (replicates - 1));
  return {
    foundation: sum.foundation, failure: sum.failure, delay: sum.delay, failureChance: Math.min(sum.failureChance, 1), surprises: sum.surprises,
    tooShortChance: Math.min(sum.tooShort, 1), totalMetres: sum.metres, samplingError: Math.sqrt(scatter), costs, weights,
  };
}

/** Chance that a pile is a surprise, and the metres by which it would be lengthened. */
function surpriseOf(problem: Problem, length: number, tooSoft: (length: number) => number): { chance: number; extension: number } {
  const { longest } = problem.piles;
  const from = length + problem.delay.surpriseTolerance;
  // A pile at the longest length cannot be lengthened: nothing on site tells it from the others.
  const chance = from < longest ? tooSoft(from) : 0;
  if (problem.delay.foundShare === 0 || chance < 1e-9) return { chance, extension: 0 };
  return { chance, extension: problem.delay.surpriseTolerance * chance + integral(from, longest, tooSoft) };
}

/** Six-point Gauss rule in length. */
function integral(from: number, to: number, value: (length: number) => number): number {
  const { nodes, weights } = gaussLegendre(6);
  let sum = 0;
  for (let k = 0; k < nodes.length; k++) sum += weights[k] * value(from + (to - from) * nodes[k]);
  return sum * (to - from);
}

function foundSurprises(problem: Problem, lengths: Float64Array, laws: LengthLaws, needed: Float64Array): FoundSurprises {
  const n = lengths.length;
  const { longest } = problem.piles;
  const gain = (i: number, length: number): number => expectedLnStiffness(laws, length) - expectedLnStiffness(laws, lengths[i]);
  return {
    share: problem.delay.foundShare,
    needed,
    toTolerance: Float64Array.from({ length: n }, (_, i) => {
      const trial = lengths[i] + problem.delay.surpriseTolerance;
      return trial < longest ? gain(i, trial) : Infinity;
    }),
    toLongest: Float64Array.from({ length: n }, (_, i) => gain(i, longest)),
    dimension: 2 * n,
  };
}
