import { designLengths } from "../decision/design-lengths.js";
import { requireDomain } from "../numerics/domain-error.js";
import { logarithm } from "../numerics/logarithm.js";
import { stream, type Stream } from "../random/stream.js";
import { elementStiffness, formStiffness, scaleField } from "./ground-under-piles.js";
import { outcomeColumns, priceOutcome, type BuiltPiles, type RealisedPiles } from "./outcome.js";
import type { Simulation } from "./prepare.js";
import { drawErrors } from "./readings.js";
import { neededLogLength } from "./stiffness-curve.js";
import { lnDesignValuesRead } from "./variant.js";

/** First number of a stream's path: the two kinds of realisation are drawn apart, so that neither knows the other's numbers. */
const elementsKind = 0;
const formKind = 1;
/** Last number of the path; 0 to 3 are the field's. */
const errorsPart = 4;
const levelPart = 5;

/** Numbers that one model gives in one realisation: variants x counts x `outcomeColumns`. */
function outcomeSize({ task }: Simulation): number {
  return task.variants.length * task.counts.length * outcomeColumns.length;
}

/**
 * One realisation with finite elements under every pile, and the second-order form in the same ground beside it.
 *
 * @param index  number of the realisation, whole, from 0; with the task it fixes the outcome, whatever was simulated before
 * @returns      outcomes by finite elements, then by the form, each variants x counts x columns
 * @throws {DomainError} the index is none
 */
export function simulateElements(simulation: Simulation, index: number): Float64Array {
  const realised = realise(simulation, elementsKind, index);
  const { ground, field, byForm, byElements } = simulation;
  elementStiffness(ground, field.underPiles, realised.level, byForm, byElements);
  const size = outcomeSize(simulation);
  const out = new Float64Array(2 * size);
  const built = buildings(simulation, realised.level);
  price(simulation, built, byElements, out, 0);
  price(simulation, built, byForm, out, size);
  return out;
}

/**
 * One realisation by the second-order form alone, about a hundredth of the work.
 *
 * @param index  number of the realisation, whole, from 0; apart from those with finite elements
 * @returns      outcomes, variants x counts x columns
 * @throws {DomainError} the index is none
 */
export function simulateForm(simulation: Simulation, index: number): Float64Array {
  const realised = realise(simulation, formKind, index);
  const out = new Float64Array(outcomeSize(simulation));
  price(simulation, buildings(simulation, realised.level), simulation.byForm, out, 0);
  return out;
}

/** Draws ground and errors into the simulation's room, and the piles' stiffness by the form. */
function realise(simulation: Simulation, kind: number, index: number): { level: number } {
  requireDomain(Number.isInteger(index) && index >= 0, "Number of the realisation", index, "a whole number, 0 or above");
  const { task, ground, field, errors, byForm } = simulation;
  const numbers = (part: number): Stream => stream(task.seed, kind, index, part);
  field.draw(numbers);
  scaleField(ground, field.underPiles);
  drawErrors(errors, numbers(errorsPart));
  const level = Math.sqrt(ground.profile.regionalVariance) * numbers(levelPart).normal();
  formStiffness(ground, field.underPiles, level, byForm);
  return { level };
}

/** What every variant with every count builds on its readings, variant by variant. */
function buildings({ task, plan, variants, field, errors }: Simulation, level: number): BuiltPiles[] {
  return variants.flatMap((variant) =>
    task.counts.map((_, c) => designLengths(variant.problem, plan, lnDesignValuesRead(variant, c, field.inHoles, level, errors), variant.counts[c].ofPile, "built")),
  );
}

/** Prices all variants and counts in the ground as one model has it. */
function price({ task, plan, ground, variants, interaction }: Simulation, built: readonly BuiltPiles[], lnStiffness: Float64Array, out: Float64Array, at: number): void {
  const { logLengths } = ground;
  const { building, piles } = variants[0].problem;
  const from = logLengths[0];
  const to = Math.max(from, Math.min(logarithm(piles.longest), logLengths[logLengths.length - 1]));
  const neededLog = Float64Array.from(plan.piles, ({ load }, i) => neededLogLength(logLengths, lnStiffness, i, from, to, logarithm(load / building.allowableSettlement)));
  const realised: RealisedPiles = { logLengths, lnStiffness, neededLog };
  built.forEach((b, k) => {
    const { problem } = variants[Math.floor(k / task.counts.length)];
    priceOutcome(problem, plan, b, realised, problem.piles.groupInteraction ? interaction : undefined, out, at + k * outcomeColumns.length);
  });
}
