import { damageShare } from "../costs/damage.js";
import { foundationCost } from "../costs/prices.js";
import { normalDistribution } from "../numerics/normal.js";
import { gaussLegendre } from "../numerics/gauss-legendre.js";
import { lnDesignValues, outerNodes, type DesignLaw } from "./design-law.js";
import type { HoleCovariance } from "./hole-covariance.js";
import { nodeMoments } from "./node-moments.js";
import { chanceTooSoft, expectedLnStiffness, lengthLaws, trialLength, type LengthLaws, type TrialLength } from "./needed-length.js";
import { damageThreshold, distortionDraws, type FoundSurprises } from "./node-draws.js";
import { designLengths, softestAllowable } from "./design-lengths.js";
import type { Plan } from "./plan.js";
import type { Problem } from "./problem.js";
import { standardDraws } from "./standard-draws.js";
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
 * @param keep     whether each draw's cost is kept
 */
export function expectedOutcome(
  problem: Problem, model: SiteModel, holes: HoleCovariance, law: DesignLaw, keep: boolean,
): Outcome {
  const { plan } = model;
  const n = plan.piles.length;
  const { building, delay, prices } = problem;
  const nodes = outerNodes(law, problem.seed);
  const { drawsPerNode } = nodes;
  const kept = keep ? nodes.weights.length * drawsPerNode : 0;
  const costs = new Float64Array(kept);
  const weights = new Float64Array(kept);
  const finds = delay.foundShare > 0;
  const draws = standardDraws(n, finds, drawsPerNode, problem.seed);
  const width = (finds ? 3 : 2) * n * drawsPerNode;
  const { distortion, foundCount, draw } = distortionDraws(plan, drawsPerNode);
  const threshold = damageThreshold(building.damage);
  const needed = Float64Array.from(plan.piles, (p) => Math.log(p.load / building.allowableSettlement));
  const sum = { foundation: 0, failure: 0, delay: 0, failureChance: 0, surprises: 0, tooShort: 0, metres: 0 };
  const replicate = new Float64Array(replicates);
  const laws = lengthLaws(model);
  for (let node = 0; node < nodes.weights.length; node++) {
    const weight = nodes.weights[node];
    const normals = nodes.normals.subarray(node * law.size, (node + 1) * law.size);
    const { lengths, metres, allowable } = designLengths(problem, plan, lnDesignValues(law, normals), law.ofPile, "mean");
    const bend = law.bend === 0 ? 0 : (law.bend * normals[0]) / law.root[0];
    const moments = nodeMoments(model, holes, normals, lengths, bend);
    const foundation = foundationCost(prices, n, metres);
    sum.foundation += weight * foundation;
    sum.metres += weight * metres;
    if (!allowable) sum.tooShort += weight;
    const { surprises, extension } = surprisesAt(problem, model, laws, lengths, (trial, i) => chanceTooSoft(trial, model.slopes.length, holes, i, normals), needed);
    sum.surprises += weight * surprises;
    const perFound = delay.daysPerSurprise * delay.dayCost;
    const nodeDelay = delay.foundShare * (surprises * perFound + extension * prices.perPileMetre);
    sum.delay += weight * nodeDelay;
    draw(moments, draws.subarray(node * width, (node + 1) * width), finds ? foundSurprises(problem, moments.lengths, laws, needed) : undefined);
    const each = surprises > 0 ? nodeDelay / (delay.foundShare * surprises || 1) : 0;
    for (let m = 0; m < drawsPerNode; m++) {
      const loss = distortion[m] > threshold ? building.value * damageShare(building.damage, distortion[m]) : 0;
      const share = weight / drawsPerNode;
      sum.failure += share * loss;
      if (loss > 0) sum.failureChance += share;
      replicate[Math.floor((m * replicates) / drawsPerNode)] += share * replicates * loss;
      if (keep) {
        costs[node * drawsPerNode + m] = foundation + loss + foundCount[m] * each;
        weights[node * drawsPerNode + m] = share;
      }
    }
  }
  const mean = replicate.reduce((total, value) => total + value, 0) / replicates;
  const scatter = replicate.reduce((total, value) => total + (value - mean) ** 2, 0) / (replicates * (replicates - 1));
  return {
    foundation: sum.foundation, failure: sum.failure, delay: sum.delay, failureChance: Math.min(sum.failureChance, 1), surprises: sum.surprises,
    tooShortChance: tooShort(problem, plan, law, Math.min(sum.tooShort, 1)), totalMetres: sum.metres, samplingError: Math.sqrt(scatter), costs, weights,
  };
}

/** Chance that the longest length is not enough: in closed form for one design value, where few nodes would give it in steps. */
function tooShort(problem: Problem, plan: Plan, law: DesignLaw, sampled: number): number {
  if (law.size !== 1) return sampled;
  const limit = softestAllowable(problem, plan, law.mean);
  return Number.isFinite(limit) ? normalDistribution((limit - law.mean) / law.root[0]) : limit > 0 ? 1 : 0;
}

/** Expected number of surprises, and the metres by which they would be lengthened, at one set of design lengths. */
function surprisesAt(
  problem: Problem, model: SiteModel, laws: LengthLaws, lengths: Float64Array, tooSoft: (trial: TrialLength, pile: number) => number, needed: Float64Array,
): { surprises: number; extension: number } {
  const { longest } = problem.piles;
  const { surpriseTolerance, foundShare } = problem.delay;
  const { nodes, weights } = gaussLegendre(6);
  let surprises = 0;
  let extension = 0;
  const trials = new Map<number, { length: number; at: TrialLength[] }>();
  for (let i = 0; i < lengths.length; i++) {
    const from = lengths[i] + surpriseTolerance;
    // A pile at the longest length cannot be lengthened: nothing on site tells it from the others.
    if (from >= longest) continue;
    let trial = trials.get(needed[i]);
    if (trial === undefined || trial.length !== lengths[i]) {
      const steps = foundShare > 0 ? Array.from(nodes, (node) => from + (longest - from) * node) : [];
      trials.set(needed[i], (trial = { length: lengths[i], at: [from, ...steps].map((length) => trialLength(laws, model, length, needed[i])) }));
    }
    const chance = tooSoft(trial.at[0], i);
    surprises += chance;
    if (foundShare === 0 || chance < 1e-9) continue;
    extension += surpriseTolerance * chance;
    for (let q = 0; q < nodes.length; q++) extension += weights[q] * (longest - from) * tooSoft(trial.at[q + 1], i);
  }
  return { surprises, extension };
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
  };
}
