import { requireDomain } from "./domain-error.js";

/**
 * Percentile of a sample by the spreadsheet's inclusive rule (type 7): the sorted values stand at equal steps from 0 to 100.
 *
 * @param values  at least one finite value, any order; not changed
 * @param p  percentile, 0 to 100
 * @returns the percentile, linear between neighbouring values
 * @throws {DomainError} there is no value, or p is out of range
 * @source Hyndman & Fan (1996), Sample quantiles in statistical packages, type 7
 */
export function percentile(values: ArrayLike<number>, p: number): number {
  requireDomain(values.length > 0, "Number of values", values.length, "above 0");
  requireDomain(p >= 0 && p <= 100, "Percentile", p, "from 0 to 100");
  const sorted = Float64Array.from(values).sort();
  const place = (p / 100) * (sorted.length - 1);
  const low = Math.floor(place);
  const high = Math.min(low + 1, sorted.length - 1);
  return sorted[low] + (place - low) * (sorted[high] - sorted[low]);
}

/**
 * Percentile of values that carry weights: each value stands at the middle of its weight, and the smallest and the largest
 * are moved to 0 and 100, so that equal weights give the inclusive rule of `percentile`.
 *
 * @param values  finite values, any order; not changed
 * @param weights  one a value, >= 0, at least one above 0; a value of weight 0 has no influence
 * @param p  percentile, 0 to 100
 * @returns the percentile, linear between neighbouring values
 * @throws {DomainError} no weight is above 0, one is negative, the numbers differ, or p is out of range
 */
export function weightedPercentile(values: ArrayLike<number>, weights: ArrayLike<number>, p: number): number {
  requireDomain(weights.length === values.length, "Number of weights", weights.length, `${values.length}, one a value`);
  requireDomain(p >= 0 && p <= 100, "Percentile", p, "from 0 to 100");
  for (let i = 0; i < weights.length; i++) requireDomain(weights[i] >= 0 && weights[i] < Infinity, "Weight", weights[i], "0 or above");
  const order = Uint32Array.from({ length: values.length }, (_, i) => i)
    .filter((i) => weights[i] > 0)
    .sort((i, j) => values[i] - values[j]);
  requireDomain(order.length > 0, "Number of values with a weight", order.length, "above 0");
  const middles = new Float64Array(order.length);
  let sum = 0;
  for (let k = 0; k < order.length; k++) {
    middles[k] = sum + weights[order[k]] / 2;
    sum += weights[order[k]];
  }
  const last = order.length - 1;
  const place = middles[0] + (p / 100) * (middles[last] - middles[0]);
  let high = 1;
  while (high < last && middles[high] < place) high++;
  if (last === 0) return values[order[0]];
  const share = (place - middles[high - 1]) / (middles[high] - middles[high - 1]);
  return values[order[high - 1]] + share * (values[order[high]] - values[order[high - 1]]);
}
