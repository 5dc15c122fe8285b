/** Adding and taking off 1.5 x 2^52 rounds to a whole number. */
const ROUNDER = 6755399441055744;
const LEAST = -708;
const MOST = 708;
/** ln 2 in two parts, of which the first has zeros enough for its products to be exact. */
const LN2_HIGH = 6.93147180369123816490e-1;
const LN2_LOW = 1.90821492927058770002e-10;

/** Powers of two from -1022 to 1023, by halving and doubling, which is exact. */
const POWERS = new Float64Array(2046);
const MIDDLE = 1022;
POWERS[MIDDLE] = 1;
for (let k = 1; k <= MIDDLE; k++) POWERS[MIDDLE - k] = POWERS[MIDDLE - k + 1] / 2;
for (let k = MIDDLE + 1; k < POWERS.length; k++) POWERS[k] = 2 * POWERS[k - 1];

/**
 * e to a power, in the same steps as the WebAssembly kernels take, so that both give the same bits in every browser; `Math.exp` may differ
 * from one to the next.
 *
 * e^x = 2^k e^r, with k the whole number nearest to x / ln 2 and e^r by its series to the 13th power, whose rest is below 2^-57.
 *
 * @param value  x; above 708 it is taken as that, so that Infinity never comes out
 * @returns e^x, within one unit in the last place; 0 below -708, where numbers lose their digits and processors their speed
 * @source reduction of the argument in two parts: Cody & Waite (1980), Software Manual for the Elementary Functions (method only)
 */
export function exponential(value: number): number {
  if (value < LEAST) return 0;
  const x = MOST < value ? MOST : value;
  const k = x * 1.4426950408889634 + ROUNDER - ROUNDER;
  const r = x - k * LN2_HIGH - k * LN2_LOW;
  let p = 1.6059043836821613e-10;
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
  p = p * r + 0.5;
  return (1 + (r + r * r * p)) * POWERS[k + MIDDLE];
}
