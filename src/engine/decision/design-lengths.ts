import { kilonewtons, kilopascals, metres, type Kilonewtons, type Metres } from "../../units/quantities.js";
import { exponential } from "../numerics/exponential.js";
import { designLength, type DesignedLength } from "../piles/design-length.js";
import { profileDesign } from "../piles/profile-design.js";
import { groundProfile } from "./ground-profile.js";
import type { Plan } from "./plan.js";
import type { Problem } from "./problem.js";

/** Length of each load class at a design value. */
export interface DesignedClasses {
  /** one a load of the plan, m */
  readonly byLoad: Float64Array;
  /** whether the predicted settlement is allowable for all */
  readonly allowable: boolean;
}

/**
 * How a length step is met: rounded up, as it is built; or by its mean, half a step, as expectations over a few design values need it
 * (each of them would otherwise stand for a whole stretch of lengths with the rounding of one, and costs would jump from count to count).
 */
export type Rounding = "built" | "mean";

/** Design lengths of the plan's loads at one design value (its logarithm, kPa). */
export function designedClasses(problem: Problem, plan: Plan, lnDesignValue: number, rounding: Rounding): DesignedClasses {
  const { piles, building } = problem;
  const design = designerOf(problem);
  const byLoad = new Float64Array(plan.loads.length);
  let allowable = true;
  for (let c = 0; c < byLoad.length; c++) {
    const heaviest = piles.lengthRule === "one";
    if (heaviest && c > 0) {
      byLoad[c] = byLoad[0];
      continue;
    }
    const found = design(kilonewtons(plan.loads[c]), exponential(lnDesignValue), building.allowableSettlement, metres(rounding === "built" ? piles.lengthStep : 0));
    byLoad[c] = rounding === "built" || found.length <= piles.shortest ? found.length : Math.min(found.length + piles.lengthStep / 2, piles.longest);
    allowable &&= found.allowable;
  }
  return { byLoad, allowable };
}

type Designer = (load: Kilonewtons, modulus: number, allowable: Metres, step: Metres) => DesignedLength;
const designers = new WeakMap<Problem, Designer>();

/** The designer of a problem: the closed form in uniform ground, its layered form else. */
function designerOf(problem: Problem): Designer {
  let designer = designers.get(problem);
  if (designer === undefined) {
    const { piles, ground } = problem;
    const { diameter, modulus: pileModulus, shortest, longest } = piles;
    const poisson = ground.poissonRatio;
    const profile = groundProfile(ground);
    designer = profile.uniform
      ? (load, modulus, allowable, step) => designLength({ load, diameter, soilModulus: kilopascals(modulus), pileModulus, allowable, poisson, shortest, longest, step })
      : profileDesign({ diameter, pileModulus, poisson, shortest, longest, shape: profile.shape });
    designers.set(problem, designer);
  }
  return designer;
}

/**
 * Design length of each pile, the metres of all piles, and whether all are allowable.
 *
 * @param lnDesignValues  logarithms of the design values, kPa
 * @param ofPile          which of them each pile follows
 * @param rounding        how the length step is met
 */
export function designLengths(
  problem: Problem, plan: Plan, lnDesignValues: Float64Array, ofPile: Int32Array, rounding: Rounding,
): { lengths: Float64Array; metres: number; allowable: boolean } {
  const designed = Array.from(lnDesignValues, (value) => designedClasses(problem, plan, value, rounding));
  const lengths = Float64Array.from(plan.loadOf, (c, i) => designed[ofPile[i]].byLoad[c]);
  return { lengths, metres: lengths.reduce((sum, l) => sum + l, 0), allowable: designed.every((d) => d.allowable) };
}

/**
 * Log design value below which even the longest pile under the heaviest load is predicted to settle too much.
 *
 * @param around  a log design value to start from, kPa
 * @returns       within 1e-6; -Infinity or Infinity where no ground within a factor of e^12 either way is such a limit
 */
export function softestAllowable(problem: Problem, plan: Plan, around: number): number {
  const enough = (value: number): boolean => designedClasses(problem, plan, value, "built").allowable;
  let low = around - 12;
  let high = around + 12;
  if (enough(low)) return -Infinity;
  if (!enough(high)) return Infinity;
  while (high - low > 1e-6) {
    const middle = (low + high) / 2;
    if (enough(middle)) high = middle;
    else low = middle;
  }
  return high;
}
