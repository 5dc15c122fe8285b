import { requireDomain } from "./domain-error.js";
import { exponential } from "./exponential.js";
import { logarithm } from "./logarithm.js";

const INVERSE_ROOT_TWO_PI = 0.3989422804014326779;
/** Below this distance from 0 the rational function of x itself is used (Cody's limit, the upper quartile). */
const CENTRE = 0.67448975;
const E_TO_MINUS_64 = 1.603810890548638e-28;

/**
 * Density of the standard normal distribution.
 *
 * @param x  any number
 * @returns phi(x), >= 0, relative error below 1e-15 for |x| <= 38
 */
export function normalDensity(x: number): number {
  return INVERSE_ROOT_TWO_PI * expOfMinusHalfSquare(Math.abs(x));
}

/**
 * Distribution function of the standard normal distribution, with full relative accuracy in the lower tail; the upper
 * tail is `normalDistribution(-x)`.
 *
 * @param x  any number, infinite too
 * @returns Phi(x), 0 to 1, relative error below 2e-15 down to 1e-300
 * @throws {DomainError} x is not a number
 * @source Cody (1969), Rational Chebyshev approximations for the error function, Math. Comp. 23, in the form for the normal
 *   distribution of Cody (1993), Algorithm 715
 */
export function normalDistribution(x: number): number {
  requireDomain(!Number.isNaN(x), "Normal variate", x, "a number");
  const y = Math.abs(x);
  if (y <= CENTRE) return 0.5 + x * ratio(CENTRE_ABOVE, CENTRE_BELOW, x * x);
  const tail = expOfMinusHalfSquare(y) * (y <= 5.65685424949238 ? ratio(MIDDLE_ABOVE, MIDDLE_BELOW, y) : millsFar(y));
  return x < 0 ? tail : 1 - tail;
}

/**
 * Chance that a standard normal variate lies between 0 and x, with full relative accuracy near 0.
 *
 * @param x  any number, infinite too
 * @returns Phi(x) - 1/2, from -1/2 to 1/2, relative error below 1e-15
 * @throws {DomainError} x is not a number
 */
export function normalCentralChance(x: number): number {
  if (Math.abs(x) <= CENTRE) return x * ratio(CENTRE_ABOVE, CENTRE_BELOW, x * x);
  return 0.5 - normalDistribution(-x);
}

/**
 * Quantile of the standard normal distribution.
 *
 * @param p  probability, above 0 and below 1
 * @returns x with Phi(x) = p, relative error below 1e-15 from p = 1e-300 to 1 - 1e-16
 * @throws {DomainError} p is not above 0 and below 1
 * @source Wichura (1988), Algorithm AS 241: the percentage points of the normal distribution, Appl. Statist. 37, PPND16
 */
export function normalQuantile(p: number): number {
  requireDomain(p > 0 && p < 1, "Probability", p, "above 0 and below 1");
  const q = p - 0.5;
  if (Math.abs(q) <= 0.425) return q * ratio(QUANTILE_CENTRE_ABOVE, QUANTILE_CENTRE_BELOW, 0.180625 - q * q);
  const r = Math.sqrt(-logarithm(q < 0 ? p : 1 - p));
  const x = r <= 5 ? ratio(QUANTILE_MIDDLE_ABOVE, QUANTILE_MIDDLE_BELOW, r - 1.6) : ratio(QUANTILE_FAR_ABOVE, QUANTILE_FAR_BELOW, r - 5);
  return q < 0 ? -x : x;
}

/**
 * Unit normal loss: mean excess of a standard normal variate over u.
 *
 * @param u  any number
 * @returns G(u) = phi(u) - u (1 - Phi(u)), >= 0, relative error below 1e-14 for u <= 37
 * @throws {DomainError} u is not finite
 * @source Raiffa & Schlaifer (1961), Applied Statistical Decision Theory. Above 3, where the two terms cancel, the continued
 *   fraction of the repeated integrals, G/(1 - Phi) = 1/(u + 2/(u + 3/(u + ...))).
 */
export function unitNormalLoss(u: number): number {
  requireDomain(Number.isFinite(u), "Standardised break-even distance", u, "a finite number");
  if (u <= 3) return normalDensity(u) - u * normalDistribution(-u);
  let denominator = u;
  // So many terms bring the error below the last digit; found by trial from 3 to 37.
  for (let k = Math.ceil(420 / (u * u)) + 10; k >= 2; k--) denominator = u + k / denominator;
  return normalDistribution(-u) / denominator;
}

/** exp(-y^2/2) with y split at sixteenths, so that squaring does not lose the digits that the exponential needs. */
function expOfMinusHalfSquare(y: number): number {
  if (y > 39) return 0;
  const coarse = Math.trunc(y * 16) / 16;
  const half = 0.5 * coarse * coarse;
  const rest = exponential(-0.5 * (y - coarse) * (y + coarse));
  // far out e to the power alone would be taken for 0 while the answer still has digits
  return half < 700 ? exponential(-half) * rest : exponential(64 - half) * rest * E_TO_MINUS_64;
}

/** (1 - Phi(y)) / exp(-y^2/2) for y above the square root of 32. */
function millsFar(y: number): number {
  const s = 1 / (y * y);
  return (INVERSE_ROOT_TWO_PI - s * ratio(FAR_ABOVE, FAR_BELOW, s)) / y;
}

/** Quotient of two polynomials, coefficients from the highest power down. */
function ratio(above: readonly number[], below: readonly number[], x: number): number {
  let numerator = above[0];
  for (let k = 1; k < above.length; k++) numerator = numerator * x + above[k];
  let denominator = below[0];
  for (let k = 1; k < below.length; k++) denominator = denominator * x + below[k];
  return numerator / denominator;
}

const CENTRE_ABOVE = [0.065682337918207449113, 2.2352520354606839287, 161.02823106855587881, 1067.6894854603709582, 18154.981253343561249];
const CENTRE_BELOW = [1, 47.20258190468824187, 976.09855173777669322, 10260.932208618978205, 45507.789335026729956];
const MIDDLE_ABOVE = [
  1.0765576773720192317e-8, 0.39894151208813466764, 8.8831497943883759412, 93.506656132177855979, 597.27027639480026226,
  2494.5375852903726711, 6848.1904505362823326, 11602.651437647350124, 9842.7148383839780218,
];
const MIDDLE_BELOW = [
  1, 22.266688044328115691, 235.38790178262499861, 1519.377599407554805, 6485.558298266760755, 18615.571640885098091,
  34900.952721145977266, 38912.003286093271411, 19685.429676859990727,
];
const FAR_ABOVE = [0.02307344176494017303, 0.21589853405795699, 0.1274011611602473639, 0.022235277870649807, 0.001421619193227893466, 2.9112874951168792e-5];
const FAR_BELOW = [1, 1.28426009614491121, 0.468238212480865118, 0.0659881378689285515, 0.00378239633202758244, 7.29751555083966205e-5];

const QUANTILE_CENTRE_ABOVE = [
  2.5090809287301226727e3, 3.3430575583588128105e4, 6.7265770927008700853e4, 4.5921953931549871457e4, 1.3731693765509461125e4,
  1.9715909503065514427e3, 1.3314166789178437745e2, 3.387132872796366608,
];
const QUANTILE_CENTRE_BELOW = [
  5.2264952788528545610e3, 2.8729085735721942674e4, 3.9307895800092710610e4, 2.1213794301586595867e4, 5.3941960214247511077e3,
  6.8718700749205790830e2, 4.2313330701600911252e1, 1,
];
const QUANTILE_MIDDLE_ABOVE = [
  7.7454501427834140764e-4, 2.27238449892691845833e-2, 2.4178072517745061177e-1, 1.27045825245236838258, 3.64784832476320460504,
  5.7694972214606914055, 4.6303378461565452959, 1.42343711074968357734,
];
const QUANTILE_MIDDLE_BELOW = [
  1.05075007164441684324e-9, 5.475938084995344946e-4, 1.51986665636164571966e-2, 1.4810397642748007459e-1, 6.8976733498510000455e-1,
  1.6763848301838038494, 2.05319162663775882187, 1,
];
const QUANTILE_FAR_ABOVE = [
  2.01033439929228813265e-7, 2.71155556874348757815e-5, 1.2426609473880784386e-3, 2.6532189526576123093e-2, 2.9656057182850489123e-1,
  1.7848265399172913358, 5.4637849111641143699, 6.6579046435011037772,
];
const QUANTILE_FAR_BELOW = [
  2.04426310338993978564e-15, 1.4215117583164458887e-7, 1.8463183175100546818e-5, 7.868691311456132591e-4, 1.48753612908506148525e-2,
  1.3692988092273580531e-1, 5.9983220655588793769e-1, 1,
];
