import { DomainError } from "./domain-error.js";

/**
 * Root of a continuous function between two places where its signs differ.
 *
 * Inverse quadratic and secant steps, with a bisection whenever they do not halve the bracket quickly enough: never more
 * than about the square of the bisections that the tolerance needs.
 *
 * @param f  the function
 * @param low  one end of the bracket
 * @param high  the other end
 * @param tolerance  absolute tolerance on the root, >= 0; a few units in the last place are always allowed
 * @returns the root
 * @throws {DomainError} the signs at the ends do not differ, or the function is not a number somewhere
 * @source Brent (1973), Algorithms for Minimization without Derivatives, chapter 4
 */
export function bracketedRoot(f: (x: number) => number, low: number, high: number, tolerance = 0): number {
  let a = low, b = high;
  let fa = f(a), fb = f(b);
  const bracketed = (fa <= 0 && fb >= 0) || (fa >= 0 && fb <= 0);
  if (!bracketed) throw new DomainError(`No root between ${low} and ${high}: the function is ${fa} and ${fb} at the ends.`);
  let c = a, fc = fa;
  let step = b - a, before = step;
  for (;;) {
    if (Math.abs(fc) < Math.abs(fb)) [a, b, c, fa, fb, fc] = [b, c, b, fb, fc, fb];
    const allowed = 2 * Number.EPSILON * Math.abs(b) + tolerance / 2 + Number.MIN_VALUE;
    const half = (c - b) / 2;
    if (Math.abs(half) <= allowed || fb === 0) return b;
    if (Math.abs(before) < allowed || Math.abs(fa) <= Math.abs(fb)) step = before = half;
    else {
      let p: number, q: number;
      const s = fb / fa;
      if (a === c) {
        p = 2 * half * s;
        q = 1 - s;
      } else {
        const t = fa / fc, r = fb / fc;
        p = s * (2 * half * t * (t - r) - (b - a) * (r - 1));
        q = (t - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      p = Math.abs(p);
      const use = 2 * p < Math.min(3 * half * q - Math.abs(allowed * q), Math.abs(before * q));
      before = use ? step : half;
      step = use ? p / q : half;
    }
    a = b;
    fa = fb;
    b += Math.abs(step) > allowed ? step : Math.sign(half) * allowed;
    fb = f(b);
    if (Number.isNaN(fb)) throw new DomainError(`The function whose root is sought is not a number at ${b}.`);
    if (fb > 0 === fc > 0) [c, fc, step, before] = [a, fa, b - a, b - a];
  }
}
