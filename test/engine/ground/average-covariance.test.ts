import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { averageCovariance } from "../../../src/engine/ground/average-covariance.js";
import { lineFamily, type LineCorrelationName } from "../../../src/engine/ground/correlation.js";
import { choleskyInPlace } from "../../../src/engine/numerics/cholesky.js";
import fixture from "../../fixtures/ground/ground.json";

const MODELS: LineCorrelationName[] = ["markov", "gaussian", "spherical", "triangular", "markov2"];

describe("averageCovariance", () => {
  // Source: ground.py, adaptive quadrature of the correlation against the overlap of the cells. Relative where the value is not tiny.
  it.each(MODELS)("meets adaptive quadrature, %s", (model) => {
    for (const { distance, a, b, value } of fixture.cells.filter((cell) => cell.model === model)) {
      const found = averageCovariance(lineFamily(model), distance, a, b);
      expect(Math.abs(found - value), `cells ${a} and ${b} at ${distance}`).toBeLessThan(5e-9 * value + 1e-15);
      expect(averageCovariance(lineFamily(model), -distance, b, a)).toBe(found);
    }
  });

  // Closed form: Markov cells apart are the point value times sinh(h)/h of each, at any distance and thickness.
  it("keeps its digits for cells far apart or thin, Markov", () => {
    const shape = (h: number) => (h < 1e-4 ? 1 + h * h / 6 : Math.sinh(h) / h);
    fc.assert(
      fc.property(fc.double({ min: -7, max: 0.3, noNaN: true }), fc.double({ min: -7, max: 0.3, noNaN: true }), fc.double({ min: 0, max: 200, noNaN: true }), (la, lb, gap) => {
        const a = 10 ** la;
        const b = 10 ** lb;
        const d = gap + (a + b) / 2;
        const exact = Math.exp(-2 * d) * shape(a) * shape(b);
        expect(Math.abs(averageCovariance(lineFamily("markov"), d, a, b) / exact - 1)).toBeLessThan(1e-8);
      }),
      { seed: 9, numRuns: 500 },
    );
  });

  // Identity: a cell cut in two is the weighted mean of its halves, overlapping or not.
  it.each(MODELS)("agrees with itself when a cell is cut, %s", (model) => {
    const family = lineFamily(model);
    fc.assert(
      fc.property(fc.double({ min: -3, max: 3, noNaN: true }), fc.double({ min: 0.01, max: 2, noNaN: true }), fc.double({ min: 0.01, max: 2, noNaN: true }), fc.double({ min: 0.01, max: 0.99, noNaN: true }), (d, a, b, share) => {
        const whole = averageCovariance(family, d, a, b);
        const first = averageCovariance(family, d - (b * (1 - share)) / 2, a, b * share);
        const second = averageCovariance(family, d + (b * share) / 2, a, b * (1 - share));
        expect(Math.abs(share * first + (1 - share) * second - whole)).toBeLessThan(1e-7);
      }),
      { seed: 4, numRuns: 300 },
    );
  });

  // Theory: the averages of a random field have a positive definite covariance, whatever the cells.
  it.each(MODELS)("gives positive semi-definite matrices for any cells, %s", (model) => {
    const family = lineFamily(model);
    const cell = fc.record({ middle: fc.double({ min: 0, max: 10, noNaN: true }), thickness: fc.double({ min: 0, max: 3, noNaN: true }) });
    fc.assert(
      fc.property(fc.array(cell, { minLength: 2, maxLength: 12 }), (cells) => {
        const n = cells.length;
        const matrix = Float64Array.from({ length: n * n }, (_, at) => {
          const [p, q] = [cells[Math.floor(at / n)], cells[at % n]];
          return averageCovariance(family, p.middle - q.middle, p.thickness, q.thickness);
        });
        for (let i = 0; i < n; i++) matrix[i * n + i] *= 1 + 1e-9; // closed forms are exact to about so much
        expect(() => choleskyInPlace(matrix, n)).not.toThrow();
      }),
      { seed: 6, numRuns: 300 },
    );
  });
});
