import { concreteCarbon, investigationCost } from "../costs/prices.js";
import { hypotenuse } from "../numerics/hypotenuse.js";
import { normalQuantile } from "../numerics/normal.js";
import { requireDomain } from "../numerics/domain-error.js";
import { percentile as percentileOf, weightedPercentile } from "../numerics/percentile.js";
import { readingDepths } from "../investigation/reading-depths.js";
import type { Assessment } from "./assessment.js";
import { designedClasses, designLengths } from "./design-lengths.js";
import { lnDesignValues, outerNodes } from "./design-law.js";
import { drawnOutcome, type DrawnOutcome } from "./drawn-outcome.js";
import { holeCovariance } from "./hole-covariance.js";
import { preparedSite } from "./prepared-site.js";
import { outcomeCosts, pricedOutcome } from "./priced-outcome.js";
import type { Problem } from "./problem.js";
import { Remembered } from "./remembered.js";

/**
 * Relative scatter of the fast failure cost about finite elements, and the part of it that does not cancel between two counts of
 * one site; see test/study/accuracy.md.
 */
const modelScatter = 0.02;

const outcomes = new Remembered<Assessment>(4000);

/**
 * What one number of holes costs in expectation.
 *
 * @param problem  the whole question
 * @param count    number of holes, a whole number from 0
 * @returns        expected costs in the problem's money, see `Assessment`
 * @throws {DomainError} the count is not a whole number, or above the hole list
 */
export function assess(problem: Problem, count: number): Assessment {
  requireCount(count);
  return outcomes.get(`${count}${keyOf(problem)}`, () => {
    const drawn = drawnOf(problem, count);
    const priced = pricedOutcome(problem, drawn);
    const investigation = investigationPrice(problem, count);
    const { foundation, failure, delay, failureChance, surprises, totalMetres, samplingError } = priced;
    return {
      count, investigation, foundation, failure, delay,
      total: investigation + foundation + failure + delay,
      standardError: hypotenuse(samplingError, modelScatter * failure),
      failureChance,
      carbon: concreteCarbon(problem.prices, problem.piles.diameter, totalMetres),
      surprises, tooShortChance: drawn.tooShortChance, totalMetres,
    };
  });
}

/** Price of an investigation: mobilisation, holes, metres, readings, report and waiting; nothing for no holes. */
export function investigationPrice(problem: Problem, count: number): number {
  requireCount(count);
  const { readingSpacing, holeDepth } = problem.investigation;
  return investigationCost(problem.prices, count, holeDepth, readingDepths(readingSpacing, holeDepth).length);
}

/**
 * Percentile of foundation, failure and delay cost together above its median: what to set aside.
 *
 * @param percentile  0 to 100
 * @returns           money; negative below the median
 * @throws {DomainError} an argument is out of range
 */
export function contingency(problem: Problem, count: number, percentile: number): number {
  requireCount(count);
  requireDomain(percentile > 0 && percentile < 100, "Percentile", percentile, "above 0 and below 100");
  const { costs, weights } = outcomeCosts(problem, drawnOf(problem, count));
  return weightedPercentile(costs, weights, percentile) - weightedPercentile(costs, weights, 50);
}

/** Percentiles of pile lengths. Where all piles follow one design value their lengths move together, and every row is one design. */
export interface LengthTable {
  readonly percentiles: readonly number[];
  /** piles of equal load, heaviest first, with their (mean) length at each percentile, m */
  readonly groups: readonly { readonly load: number; readonly piles: number; readonly lengths: readonly number[] }[];
  readonly meanLength: readonly number[];
  readonly totalMetres: readonly number[];
}

/**
 * Pile lengths at percentiles of the design value.
 *
 * @param percentiles  each above 0 and below 100; a high percentile is a long pile
 * @throws {DomainError} an argument is out of range
 */
export function pileLengthTable(problem: Problem, count: number, percentiles: readonly number[]): LengthTable {
  requireCount(count);
  for (const p of percentiles) requireDomain(p > 0 && p < 100, "Percentile", p, "above 0 and below 100");
  const { plan } = preparedSite(problem).model;
  const sizes = Array.from(plan.loads, (_, c) => plan.loadOf.filter((of) => of === c).length);
  const lengthsOf = sampledLengths(problem, count);
  const groups = sizes.map((piles, c) => ({
    load: plan.loads[c],
    piles,
    lengths: lengthsOf(percentiles, (lengths) => lengths.reduce((sum, length, i) => sum + (plan.loadOf[i] === c ? length : 0), 0) / piles),
  }));
  const meanLength = lengthsOf(percentiles, (lengths) => lengths.reduce((sum, length) => sum + length, 0) / lengths.length);
  return { percentiles, groups, meanLength, totalMetres: meanLength.map((mean) => mean * plan.piles.length) };
}

/** Percentiles of a quantity of the pile lengths: exact for one design value, from a quasi-random set for one a hole. */
function sampledLengths(problem: Problem, count: number): (percentiles: readonly number[], quantity: (lengths: Float64Array) => number) => number[] {
  const site = preparedSite(problem);
  const { plan } = site.model;
  const law = site.design(count);
  if (law.size <= 1) {
    return (percentiles, quantity) =>
      percentiles.map((p) => {
        // Soft readings make long piles: the percentile of length is the opposite one of the design value.
        const { byLoad } = designedClasses(problem, plan, law.mean - (law.size === 0 ? 0 : normalQuantile(p / 100) * law.root[0]), "built");
        return quantity(Float64Array.from(plan.loadOf, (c) => byLoad[c]));
      });
  }
  const nodes = outerNodes(law, problem.seed);
  const designs = Array.from(nodes.weights, (_, node) => {
    const normals = nodes.normals.subarray(node * law.size, (node + 1) * law.size);
    return designLengths(problem, plan, lnDesignValues(law, normals), law.ofPile, "built").lengths;
  });
  return (percentiles, quantity) => {
    const values = designs.map(quantity);
    return percentiles.map((p) => percentileOf(values, p));
  };
}

/**
 * Percentile of the length of one pile, or of the mean length of all piles.
 *
 * @param pile  place in the pile list from 1; left out: the mean length, which times the number of piles is the job's metres
 * @returns     m
 * @throws {DomainError} an argument is out of range
 */
export function pileLengthPercentile(problem: Problem, count: number, percentile: number, pile?: number): number {
  if (pile === undefined) return pileLengthTable(problem, count, [percentile]).meanLength[0];
  requireCount(count);
  requireDomain(percentile > 0 && percentile < 100, "Percentile", percentile, "above 0 and below 100");
  const piles = problem.building.piles.length;
  requireDomain(Number.isInteger(pile) && pile >= 1 && pile <= piles, "Pile", pile, `a whole number from 1 to ${piles}`);
  return sampledLengths(problem, count)([percentile], (lengths) => lengths[pile - 1])[0];
}

/** What happens to the piles, remembered without prices: a sensitivity to prices or damage costs sums only. */
function drawnOf(problem: Problem, count: number): DrawnOutcome {
  return drawn.get(`${count}${physicalKey(problem)}`, () => {
    const site = preparedSite(problem);
    const law = site.design(count);
    return drawnOutcome(problem, site.model, holeCovariance(site.model, site.layout(count), law), law);
  });
}
const drawn = new Remembered<DrawnOutcome>(200);

function requireCount(count: number): void {
  requireDomain(Number.isInteger(count) && count >= 0, "Number of holes", count, "a whole number, 0 or above");
}

const keys = new WeakMap<Problem, string>();
function keyOf(problem: Problem): string {
  let key = keys.get(problem);
  if (key === undefined) keys.set(problem, (key = JSON.stringify(problem)));
  return key;
}

const physicalKeys = new WeakMap<Problem, string>();
/** Everything that what happens depends on: all but prices, building value, damage list and how large the share found is. */
function physicalKey(problem: Problem): string {
  let key = physicalKeys.get(problem);
  if (key === undefined) {
    const { ground, building, piles, investigation, delay, seed } = problem;
    const { piles: plan, footprint, allowableSettlement } = building;
    key = JSON.stringify([ground, plan, footprint, allowableSettlement, piles, investigation, delay.surpriseTolerance, delay.foundShare > 0, seed]);
    physicalKeys.set(problem, key);
  }
  return key;
}
