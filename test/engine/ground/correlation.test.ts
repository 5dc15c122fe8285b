import { describe, expect, it } from "vitest";
import { correlation, varianceReduction, type LineCorrelationName } from "../../../src/engine/ground/correlation.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import fixture from "../../fixtures/ground/ground.json";

const MODELS: LineCorrelationName[] = ["markov", "ellipsoidal", "gaussian", "spherical", "triangular", "markov2"];

// Source: computed with scipy 1.17.1 by integrating the correlations, to the six decimals given.
const VARIANCE_FUNCTION: [number, Record<"markov" | "gaussian" | "triangular" | "spherical" | "markov2", number>][] = [
  [0.1, { markov: 0.936538, gaussian: 0.994797, triangular: 0.966667, spherical: 0.962521, markov2: 0.988602 }],
  [0.5, { markov: 0.735759, gaussian: 0.887096, triangular: 0.833333, spherical: 0.815137, markov2: 0.838338 }],
  [1, { markov: 0.567668, gaussian: 0.683257, triangular: 0.666667, spherical: 0.646094, markov2: 0.641026 }],
  [2, { markov: 0.377289, gaussian: 0.420423, triangular: 0.416667, spherical: 0.411111, markov2: 0.406365 }],
  [10, { markov: 0.095, gaussian: 0.096817, triangular: 0.096667, spherical: 0.096444, markov2: 0.09625 }],
  [20, { markov: 0.04875, gaussian: 0.049204, triangular: 0.049167, spherical: 0.049111, markov2: 0.049062 }],
  [100, { markov: 0.00995, gaussian: 0.009968, triangular: 0.009967, spherical: 0.009964, markov2: 0.009963 }],
];

describe.each(MODELS)("%s correlation", (model) => {
  // Definition: the integral over all lags is the scale of fluctuation; Simpson's rule, the kinks on nodes.
  it("has the scale of fluctuation as its integral, 1 at no lag, and falls", () => {
    const scale = 3;
    const steps = 60_000;
    const end = 20 * scale;
    let sum = 0;
    for (let k = 0; k <= steps; k++) sum += (k === 0 || k === steps ? 1 : k % 2 === 1 ? 4 : 2) * correlation(model, (k * end) / steps, scale);
    expect(Math.abs((2 * sum * end) / steps / 3 / scale - 1)).toBeLessThan(1e-8);
    expect(correlation(model, 0, scale)).toBe(1);
    for (let lag = 0; lag < 9; lag += 0.1) {
      expect(correlation(model, lag + 0.1, scale)).toBeLessThanOrEqual(correlation(model, lag, scale));
      expect(correlation(model, -lag, scale)).toBe(correlation(model, lag, scale));
    }
  });

  it("refuses a scale of 0 and lengths that are none", () => {
    expect(() => correlation(model, 1, 0)).toThrow(DomainError);
    expect(() => correlation(model, Number.NaN, 1)).toThrow(DomainError);
    expect(() => varianceReduction(model, -1, 1)).toThrow(DomainError);
    expect(() => varianceReduction(model, 1, Infinity)).toThrow(DomainError);
    expect(() => varianceReduction(model, Number.NaN, 1)).toThrow(DomainError);
  });

  // Limits: 1 for no length, theta / T for a great one, without a jump where series and closed forms meet.
  it("has a variance function that falls smoothly from 1 to theta / T", () => {
    expect(varianceReduction(model, 0, 2)).toBe(1);
    expect(varianceReduction(model, 1e-200, 2)).toBe(1);
    for (const length of [1e8, 1e120, 1e200]) expect(Math.abs((varianceReduction(model, length, 2) * length) / 2 - 1)).toBeLessThan(1e-7);
    const values = Array.from({ length: 8000 }, (_, k) => varianceReduction(model, 0.001 * 1.001 ** k, 1));
    const drops = values.slice(1).map((value, k) => values[k] - value);
    expect(Math.min(...drops)).toBeGreaterThan(0);
    expect(Math.max(...drops)).toBeLessThan(0.001);
  });
});

describe("varianceReduction", () => {
  it.each(VARIANCE_FUNCTION)("meets the table of variance functions at T = %d theta", (length, row) => {
    for (const [model, value] of Object.entries(row)) expect(Math.abs(varianceReduction(model as LineCorrelationName, 2 * length, 2) - value)).toBeLessThan(5.1e-7);
    expect(varianceReduction("ellipsoidal", length, 1)).toBe(varianceReduction("markov", length, 1));
  });

  // Source: ground.py, adaptive quadrature of (1 - s) rho(s T), to 1e-13.
  it("meets adaptive quadrature over seven decades of length", () => {
    for (const { model, length, value } of fixture.variances) {
      expect(Math.abs(varianceReduction(model as LineCorrelationName, length, 1) / value - 1), `${model} at ${length}`).toBeLessThan(2e-13);
    }
  });

  // By hand: Markov at T = theta is (1 + exp(-2)) / 2, triangular 2/3.
  it("meets the values that can be worked by hand", () => {
    expect(varianceReduction("markov", 7, 7)).toBeCloseTo((1 + Math.exp(-2)) / 2, 15);
    expect(varianceReduction("triangular", 7, 7)).toBeCloseTo(2 / 3, 15);
  });

  it("refuses a model that it does not know", () => {
    expect(() => varianceReduction("exponential" as LineCorrelationName, 1, 1)).toThrow("Correlation is exponential");
    expect(() => correlation("" as LineCorrelationName, 1, 1)).toThrow(DomainError);
  });
});
