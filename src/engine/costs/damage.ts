import { requireDomain } from "../numerics/domain-error.js";

/** Share of the building's value that is lost at an angular distortion. */
export interface DamagePoint {
  /** angular distortion, settlement difference over distance, a ratio (1/500 = 0.002) */
  readonly distortion: number;
  /** share of the building's value, 0 to 1 */
  readonly share: number;
}

/**
 * Share of the building's value that a distortion costs: nothing below the first point, straight between points, level
 * beyond the last. At the first point itself its own share holds, so a first share above 0 is a step.
 *
 * @param damage  points, at least one, with increasing distortions and shares that do not fall
 * @param distortion  angular distortion, a ratio, >= 0
 * @returns share, 0 to 1
 * @throws {DomainError} there is no point, or the distortion is negative or not a number
 */
export function damageShare(damage: readonly DamagePoint[], distortion: number): number {
  requireDomain(damage.length > 0, "Number of damage points", 0, "at least 1");
  requireDomain(distortion >= 0, "Angular distortion", distortion, "0 or above");
  if (distortion < damage[0].distortion) return 0;
  for (let k = 1; k < damage.length; k++) {
    const low = damage[k - 1];
    const high = damage[k];
    if (distortion < high.distortion) return low.share + ((distortion - low.distortion) / (high.distortion - low.distortion)) * (high.share - low.share);
  }
  return damage[damage.length - 1].share;
}
