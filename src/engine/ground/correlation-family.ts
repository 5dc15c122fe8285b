import { exponentialLessOne } from "../numerics/exponential-less-one.js";
import { exponential } from "../numerics/exponential.js";
import { normalCentralChance, normalDistribution, unitNormalLoss } from "../numerics/normal.js";

/**
 * A correlation along a line and its integrals, in the scaled lag t = lag / scale of fluctuation, t >= 0. Each is accurate
 * relative to its own size: the integrals from 0 near 0, the tails far out, so that neither differences of near nor of far
 * cells lose their digits.
 */
export interface CorrelationFamily {
  /** rho(t) */
  readonly correlation: (t: number) => number;
  /** integral of rho from 0 to t; it tends to 1/2 because t is scaled */
  readonly integral: (t: number) => number;
  /** integral of rho from t to infinity */
  readonly tail: (t: number) => number;
  /** integral of `integral` from 0 to t, so that its second derivative is rho */
  readonly doubleIntegral: (t: number) => number;
  /** integral of `tail` from t to infinity; second derivative rho too */
  readonly doubleTail: (t: number) => number;
}

/** Markov (exponential) correlation exp(-2 t). @source Vanmarcke (1983), Random Fields: Analysis and Synthesis */
export const markovFamily: CorrelationFamily = {
  correlation: (t) => exponential(-2 * t),
  integral: (t) => -exponentialLessOne(-2 * t) / 2,
  tail: (t) => exponential(-2 * t) / 2,
  doubleIntegral: (t) => (t < 0.5 ? exponentialSeries(2 * t, 1, 0) / 4 : (exponentialLessOne(-2 * t) + 2 * t) / 4),
  doubleTail: (t) => exponential(-2 * t) / 4,
};

const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);

/** Gaussian (squared exponential) correlation exp(-pi t^2). @source Vanmarcke (1983), Random Fields: Analysis and Synthesis */
export const gaussianFamily: CorrelationFamily = {
  correlation: (t) => exponential(-Math.PI * t * t),
  integral: (t) => normalCentralChance(ROOT_TWO_PI * t),
  tail: (t) => normalDistribution(-ROOT_TWO_PI * t),
  doubleIntegral: (t) => t * normalCentralChance(ROOT_TWO_PI * t) + exponentialLessOne(-Math.PI * t * t) / (2 * Math.PI),
  doubleTail: (t) => unitNormalLoss(ROOT_TWO_PI * t) / ROOT_TWO_PI,
};

/** Where the spherical correlation ends, in scales of fluctuation. */
const RANGE = 4 / 3;

/** Spherical correlation of range 4/3. @source Fenton & Griffiths (2008), Risk Assessment in Geotechnical Engineering, ch. 3 */
export const sphericalFamily: CorrelationFamily = within(RANGE, {
  correlation: (v) => v * v * (1.5 - 0.5 * v),
  integral: (u) => RANGE * u * (1 - u * (0.75 - 0.125 * u * u)),
  tail: (v) => RANGE * v * v * v * (0.5 - 0.125 * v),
  doubleIntegral: (u) => RANGE ** 2 * u * u * (0.5 - u * (0.25 - 0.025 * u * u)),
  doubleTail: (v) => RANGE ** 2 * (v * v) ** 2 * (0.125 - 0.025 * v),
});

/** Triangular correlation 1 - t up to t = 1; valid along a line only. @source Vanmarcke (1983), as above */
export const triangularFamily: CorrelationFamily = within(1, {
  correlation: (v) => v,
  integral: (u) => u * (1 - 0.5 * u),
  tail: (v) => 0.5 * v * v,
  doubleIntegral: (u) => u * u * (0.5 - u / 6),
  doubleTail: (v) => (v * v * v) / 6,
});

/** Second-order Markov correlation (1 + 4 t) exp(-4 t). @source Vanmarcke (1983), Random Fields: Analysis and Synthesis */
export const secondOrderMarkovFamily: CorrelationFamily = {
  correlation: (t) => (1 + 4 * t) * exponential(-4 * t),
  integral: (t) => -exponentialLessOne(-4 * t) / 2 - t * exponential(-4 * t),
  tail: (t) => (t + 0.5) * exponential(-4 * t),
  doubleIntegral: (t) => (t < 0.25 ? exponentialSeries(4 * t, 3, 1) / 16 : t / 2 - 3 / 16 + (t / 4 + 3 / 16) * exponential(-4 * t)),
  doubleTail: (t) => (t / 4 + 3 / 16) * exponential(-4 * t),
};

/** (c + d y) exp(-y) less its terms below y^2, d being 0 or 1: sum from k = 2 of (c - d k) (-y)^k / k!, for y <= 1. */
function exponentialSeries(y: number, c: number, d: number): number {
  let sum = 0;
  let power = -y;
  for (let k = 2; k < 20; k++) {
    power *= -y / k;
    sum += (c - d * k) * power;
  }
  return sum;
}

/**
 * A correlation that ends at a range: integrals from 0 are given in u = t / range, tails and the correlation itself in
 * v = 1 - u, in which they are products of small numbers near the range.
 */
function within(range: number, inside: CorrelationFamily): CorrelationFamily {
  const fromEnd = (f: (v: number) => number) => (t: number) => (t < range ? f(1 - t / range) : 0);
  return {
    correlation: fromEnd(inside.correlation),
    integral: (t) => (t < range ? inside.integral(t / range) : 0.5),
    tail: fromEnd(inside.tail),
    doubleIntegral: (t) => (t < range ? inside.doubleIntegral(t / range) : inside.doubleIntegral(1) + (t - range) / 2),
    doubleTail: fromEnd(inside.doubleTail),
  };
}
