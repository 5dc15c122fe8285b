import { exponential } from "./exponential.js";
import { exponentialLessOne } from "./exponential-less-one.js";
import { logarithm, logarithmOfOnePlus } from "./logarithm.js";

const LN2 = 0.6931471805599453;
/** From here on e^-2x is below the last place of 1. */
const FLAT = 20;
/** From here on the square of x hides a 1, and further out it is too large for a number. */
const FAR = 268435456;

// Of `Math.tanh` and its sisters every engine may give other last digits; these are the same to the bit in all.

/**
 * Hyperbolic tangent.
 *
 * @param x  any number
 * @returns tanh x, within two units in the last place
 */
export function hyperbolicTangent(x: number): number {
  const size = Math.abs(x);
  if (size >= FLAT) return x > 0 ? 1 : -1;
  const e = exponentialLessOne(2 * size);
  const found = size < 1 ? e / (e + 2) : 1 - 2 / (e + 2);
  return x < 0 ? -found : found;
}

/**
 * Hyperbolic sine.
 *
 * @param x  -708 to 708; beyond, as there
 * @returns sinh x, within two units in the last place
 */
export function hyperbolicSine(x: number): number {
  const size = Math.abs(x);
  const e = exponentialLessOne(Math.min(size, 708));
  const half = (e + e / (e + 1)) / 2;
  return x < 0 ? -half : half;
}

/**
 * Hyperbolic cosine.
 *
 * @param x  -708 to 708; beyond, as there
 * @returns cosh x, >= 1, within two units in the last place
 */
export function hyperbolicCosine(x: number): number {
  const e = exponential(Math.abs(x));
  return (e + 1 / e) / 2;
}

/**
 * The number whose hyperbolic sine is given.
 *
 * @param x  any number
 * @returns arsinh x, within two units in the last place
 */
export function inverseHyperbolicSine(x: number): number {
  const size = Math.abs(x);
  const found = size < FAR ? logarithmOfOnePlus(size + (size * size) / (1 + Math.sqrt(1 + size * size))) : logarithm(size) + LN2;
  return x < 0 ? -found : found;
}
