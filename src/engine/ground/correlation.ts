import { requireDomain } from "../numerics/domain-error.js";
import * as families from "./correlation-family.js";

/** Correlation structures of the log stiffness; the lengths are scales of fluctuation. */
export type CorrelationName = "markov" | "ellipsoidal" | "gaussian" | "spherical" | "markov2";

/** Structures along a line: those of the ground and the triangular one, which no field in space has. */
export type LineCorrelationName = CorrelationName | "triangular";

/**
 * The family of a named correlation along a line; the ellipsoidal Markov structure is Markov along any line.
 *
 * @param model  name of the correlation
 * @returns the family in the scaled lag
 * @throws {DomainError} there is no correlation of that name
 */
export function lineFamily(model: LineCorrelationName): families.CorrelationFamily {
  switch (model) {
    case "markov":
    case "ellipsoidal":
      return families.markovFamily;
    case "gaussian":
      return families.gaussianFamily;
    case "spherical":
      return families.sphericalFamily;
    case "triangular":
      return families.triangularFamily;
    case "markov2":
      return families.secondOrderMarkovFamily;
    default:
      requireDomain(false, "Correlation", model, "markov, ellipsoidal, gaussian, spherical, triangular or markov2");
  }
}

/**
 * Correlation of the ground at two points of a line.
 *
 * @param model  name of the correlation
 * @param lag  distance of the points, m, finite; the sign does not matter
 * @param scale  scale of fluctuation theta (the integral of the correlation over all lags), m, > 0, finite
 * @returns rho, 0 to 1
 * @throws {DomainError} an argument is outside the range above
 * @source Vanmarcke (1983), Random Fields: Analysis and Synthesis
 */
export function correlation(model: LineCorrelationName, lag: number, scale: number): number {
  requireDomain(Number.isFinite(lag), "Lag", lag, "a finite length in m");
  requireDomain(scale > 0 && scale < Infinity, "Scale of fluctuation", scale, "above 0 m");
  return lineFamily(model).correlation(Math.abs(lag) / scale);
}

/**
 * Variance of a line average over the point variance (a ratio of variances, not of standard deviations).
 *
 * @param model  name of the correlation
 * @param length  averaging length T, m, >= 0, finite
 * @param scale  scale of fluctuation theta, m, > 0, finite
 * @returns gamma(T), 0 to 1, relative error below 1e-13
 * @throws {DomainError} an argument is outside the range above
 * @source Vanmarcke (1983), Random Fields: Analysis and Synthesis; gamma = 2 F(T) / T^2 with F'' = rho
 */
export function varianceReduction(model: LineCorrelationName, length: number, scale: number): number {
  requireDomain(length >= 0 && length < Infinity, "Averaging length", length, "0 m or above");
  requireDomain(scale > 0 && scale < Infinity, "Scale of fluctuation", scale, "above 0 m");
  const t = length / scale;
  if (t < 1e-100) return 1; // its square would vanish
  if (t > 1e100) return 1 / t;
  return (2 * lineFamily(model).doubleIntegral(t)) / (t * t);
}
