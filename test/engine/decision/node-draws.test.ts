import { describe, expect, it } from "vitest";
import { groupInteraction } from "../../../src/engine/decision/group-interaction.js";
import { distortionDraws, type FoundSurprises } from "../../../src/engine/decision/node-draws.js";
import type { NodeMoments } from "../../../src/engine/decision/node-moments.js";
import { sortedPlan } from "../../../src/engine/decision/plan.js";
import { quadraticWidth } from "../../../src/engine/decision/second-order-terms.js";
import { stream } from "../../../src/engine/random/stream.js";
import { kilonewtons, metres } from "../../../src/units/quantities.js";

// Three piles in a line, 5 m and 4 m apart: the two outer ones are no neighbours.
const loads = [1000, 800, 1200];
const plan = sortedPlan([0, 5, 9].map((x, i) => ({ x: metres(x), y: metres(0), load: kilonewtons(loads[i]) })));
const means = Float64Array.of(10.1, 10.4, 9.9);
const constants = [0.3, -0.2, 0.15];
const residual = Float64Array.of(0.1, 0.25, 0.05);
const factor = Float64Array.of(0.2, 0, 0, 0.05, 0.3, 0, -0.1, 0.08, 0.25);
const quadratic = new Float64Array(3 * quadraticWidth);
constants.forEach((value, i) => (quadratic[i * quadraticWidth] = value));
const moments: NodeMoments = { lengths: Float64Array.of(10, 10, 10), means, covariance: new Float64Array(9), factor, quadratic, residual };
/** Two draws: a row a pile for the ground, then one a pile for the rest. */
const normals = [[0.5, -1], [1.2, 0.3], [-0.7, 2], [0.7, -0.2], [-1.1, 0.4], [0.9, 1.5]];

// By hand: ln K of a pile is its mean, its second-order constant, its own deviation (a row of the factor times the ground's normals) and the rest.
const lnStiffness = (i: number, m: number): number => means[i] + constants[i] + [0, 1, 2].reduce((sum, k) => sum + factor[3 * i + k] * normals[k][m], 0) + residual[i] * normals[3 + i][m];
const largest = (settlement: (i: number) => number): number => Math.max(Math.abs(settlement(0) - settlement(1)) / 5, Math.abs(settlement(1) - settlement(2)) / 4);
const near = (found: number, expected: number): void => expect(Math.abs(found / expected - 1)).toBeLessThan(1e-12);

describe("draws of the largest distortion", () => {
  it("are the settlements of neighbours over their distance, every part of ln stiffness included", () => {
    const { draw, distortion } = distortionDraws(plan, 2);
    draw(moments, Float64Array.from(normals.flat()), undefined);
    for (const m of [0, 1]) near(distortion[m], largest((i) => loads[i] * Math.exp(-lnStiffness(i, m))));
  });

  it("lengthen every pile that would settle too much: to what is needed, or to the longest length where that is not enough", () => {
    const found: FoundSurprises = { needed: Float64Array.of(10.7, 10.2, 10.9), toTolerance: Float64Array.of(0.05, 0.1, 0.02), toLongest: Float64Array.of(0.4, 0.5, 0.3), designPlace: () => 0, builtPlace: () => 0 };
    const { draw, distortion, foundDistortion, surprises } = distortionDraws(plan, 2);
    draw(moments, Float64Array.from(normals.flat()), found);
    for (const m of [0, 1]) {
      const isShort = (i: number): boolean => lnStiffness(i, m) + found.toTolerance[i] < found.needed[i];
      expect(surprises[m]).toBe([0, 1, 2].filter(isShort).length);
      near(distortion[m], largest((i) => loads[i] * Math.exp(-lnStiffness(i, m))));
      near(foundDistortion[m], largest((i) => loads[i] * Math.exp(-(isShort(i) ? Math.min(found.needed[i], lnStiffness(i, m) + found.toLongest[i]) : lnStiffness(i, m)))));
    }
    expect(surprises[0] + surprises[1]).toBeGreaterThan(2);
  });

  // Long blocks are drawn in parts, so that the memory stays small: the parts must meet, and the last may be shorter.
  it("do not hang on how many stand in a block", () => {
    const all = 300;
    const random = stream("long block");
    const values = Float64Array.from({ length: 6 * all }, () => random.normal());
    const found: FoundSurprises = { needed: Float64Array.of(10.7, 10.2, 10.4), toTolerance: Float64Array.of(0.05, 0.1, 0.02), toLongest: Float64Array.of(0.4, 0.5, 0.3), designPlace: () => 0.5, builtPlace: () => 1.5 };
    const interaction = groupInteraction(Float64Array.of(2, 2.4, 2.8, 3.2), (length) => ({ length, radius: 0.25, tipShearModulus: 3000, averageRatio: 1, poisson: 0.3, pileModulus: 3e7 }), plan.distances, plan.distanceOf);
    for (const between of [undefined, interaction]) {
      const long = distortionDraws(plan, all);
      long.draw(moments, values, found, between);
      expect(long.surprises.reduce((sum, count) => sum + count, 0)).toBeGreaterThan(all / 2);
      const short = distortionDraws(plan, 20);
      for (let from = 0; from < all; from += 20) {
        short.draw(moments, Float64Array.from({ length: 6 * 20 }, (_, at) => values[Math.floor(at / 20) * all + from + (at % 20)]), found, between);
        expect([...long.distortion.subarray(from, from + 20)]).toEqual([...short.distortion]);
        expect([...long.foundDistortion.subarray(from, from + 20)]).toEqual([...short.foundDistortion]);
        expect([...long.surprises.subarray(from, from + 20)]).toEqual([...short.surprises]);
      }
    }
  });
});
