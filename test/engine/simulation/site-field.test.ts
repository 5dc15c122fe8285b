import { describe, expect, it } from "vitest";
import { sortedPlan } from "../../../src/engine/decision/plan.js";
import { fieldCorrelation } from "../../../src/engine/ground/field-correlation.js";
import { separableTerms, type GroundStructure } from "../../../src/engine/ground/separable-terms.js";
import { stream } from "../../../src/engine/random/stream.js";
import { siteField } from "../../../src/engine/simulation/site-field.js";
import { kilonewtons, metres } from "../../../src/units/quantities.js";

const plan = sortedPlan([[0, 0], [5, 0], [2, 4]].map(([x, y]) => ({ x: metres(x), y: metres(y), load: kilonewtons(100) })));
const rings = Float64Array.of(0.3, 1.2, 6);
const levelBounds = Float64Array.of(0, 0.4, 1.2, 3, 8);
const holes = [[1, 1], [1, 5], [9, -2]].map(([x, y]) => ({ x: metres(x), y: metres(y) }));
const readingDepths = Float64Array.of(0.5, 1, 4);
const places = { plan, rings, levelBounds, holes, readingDepths };
const cells = levelBounds.length - 1;

/** A value of the field: a ring mean over a cell, or a point of a hole. */
interface Place {
  readonly x: number; readonly y: number; readonly radius: number; readonly top: number; readonly bottom: number;
  readonly value: (field: ReturnType<typeof siteField>) => number;
}
const underPile = (i: number, r: number, c: number): Place => ({
  x: plan.piles[i].x, y: plan.piles[i].y, radius: rings[r], top: levelBounds[c], bottom: levelBounds[c + 1],
  value: ({ underPiles }) => underPiles[(i * rings.length + r) * cells + c],
});
const inHole = (h: number, d: number): Place => ({
  x: holes[h].x, y: holes[h].y, radius: 0, top: readingDepths[d], bottom: readingDepths[d], value: ({ inHoles }) => inHoles[h * readingDepths.length + d],
});
const looked = [underPile(0, 0, 0), underPile(0, 0, 3), underPile(0, 2, 1), underPile(1, 0, 1), underPile(1, 1, 2), underPile(2, 2, 2), inHole(0, 0), inHole(0, 2), inHole(1, 1), inHole(2, 0)];

/**
 * Covariance by brute force: mean of the point correlation over both rings and both cells, on an additive sequence in the four
 * variables (angle and depth of each), whose error is below 0.003 here, the kink of a cell averaged with itself included.
 */
function bruteForce(a: Place, b: Place, correlation: (distance: number, depth: number) => number): number {
  const points = 20_000;
  // Powers of the root of x^5 = x + 1 spread best in four dimensions.
  const steps = [1, 2, 3, 4].map((power) => 1.1673039782614187 ** -power);
  let sum = 0;
  for (let k = 0; k < points; k++) {
    const [u, v, w, t] = steps.map((step) => (0.5 + k * step) % 1);
    const [first, second] = [2 * Math.PI * u, 2 * Math.PI * w];
    const x = a.x + a.radius * Math.cos(first) - b.x - b.radius * Math.cos(second);
    const y = a.y + a.radius * Math.sin(first) - b.y - b.radius * Math.sin(second);
    sum += correlation(Math.hypot(x, y), a.top + (a.bottom - a.top) * v - b.top - (b.bottom - b.top) * t);
  }
  return sum / points;
}

const structures: GroundStructure[] = [
  { correlation: "markov", horizontalScale: 6, verticalScale: 2 },
  { correlation: "ellipsoidal", horizontalScale: 8, verticalScale: 3 },
  { correlation: "spherical", horizontalScale: 10, verticalScale: 4 },
  { correlation: "gaussian", horizontalScale: 6, verticalScale: 3 },
];

describe.each(structures)("the ground under piles and in holes, $correlation", (structure) => {
  const draws = 6000;
  const field = siteField(separableTerms(structure), places);
  const values = looked.map(() => new Float64Array(draws));
  for (let k = 0; k < draws; k++) {
    field.draw((part) => stream("site field", k, part));
    looked.forEach((place, p) => (values[p][k] = place.value(field)));
  }

  // Independent: brute force on the point correlation. The interval: 55 covariances in each of 4 structures fail by chance less
  // than once in a million at 6.4 standard errors; the brute force itself errs by up to 0.003.
  it("has the covariance of the point correlation's averages", () => {
    const correlation = fieldCorrelation(structure);
    const own = looked.map((place) => (place.radius === 0 ? 1 : bruteForce(place, place, correlation)));
    looked.forEach((a, i) =>
      looked.slice(0, i + 1).forEach((b, j) => {
        const exact = i === j ? own[i] : bruteForce(a, b, correlation);
        const sampled = values[i].reduce((sum, value, k) => sum + value * values[j][k], 0) / draws;
        const error = Math.sqrt((own[i] * own[j] + exact ** 2) / draws);
        expect(Math.abs(sampled - exact), `places ${i} and ${j}: ${sampled} for ${exact}`).toBeLessThan(6.4 * error + 0.003);
      }),
    );
  });

  it("has mean zero", () => {
    values.forEach((list) => expect(Math.abs(list.reduce((sum, value) => sum + value, 0) / draws)).toBeLessThan(5.6 / Math.sqrt(draws)));
  });

  // Identity: the ground is there before anybody drills.
  it("is the same under the piles whatever holes are looked at", () => {
    field.draw((part) => stream("again", 7, part));
    const alone = siteField(separableTerms(structure), { ...places, holes: [], readingDepths: new Float64Array(0) });
    alone.draw((part) => stream("again", 7, part));
    expect(alone.underPiles).toEqual(field.underPiles);
  });
});
