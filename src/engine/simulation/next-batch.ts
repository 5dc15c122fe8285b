import { positions } from "../decision/prepared-site.js";
import { requireDomain } from "../numerics/domain-error.js";
import { covarianceOf } from "./control-variate.js";
import { estimate, estimateRow, type EstimatedRow } from "./estimate.js";
import { solvesPerPile } from "./ground-under-piles.js";
import { mostRealisations, type Totals } from "./kept-rows.js";
import { rowSamples } from "./row-samples.js";
import type { SimulationTable } from "./simulation-table.js";
import { investigationOf, type SimulationTask } from "./task.js";

/** Where a run ends: an expected regret of the cheapest row (money), or a number of realisations by finite elements. */
export type SimulationTarget = { readonly regret: number } | { readonly realisations: number };

/** Realisations on which the first decision rests. */
const pilot: Totals = { elements: 16, form: 512 };
/** A run to a precision does not end on fewer: what a variance says of itself is too little before. */
const fewest = 24;
/** A run grows by at most this factor from one decision to the next, because the first ones know little. */
const growth = 2;
/** Realisations by the form for each by elements, at least. */
const leastForm = 4;
/** Work of all realisations by the form over that of all by elements, at most: who asks for a number means that number's time. */
const mostWork = { number: 3, precision: 10 };

/**
 * The next checkpoint of a run.
 *
 * @param elements  realisations so far, in order of the index; as many as the last checkpoint wanted
 * @param form      the same by the form alone
 * @param most      of each that a run may keep
 * @returns         totals at the next checkpoint, none smaller than before; "enough"; or "full" where a run may not keep what the
 *   precision needs. Nothing but the arguments decides, and with a number of realisations nothing but that number and the pilot's
 *   realisations: a run continued to more gives what one long run would have
 * @throws {DomainError} the target is no positive number
 */
export function nextBatch(task: SimulationTask, target: SimulationTarget, elements: readonly Float64Array[], form: readonly Float64Array[], most = mostRealisations(task)): Totals | "enough" | "full" {
  const done: Totals = { elements: elements.length, form: form.length };
  if ("realisations" in target) {
    const wanted = target.realisations;
    requireDomain(Number.isInteger(wanted) && wanted >= 2, "Number of realisations", wanted, "a whole number, 2 or above");
    const first: Totals = { elements: Math.min(pilot.elements, wanted), form: pilot.form };
    if (done.elements < first.elements || done.form < first.form) return largest(done, first);
    const { ratio } = split(task, elements.slice(0, first.elements), form.slice(0, first.form), mostWork.number);
    const last: Totals = { elements: wanted, form: Math.max(first.form, Math.min(Math.ceil(wanted * ratio), most.form)) };
    return done.elements >= last.elements && done.form >= last.form ? "enough" : largest(done, last);
  }
  requireDomain(target.regret > 0 && target.regret < Infinity, "Expected regret", target.regret, "a sum above 0");
  if (done.elements < pilot.elements || done.form < pilot.form) return largest(done, pilot);
  const table = estimate(task, elements, form);
  if (table.expectedRegret <= target.regret && done.elements >= fewest) return "enough";
  const { ratio, ofElements, ofForm } = split(task, elements, form, mostWork.precision);
  const factor = Math.min(Math.max(growthWanted(table, target.regret), 1.1), growth);
  // Totals n and N = ratio n that leave the variance of the decision divided by the factor.
  const now = ofElements / done.elements + ofForm / done.form;
  const variance = now / factor;
  const isFull = done.elements >= most.elements || (done.form >= most.form && ofForm / done.form >= now / growthWanted(table, target.regret));
  if (isFull) return "full";
  const unbound = variance > 0 ? (ofElements + ofForm / ratio) / variance : fewest;
  // What the form may not give for want of room, the elements must.
  const left = variance - ofForm / most.form;
  const n = unbound * ratio <= most.form ? unbound : left > 0 ? ofElements / left : Infinity;
  const next: Totals = {
    elements: Math.max(fewest, Math.min(Math.ceil(n), growth * done.elements, most.elements)),
    form: Math.min(Math.ceil(n * ratio), growth * growth * done.form, most.form),
  };
  const grown = largest(done, next);
  if (grown.elements + grown.form > done.elements + done.form) return grown;
  return { elements: done.elements + 1, form: Math.min(done.form + leastForm, most.form) };
}

/**
 * Factor by which all realisations must grow for the expected regret to fall to a target: regret falls as the standard errors do.
 *
 * @param table   of the realisations so far
 * @param regret  money, > 0
 */
export function growthWanted(table: SimulationTable, regret: number): number {
  return (table.expectedRegret / regret) ** 2;
}

/**
 * The regret at which a run ends where nobody says otherwise: the price of one hole more, the cheapest of the variants. Where holes
 * cost nothing, a thousandth of the building's value.
 */
export function usualRegret({ variants }: SimulationTask): number {
  const least = Math.min(...variants.map((variant) => investigationOf(variant, 2) - investigationOf(variant, 1)));
  return least > 0 ? least : variants[0].problem.building.value / 1000;
}

/**
 * Best number of realisations by the form for each by elements. What counts is the difference of each row from the cheapest, in
 * the measure in which it may be the cheapest itself: with variances a of what the form leaves and b of what it explains, and its
 * work w over that of elements, N / n = root(b / (a w)).
 *
 * @param most  work of the form over that of elements, at most
 */
function split(task: SimulationTask, elements: readonly Float64Array[], form: readonly Float64Array[], most: number): { ratio: number; ofElements: number; ofForm: number } {
  const count = task.variants.length * task.counts.length;
  const rows = Array.from({ length: count }, (_, k) => estimateRow(rowSamples(elements, form, k, count)));
  const { rows: table, cheapest } = estimate(task, elements, form);
  let ofElements = 0;
  let ofForm = 0;
  table.forEach(({ chanceCheapest }, k) => {
    const share = count === 1 ? 1 : k === cheapest ? 0 : chanceCheapest + 1e-6;
    const rival = count === 1 ? undefined : rows[cheapest];
    ofElements += share * varianceOfDifference((r) => r.unexplained, rows[k], rival);
    ofForm += share * varianceOfDifference((r) => r.explained, rows[k], rival);
  });
  const work = workRatio(task);
  const best = ofElements > 0 ? Math.sqrt(ofForm / (ofElements * work)) : most / work;
  return { ratio: Math.max(Math.min(best, most / work), leastForm), ofElements, ofForm };
}

function varianceOfDifference(part: (row: EstimatedRow) => Float64Array, row: EstimatedRow, other: EstimatedRow | undefined): number {
  const values = part(row);
  const difference = other === undefined ? values : values.map((value, i) => value - part(other)[i]);
  return covarianceOf(difference, difference);
}

/**
 * Work of a realisation by the form over that of one by elements, counted, not timed, so that it is the same on every machine:
 * multiplications of the roots, of the form and of the pricing, against those of the finite-element solutions. Within a third of
 * processor times measured for 2 to 12 piles and 3 to 13 counts.
 */
function workRatio({ variants, counts }: SimulationTask): number {
  const [{ problem }] = variants;
  const piles = problem.building.piles.length;
  const holes = counts.reduce((sum, count) => sum + positions(problem, count).length, 0);
  const terms = problem.ground.correlation === "ellipsoidal" ? 15 : 1;
  const depths = problem.investigation.holeDepth / problem.investigation.readingSpacing;
  const rings = 10 * piles;
  const field = terms * (rings + holes) * (60 * rings + depths * holes + 60 * depths);
  return Math.min((field + 4e5 * piles + 3e5 * variants.length * counts.length) / (piles * solvesPerPile * 8e6), 1);
}

function largest(a: Totals, b: Totals): Totals {
  return { elements: Math.max(a.elements, b.elements), form: Math.max(a.form, b.form) };
}
