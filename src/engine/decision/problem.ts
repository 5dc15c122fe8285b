import type { CorrelationName } from "../ground/correlation.js";
import type { DamagePoint } from "../costs/damage.js";
import type { Prices, Delay } from "../costs/prices.js";
import type { DesignRule } from "../investigation/design-rule.js";
import type { Point } from "../investigation/hole-positions.js";
import type { PileSpecification } from "../piles/pile-specification.js";
import type { Kilonewtons, Kilopascals, Metres } from "../../units/quantities.js";

/** One stratum: the mean Young's modulus at its top, how the mean grows below, and its variation. */
export interface GroundLayer {
  /** depth of the top below pile head level, m; 0 for the first layer, increasing */
  readonly top: Metres;
  /** mean Young's modulus at the top of the layer, kPa, > 0 */
  readonly mean: Kilopascals;
  /** growth of the mean with depth, kPa per m, >= 0 */
  readonly increase: number;
  /** coefficient of variation of the modulus about its mean, a ratio, >= 0 */
  readonly cov: number;
}

/** The ground: a lognormal random field about the layers' means. Scales are scales of fluctuation, not integral scales. */
export interface Ground {
  readonly layers: readonly GroundLayer[];
  readonly correlation: CorrelationName;
  readonly horizontalScale: Metres;
  readonly verticalScale: Metres;
  /** how far the mean of this site may lie from the assumed one before any hole, a COV, >= 0 */
  readonly regionalCov: number;
  /** Poisson's ratio, 0 to below 0.5 */
  readonly poissonRatio: number;
}

/** One pile of the plan with the load that it carries. */
export interface PilePoint {
  readonly x: Metres;
  readonly y: Metres;
  readonly load: Kilonewtons;
}

/** The building: its piles, what it is worth, and what distortion does to it. */
export interface Building {
  readonly piles: readonly PilePoint[];
  /** rectangle in which holes are placed automatically, centred on the bounding box of the piles */
  readonly footprint: { readonly length: Metres; readonly width: Metres };
  /** value at stake, money; failure cost is capped at it */
  readonly value: number;
  /** share of the value lost at each angular distortion, both increasing */
  readonly damage: readonly DamagePoint[];
  readonly allowableSettlement: Metres;
}

/** What is bought: the kind of hole, its errors, its depth, where, and what is made of the readings. */
export interface Investigation {
  /** coefficients of variation of the errors: one draw a reading, one a hole, one common to all holes */
  readonly readingCov: number;
  readonly holeCov: number;
  readonly methodCov: number;
  readonly readingSpacing: Metres;
  readonly holeDepth: Metres;
  /** the first n rows serve a count of n; undefined: positions are automatic */
  readonly holes: readonly Point[] | undefined;
  readonly designRule: DesignRule;
}

/** The whole question as one value, SI inside. Equal problems give equal answers. */
export interface Problem {
  readonly ground: Ground;
  readonly building: Building;
  readonly piles: PileSpecification;
  readonly investigation: Investigation;
  readonly prices: Prices;
  readonly delay: Delay;
  /** seed of the quasi-random numbers; the same seed gives the same figures */
  readonly seed: string;
}
