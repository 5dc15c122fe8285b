import { requireDomain } from "./domain-error.js";

/** Adding and taking off 1.5 x 2^52 rounds to a whole number. */
const ROUNDER = 6755399441055744;
const TWO_OVER_PI = 0.6366197723675814;
/** pi/2 in three parts, of which two have zeros enough for their products with whole numbers up to 2^20 to be exact. */
const HALF_PI_HIGH = 1.5707963267341256;
const HALF_PI_MIDDLE = 6.077100506303966e-11;
const HALF_PI_LOW = 2.0222662487959506e-21;
const FARTHEST = 1e6;

/**
 * Sine, the same to the bit in every engine; `Math.sin` is not.
 *
 * @param angle  radians, -1e6 to 1e6
 * @returns sin(angle), within one unit in the last place
 * @throws {DomainError} the angle is not within range
 * @source reduction of the angle in parts: Cody & Waite (1980), Software Manual for the Elementary Functions (method only)
 */
export function sine(angle: number): number {
  requireDomain(angle >= -FARTHEST && angle <= FARTHEST, "Angle", angle, "from -1e6 to 1e6");
  const k = angle * TWO_OVER_PI + ROUNDER - ROUNDER;
  if (k === 0) return angle === 0 ? angle : sineNearZero(angle, 0);
  const first = angle - k * HALF_PI_HIGH;
  const second = first - k * HALF_PI_MIDDLE;
  const third = k * HALF_PI_LOW - (first - second - k * HALF_PI_MIDDLE);
  const r = second - third;
  const rest = second - r - third;
  const quarter = k & 3;
  const size = (quarter & 1) === 0 ? sineNearZero(r, rest) : cosineNearZero(r, rest);
  return quarter < 2 ? size : -size;
}

/** sin(r + rest) for r up to pi/4 and a rest far below its last place, by the series. */
function sineNearZero(r: number, rest: number): number {
  const z = r * r;
  let p = 2.8114572543455206e-15;
  p = p * z - 7.647163731819816e-13;
  p = p * z + 1.6059043836821613e-10;
  p = p * z - 2.505210838544172e-8;
  p = p * z + 2.7557319223985893e-6;
  p = p * z - 1.984126984126984e-4;
  p = p * z + 8.333333333333333e-3;
  p = p * z - 1.6666666666666666e-1;
  return r + (r * z * p + rest * (1 - 0.5 * z));
}

/** cos(r + rest) for r up to pi/4 and a rest far below its last place, by the series. */
function cosineNearZero(r: number, rest: number): number {
  const z = r * r;
  let p = -1.5619206968586225e-16;
  p = p * z + 4.779477332387385e-14;
  p = p * z - 1.1470745597729725e-11;
  p = p * z + 2.08767569878681e-9;
  p = p * z - 2.755731922398589e-7;
  p = p * z + 2.48015873015873e-5;
  p = p * z - 1.388888888888889e-3;
  p = p * z + 4.1666666666666664e-2;
  const half = 0.5 * z;
  const near = 1 - half;
  return near + (1 - near - half + (z * z * p - r * rest));
}
