import { concreteCarbon, investigationCost } from "../costs/prices.js";
import { normalQuantile } from "../numerics/normal.js";
import { requireDomain } from "../numerics/domain-error.js";
import { weightedPercentile } from "../numerics/percentile.js";
import { readingDepths } from "../investigation/reading-depths.js";
import type { Assessment } from "./assessment.js";
import { designedClasses } from "./design-lengths.js";
import { expectedOutcome, type Outcome } from "./expected-outcome.js";
import { holeCovariance } from "./node-moments.js";
import { preparedSite } from "./prepared-site.js";
import type { Problem } from "./problem.js";
import { Remembered } from "./remembered.js";
import { standardDraws } from "./standard-draws.js";

/**
 * Relative scatter of the fast failure cost about finite elements, and the part of it that does not cancel between two counts of
 * one site; see the accuracy table that the study command writes.
 */
export const modelScatter = 0.02;

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
    const outcome = outcomeOf(problem, count, false);
    const investigation = investigationPrice(problem, count);
    const { foundation, failure, delay, failureChance, surprises, tooShortChance, totalMetres, samplingError } = outcome;
    return {
      count, investigation, foundation, failure, delay,
      total: investigation + foundation + failure + delay,
      standardError: Math.hypot(samplingError, modelScatter * failure),
      failureChance,
      carbon: concreteCarbon(problem.prices, problem.piles.diameter, totalMetres),
      surprises, tooShortChance, totalMetres,
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
  const { costs, weights } = outcomeOf(problem, count, true);
  return weightedPercentile(costs, weights, percentile) - weightedPercentile(costs, weights, 50);
}

/** Percentiles of pile lengths; all lengths move together with the one design value, so percentiles of lengths and of metres agree. */
export interface LengthTable {
  readonly percentiles: readonly number[];
  /** piles of equal load, heaviest first, with their length at each percentile, m */
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
  const site = preparedSite(problem);
  const { plan } = site.model;
  const design = site.design(count);
  const rows = percentiles.map((percentile) => {
    requireDomain(percentile > 0 && percentile < 100, "Percentile", percentile, "above 0 and below 100");
    // Soft readings make long piles: the percentile of length is the opposite one of the design value.
    return designedClasses(problem, plan, design.mean - normalQuantile(percentile / 100) * Math.sqrt(design.variance)).byLoad;
  });
  const sizes = Array.from(plan.loads, (_, c) => plan.loadOf.filter((of) => of === c).length);
  const totalMetres = rows.map((byLoad) => sizes.reduce((sum, size, c) => sum + size * byLoad[c], 0));
  return {
    percentiles,
    groups: sizes.map((piles, c) => ({ load: plan.loads[c], piles, lengths: rows.map((byLoad) => byLoad[c]) })),
    meanLength: totalMetres.map((total) => total / plan.piles.length),
    totalMetres,
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
  const table = pileLengthTable(problem, count, [percentile]);
  if (pile === undefined) return table.meanLength[0];
  const piles = problem.building.piles;
  requireDomain(Number.isInteger(pile) && pile >= 1 && pile <= piles.length, "Pile", pile, `a whole number from 1 to ${piles.length}`);
  return table.groups.find((group) => group.load === piles[pile - 1].load)!.lengths[0];
}

function outcomeOf(problem: Problem, count: number, keep: boolean): Outcome {
  const site = preparedSite(problem);
  const design = site.design(count);
  const holes = holeCovariance(site.model, site.layout(count), design);
  const piles = problem.building.piles.length;
  return expectedOutcome(problem, site.model, holes, design, standardDraws(piles, problem.delay.foundShare > 0, problem.seed), keep);
}

function requireCount(count: number): void {
  requireDomain(Number.isInteger(count) && count >= 0, "Number of holes", count, "a whole number, 0 or above");
}

const keys = new WeakMap<Problem, string>();
function keyOf(problem: Problem): string {
  let key = keys.get(problem);
  if (key === undefined) keys.set(problem, (key = JSON.stringify(problem)));
  return key;
}
