/** Adding and taking off 1.5 x 2^52 rounds to a whole number. */
const ROUNDER = 6755399441055744;
/** ln 2 in two parts, of which the first has zeros enough for its products with whole numbers to be exact. */
const LN2_HIGH = 6.93147180369123816490e-1;
const LN2_LOW = 1.90821492927058770002e-10;
/** Below the first the answer is -1 to the last digit, above the second it is too large for a number. */
const LEAST = -38;
const MOST = 709.782712893384;
/** Below this x is its own answer, and its sign survives. */
const TINY = 1e-17;

/** Powers of two from 2^-64 to 2^1023. */
const LOWEST = 64;
const POWERS = new Float64Array(LOWEST + 1024);
POWERS[LOWEST] = 1;
for (let k = LOWEST; k > 0; k--) POWERS[k - 1] = POWERS[k] / 2;
for (let k = LOWEST; k < POWERS.length - 1; k++) POWERS[k + 1] = 2 * POWERS[k];

/**
 * e^x - 1 with full relative accuracy near 0, the same to the bit in every engine; `Math.expm1` need not be.
 *
 * With x = k ln 2 + r, e^x - 1 = 2^k ((1 - 2^-k) + (e^r - 1)), the terms added from the largest down without loss.
 *
 * @param x  any number
 * @returns e^x - 1, within one unit in the last place
 * @source reduction of the argument in two parts: Cody & Waite (1980), Software Manual for the Elementary Functions (method only)
 */
export function exponentialLessOne(x: number): number {
  if (x <= LEAST) return -1;
  if (!(x <= MOST)) return x > MOST ? Infinity : Number.NaN;
  if (x < TINY && x > -TINY) return x;
  const k = x * 1.4426950408889634 + ROUNDER - ROUNDER;
  if (k === 0) return x + x * x * beyondFirst(x);
  const high = x - k * LN2_HIGH;
  const low = k * LN2_LOW;
  const r = high - low;
  const rest = high - r - low + r * r * beyondFirst(r);
  const offset = 1 - POWERS[LOWEST - (k < LOWEST ? k : LOWEST)];
  const sum = offset + r;
  const near = sum + (offset - sum + r + rest);
  return k < 1024 ? near * POWERS[k + LOWEST] : 2 * near * POWERS[1023 + LOWEST];
}

/** (e^r - 1 - r) / r^2 by its series; what is left out is below 2^-57 of e^r - 1 up to (ln 2)/2. */
function beyondFirst(r: number): number {
  let p = 1.1470745597729725e-11;
  p = p * r + 1.6059043836821613e-10;
  p = p * r + 2.08767569878681e-9;
  p = p * r + 2.505210838544172e-8;
  p = p * r + 2.755731922398589e-7;
  p = p * r + 2.7557319223985893e-6;
  p = p * r + 2.48015873015873e-5;
  p = p * r + 1.984126984126984e-4;
  p = p * r + 1.388888888888889e-3;
  p = p * r + 8.333333333333333e-3;
  p = p * r + 4.1666666666666664e-2;
  p = p * r + 1.6666666666666666e-1;
  return p * r + 0.5;
}
