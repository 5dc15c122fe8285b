import { requireDomain } from "./domain-error.js";
import { sine } from "./sine.js";

/** Nodes and weights of a quadrature rule. */
export interface QuadratureRule {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
}

const known = new Map<number, QuadratureRule>();

/**
 * Gauss-Legendre rule on the interval from 0 to 1, exact for polynomials of degree 2 n - 1.
 *
 * @param n  number of points, 1 to 1000
 * @returns nodes in increasing order and weights that sum to 1, error below 1e-15; shared, not to be written to
 * @throws {DomainError} n is out of range
 * @source Newton's iteration on the Legendre recurrence from the usual cosine starting values, as in Press et al. (2007),
 *   Numerical Recipes, 4.6 (method only)
 */
export function gaussLegendre(n: number): QuadratureRule {
  requireDomain(Number.isInteger(n) && n >= 1 && n <= 1000, "Number of quadrature points", n, "a whole number from 1 to 1000");
  let rule = known.get(n);
  if (rule === undefined) known.set(n, (rule = makeRule(n)));
  return rule;
}

/** Newton's iteration for t = 1 - x, in which nodes and weights near the end keep their relative accuracy. */
function makeRule(n: number): QuadratureRule {
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < (n + 1) >> 1; i++) {
    let t = 2 * sine((Math.PI * (i + 0.75)) / (2 * n + 1)) ** 2;
    let slope = 0;
    for (let iteration = 0; iteration < 100; iteration++) {
      let value = 1;
      let rise = 0; // of the polynomial over the one of a degree less
      for (let k = 0; k < n; k++) {
        rise = (k * rise - (2 * k + 1) * t * value) / (k + 1);
        value += rise;
      }
      slope = (n * (rise - t * value)) / (t * (2 - t));
      const step = value / slope;
      t -= step;
      if (Math.abs(step) < 1e-15 * t) break;
    }
    if (2 * i + 1 === n) t = 1;
    nodes[i] = t / 2;
    nodes[n - 1 - i] = 1 - t / 2;
    weights[i] = weights[n - 1 - i] = 1 / (t * (2 - t) * slope * slope);
  }
  return { nodes, weights };
}
