import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { bracketedRoot } from "../../../src/engine/numerics/root.js";

describe("bracketedRoot", () => {
  // Closed forms.
  it.each([
    [(x: number) => x * x - 2, 0, 2, Math.SQRT2],
    [(x: number) => Math.exp(x) - 5, 3, -4, Math.log(5)],
    [(x: number) => Math.cos(x), 1, 2, Math.PI / 2],
    [(x: number) => (x - 1) ** 3, 0, 4, 1],
    [(x: number) => (x < 0.3 ? -1 : 1), 0, 1, 0.3],
    [(x: number) => x, 0, 5, 0],
    [(x: number) => 1e-200 * (x - 7), 0, 10, 7],
  ])("finds the root of %s", (f, low, high, root) => {
    const tolerance = root === 1 ? 2e-5 : 1e-14; // a triple root is known to the cube root of rounding only
    expect(Math.abs(bracketedRoot(f, low, high) - root)).toBeLessThan(tolerance);
  });

  // Work: bisection to the last digit would take 54 evaluations.
  it.each([
    ["exp", (x: number) => Math.exp(x) - 5, -4, 3],
    ["cubic", (x: number) => x ** 3 - 2 * x - 5, 0, 4],
    ["logarithm", (x: number) => Math.log(x) - 1, 0.1, 10],
    ["straight line", (x: number) => 3 * x - 1, -10, 10],
  ])("needs few evaluations where the function is smooth: %s", (_, f, low, high) => {
    let calls = 0;
    const root = bracketedRoot((x) => (calls++, f(x)), low, high);
    expect(Math.abs(f(root))).toBeLessThan(2e-14);
    expect(calls).toBeLessThan(15);
  });

  // Work: where the function is a step in all but name, little more than bisection's 41 evaluations for this bracket and tolerance.
  it("never needs many evaluations", () => {
    fc.assert(
      fc.property(fc.double({ min: -20, max: 20, noNaN: true }), fc.double({ min: 0.01, max: 30, noNaN: true }), (root, steepness) => {
        let calls = 0;
        const f = (x: number) => (calls++, Math.tanh((x - root) / steepness));
        expect(Math.abs(bracketedRoot(f, -25, 30, 1e-10) - root)).toBeLessThan(1e-9);
        expect(calls).toBeLessThan(45);
      }),
      { seed: 2 },
    );
  });

  it("refuses a bracket without a change of sign and a function that is not a number", () => {
    expect(() => bracketedRoot((x) => x * x + 1, -1, 1)).toThrow(DomainError);
    expect(() => bracketedRoot(() => 1e-200, -1, 1)).toThrow(DomainError);
    expect(() => bracketedRoot(() => Number.NaN, -1, 1)).toThrow(DomainError);
    expect(() => bracketedRoot((x) => (Math.abs(x) < 0.9 ? Number.NaN : x), -1, 1)).toThrow("not a number at");
  });
});
