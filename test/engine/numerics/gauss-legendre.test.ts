import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { gaussLegendre } from "../../../src/engine/numerics/gauss-legendre.js";
import fixture from "../../fixtures/numerics/numerics.json";

describe("gaussLegendre", () => {
  // Source: numerics.py, Newton's iteration in 50 decimal digits.
  it.each(fixture.gaussLegendre)("meets nodes and weights of $n points to 1e-15", ({ n, nodes, weights }) => {
    const rule = gaussLegendre(n);
    nodes.forEach((node, k) => expect(Math.abs(rule.nodes[k] - node)).toBeLessThan(1e-15));
    weights.forEach((weight, k) => expect(Math.abs(rule.weights[k] / weight - 1)).toBeLessThan(1e-14));
    weights.forEach((weight, k) => expect(Math.abs(rule.weights[k] - weight)).toBeLessThan(1e-15));
  });

  // Identity: n points integrate x^(2n-1) over (0, 1) to 1/(2n), and miss x^(2n) by the known remainder n!^4 / ((2n+1) (2n)!^2) (2n)! / (2n)!.
  it.each([1, 2, 3, 5, 8])("is exact to degree 2n - 1 and no further, n = %i", (n) => {
    const { nodes, weights } = gaussLegendre(n);
    const mean = (power: number) => nodes.reduce((sum, x, k) => sum + weights[k] * x ** power, 0);
    for (let power = 0; power < 2 * n; power++) expect(Math.abs(mean(power) - 1 / (power + 1))).toBeLessThan(2e-15);
    let remainder = 1 / (2 * n + 1); // n!^4 / ((2n)!^2 (2n + 1)), the error for x^(2n)
    for (let k = 1; k <= n; k++) remainder *= (k / (n + k)) ** 2;
    expect(Math.abs((1 / (2 * n + 1) - mean(2 * n)) / remainder - 1)).toBeLessThan(1e-6);
  });

  it.each([0, 1.5, -3, 1001, Number.NaN])("refuses %d points", (n) => {
    expect(() => gaussLegendre(n)).toThrow(DomainError);
  });
});
