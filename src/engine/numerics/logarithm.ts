/** ln 2 in two parts, of which the first has zeros enough for its products with whole numbers to be exact. */
const LN2_HIGH = 6.93147180369123816490e-1;
const LN2_LOW = 1.90821492927058770002e-10;
const ROOT_TWO = 1.4142135623730951;
/** Added to the upper half of the bits, it raises the exponent from the root of 2 on. */
const TO_ROOT_TWO = 0x95f62;
const LEAST_NORMAL = 2.2250738585072014e-308;
const TWO_TO_54 = 18014398509481984;

/** A number, and the two halves of its bits; the one with the exponent is the second on every machine that runs a browser. */
const number = new Float64Array(1);
const halves = new Int32Array(number.buffer);

/** Powers of two from 2^1022 down to 2^-1023, by halving, which is exact: what brings a number of that place's exponent near 1. */
const SCALES = new Float64Array(2047);
SCALES[1] = 4.49423283715579e307;
for (let k = 2; k < SCALES.length; k++) SCALES[k] = SCALES[k - 1] / 2;

/**
 * Natural logarithm, the same to the bit in every engine; `Math.log` need not be.
 *
 * ln x = k ln 2 + ln m, with m between the roots of 1/2 and 2.
 *
 * @param x  any number
 * @returns ln x, within one unit in the last place; -Infinity for 0, NaN below 0
 * @source ln m = 2 artanh((m - 1) / (m + 1)) with the leading terms kept apart: Tang (1990), Table-driven implementation of the
 *   logarithm function in IEEE floating-point arithmetic, ACM Trans. Math. Softw. 16 (method without its table)
 */
export function logarithm(x: number): number {
  if (!(x >= LEAST_NORMAL && x < Infinity)) return ofUnusual(x);
  return ofScaled(x, 0, 0);
}

/**
 * ln(1 + x) with full relative accuracy near 0, the same to the bit in every engine; `Math.log1p` need not be.
 *
 * @param x  any number
 * @returns ln(1 + x), within one unit in the last place; -Infinity for -1, NaN below
 * @source as for `logarithm`; what rounding 1 + x takes away is added to first order
 */
export function logarithmOfOnePlus(x: number): number {
  if (x > ROOT_TWO / 2 - 1 && x < ROOT_TWO - 1) return nearOne(x);
  const whole = 1 + x;
  if (!(whole > 0 && whole < Infinity)) return ofUnusual(whole);
  const lost = x < 1 ? x - (whole - 1) : 1 - (whole - x);
  return ofScaled(whole, 0, lost / whole);
}

function ofUnusual(x: number): number {
  if (x > 0 && x < Infinity) return ofScaled(x * TWO_TO_54, -54, 0);
  if (x === 0) return -Infinity;
  return x > 0 ? x : Number.NaN;
}

/** ln(x) + twos ln 2 + rest, for a normal x and a rest far below the last place. */
function ofScaled(x: number, twos: number, rest: number): number {
  number[0] = x;
  const place = (halves[1] + TO_ROOT_TWO) >> 20;
  const m = x * SCALES[place];
  const k = place - 1023 + twos;
  const f = m - 1;
  if (k === 0 && rest === 0) return nearOne(f);
  const half = 0.5 * f * f;
  const s = f / (2 + f);
  return k * LN2_HIGH - (half - (s * (half + beyondFirst(s * s)) + (k * LN2_LOW + rest)) - f);
}

/** ln(1 + f) between the roots of 1/2 and 2. */
function nearOne(f: number): number {
  const half = 0.5 * f * f;
  const s = f / (2 + f);
  return f - (half - s * (half + beyondFirst(s * s)));
}

/** (2 artanh s - 2 s) / s by its series in z = s^2, z up to 0.0295; what is left out is below 2^-60 of the logarithm. */
function beyondFirst(z: number): number {
  const w = z * z;
  const odd = 2 / 3 + w * (2 / 7 + w * (2 / 11 + w * (2 / 15 + w * (2 / 19))));
  const even = 2 / 5 + w * (2 / 9 + w * (2 / 13 + w * (2 / 17 + w * (2 / 21))));
  return z * (odd + z * even);
}
