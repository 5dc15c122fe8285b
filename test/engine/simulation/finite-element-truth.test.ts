import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { assess, estimate, prepareSimulation, simulateElements, simulateForm, type DesignRuleName, type SimulationTask } from "../../../src/engine/index.js";
import { ninePiles } from "../decision/example-problem.js";

// Source: independent Monte Carlo with finite elements under every pile in another language, its own mesh, fields and design code:
// test/fixtures/decision/finite-element-truth.py (versions, seeds and realisations inside).
interface Known {
  readonly value: number;
  readonly standardError: number;
}
type Rule = "geometric" | "harmonic" | "quartile" | "nearest" | "update" | "group";
interface Case {
  readonly horizontalScale: number;
  readonly verticalScale: number;
  readonly cov: number;
  readonly regionalCov: number;
  readonly rules: Partial<Record<Rule, Record<string, { readonly failure: Known; readonly chance: Known; readonly surprises: Known }>>>;
  readonly centrePileLength: Record<string, [number, number, number]>;
}
const { cases } = JSON.parse(readFileSync(new URL("../../fixtures/decision/finite-element-truth.json", import.meta.url), "utf8")) as { cases: readonly Case[] };

const counts = [0, 1, 4, 9];
const realisations = { elements: 16, form: 1500 };

describe.each(cases)("nine piles, $horizontalScale m / $verticalScale m, COV $cov, regional COV $regionalCov", (known) => {
  const rules = Object.keys(known.rules) as Rule[];
  const problemOf = (rule: Rule) =>
    ninePiles({
      scales: [known.horizontalScale, known.verticalScale], cov: known.cov, regionalCov: known.regionalCov, update: rule === "update",
      rule: (["nearest", "update", "group"].includes(rule) ? "geometric" : rule) as DesignRuleName, lengthRule: rule === "nearest" ? "nearest" : "load", groupInteraction: rule === "group",
    });
  const task: SimulationTask = { variants: rules.map((rule) => ({ name: rule, problem: problemOf(rule) })), counts, seed: "truth" };
  const simulation = prepareSimulation(task);
  const { rows } = estimate(
    task,
    Array.from({ length: realisations.elements }, (_, k) => simulateElements(simulation, k)),
    Array.from({ length: realisations.form }, (_, k) => simulateForm(simulation, k)),
  );

  // Five and a half joint standard errors, for some 150 comparisons by chance less than once in a hundred thousand. The other side reads
  // the ground at points where this one averages it, and joins lengths by straight lines: three per cent are granted for both.
  it.each(rows.map((row) => [row.name as Rule, row.count, row] as const))("%s, %d holes: failure cost, its chance, and surprises", (rule, count, row) => {
    const { failure, chance, surprises } = known.rules[rule]![count];
    const within = (found: number, error: number, other: Known): void => {
      expect(Math.abs(found - other.value)).toBeLessThan(5.5 * Math.hypot(error, other.standardError) + 0.03 * other.value);
    };
    within(row.failure, row.errors.failure, failure);
    within(row.failureChance, row.failureChanceError, chance);
    within(row.surprises, surprises.standardError * 2, surprises); // more realisations there: its error is about half of ours
  });

  // All rules and counts together, whose errors partly cancel: their sum is known to about 3 % here.
  it("all failure costs together", () => {
    const sum = rows.reduce((total, row) => total + row.failure, 0);
    const other = rows.reduce((total, row) => total + known.rules[row.name as Rule]![row.count].failure.value, 0);
    expect(Math.abs(sum / other - 1)).toBeLessThan(0.15);
  });

  // The cell functions answer the same question without sampling: within 6 % and the errors of the simulation, and some
  // thousands where hardly anything fails.
  it.each(rows.map((row) => [row.name as Rule, row.count, row] as const))("%s, %d holes: the cells' failure cost", (rule, count, row) => {
    const { failure } = assess(problemOf(rule), count);
    expect(Math.abs(failure - row.failure)).toBeLessThan(5 * row.errors.failure + 0.06 * row.failure + 3000);
  });
});
