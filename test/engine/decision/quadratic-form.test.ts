import { describe, expect, it } from "vitest";
import { lowRankForm } from "../../../src/engine/decision/quadratic-form.js";
import { stream } from "../../../src/engine/random/stream.js";

const n = 12;
const random = stream("forms", 0);
const covariance = Float64Array.from({ length: n * n }, (_, at) => Math.exp(-0.3 * Math.abs(Math.floor(at / n) - (at % n))));
const half = Float64Array.from({ length: n * n }, () => random.normal());
const matrix = Float64Array.from({ length: n * n }, (_, at) => half[at] + half[(at % n) * n + Math.floor(at / n)]);

describe("largest parts of a quadratic form", () => {
  // Identity: with as many parts as cells nothing is left out, so sum of value v v' is the matrix itself.
  it("all parts together are the form", () => {
    const { values, functionals } = lowRankForm(matrix, covariance, n, n);
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        let sum = 0;
        for (let r = 0; r < n; r++) sum += values[r] * functionals[r * n + i] * functionals[r * n + j];
        expect(sum).toBeCloseTo(matrix[i * n + j], 8);
      }
    }
  });

  // Identity: the functionals are uncorrelated and have unit variance in the metric of the field.
  it("the parts are uncorrelated with variance one", () => {
    const ranks = 4;
    const { functionals } = lowRankForm(matrix, covariance, n, ranks);
    for (let r = 0; r < ranks; r++) {
      for (let q = 0; q < ranks; q++) {
        let sum = 0;
        for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) sum += functionals[r * n + i] * covariance[i * n + j] * functionals[q * n + j];
        expect(sum).toBeCloseTo(r === q ? 1 : 0, 6);
      }
    }
  });

  // Identity: E[g' M g] = tr(M S) and Var = 2 tr(M S M S), summed here entry by entry.
  it("expectation and variance are those of the whole form", () => {
    const { trace, variance } = lowRankForm(matrix, covariance, n, 2);
    const ms = new Float64Array(n * n);
    for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) for (let k = 0; k < n; k++) ms[i * n + j] += matrix[i * n + k] * covariance[k * n + j];
    let t = 0;
    let v = 0;
    for (let i = 0; i < n; i++) {
      t += ms[i * n + i];
      for (let j = 0; j < n; j++) v += 2 * ms[i * n + j] * ms[j * n + i];
    }
    expect(trace).toBeCloseTo(t, 8);
    expect(variance).toBeCloseTo(v, 6);
  });
});
