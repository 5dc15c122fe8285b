import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { sobolNormals, sobolPoints } from "../../../src/engine/numerics/sobol.js";
import { stream } from "../../../src/engine/random/stream.js";
import fixture from "../../fixtures/numerics/numerics.json";

describe("the plain Sobol sequence", () => {
  const { bits, powers, first, dimensions } = fixture.sobol;

  // Source: numerics.py, scipy.stats.qmc.Sobol(256, scramble=False). Points number 2^k hold every direction number.
  it("equals scipy's in all 256 dimensions", () => {
    const count = 2 ** (bits - 1) + 1;
    const points = sobolPoints(256, count);
    powers.forEach((row, k) => row.forEach((value, dimension) => expect(points[dimension * count + 2 ** k]).toBe(value / 2 ** bits)));
  });

  it("equals scipy's point by point, and its beginning does not depend on the number of points", () => {
    for (const count of [32, 20, 1000]) {
      const points = sobolPoints(dimensions, count);
      for (let i = 0; i < Math.min(count, 32); i++) {
        for (let d = 0; d < dimensions; d++) expect(points[d * count + i]).toBe(first[i * dimensions + d]);
      }
    }
  });
});

describe("the scrambled Sobol sequence", () => {
  const count = 256;
  const points = sobolPoints(40, count, stream("scramble", 3));

  // Theorem (Owen 1995): scrambling keeps the net, so every 256th of every axis holds one point.
  it("puts one point into every equal part of every axis", () => {
    for (let d = 0; d < 40; d++) {
      const filled = new Set(Array.from(points.subarray(d * count, (d + 1) * count), (x) => Math.floor(x * count)));
      expect(filled.size).toBe(count);
    }
  });

  // Theorem: the first two dimensions are a (0, 8, 2)-net, so every box of 2^-a by 2^-(8-a) holds one point.
  it("puts one point into every box of the first two dimensions", () => {
    for (let a = 0; a <= 8; a++) {
      const filled = new Set<number>();
      for (let i = 0; i < count; i++) filled.add(Math.floor(points[i] * 2 ** a) * count + Math.floor(points[count + i] * 2 ** (8 - a)));
      expect(filled.size).toBe(count);
    }
  });

  // Each point is uniform over scramblings: mean 1/2 and mean square 1/3 of 4,000 scramblings; five standard errors fail once in 1.7 million.
  it("makes each single point uniform over scramblings", () => {
    const runs = 4000;
    let sum = 0;
    let squares = 0;
    for (let run = 0; run < runs; run++) {
      const x = sobolPoints(3, 4, stream("uniform", run))[2 * 4 + 1];
      sum += x;
      squares += x * x;
    }
    expect(Math.abs(sum / runs - 1 / 2)).toBeLessThan(5 * Math.sqrt(1 / 12 / runs));
    expect(Math.abs(squares / runs - 1 / 3)).toBeLessThan(5 * Math.sqrt(4 / 45 / runs));
  });

  // Known integral: E exp(0.2 (z1 + ... + z10)) = exp(0.2) for independent normals. Plain sampling with 4,096 points errs by
  // sqrt((exp(0.4) - 1) / 4096) = 1.1 % of it; scrambled points by less than a tenth of that, root mean square of 20 fixed streams.
  it("integrates far better than plain sampling", () => {
    let squares = 0;
    for (let run = 0; run < 20; run++) {
      const z = sobolNormals(10, 4096, stream("integral", run));
      let mean = 0;
      for (let i = 0; i < 4096; i++) {
        let sum = 0;
        for (let d = 0; d < 10; d++) sum += z[d * 4096 + i];
        mean += Math.exp(0.2 * sum) / 4096;
      }
      squares += (mean / Math.exp(0.2) - 1) ** 2 / 20;
    }
    expect(Math.sqrt(squares)).toBeLessThan(Math.sqrt(Math.expm1(0.4) / 4096) / 10);
  });

  it("maps the points themselves to normals and gives a dimension the same numbers whatever follows it", () => {
    const few = sobolNormals(2, 64, stream("same"));
    const many = sobolNormals(5, 64, stream("same"));
    expect([...many.subarray(0, 128)]).toEqual([...few]);
    const mean = few.subarray(0, 64).reduce((a, b) => a + b) / 64;
    expect(Math.abs(mean)).toBeLessThan(0.05); // one value in each of 64 equal strata
  });

  it("never reaches 0 or 1, and one point is enough", () => {
    expect(points.every((x) => x > 0 && x < 1)).toBe(true);
    const one = sobolPoints(3, 1, stream("one"));
    expect(one.every((x) => x > 0 && x < 1)).toBe(true);
    expect([...sobolPoints(3, 1)]).toEqual([0, 0, 0]);
  });

  it("refuses numbers out of range", () => {
    for (const [dimensions, n] of [[0, 4], [257, 4], [2, 0], [2, 2 ** 20 + 1], [1.5, 4]]) expect(() => sobolPoints(dimensions, n)).toThrow(DomainError);
  });
});
