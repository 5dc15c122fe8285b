import type { Kilopascals, Metres } from "../../units/quantities.js";
import type { GroupedForm } from "./grouped-form.js";

/** One pile of one length, and what the elements need to know of it. */
export interface PileGeometry {
  readonly diameter: Metres;
  readonly length: Metres;
  /** Young's modulus of the pile, kPa */
  readonly pileModulus: Kilopascals;
  /** Poisson's ratio of the ground, 0 to below 0.5 */
  readonly poissonRatio: number;
}

/**
 * How the head stiffness of one pile answers the ground around it, to second order:
 * ln K = lnStiffness + beta sigma (w' g) + sigma^2 (g' M g), with g the ring means of the log modulus about its median, in units of sigma.
 */
export interface PileResponse {
  readonly length: Metres;
  /** ln of the head stiffness in the median ground, K in kN/m */
  readonly lnStiffness: number;
  /** representative radius of each ring, m, increasing; the same for all lengths of one diameter. The first ring lies under the shaft and has weight below the tip only */
  readonly rings: Float64Array;
  /** depths that bound the levels, m, one more than there are levels, from 0 */
  readonly levelBounds: Float64Array;
  /** energy shares w, rings x levels, ring by ring (ring * levels + level); their sum is below 1, the pile takes the rest */
  readonly weights: Float64Array;
  /** kappa, the sum of the energy shares, 0 to 1: what ln stiffness gains when all ground is stiffer by a factor e, to first order */
  readonly weightSum: number;
  /** the second-order form, where it was asked for */
  readonly form: GroupedForm | undefined;
}
