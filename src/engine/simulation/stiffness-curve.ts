import { lagrangeWeights } from "../numerics/lagrange.js";

/** Bisections of an interval of lengths: they place a needed length to a millionth of the interval. */
const halvings = 20;

/**
 * ln head stiffness of a pile at a length, by cubics through its values at known lengths.
 *
 * @param logLengths    known lengths, increasing
 * @param lnStiffness   piles x lengths
 * @param pile          index of the pile
 * @param logLength     ln of the length in m, within the known ones
 */
export function lnStiffnessAt(logLengths: Float64Array, lnStiffness: Float64Array, pile: number, logLength: number): number {
  const { start, weights } = lagrangeWeights(logLengths, logLength);
  const at = pile * logLengths.length + start;
  return weights[0] * lnStiffness[at] + weights[1] * lnStiffness[at + 1] + weights[2] * lnStiffness[at + 2] + weights[3] * lnStiffness[at + 3];
}

/**
 * Shortest length from which a pile is stiff enough.
 *
 * @param from     ln of the shortest length looked at, within the known ones
 * @param to       ln of the longest, above `from`
 * @param needed   ln stiffness
 * @returns        ln of the length, m; Infinity where even the longest is too soft
 */
export function neededLogLength(
  logLengths: Float64Array, lnStiffness: Float64Array, pile: number, from: number, to: number, needed: number,
): number {
  const at = (x: number): number => lnStiffnessAt(logLengths, lnStiffness, pile, x);
  if (at(from) >= needed) return from;
  let low = from;
  for (let k = 0; k < logLengths.length; k++) {
    if (logLengths[k] <= low) continue;
    let high = Math.min(logLengths[k], to);
    if (at(high) >= needed) {
      for (let h = 0; h < halvings; h++) {
        const middle = (low + high) / 2;
        if (at(middle) >= needed) high = middle;
        else low = middle;
      }
      return high;
    }
    low = high;
  }
  return Infinity;
}
