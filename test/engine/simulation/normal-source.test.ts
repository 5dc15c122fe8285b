import { describe, expect, it } from "vitest";
import { normalDistribution } from "../../../src/engine/numerics/normal.js";
import { stream } from "../../../src/engine/random/stream.js";
import { normalSource } from "../../../src/engine/simulation/normal-source.js";

const draws = 1_000_000;
const values = new Float64Array(draws);
normalSource(stream("normals", 1)).fill(values, 0, draws);

describe("normalSource", () => {
  // Independent: the distribution function. Chi-square with 199 degrees of freedom lies below 314 and above 112 but for once in a million each.
  it("fills equal parts of the normal law equally", () => {
    const parts = new Float64Array(200);
    for (const value of values) parts[Math.min(199, Math.floor(200 * normalDistribution(value)))]++;
    const square = parts.reduce((sum, count) => sum + (count - draws / 200) ** 2 / (draws / 200), 0);
    expect(square).toBeLessThan(314);
    expect(square).toBeGreaterThan(112);
  });

  // Moments of the normal law: means of x, x^2, x^3, x^4, x^6 are 0, 1, 0, 3, 15, those of their squares 1, 3, 15, 105, 10395.
  it("has the moments of the normal law", () => {
    for (const [power, mean, square] of [[1, 0, 1], [2, 1, 3], [3, 0, 15], [4, 3, 105], [6, 15, 10395]]) {
      const found = values.reduce((sum, value) => sum + value ** power, 0) / draws;
      expect(Math.abs(found - mean)).toBeLessThan(5.2 * Math.sqrt((square - mean ** 2) / draws));
    }
  });

  // The ziggurat's tail begins at 3.44: Poisson numbers of 20 million draws, five and a half standard deviations.
  it("has the tails of the normal law on both sides", () => {
    const limits = [3, 3.44, 4, 4.5];
    const found = limits.map(() => [0, 0]);
    const source = normalSource(stream("normals", 3));
    const chunk = new Float64Array(draws);
    for (let k = 0; k < 20; k++) {
      source.fill(chunk, 0, draws);
      for (const value of chunk) if (Math.abs(value) > 3) limits.forEach((limit, l) => Math.abs(value) > limit && found[l][value > 0 ? 0 : 1]++);
    }
    limits.forEach((limit, l) => {
      const expected = 20 * draws * normalDistribution(-limit);
      for (const count of found[l]) expect(Math.abs(count - expected)).toBeLessThan(5.5 * Math.sqrt(expected) + 1);
    });
  });

  it("has neighbours that know nothing of each other", () => {
    for (const lag of [1, 2, 4, 128]) {
      let sum = 0;
      let sizes = 0;
      for (let k = lag; k < draws; k++) {
        sum += values[k] * values[k - lag];
        sizes += (values[k] ** 2 - 1) * (values[k - lag] ** 2 - 1);
      }
      expect(Math.abs(sum / draws)).toBeLessThan(5.2 / Math.sqrt(draws));
      expect(Math.abs(sizes / draws)).toBeLessThan(5.2 * (2 / Math.sqrt(draws)));
    }
  });

  it("gives the same numbers in whatever pieces, and others for another stream", () => {
    const pieces = new Float64Array(5000);
    const source = normalSource(stream("normals", 1));
    for (let from = 0; from < 5000; from += 7) source.fill(pieces, from, Math.min(from + 7, 5000));
    expect(pieces).toEqual(values.slice(0, 5000));
    const other = new Float64Array(1000);
    normalSource(stream("normals", 2)).fill(other, 0, 1000);
    expect(other.filter((value, k) => value === values[k]).length).toBe(0);
  });
});
