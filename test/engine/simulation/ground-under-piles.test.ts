import { describe, expect, it } from "vitest";
import { levelGrid } from "../../../src/engine/decision/level-grid.js";
import { sortedPlan } from "../../../src/engine/decision/plan.js";
import { lagrangeWeights } from "../../../src/engine/numerics/lagrange.js";
import { pileResponse } from "../../../src/engine/piles/pile-stiffness.js";
import { stream } from "../../../src/engine/random/stream.js";
import { elementLnStiffness } from "../../../src/engine/simulation/element-stiffness.js";
import { elementStiffness, formStiffness, groundUnderPiles, scaleField, type GroundUnderPiles } from "../../../src/engine/simulation/ground-under-piles.js";
import { siteField } from "../../../src/engine/simulation/site-field.js";
import { kilopascals, metres } from "../../../src/units/quantities.js";
import { ninePiles } from "../decision/example-problem.js";

const layered = {
  ...ninePiles(),
  ground: { ...ninePiles().ground, layers: [{ top: metres(0), mean: kilopascals(6000), increase: 200, cov: 0.3 }, { top: metres(7), mean: kilopascals(15000), increase: 0, cov: 0.6 }] },
};

describe("elementLnStiffness", () => {
  const ground = groundUnderPiles(layered);
  const cells = ground.rings.length * ground.cellSd.length;

  // Independent path: the response in a median ground that is stiffer by the same factor everywhere.
  it.each([0, 7, 15])("in ground that is stiffer everywhere is that of a stiffer median, length %d", (k) => {
    const { profile } = ground;
    const raised = pileResponse(
      { diameter: metres(0.5), pileModulus: kilopascals(30e6), poissonRatio: 0.3, length: metres(Math.exp(ground.logLengths[k])) },
      (depth) => kilopascals(Math.exp(0.7) * profile.modulus * profile.shape(depth)),
      { withForm: false },
    );
    const found = elementLnStiffness(ground.forms[k], 30e6, new Float64Array(cells).fill(0.7), ground.levelBounds);
    expect(found).toBeCloseTo(raised.lnStiffness, 10);
  });

  // Independent path: the same field given as a median that changes with depth; cells hold its means, hence the small difference.
  it("follows a field that changes with depth", () => {
    const ln = (depth: number): number => 0.05 * depth - 0.4;
    const middle = (c: number): number => (ground.levelBounds[c % ground.cellSd.length] + ground.levelBounds[(c % ground.cellSd.length) + 1]) / 2;
    const other = pileResponse(
      { diameter: metres(0.5), pileModulus: kilopascals(30e6), poissonRatio: 0.3, length: metres(Math.exp(ground.logLengths[8])) },
      (depth) => kilopascals(ground.profile.modulus * ground.profile.shape(depth) * Math.exp(ln(depth))),
      { withForm: false },
    );
    const found = elementLnStiffness(ground.forms[8], 30e6, Float64Array.from({ length: cells }, (_, c) => ln(middle(c))), ground.levelBounds);
    expect(Math.abs(found - other.lnStiffness)).toBeLessThan(1e-3);
    expect(Math.abs(found - ground.forms[8].lnStiffness)).toBeGreaterThan(0.03);
  });
});

/** Stiffness of nine piles in some realised grounds, by the form and by elements. */
function realised(ground: GroundUnderPiles, grounds: number, level: number): { form: Float64Array[]; elements: Float64Array[]; fields: Float64Array[] } {
  const plan = sortedPlan(ninePiles().building.piles);
  const places = siteField(ground.terms, { plan, rings: ground.rings, levelBounds: ground.levelBounds, holes: [], readingDepths: new Float64Array(0) });
  const out = { form: [] as Float64Array[], elements: [] as Float64Array[], fields: [] as Float64Array[] };
  for (let k = 0; k < grounds; k++) {
    places.draw((part) => stream("form against elements", k, part));
    const field = places.underPiles.slice();
    scaleField(ground, field);
    const form = new Float64Array(9 * ground.logLengths.length);
    formStiffness(ground, field, level, form);
    const elements = new Float64Array(form.length);
    elementStiffness(ground, field, level, form, elements);
    out.fields.push(field);
    out.form.push(form);
    out.elements.push(elements);
  }
  return out;
}

describe.each([
  ["markov 8 m / 8 m, COV 0.6", ninePiles(), 0.006, 0.002],
  ["markov 20 m / 2 m, COV 0.6", ninePiles({ scales: [20, 2] }), 0.006, 0.002],
  ["ellipsoidal 8 m / 8 m, COV 1", ninePiles({ correlation: "ellipsoidal", cov: 1 }), 0.016, 0.005],
  ["layers", layered, 0.006, 0.002],
])("the second-order form in %s", (_, problem, spread, bias) => {
  const ground = groundUnderPiles(problem);
  const { form, elements, fields } = realised(ground, 4, 0);

  // Independent: direct finite elements in the same ground, at the lengths where they are solved. The bounds are half as much again as the
  // study of the second-order stiffness finds: standard deviation 0.004 at COV 0.6, 0.01 at COV 1.
  it("follows finite elements", () => {
    const differences = elements.flatMap((list, g) => [...list].map((value, at) => value - form[g][at]));
    const mean = differences.reduce((sum, d) => sum + d, 0) / differences.length;
    const sd = Math.sqrt(differences.reduce((sum, d) => sum + (d - mean) ** 2, 0) / differences.length);
    const all = elements.flatMap((list) => [...list]);
    expect(Math.abs(mean)).toBeLessThan(bias);
    expect(sd).toBeLessThan(spread);
    expect(Math.max(...all) - Math.min(...all)).toBeGreaterThan(1);
  });

  // Identity: where elements are solved nothing is interpolated.
  it("leaves solved lengths as they are solved", () => {
    const cells = ground.rings.length * ground.cellSd.length;
    for (const [i, k] of [[0, 0], [4, 6], [7, 15]]) {
      const direct = elementLnStiffness(ground.forms[k], 30e6, fields[2].subarray(i * cells, (i + 1) * cells), ground.levelBounds);
      expect(elements[2][i * ground.logLengths.length + k]).toBeCloseTo(direct, 10);
    }
  });

  // Independent: a direct solution at lengths between the solved ones. Cubics through solved lengths alone miss by two to four times as much.
  it("is a good guide between solved lengths", () => {
    const solved = [0, 3, 6, 9, 12, 15];
    const cells = ground.rings.length * ground.cellSd.length;
    let guided = 0;
    let plain = 0;
    for (const k of [2, 5, 7, 10, 13]) {
      const { start, weights } = lagrangeWeights(solved.map((s) => ground.logLengths[s]), ground.logLengths[k]);
      for (let i = 0; i < 9; i += 2) {
        const direct = elementLnStiffness(ground.forms[k], 30e6, fields[1].subarray(i * cells, (i + 1) * cells), ground.levelBounds);
        const at = (index: number): number => i * ground.logLengths.length + index;
        guided += (elements[1][at(k)] - direct) ** 2;
        plain += (weights.reduce((sum, w, q) => sum + w * elements[1][at(solved[start + q])], 0) - direct) ** 2;
      }
    }
    expect(Math.sqrt(guided / 25)).toBeLessThan(spread);
    expect(guided).toBeLessThan(plain / 2);
  });
});

// Independent: a site level is ground that is stiffer everywhere, to which the form and the elements must agree too.
it("the second-order form follows the site's level", () => {
  const ground = groundUnderPiles(ninePiles({ cov: 0.3, regionalCov: 0.4 }));
  for (const level of [-0.5, 0.6]) {
    const { form, elements } = realised(ground, 1, level);
    const worst = form[0].reduce((most, value, at) => Math.max(most, Math.abs(value - elements[0][at])), 0);
    expect(worst).toBeLessThan(0.012);
  }
});

// By hand: standard deviations of the two layers, in the cells above and below 7 m, under every pile and ring.
it("scaleField gives each depth its own spread", () => {
  const ground = groundUnderPiles(layered);
  const field = new Float64Array(2 * ground.rings.length * ground.cellSd.length).fill(2);
  scaleField(ground, field);
  field.forEach((value, c) => {
    const cell = c % ground.cellSd.length;
    const middle = (ground.levelBounds[cell] + ground.levelBounds[cell + 1]) / 2;
    expect(value).toBeCloseTo(2 * Math.sqrt(Math.log1p((middle < 7 ? 0.3 : 0.6) ** 2)), 12);
  });
});

it("lengths cover the range, and half as much again where one length is allowed", () => {
  const one = groundUnderPiles({ ...ninePiles(), piles: { ...ninePiles().piles, shortest: metres(10), longest: metres(10) } });
  expect(Math.exp(one.logLengths[15])).toBeCloseTo(15, 9);
  expect(one.levelBounds).toEqual(levelGrid(one.levelBounds[one.levelBounds.length - 1]));
});
