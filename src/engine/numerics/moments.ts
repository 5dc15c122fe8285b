import { requireDomain } from "./domain-error.js";

/** Mean, spread and lag-one correlation of a series. */
export interface Moments {
  readonly mean: number;
  /** standard deviation with n - 1; 0 for a single value */
  readonly sd: number;
  /** sum of lagged products over sum of squares, both about the mean of the whole series; 0 for a constant series */
  readonly lagOneCorrelation: number;
}

/**
 * Moments of a series in two passes: the mean is corrected by the mean of the deviations from it, so that a large common
 * part does not cost digits.
 *
 * @param values  at least one finite value, in order
 * @returns mean, standard deviation (n - 1) and lag-one correlation
 * @throws {DomainError} there is no value
 * @source Chan, Golub & LeVeque (1983), Algorithms for computing the sample variance, Amer. Statist. 37 (corrected two-pass)
 */
export function moments(values: ArrayLike<number>): Moments {
  const n = values.length;
  requireDomain(n > 0, "Number of values", n, "above 0");
  const rough = meanLess(values, 0);
  const correction = meanLess(values, rough);
  const mean = rough + correction;
  let squares = 0;
  let products = 0;
  for (let i = 0; i < n; i++) {
    const deviation = values[i] - rough - correction;
    squares += deviation * deviation;
    if (i > 0) products += deviation * (values[i - 1] - rough - correction);
  }
  return { mean, sd: n > 1 ? Math.sqrt(squares / (n - 1)) : 0, lagOneCorrelation: squares > 0 ? products / squares : 0 };
}

function meanLess(values: ArrayLike<number>, origin: number): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += values[i] - origin;
  return sum / values.length;
}
