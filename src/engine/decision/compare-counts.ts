import { hypotenuse } from "../numerics/hypotenuse.js";
import { normalDensity, normalDistribution } from "../numerics/normal.js";
import { assess } from "./assess.js";
import type { Assessment, CountRow } from "./assessment.js";
import type { Problem } from "./problem.js";

/**
 * Several counts side by side.
 *
 * @param counts  numbers of holes, whole, from 0
 * @returns       one row a count in the given order, with the chance of being the cheapest given the standard errors
 * @throws {DomainError} a count is out of range
 */
export function assessCounts(problem: Problem, counts: readonly number[]): CountRow[] {
  const rows = counts.map((count) => assess(problem, count));
  const chances = chancesOfLeast(rows.map((row) => row.total), rows.map(errorOfDifference));
  const least = rows.reduce((best, row) => (row.total < best.total ? row : best), rows[0]);
  return rows.map((row, i) => ({
    ...row,
    chanceCheapest: chances[i],
    notDistinguishable: row.total - least.total <= 2 * hypotenuse(errorOfDifference(row), errorOfDifference(least)),
  }));
}

/** The count of the row with the smallest total; the smaller count where two are equal. */
export function cheapestCount(rows: readonly CountRow[]): number {
  return rows.reduce((best, row) => (row.total < best.total || (row.total === best.total && row.count < best.count) ? row : best)).count;
}

/** Most of the model's error is common to all counts of a site: a quarter of the standard error is left in a difference. */
function errorOfDifference(row: Assessment): number {
  return row.standardError / 4;
}

/** Chance of each of several independent normal variables to be the smallest, by a 400-step trapezoid over each one's own law. */
function chancesOfLeast(means: readonly number[], errors: readonly number[]): number[] {
  const chances = means.map((mean, i) => {
    if (errors[i] === 0) return means.reduce((chance, other, j) => (j === i ? chance : chance * above(other, errors[j], mean, j < i)), 1);
    const steps = 400;
    let chance = 0;
    for (let s = 0; s <= steps; s++) {
      const z = -8 + (16 * s) / steps;
      let others = (normalDensity(z) * 16) / steps;
      for (let j = 0; j < means.length && others > 1e-300; j++) if (j !== i) others *= above(means[j], errors[j], mean + errors[i] * z, j < i);
      chance += others;
    }
    return chance;
  });
  const sum = chances.reduce((total, chance) => total + chance, 0);
  return chances.map((chance) => chance / sum);
}

/** Chance that a normal variable lies above a value; ties of sure values go to the earlier one. */
function above(mean: number, error: number, value: number, earlier: boolean): number {
  if (error > 0) return normalDistribution((mean - value) / error);
  return mean > value || (mean === value && !earlier) ? 1 : 0;
}
