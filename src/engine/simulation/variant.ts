import { fieldCorrelation } from "../ground/field-correlation.js";
import type { GroundProfile } from "../decision/ground-profile.js";
import type { Problem } from "../decision/problem.js";
import { designDistribution, type LogVariances } from "../investigation/design-distribution.js";
import { readingSums } from "../investigation/reading-sums.js";
import { hypotenuse } from "../numerics/hypotenuse.js";
import type { HolePlaces, PlacesOfVariant } from "./hole-places.js";
import { lnDesignValue } from "./design-value.js";
import { logReadings, readingLaw, type ErrorDraws, type ReadingLaw } from "./readings.js";

/** How readings become a design value where what is known of the region is brought in: offset + gain x mean log reading. */
interface Update {
  readonly offset: number;
  readonly gain: number;
}

/** One count of one variant. */
interface CountPlan {
  /** groups of holes, one a design value: all holes together, or each by itself where piles follow the nearest; none without holes */
  readonly groups: readonly Int32Array[];
  /** design value that each pile follows */
  readonly ofPile: Int32Array;
  readonly updates: readonly (Update | undefined)[];
  /** ln of the design value where nothing is read */
  readonly unread: number;
}

/** A way to investigate and to design, made ready for realisations. */
export interface Variant {
  readonly problem: Problem;
  readonly law: ReadingLaw;
  readonly counts: readonly CountPlan[];
}

/** Makes a variant ready. */
export function preparedVariant(problem: Problem, profile: GroundProfile, places: HolePlaces, own: PlacesOfVariant): Variant {
  const { investigation, building, piles, ground } = problem;
  const rule = investigation.designRule;
  const law = readingLaw(investigation, profile, places, own);
  const variances: LogVariances = {
    ground: profile.groundVariance, regional: profile.regionalVariance,
    reading: law.readingSd ** 2, hole: law.holeSd ** 2, method: law.methodSd ** 2,
  };
  const relativeSd = Float64Array.from(own.depths, (d) => profile.relativeSd(places.depths[d]));
  const correlation = fieldCorrelation(ground);
  const unread = designDistribution(rule, undefined, profile.logModulus, variances).mean;
  const expectedMean = profile.logModulus + law.errorMean;
  const update = (holes: Int32Array): Update | undefined => {
    if (!rule.update || profile.regionalVariance === 0) return undefined;
    const sums = readingSums(Array.from(holes, (h) => places.holes[h]), investigation.readingSpacing, relativeSd, correlation);
    const { mean, gain } = designDistribution(rule, sums, profile.logModulus, variances);
    return { offset: mean - gain * expectedMean, gain };
  };
  const counts = own.holes.map((holes): CountPlan => {
    const apart = piles.lengthRule === "nearest" && holes.length > 1;
    const groups = holes.length === 0 ? [] : apart ? Array.from(holes, (h) => Int32Array.of(h)) : [holes];
    const ofPile = Int32Array.from(building.piles, (p) => {
      if (!apart) return 0;
      const distances = Array.from(holes, (h) => hypotenuse(places.holes[h].x - p.x, places.holes[h].y - p.y));
      return distances.indexOf(Math.min(...distances));
    });
    return { groups, ofPile, updates: groups.map(update), unread };
  });
  return { problem, law, counts };
}

/**
 * Log design values of one count from actual readings.
 *
 * @param field   unit field in the holes, holes x depths
 * @param level   of the site: log modulus
 * @returns       one a group of holes; the unread one where there is none
 */
export function lnDesignValuesRead(variant: Variant, count: number, field: Float64Array, level: number, errors: ErrorDraws): Float64Array {
  const { law, counts, problem } = variant;
  const { groups, updates, unread } = counts[count];
  if (groups.length === 0) return Float64Array.of(unread);
  return Float64Array.from(groups, (holes, g) => {
    const each = law.depths.length;
    const logs = new Float64Array(holes.length * each);
    holes.forEach((hole, h) => logReadings(law, hole, field, level, errors, logs, h * each));
    const update = updates[g];
    if (update === undefined) return lnDesignValue(problem.investigation.designRule, logs);
    return update.offset + (update.gain * logs.reduce((sum, value) => sum + value, 0)) / logs.length;
  });
}
