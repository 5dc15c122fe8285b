import { interactionOf, type Interaction } from "../decision/group-interaction.js";
import { sortedPlan, type Plan } from "../decision/plan.js";
import { groundUnderPiles, type GroundUnderPiles } from "./ground-under-piles.js";
import { holePlaces } from "./hole-places.js";
import { errorDraws, type ErrorDraws } from "./readings.js";
import { siteField, type SiteField } from "./site-field.js";
import { requireTask, type SimulationTask } from "./task.js";
import { preparedVariant, type Variant } from "./variant.js";

/** A task with everything that its realisations share made ready. They are drawn in its room: one simulation serves one thread. */
export interface Simulation {
  readonly task: SimulationTask;
  readonly plan: Plan;
  readonly ground: GroundUnderPiles;
  readonly field: SiteField;
  readonly errors: ErrorDraws;
  readonly variants: readonly Variant[];
  /** undefined where no variant wants it */
  readonly interaction: Interaction | undefined;
  /** ln head stiffness of the last realisation by the form and by finite elements, piles x lengths */
  readonly byForm: Float64Array;
  readonly byElements: Float64Array;
}

/**
 * Makes a task ready: finite elements in the median ground at all lengths, roots of the ground's covariance, holes of all counts.
 *
 * @param task  at least one variant and one count
 * @returns     takes about a second for a dozen piles
 * @throws {DomainError} the task cannot be simulated
 */
export function prepareSimulation(task: SimulationTask): Simulation {
  requireTask(task);
  const problems = task.variants.map((v) => v.problem);
  const ground = groundUnderPiles(problems[0]);
  const plan = sortedPlan(problems[0].building.piles);
  const places = holePlaces(problems, task.counts);
  const stiffnesses = plan.piles.length * ground.logLengths.length;
  return {
    task,
    plan,
    ground,
    field: siteField(ground.terms, { plan, rings: ground.rings, levelBounds: ground.levelBounds, holes: places.holes, readingDepths: places.depths }),
    errors: errorDraws(places),
    variants: problems.map((problem, v) => preparedVariant(problem, ground.profile, places, places.variants[v])),
    interaction: problems.some(({ piles }) => piles.groupInteraction) ? interactionOf(problems[0], plan, ground.logLengths) : undefined,
    byForm: new Float64Array(stiffnesses),
    byElements: new Float64Array(stiffnesses),
  };
}
