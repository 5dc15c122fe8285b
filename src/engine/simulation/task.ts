import { investigationCost } from "../costs/prices.js";
import type { Problem } from "../decision/problem.js";
import { readingDepths } from "../investigation/reading-depths.js";
import { requireDomain } from "../numerics/domain-error.js";

/** One way to investigate and to design: same ground, building and piles as the other variants, its own investigation, length rule, group interaction and prices. */
export interface SimulationVariant {
  readonly name: string;
  readonly problem: Problem;
}

/** What is to be simulated. Plain data: equal tasks give equal realisations. */
export interface SimulationTask {
  readonly variants: readonly SimulationVariant[];
  /** numbers of holes, whole, from 0 */
  readonly counts: readonly number[];
  readonly seed: string;
}

/**
 * Refuses a task whose variants do not share one realised ground.
 *
 * @throws {DomainError} nothing to simulate, a count that is none, or variants of different ground, piles or buildings
 */
export function requireTask({ variants, counts }: SimulationTask): void {
  requireDomain(variants.length > 0, "Number of variants", 0, "at least 1");
  requireDomain(counts.length > 0, "Number of counts", 0, "at least 1");
  for (const count of counts) requireDomain(Number.isInteger(count) && count >= 0, "Number of holes", count, "a whole number, 0 or above");
  requireDomain(new Set(counts).size === counts.length, "Counts", counts.join(", "), "each named once");
  const first = shared(variants[0].problem);
  for (const { name, problem } of variants) {
    requireDomain(problem.building.piles.length > 0, "Number of piles", 0, "at least 1");
    requireDomain(shared(problem) === first, `Ground, building or piles of "${name}"`, "another one", `that of "${variants[0].name}"; only investigation, design rule, length rule, group interaction and prices may differ`);
  }
}

/** What all variants have in common, as text. */
function shared({ ground, building, piles }: Problem): string {
  const { diameter, modulus, shortest, longest } = piles;
  return JSON.stringify([ground, building.piles, building.value, building.damage, building.allowableSettlement, diameter, modulus, shortest, longest]);
}

/** Price of a number of holes of a variant, money. */
export function investigationOf({ problem: { prices, investigation } }: SimulationVariant, count: number): number {
  const { readingSpacing, holeDepth } = investigation;
  return investigationCost(prices, count, holeDepth, readingDepths(readingSpacing, holeDepth).length);
}
