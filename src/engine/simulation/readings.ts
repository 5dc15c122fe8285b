import type { GroundProfile } from "../decision/ground-profile.js";
import type { Investigation } from "../decision/problem.js";
import { logarithmOfOnePlus } from "../numerics/logarithm.js";
import type { Stream } from "../random/stream.js";
import type { HolePlaces, PlacesOfVariant } from "./hole-places.js";

/** Standard normals behind the errors of one realisation; every variant scales the same ones by its own COVs. */
export interface ErrorDraws {
  method: number;
  /** one a hole */
  readonly holes: Float64Array;
  /** holes x depths */
  readonly readings: Float64Array;
}

/** Room for the errors of some places. */
export function errorDraws({ holes, depths }: HolePlaces): ErrorDraws {
  return { method: 0, holes: new Float64Array(holes.length), readings: new Float64Array(holes.length * depths.length) };
}

/** Draws the errors anew. */
export function drawErrors(errors: ErrorDraws, numbers: Stream): void {
  errors.method = numbers.normal();
  for (let h = 0; h < errors.holes.length; h++) errors.holes[h] = numbers.normal();
  for (let r = 0; r < errors.readings.length; r++) errors.readings[r] = numbers.normal();
}

/** What a method reads in the ground: everything of a variant that does not change from realisation to realisation. */
export interface ReadingLaw {
  readonly depths: Int32Array;
  /** ln of the median modulus at the surface, kPa */
  readonly logModulus: number;
  /** standard deviation of the log ground at the depths */
  readonly groundSd: Float64Array;
  /** standard deviations of the logarithms of the errors */
  readonly methodSd: number;
  readonly holeSd: number;
  readonly readingSd: number;
  /** mean of the logarithm of all three errors together: the multipliers themselves have unit mean */
  readonly errorMean: number;
}

/** The law of one investigation's readings. */
export function readingLaw(investigation: Investigation, profile: GroundProfile, places: HolePlaces, own: PlacesOfVariant): ReadingLaw {
  const variances = [investigation.methodCov, investigation.holeCov, investigation.readingCov].map((cov) => logarithmOfOnePlus(cov ** 2));
  return {
    depths: own.depths,
    logModulus: profile.logModulus,
    groundSd: Float64Array.from(own.depths, (d) => Math.sqrt(profile.groundVariance) * profile.relativeSd(places.depths[d])),
    methodSd: Math.sqrt(variances[0]),
    holeSd: Math.sqrt(variances[1]),
    readingSd: Math.sqrt(variances[2]),
    errorMean: -(variances[0] + variances[1] + variances[2]) / 2,
  };
}

/**
 * Logarithms of the readings of one hole, each over the assumed profile: what a reading says of the modulus at the surface.
 *
 * @param law     of the variant
 * @param hole    index among all holes
 * @param field   unit field in the holes, holes x depths
 * @param level   of the site: log modulus
 * @param errors  of the realisation
 * @param out     receives the logs (kPa) from `at` on
 */
export function logReadings(law: ReadingLaw, hole: number, field: Float64Array, level: number, errors: ErrorDraws, out: Float64Array, at: number): void {
  const row = hole * (field.length / errors.holes.length);
  const common = law.logModulus + level + law.errorMean + law.methodSd * errors.method + law.holeSd * errors.holes[hole];
  for (let k = 0; k < law.depths.length; k++) {
    const place = row + law.depths[k];
    out[at + k] = law.groundSd[k] * field[place] + common + law.readingSd * errors.readings[place];
  }
}
