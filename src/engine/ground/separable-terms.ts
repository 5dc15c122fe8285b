import { requireDomain } from "../numerics/domain-error.js";
import { exponential } from "../numerics/exponential.js";
import { averageCovariance } from "./average-covariance.js";
import { gaussianFamily, type CorrelationFamily } from "./correlation-family.js";
import { lineFamily, type CorrelationName } from "./correlation.js";

/** One product of a plan and a depth part; the correlation of the ground is the weighted sum of its terms. */
export interface SeparableTerm {
  readonly weight: number;
  /** plan part at a horizontal distance, m, >= 0 */
  plan(distance: number): number;
  /** depth part at a vertical distance, m, either sign */
  vertical(distance: number): number;
  /** depth part averaged over two cells: distance of their middles, either sign, and their thicknesses, m; thickness 0 is a point */
  verticalCellAverage(distance: number, thicknessA: number, thicknessB: number): number;
}

/** What the terms need of the ground: structure and scales of fluctuation, m, > 0. */
export interface GroundStructure {
  readonly correlation: CorrelationName;
  readonly horizontalScale: number;
  readonly verticalScale: number;
}

/** Step and ends of the trapezoidal rule in ln u; see `separableTerms`. */
const STEP = 0.9;
const FIRST = -2.4;
const TERMS = 14;
/** Where the rest of the rule is gathered, over the last u: the mean of 1/u over the rest, as rough averages weigh it. */
const REST = 5;

/**
 * The ground's correlation as a sum of products of a plan and a depth part.
 *
 * One term for the separable structures. The ellipsoidal Markov structure exp(-2 sqrt(q)), q = (r/th)^2 + (dz/tv)^2, is a
 * mixture of Gaussian ones, exp(-2 sqrt(q)) = integral over u of u^(-3/2) exp(-1/u) exp(-u q) / sqrt(pi), taken by the
 * trapezoidal rule in ln u, whose error falls exponentially with the step. The rule's slowly falling rest, whose terms vary
 * over a hundredth of the scales or less, is gathered in one last term, so that the weights sum to 1.
 *
 * @param ground  structure and scales of fluctuation
 * @returns the terms. For the ellipsoidal structure: averages over cells and rings from a four-hundredth of the scales up within
 *   1e-3 of themselves (0.5e-3 measured); between points absolute errors below 2.5e-4 from a hundredth of the scales up, 2e-3 closer
 * @throws {DomainError} a scale is not above 0
 * @source Feller (1971), An Introduction to Probability Theory and Its Applications II, XIII.2 (the mixing density)
 */
export function separableTerms(ground: GroundStructure): SeparableTerm[] {
  const { horizontalScale, verticalScale } = ground;
  requireDomain(horizontalScale > 0 && horizontalScale < Infinity, "Horizontal scale of fluctuation", horizontalScale, "above 0 m");
  requireDomain(verticalScale > 0 && verticalScale < Infinity, "Vertical scale of fluctuation", verticalScale, "above 0 m");
  if (ground.correlation !== "ellipsoidal") return [term(lineFamily(ground.correlation), 1, horizontalScale, verticalScale)];
  const terms: SeparableTerm[] = [];
  let rest = 1;
  const add = (weight: number, u: number) => {
    const stretch = Math.sqrt(Math.PI / u); // exp(-u t^2) is the Gaussian family with its scale stretched so
    terms.push(term(gaussianFamily, weight, horizontalScale * stretch, verticalScale * stretch));
    rest -= weight;
  };
  let u = 0;
  for (let k = 0; k < TERMS; k++) {
    u = exponential(FIRST + k * STEP);
    add((STEP / Math.sqrt(Math.PI * u)) * exponential(-1 / u), u);
  }
  add(rest, REST * u);
  return terms;
}

function term(family: CorrelationFamily, weight: number, horizontalScale: number, verticalScale: number): SeparableTerm {
  return {
    weight,
    plan: (distance) => family.correlation(distance / horizontalScale),
    vertical: (distance) => family.correlation(Math.abs(distance) / verticalScale),
    verticalCellAverage: (distance, a, b) => averageCovariance(family, distance / verticalScale, a / verticalScale, b / verticalScale),
  };
}
