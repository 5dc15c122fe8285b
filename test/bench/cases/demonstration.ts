import { parseSite, templateRows } from "../../../src/inputs/index.js";
import type { Problem } from "../../../src/engine/index.js";

/** The demonstration's problem: 12 piles, separable correlation, COV 0.6. */
export function demonstrationProblem(): Problem {
  return parseSite(templateRows()).problem;
}

/** The same site with another building value, so that nothing is remembered but what hangs on ground, piles and holes. */
export function revalued(problem: Problem, round: number): Problem {
  return { ...problem, building: { ...problem.building, value: problem.building.value * (1 + 1e-6 * (round + 10)) } };
}
