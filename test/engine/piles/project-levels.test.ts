import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { averageLevels, projectLevels } from "../../../src/engine/piles/project-levels.js";
import { stream } from "../../../src/engine/random/stream.js";

const bounds = Float64Array.of(0, 0.4, 1, 2.5, 7);
const onto = Float64Array.of(0, 1, 2, 3, 5);
const rings = 3;
const draws = stream("levels", 1);
const shares = Float64Array.from({ length: rings * 4 }, () => draws.uniform());
const field = Float64Array.from({ length: rings * 4 }, () => draws.normal());
const sum = (values: ArrayLike<number>) => Array.from(values).reduce((a, b) => a + b, 0);

describe("projectLevels", () => {
  it("keeps the sum of each ring", () => {
    const moved = projectLevels(shares, rings, bounds, onto);
    for (let r = 0; r < rings; r++) expect(sum(moved.subarray(r * 4, r * 4 + 4))).toBeCloseTo(sum(shares.subarray(r * 4, r * 4 + 4)), 14);
  });

  // Source: worked by hand. The third level, 1 to 2.5 m, lies two thirds in 1 to 2 and one third in 2 to 3; the fourth, 2.5 to
  // 7 m, lies 0.5 / 4.5 in 2 to 3 and the rest in the last.
  it("shares by overlap", () => {
    const moved = projectLevels(Float64Array.of(1, 10, 100, 1000), 1, bounds, onto);
    const expected = [11, (100 * 2) / 3, 100 / 3 + 1000 / 9, (1000 * 8) / 9];
    expected.forEach((value, i) => expect(moved[i]).toBeCloseTo(value, 10));
  });

  it("does nothing between the same levels", () => expect(projectLevels(shares, rings, bounds, bounds)).toEqual(shares));
  it("puts what lies below the last level into it", () => {
    expect(projectLevels(Float64Array.of(0, 0, 0, 5), 1, bounds, Float64Array.of(0, 1, 2))).toEqual(Float64Array.of(0, 5));
  });
  it("refuses shares of another shape", () => expect(() => projectLevels(shares, 2, bounds, onto)).toThrow(DomainError));
});

describe("averageLevels", () => {
  // Source: identity, the transpose.
  it("gives the same weighted mean as shares moved the other way", () => {
    const one = sum(averageLevels(field, rings, onto, bounds).map((g, i) => g * shares[i]));
    const other = sum(projectLevels(shares, rings, bounds, onto).map((w, i) => w * field[i]));
    expect(one).toBeCloseTo(other, 13);
  });
  it("leaves an even field even, below the last level too", () => {
    averageLevels(new Float64Array(rings * 4).fill(2), rings, onto, bounds).forEach((g) => expect(g).toBeCloseTo(2, 14));
  });
  it("refuses a field of another shape", () => expect(() => averageLevels(field, 2, onto, bounds)).toThrow(DomainError));
});
