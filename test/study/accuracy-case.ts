import { assessCounts, cheapestCount, estimate, outcomeColumns, prepareSimulation, simulateElements, simulateForm, type DesignRuleName, type SimulationTask } from "../../src/engine/index.js";
import { ninePiles, type Change } from "../engine/decision/example-problem.js";

/** One ground. */
export interface AccuracyCase {
  readonly label: string;
  readonly change: Change;
}

/** What one design rule shows in one ground. */
export interface AccuracyRow {
  readonly rule: DesignRuleName;
  /** expected failure cost over the counts, lowest and highest, money */
  readonly failure: readonly [number, number];
  /** the cells' failure cost over the simulation's, each count, with the standard errors of the ratio */
  readonly cells: readonly number[];
  readonly cellsError: readonly number[];
  /** failure cost of all counts together by the form over that by elements, in the same grounds, and its standard error */
  readonly form: number;
  readonly formError: number;
  /** of the failure cost of a count, lowest of all counts */
  readonly correlation: number;
  /** of the total, each count that has one */
  readonly cuts: readonly number[];
  readonly best: { readonly simulation: number; readonly cells: number };
  /** what the cells' best count costs more than the simulation's, money, and its standard error */
  readonly loss: number;
  readonly lossError: number;
}

/** Without the raw rules on nothing, which know the ground they are given exactly. */
export const COUNTS = [1, 2, 3, 4, 6, 9, 12, 16];
const RULES: readonly DesignRuleName[] = ["geometric", "harmonic", "quartile"];

/** Simulates one ground and compares the cells and the form with it. */
export function runAccuracy({ change }: AccuracyCase, seed: string, elements: number, form: number): AccuracyRow[] {
  const task: SimulationTask = { variants: RULES.map((rule) => ({ name: rule, problem: ninePiles({ ...change, rule }) })), counts: COUNTS, seed };
  const simulation = prepareSimulation(task);
  const byElements = Array.from({ length: elements }, (_, k) => simulateElements(simulation, k));
  const byForm = Array.from({ length: form }, (_, k) => simulateForm(simulation, k));
  const { rows } = estimate(task, byElements, byForm);
  const size = rows.length * outcomeColumns.length;
  return RULES.map((rule, v) => {
    const own = rows.filter((row) => row.variant === v);
    const cells = assessCounts(task.variants[v].problem, COUNTS);
    const failureAt = (offset: number): number[] => byElements.map((row) => own.reduce((sum, _, c) => sum + row[offset + (v * COUNTS.length + c) * outcomeColumns.length + 1], 0));
    const [y, x] = [failureAt(0), failureAt(size)];
    const ratio = mean(x) / mean(y);
    const best = own.reduce((least, row) => (row.total < least.total ? row : least));
    const cellBest = cheapestCount(cells);
    const lossOf = (row: Float64Array, offset: number): number => {
      const total = (count: number): number => [0, 1, 2].reduce((sum, part) => sum + row[offset + (v * COUNTS.length + COUNTS.indexOf(count)) * outcomeColumns.length + part], 0);
      return total(cellBest) - total(best.count);
    };
    return {
      rule,
      failure: [Math.min(...own.map((row) => row.failure)), Math.max(...own.map((row) => row.failure))],
      cells: own.map((row, c) => cells[c].failure / row.failure),
      cellsError: own.map((row, c) => (cells[c].failure / row.failure) * (row.errors.failure / row.failure)),
      form: ratio,
      formError: Math.sqrt(mean(x.map((value, k) => (value - ratio * y[k]) ** 2)) / elements) / mean(y),
      correlation: Math.min(...own.map((row) => row.correlation ?? 1)),
      cuts: own.flatMap((row) => (row.varianceCut === undefined ? [] : [row.varianceCut])),
      best: { simulation: best.count, cells: cellBest },
      loss: own[COUNTS.indexOf(cellBest)].total - best.total,
      lossError: Math.hypot(spread(byElements.map((row) => lossOf(row, 0) - lossOf(row, size))) / Math.sqrt(elements), spread(byForm.map((row) => lossOf(row, 0))) / Math.sqrt(form)),
    };
  });
}

const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
const spread = (values: readonly number[]): number => {
  const middle = mean(values);
  return Math.sqrt(mean(values.map((value) => (value - middle) ** 2)));
};
