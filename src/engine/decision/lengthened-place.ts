import { lagrangeWeights } from "../numerics/lagrange.js";
import { logarithm } from "../numerics/logarithm.js";
import type { HoleCovariance } from "./hole-covariance.js";
import { placeOfLength, type LengthLaws } from "./needed-length.js";
import type { SiteModel } from "./site-model.js";

/** At one node: place among the laws' lengths that a pile of a ln stiffness at its design length is lengthened to. */
export type LengthenedPlace = (pile: number, lnStiffness: number) => number;

/**
 * How far piles are lengthened once they are found too short: to where their stiffness, expected from what it is at the design length and
 * from the design values, is the needed one, or to the longest length. A soft pile is expected to gain more than the average one, because
 * the ground further down is not as soft.
 *
 * @param model    ground under the piles
 * @param holes    what the design values say of it
 * @param laws     of the site; places are among their lengths
 * @param longest  m
 * @param needed   ln stiffness that makes the settlement allowable, one a pile
 */
export function lengthenedPlaces(
  model: SiteModel, holes: HoleCovariance, laws: LengthLaws, longest: number, needed: Float64Array,
): (normals: Float64Array, lengths: Float64Array) => LengthenedPlace {
  const { logLengths, base } = laws;
  const { logLengths: grid } = model.family;
  const { size } = holes;
  const count = grid.length;
  const steps = logLengths.length;
  const known = Array.from(logLengths, (x) => lagrangeWeights(grid, x));
  const last = placeOfLength(laws, longest);
  return (normals, lengths) => {
    const expected: (Float64Array | undefined)[] = new Array<Float64Array | undefined>(lengths.length);
    const slopes: Float64Array[] = new Array<Float64Array>(lengths.length);
    const starts = Float64Array.from(lengths, (length) => placeOfLength(laws, length));
    const ready = (pile: number): void => {
      const own = lagrangeWeights(grid, Math.min(Math.max(logarithm(lengths[pile]), grid[0]), grid[count - 1]));
      const toNormal = (at: { start: number; weights: Float64Array }, s: number): number => {
        let sum = 0;
        for (let q = 0; q < 4; q++) sum += at.weights[q] * holes.design[(pile * count + at.start + q) * size + s];
        return sum;
      };
      const covariance = (at: { start: number; weights: Float64Array }): number => {
        let sum = 0;
        for (let p = 0; p < 4; p++) for (let q = 0; q < 4; q++) sum += at.weights[p] * own.weights[q] * model.covariance[(at.start + p) * count + own.start + q];
        for (let s = 0; s < size; s++) sum -= toNormal(at, s) * toNormal(own, s);
        return sum;
      };
      const variance = covariance(own);
      expected[pile] = Float64Array.from(known, (at, k) => {
        let mean = base[k];
        for (let s = 0; s < size; s++) mean += toNormal(at, s) * normals[s];
        return mean;
      });
      slopes[pile] = Float64Array.from(known, (at) => (variance > 0 ? covariance(at) / variance : 1));
    };
    return (pile, lnStiffness) => {
      if (expected[pile] === undefined) ready(pile);
      const mean = expected[pile]!;
      const slope = slopes[pile];
      const from = Math.min(Math.floor(starts[pile]), steps - 2);
      const t = starts[pile] - from;
      const x = lnStiffness - ((1 - t) * mean[from] + t * mean[from + 1]);
      let low = mean[from] + slope[from] * x;
      for (let k = from + 1; k < steps; k++) {
        const high = mean[k] + slope[k] * x;
        if (high >= needed[pile]) return Math.min(Math.max(k - 1 + (high > low ? (needed[pile] - low) / (high - low) : 1), starts[pile]), last);
        low = high;
      }
      return last;
    };
  };
}
