import { requireDomain } from "./domain-error.js";

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
 * @returns nodes in increasing order and weights that sum to 1, absolute error below 1e-15; shared, not to be written to
 * @throws {DomainError} n is out of range
 * @source Newton's iteration on the Legendre recurrence from the usual cosine starting values, e.g. Press et al. (2007),
 *   Numerical Recipes, 4.6 (method only)
 */
export function gaussLegendre(n: number): QuadratureRule {
  requireDomain(Number.isInteger(n) && n >= 1 && n <= 1000, "Number of quadrature points", n, "a whole number from 1 to 1000");
  let rule = known.get(n);
  if (rule === undefined) known.set(n, (rule = makeRule(n)));
  return rule;
}

function makeRule(n: number): QuadratureRule {
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < (n + 1) >> 1; i++) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    let slope = 0;
    for (let iteration = 0; iteration < 100; iteration++) {
      let previous = 0;
      let value = 1;
      for (let k = 1; k <= n; k++) [previous, value] = [value, x * value + ((k - 1) / k) * (x * value - previous)];
      slope = (n * (x * value - previous)) / (x * x - 1);
      const step = value / slope;
      x -= step;
      if (Math.abs(step) < 1e-15) break;
    }
    if (2 * i + 1 === n) x = 0;
    nodes[i] = (1 - x) / 2;
    nodes[n - 1 - i] = (1 + x) / 2;
    weights[i] = weights[n - 1 - i] = 1 / ((1 - x * x) * slope * slope);
  }
  return { nodes, weights };
}
