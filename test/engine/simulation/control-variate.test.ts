import { describe, expect, it } from "vitest";
import { normalDensity, normalDistribution, normalQuantile } from "../../../src/engine/numerics/normal.js";
import { caution, controlledMean, covarianceOf, meanOf } from "../../../src/engine/simulation/control-variate.js";
import { stream } from "../../../src/engine/random/stream.js";

const numbers = stream("control variate", 1);
const sample = (n: number): Float64Array => Float64Array.from({ length: n }, () => 3 + numbers.normal());

describe("controlledMean", () => {
  // Identity: elements that are a multiple of the form say no more than the form in all realisations together.
  it("is the pooled mean where the form says all", () => {
    const [x, z] = [sample(40), sample(160)];
    const found = controlledMean(x.map((v) => 5 * v), x, z);
    expect(found.mean).toBeCloseTo(5 * meanOf(Float64Array.of(...x, ...z)), 12);
    expect(found.coefficient).toBeCloseTo(4, 12);
    expect(found.correlation).toBeCloseTo(1, 12);
  });

  // Least squares by hand: of all coefficients it takes the one with the smallest error.
  it("takes the coefficient with the smallest variance", () => {
    const [x, z] = [sample(40), sample(200)];
    const y = x.map((v) => 2 * v + 0.5 * numbers.normal());
    const { coefficient } = controlledMean(y, x, z);
    const variance = (c: number): number => {
      const residual = y.map((v, i) => v - c * x[i]);
      return covarianceOf(residual, residual) / 40 + (c * c * covarianceOf(x, x)) / 200;
    };
    for (const step of [-0.02, 0.02]) expect(variance(coefficient)).toBeLessThan(variance(coefficient + step));
  });

  // Independent: repetition. 4,000 experiments; the mean square of a standard error's worth scatters by root(2 / 4,000) = 2.2 %, five of these allowed.
  it.each([[8, 100, 0.9], [14, 50, 0.9], [30, 300, 0.99], [30, 300, 0]])("has errors that repetition confirms: %d elements, %d alone, correlation %d", (n, many, rho) => {
    const experiments = 4000;
    let worth = 0;
    let expected = 0;
    for (let k = 0; k < experiments; k++) {
      const [x, z] = [sample(n), sample(many)];
      const y = x.map((v) => 10 + rho * (v - 3) + Math.sqrt(1 - rho * rho) * numbers.normal());
      const { mean, error } = controlledMean(y, x, z);
      worth += (mean - 10) ** 2 / experiments;
      expected += error ** 2 / experiments;
    }
    // The caution for few realisations makes the stated variance larger than the true one by up to (n - 1) / (n - 3), twice that with a coefficient.
    expect(worth / expected).toBeLessThan(1.12);
    expect(worth / expected).toBeGreaterThan(0.88 / caution(n, 1));
  });

  it("is the plain mean without the form, and the form's without elements", () => {
    const [y, z] = [sample(30), sample(50)];
    const plain = controlledMean(y, y.map(() => 0), new Float64Array(0));
    expect(plain.mean).toBeCloseTo(meanOf(y), 12);
    expect(plain.error).toBeCloseTo(Math.sqrt((covarianceOf(y, y) * caution(30, 1)) / 30), 12);
    const form = controlledMean(y.subarray(0, 1), y.subarray(0, 1), z);
    expect(form.mean).toBeCloseTo(meanOf(z), 12);
    expect(form.error).toBeCloseTo(Math.sqrt(covarianceOf(z, z) / 50), 12);
  });

  // By hand: the elements saw nothing, so the form stands for them: its mean 0.1 counts in the measure of its realisations.
  it("lets the form speak where elements never varied", () => {
    const none = new Float64Array(30);
    const z = Float64Array.from({ length: 300 }, (_, k) => (k < 30 ? 1 : 0));
    const found = controlledMean(none, none, z);
    expect(found.correlation).toBeUndefined();
    expect(found.mean).toBeCloseTo((0.1 * 300) / 330, 12);
    expect(found.error).toBeGreaterThan(0);
    const nothing = controlledMean(none, none, new Float64Array(300));
    expect(nothing).toEqual({ mean: 0, error: 0, coefficient: 300 / 330, slope: 1, correlation: undefined });
  });
});

// By hand: (n - 1) / (n - 2) for the coefficient, and the variance of Student's t, (n - 2) / (n - 4).
it("caution", () => {
  expect(caution(12, 2)).toBeCloseTo((11 / 10) * (10 / 8), 12);
  expect(caution(30, 1)).toBeCloseTo(29 / 27, 12);
  expect(caution(2, 1)).toBe(10);
  expect(caution(2, 2)).toBe(10);
});

// By hand: sums of products over n - 1.
it("covarianceOf and meanOf", () => {
  expect(covarianceOf(Float64Array.of(1, 2, 6), Float64Array.of(2, 0, 1))).toBeCloseTo(-0.5, 12);
  expect(covarianceOf(Float64Array.of(1), Float64Array.of(2))).toBe(0);
  expect(meanOf(new Float64Array(0))).toBe(0);
});

// Coverage by repetition: damage in one realisation of thirty, by the form and by elements not quite alike. One damaged building among the
// elements would make a slope of its own, and an error that knows nothing of it. Means and errors must stay right: 95 % of means lie within
// two errors (five deviations of the count of a thousand), and their scatter is what is stated.
it("rests on the form as it is where damage is rare", () => {
  const repetitions = 1000;
  const numbers = stream("rare", 1);
  const least = -normalQuantile(1 / 30);
  const damage = (z: number): number => Math.min(Math.max((z - least) * 600, 0), 2000);
  const pair = (): [number, number] => {
    const z = numbers.normal();
    return [damage(z + 0.05 * numbers.normal()), damage(z)];
  };
  // E max(a (s Z - t), 0) = a (s phi(t / s) - t Phi(-t / s)) for z with the standard deviation s; its cap is out of reach.
  const s = Math.sqrt(1 + 0.05 ** 2);
  const truth = 600 * (s * normalDensity(least / s) - least * normalDistribution(-least / s));
  let within = 0;
  let square = 0;
  let stated = 0;
  for (let r = 0; r < repetitions; r++) {
    const pairs = Array.from({ length: 30 }, pair);
    const alone = Float64Array.from({ length: 2000 }, () => pair()[1]);
    const { mean, error } = controlledMean(Float64Array.from(pairs, ([y]) => y), Float64Array.from(pairs, ([, x]) => x), alone);
    if (Math.abs(mean - truth) <= 2 * error) within++;
    square += (mean - truth) ** 2 / repetitions;
    stated += error ** 2 / repetitions;
  }
  expect(within / repetitions).toBeGreaterThan(0.95 - 5 * Math.sqrt((0.95 * 0.05) / repetitions));
  expect(Math.sqrt(square / stated)).toBeGreaterThan(0.8);
  expect(Math.sqrt(square / stated)).toBeLessThan(1.2);
});
