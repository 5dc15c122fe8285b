const QUARTER_PI = 0.7853981633974483;
const HALF_PI = 1.5707963267948966;
/** What the double of pi/2 leaves out. */
const HALF_PI_REST = 6.123233995736766e-17;

/**
 * The angle whose sine is given, the same to the bit in every engine; `Math.asin` need not be.
 *
 * @param x  -1 to 1
 * @returns arcsin x, -pi/2 to pi/2, within one unit in the last place; NaN beyond -1 or 1
 */
export function arcSine(x: number): number {
  const size = Math.abs(x);
  if (size <= 0.5) return x + x * beyondFirst(x * x);
  const { root, rest } = halfAngle(size);
  const angle = QUARTER_PI - (2 * rest - HALF_PI_REST - (QUARTER_PI - 2 * root));
  return x < 0 ? -angle : angle;
}

/**
 * The angle whose cosine is given, the same to the bit in every engine; `Math.acos` need not be.
 *
 * @param x  -1 to 1
 * @returns arccos x, 0 to pi, within one unit in the last place; NaN beyond -1 or 1
 */
export function arcCosine(x: number): number {
  if (Math.abs(x) <= 0.5) return HALF_PI - (x - (HALF_PI_REST - x * beyondFirst(x * x)));
  const { root, rest } = halfAngle(Math.abs(x));
  return x > 0 ? 2 * (root + rest) : 2 * (HALF_PI - (root + (rest - HALF_PI_REST)));
}

/** Half of arccos x, 1/2 < x <= 1, as the sine of it (with zeros enough for its square to be exact) and the rest: arccos x = 2 arcsin of the root of (1 - x)/2. */
function halfAngle(x: number): { root: number; rest: number } {
  const square = (1 - x) / 2;
  const whole = Math.sqrt(square);
  if (whole === 0) return { root: 0, rest: 0 };
  const root = Math.fround(whole);
  return { root, rest: (square - root * root) / (whole + root) + whole * beyondFirst(square) };
}

/** (arcsin x - x) / x in z = x^2, z up to 1/4; coefficients from test/fixtures/numerics/elementary.py, which leave out less than 2^-57. */
function beyondFirst(z: number): number {
  let p = 0.028757851367421566;
  p = p * z - 0.014851887071247204;
  p = p * z + 0.01740087944269402;
  p = p * z + 0.005457506718640358;
  p = p * z + 0.01032281435018578;
  p = p * z + 0.011479177415184906;
  p = p * z + 0.013971212973552933;
  p = p * z + 0.017352392720869973;
  p = p * z + 0.02237217294214989;
  p = p * z + 0.030381944138531247;
  p = p * z + 0.04464285714635543;
  p = p * z + 0.07499999999998433;
  p = p * z + 0.16666666666666669;
  return z * p;
}
