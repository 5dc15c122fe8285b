import { describe, expect, it } from "vitest";
import type { CorrelationName } from "../../../src/engine/ground/correlation.js";
import { fieldCorrelation } from "../../../src/engine/ground/field-correlation.js";
import { ringTables } from "../../../src/engine/ground/ring-average.js";
import { separableTerms, type SeparableTerm } from "../../../src/engine/ground/separable-terms.js";
import { choleskyInPlace } from "../../../src/engine/numerics/cholesky.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { stream } from "../../../src/engine/random/stream.js";
import fixture from "../../fixtures/ground/ground.json";

const SEPARABLE: CorrelationName[] = ["markov", "gaussian", "spherical", "markov2"];
const sum = (terms: SeparableTerm[], part: (term: SeparableTerm) => number) => terms.reduce((total, term) => total + term.weight * part(term), 0);

describe.each(SEPARABLE)("separableTerms, %s", (model) => {
  const structure = { correlation: model, horizontalScale: 12, verticalScale: 3 };

  it("is one product that equals the correlation of the field", () => {
    const terms = separableTerms(structure);
    expect(terms.length).toBe(1);
    const exact = fieldCorrelation(structure);
    expect(exact(12, 0)).toBe(exact(0, -3)); // one scale off either way
    for (const [r, z] of [[0, 0], [5, 0], [0, 2], [7, -1.5], [20, 6]]) expect(terms[0].weight * terms[0].plan(r) * terms[0].vertical(z)).toBe(exact(r, z));
  });

  // Brute force: mean of the depth part over 400 x 400 points of the two cells; the midpoint rule errs by its kink, 1e-6.
  it("averages its depth part over cells", () => {
    const [term] = separableTerms(structure);
    const middles = (n: number) => Array.from({ length: n }, (_, i) => (i + 0.5) / n - 0.5);
    for (const [d, a, b] of [[0, 1, 1], [-0.7, 1, 2], [4, 0.5, 1]]) {
      let mean = 0;
      for (const x of middles(400)) for (const y of middles(400)) mean += term.vertical(d + x * a - y * b) / 160_000;
      expect(Math.abs(term.verticalCellAverage(d, a, b) - mean)).toBeLessThan(5e-6);
    }
  });
});

describe("separableTerms, ellipsoidal", () => {
  const structure = { correlation: "ellipsoidal" as const, horizontalScale: 8, verticalScale: 2 };
  const terms = separableTerms(structure);

  it("has few terms, of positive weights that sum to 1", () => {
    expect(terms.length).toBeLessThanOrEqual(20);
    expect(terms.every((term) => term.weight > 0)).toBe(true);
    expect(sum(terms, () => 1)).toBeCloseTo(1, 14);
  });

  // Definition: exp(-2 sqrt((r/th)^2 + (z/tv)^2)), at distances from a hundredth of the scales to five scales, in all directions.
  it("sums to the correlation of the field between points", () => {
    for (let t = 0.01; t < 5; t *= 1.1) {
      for (const angle of [0, 0.5, 1, Math.PI / 2]) {
        const r = 8 * t * Math.cos(angle);
        const z = 2 * t * Math.sin(angle);
        expect(Math.abs(sum(terms, (term) => term.plan(r) * term.vertical(z)) - Math.exp(-2 * t))).toBeLessThan(2.5e-4);
        expect(fieldCorrelation(structure)(r, -z)).toBeCloseTo(Math.exp(-2 * t), 14);
      }
    }
  });

  // What the rule loses: terms rougher than its last are one. Closer than a hundredth of a scale that shows, and no more than this.
  it("strays by at most 0.002 between closer points", () => {
    let worst = 0;
    for (let t = 1e-4; t < 0.01; t *= 1.05) worst = Math.max(worst, Math.abs(sum(terms, (term) => term.plan(8 * t)) - Math.exp(-2 * t)));
    expect(worst).toBeLessThan(2e-3);
    expect(worst).toBeGreaterThan(2e-4); // if this falls, the words above can promise more
  });

  // Source: ground.py, the exact correlation averaged over rings and cells by dense quadrature, 0.25 m to 20 m against scales of 1 to 50 m.
  it.each(fixture.rings)("averages within 1e-3: scales $horizontalScale, $verticalScale m, rings $ringA, $ringB m, $centres m apart, cells $thickness m", (given) => {
    const each = separableTerms({ correlation: "ellipsoidal", horizontalScale: given.horizontalScale, verticalScale: given.verticalScale });
    const radii = Float64Array.of(given.ringA, given.ringB);
    const found = sum(each, (term) => ringTables(term.plan, radii, Float64Array.of(given.centres))[1] * term.verticalCellAverage(given.depth, given.thickness, given.thickness));
    expect(Math.abs(found / given.value - 1)).toBeLessThan(6e-4);
  });

  it("averages along a line within 1.5e-3 down to a four-hundredth of the scale", () => {
    const [markov] = separableTerms({ ...structure, correlation: "markov" });
    for (const thickness of [0.005, 0.02, 0.1, 0.5, 2]) {
      const exact = markov.verticalCellAverage(0, thickness, thickness);
      expect(Math.abs(sum(terms, (term) => term.verticalCellAverage(0, thickness, thickness)) / exact - 1)).toBeLessThan(1.5e-3);
    }
  });
});

describe("separableTerms", () => {
  // Theory: covariances of any places and cells are positive semi-definite, for every structure.
  it.each<CorrelationName>([...SEPARABLE, "ellipsoidal"])("gives positive semi-definite covariances in space, %s", (model) => {
    const terms = separableTerms({ correlation: model, horizontalScale: 10, verticalScale: 2 });
    const random = stream("places", 1);
    const n = 40;
    const places = Array.from({ length: n }, () => ({ x: 20 * random.uniform(), y: 20 * random.uniform(), z: 12 * random.uniform(), h: random.uniform() }));
    const matrix = Float64Array.from({ length: n * n }, (_, at) => {
      const [p, q] = [places[Math.floor(at / n)], places[at % n]];
      return sum(terms, (term) => term.plan(Math.hypot(p.x - q.x, p.y - q.y)) * term.verticalCellAverage(p.z - q.z, p.h, q.h));
    });
    expect(choleskyInPlace(matrix, n)).toBe(n);
  });

  it("refuses scales that are none", () => {
    for (const scale of [0, -1, Infinity, Number.NaN]) {
      expect(() => separableTerms({ correlation: "markov", horizontalScale: scale, verticalScale: 1 })).toThrow(DomainError);
      expect(() => separableTerms({ correlation: "ellipsoidal", horizontalScale: 1, verticalScale: scale })).toThrow(DomainError);
    }
  });
});
