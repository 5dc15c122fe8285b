import { concreteCarbon } from "../costs/prices.js";
import { requireDomain } from "../numerics/domain-error.js";
import { caution, controlledMean, covarianceOf, meanOf, type ControlledMean } from "./control-variate.js";
import { contest } from "./contest.js";
import { outcomeColumns } from "./outcome.js";
import { rowSamples, type RowSamples } from "./row-samples.js";
import type { SimulationRow, SimulationTable } from "./simulation-table.js";
import { investigationOf, type SimulationTask } from "./task.js";

/** Percentiles at which mean pile lengths are given. */
export const lengthPercentiles: readonly number[] = Array.from({ length: 19 }, (_, k) => 5 * (k + 1));

/** A share of a variance that is rounding alone. */
const nothing = 1e-12;

/** Columns whose sum is the cost of an outcome. */
const costColumns = [0, 1, 2];

/**
 * The table of all variants and counts from realisations. It depends on the lists and their order alone: parts of a run computed
 * anywhere and put together in order give what one run would have given, to the bit.
 *
 * @param elements  of `simulateElements`, in order of the index
 * @param form      of `simulateForm`, in order of the index; at least 2 of one kind
 * @returns         rows variant by variant; no value is infinite or no number
 * @throws {DomainError} there are fewer than 2 realisations of either kind, or they are of another task
 */
export function estimate(task: SimulationTask, elements: readonly Float64Array[], form: readonly Float64Array[]): SimulationTable {
  requireDomain(elements.length >= 2 || form.length >= 2, "Number of realisations", Math.max(elements.length, form.length), "at least 2");
  const count = task.variants.length * task.counts.length;
  const size = count * outcomeColumns.length;
  requireDomain(elements.every((row) => row.length === 2 * size) && form.every((row) => row.length === size), "A realisation", "one of another task", "of this task");
  const useful = elements.length >= 2 ? elements : [];
  const piles = task.variants[0].problem.building.piles.length;
  const estimated = Array.from({ length: count }, (_, k) => {
    const samples = rowSamples(useful, form, k, count);
    const seen = { elements: howManyAbove(samples.elements[6]), form: howManyAbove(samples.alone[6]) };
    return { ...estimateRow(samples), seen, meanLengths: meanLengthPercentiles(samples, piles) };
  });
  const covariance = totalCovariance(estimated, useful.length, form.length);
  const alternatives = task.variants.flatMap((variant, v) => task.counts.map((holes) => ({ v, variant, holes })));
  const investigation = alternatives.map(({ variant, holes }) => investigationOf(variant, holes));
  const totals = Float64Array.from(estimated, ({ means: [a, b, c] }, k) => investigation[k] + a.mean + b.mean + c.mean);
  const all = contest(totals, covariance);
  const within = task.variants.map((_, v) => contestWithin(totals, covariance, v * task.counts.length, task.counts.length));
  const cheapest = indexOfLeast(totals, 0, count);
  const rows = alternatives.map(({ v, variant, holes }, k): SimulationRow => {
    const [foundation, failure, delay, surprises, overDesign, totalMetres, damaged, tooShort] = estimated[k].means;
    const best = indexOfLeast(totals, v * task.counts.length, task.counts.length);
    const { unexplained, total, seen } = estimated[k];
    const plain = covarianceOf(total, total);
    const left = covarianceOf(unexplained, unexplained);
    return {
      variant: v, name: variant.name, count: holes, investigation: investigation[k],
      foundation: foundation.mean, failure: failure.mean, delay: delay.mean, total: totals[k],
      errors: { foundation: foundation.error, failure: failure.error, delay: delay.error },
      standardError: Math.sqrt(Math.max(covariance[k * count + k], 0)),
      failureChance: clamp(damaged.mean), failureChanceError: damaged.error,
      damageSeen: seen,
      failureChanceAtMost: seen.elements + seen.form === 0 ? Math.min(3 / (useful.length + form.length), 1) : undefined,
      carbon: concreteCarbon(variant.problem.prices, variant.problem.piles.diameter, totalMetres.mean),
      surprises: Math.max(surprises.mean, 0), overDesign: Math.max(overDesign.mean, 0), totalMetres: totalMetres.mean, tooShortChance: clamp(tooShort.mean),
      meanLengths: estimated[k].meanLengths,
      chanceCheapest: all.chances[k], regret: all.regrets[k],
      chanceWithin: within[v].chances[k - v * task.counts.length],
      notDistinguishable: totals[k] - totals[best] <= 2 * errorOfDifference(covariance, count, k, best),
      correlation: failure.correlation,
      varianceCut: left > nothing * plain ? plain / left : undefined,
    };
  });
  return { rows, cheapest, expectedRegret: all.regrets[cheapest], elements: elements.length, form: form.length };
}

/** What is estimated of one row: the mean of each column, and the two independent parts of the error of its cost. */
export interface EstimatedRow {
  readonly means: readonly ControlledMean[];
  /** cost by elements, n */
  readonly total: Float64Array;
  /** cost by elements less all that the form could explain, n */
  readonly unexplained: Float64Array;
  /** cost by elements less what the form explains, n */
  readonly residual: Float64Array;
  /** what the form explains, in the realisations by the form alone, N */
  readonly explained: Float64Array;
}

/** Estimates one row. The parts of its cost keep their own coefficients, so that they add up to the total. */
export function estimateRow(samples: RowSamples): EstimatedRow {
  const means = outcomeColumns.map((_, c) => controlledMean(samples.elements[c], samples.beside[c], samples.alone[c]));
  const total = new Float64Array(samples.elements[0].length);
  const residual = new Float64Array(total.length);
  const unexplained = new Float64Array(total.length);
  const explained = new Float64Array(samples.alone[0].length);
  for (const c of costColumns) {
    const { coefficient, slope } = means[c];
    for (let i = 0; i < residual.length; i++) {
      total[i] += samples.elements[c][i];
      residual[i] += samples.elements[c][i] - coefficient * samples.beside[c][i];
      unexplained[i] += samples.elements[c][i] - slope * samples.beside[c][i];
    }
    for (let i = 0; i < explained.length; i++) explained[i] += coefficient * samples.alone[c][i];
  }
  return { means, total, unexplained, residual, explained };
}

/** Covariance of the rows' estimated costs, which share their realisations. */
function totalCovariance(rows: readonly EstimatedRow[], n: number, many: number): Float64Array {
  const k = rows.length;
  const out = new Float64Array(k * k);
  const ofElements = n < 2 ? 0 : caution(n, many < 2 ? 1 : 2) / (n * (n - 1));
  const ofForm = many < 2 ? 0 : 1 / (many * (many - 1));
  const residuals = rows.map(({ residual }) => centred(residual));
  const explained = rows.map((row) => centred(row.explained));
  for (let i = 0; i < k; i++) {
    for (let j = 0; j <= i; j++) out[i * k + j] = out[j * k + i] = ofElements * product(residuals[i], residuals[j]) + ofForm * product(explained[i], explained[j]);
  }
  return out;
}

function centred(values: Float64Array): Float64Array {
  const mean = meanOf(values);
  return values.map((value) => value - mean);
}

function product(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

function contestWithin(totals: Float64Array, covariance: Float64Array, from: number, count: number): ReturnType<typeof contest> {
  const part = Float64Array.from({ length: count * count }, (_, at) => covariance[(from + Math.floor(at / count)) * totals.length + from + (at % count)]);
  return contest(totals.slice(from, from + count), part);
}

function errorOfDifference(covariance: Float64Array, k: number, i: number, j: number): number {
  return Math.sqrt(Math.max(covariance[i * k + i] + covariance[j * k + j] - 2 * covariance[i * k + j], 0));
}

/** Lengths do not depend on how piles are analysed: all realisations count. */
function meanLengthPercentiles(samples: RowSamples, piles: number): number[] {
  const metres = new Float64Array(samples.elements[5].length + samples.alone[5].length);
  metres.set(samples.elements[5]);
  metres.set(samples.alone[5], samples.elements[5].length);
  metres.sort();
  return lengthPercentiles.map((p) => ofSorted(metres, p) / piles);
}

/** The inclusive rule of `percentile` for values that are sorted once and asked many times. */
function ofSorted(sorted: Float64Array, p: number): number {
  const place = (p / 100) * (sorted.length - 1);
  const low = Math.floor(place);
  return sorted[low] + (place - low) * (sorted[Math.min(low + 1, sorted.length - 1)] - sorted[low]);
}

function indexOfLeast(values: Float64Array, from: number, count: number): number {
  let least = from;
  for (let k = from; k < from + count; k++) if (values[k] < values[least]) least = k;
  return least;
}

const clamp = (chance: number): number => Math.min(Math.max(chance, 0), 1);
/** Realisations with any chance of damage: the column holds a chance, since surprises may be found or not. */
const howManyAbove = (chances: Float64Array): number => chances.reduce((count, chance) => count + (chance > 0 ? 1 : 0), 0);
