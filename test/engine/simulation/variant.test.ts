import { describe, expect, it } from "vitest";
import { groundProfile } from "../../../src/engine/decision/ground-profile.js";
import { preparedSite } from "../../../src/engine/decision/prepared-site.js";
import type { Problem } from "../../../src/engine/index.js";
import { holePlaces } from "../../../src/engine/simulation/hole-places.js";
import { drawErrors, errorDraws, logReadings } from "../../../src/engine/simulation/readings.js";
import { prepareSimulation } from "../../../src/engine/simulation/prepare.js";
import { lnDesignValuesRead, preparedVariant } from "../../../src/engine/simulation/variant.js";
import { stream } from "../../../src/engine/random/stream.js";
import { metres } from "../../../src/units/quantities.js";
import { ninePiles, type Change } from "../decision/example-problem.js";

const prepared = (problem: Problem, counts: number[]) => {
  const places = holePlaces([problem], counts);
  return { places, variant: preparedVariant(problem, groundProfile(problem.ground), places, places.variants[0]) };
};
const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
const covariance = (a: readonly number[], b: readonly number[]): number => {
  const [ofA, ofB] = [mean(a), mean(b)];
  return mean(a.map((value, k) => (value - ofA) * (b[k] - ofB)));
};

describe("holePlaces", () => {
  const fine = { ...ninePiles(), investigation: { ...ninePiles().investigation, readingSpacing: metres(1), holeDepth: metres(6) } };

  it("takes what variants and counts share once", () => {
    const places = holePlaces([ninePiles(), fine], [0, 1, 4, 9]);
    expect(places.holes.length).toBe(1 + 4 + 8); // the middle one of nine stands where the single one does
    expect(places.depths.length).toBe(31);
    expect(Array.from(places.variants[1].depths, (d) => places.depths[d])).toEqual([1, 2, 3, 4, 5, 6]);
    expect(places.variants[0].holes.map((holes) => holes.length)).toEqual([0, 1, 4, 9]);
    expect(places.variants[0].holes[3]).toContain(places.variants[1].holes[1][0]);
  });
});

describe("readings", () => {
  // Independent: variances of sums by hand. 30,000 draws; a covariance errs by root((aa bb + ab^2) / draws), and 10 of them fail by
  // chance less than once in a million at 5.4 of these.
  it("carry one error of the method, one of each hole and one of each reading", () => {
    const { places, variant } = prepared(ninePiles({ covs: [0.2, 0.3, 0.5] }), [2]);
    const errors = errorDraws(places);
    const draws = 30_000;
    const field = new Float64Array(2 * 31);
    const out = new Float64Array(62);
    const logs: number[][] = [[], [], []];
    const numbers = stream("errors", 1);
    for (let k = 0; k < draws; k++) {
      drawErrors(errors, numbers);
      for (const hole of [0, 1]) logReadings(variant.law, hole, field, 0, errors, out, hole * 31);
      [out[3], out[20], out[31 + 3]].forEach((value, p) => logs[p].push(value - variant.law.logModulus));
    }
    const v = (cov: number): number => Math.log1p(cov ** 2);
    const own = v(0.2) + v(0.3) + v(0.5);
    const expected = [[own, v(0.3) + v(0.5), v(0.5)], [v(0.3) + v(0.5), own, v(0.5)], [v(0.5), v(0.5), own]];
    expected.forEach((row, i) => row.forEach((value, j) => expect(Math.abs(covariance(logs[i], logs[j]) - value)).toBeLessThan(5.4 * Math.sqrt((own * own + value ** 2) / draws))));
    // Multipliers of unit mean: their own standard deviation is root(e^own - 1).
    logs.forEach((list) => expect(Math.abs(mean(list.map(Math.exp)) - 1)).toBeLessThan(5.4 * Math.sqrt(Math.expm1(own) / draws)));
  });

  it("read the ground at their own places, with its own spread and the site's level", () => {
    const layers = [{ top: metres(0), mean: ninePiles().ground.layers[0].mean, increase: 100, cov: 0.3 }, { top: metres(5), mean: ninePiles().ground.layers[0].mean, increase: 0, cov: 0.8 }];
    const { places, variant } = prepared({ ...ninePiles({ covs: [0, 0, 0] }), ground: { ...ninePiles().ground, layers } }, [2]);
    const field = Float64Array.from({ length: 62 }, (_, at) => at / 10);
    const out = new Float64Array(40);
    logReadings(variant.law, 1, field, 0.25, errorDraws(places), out, 5);
    const sd = (cov: number): number => Math.sqrt(Math.log1p(cov ** 2));
    expect(out[5]).toBeCloseTo(variant.law.logModulus + sd(0.3) * 3.1 + 0.25, 12); // at 0.5 m
    expect(out[5 + 20]).toBeCloseTo(variant.law.logModulus + sd(0.8) * 5.1 + 0.25, 12); // at 10.5 m
    expect(out[4]).toBe(0);
  });
});

// Independent: the law of the design value that the fast model takes, exact for these rules (its geometric mean is tested against
// draws in another language). 1,500 grounds: mean and variance fail by chance less than once in a million at 5.6 standard errors.
describe.each<[string, Change, number]>([
  ["geometric mean", {}, 4],
  ["geometric mean of one hole", {}, 1],
  ["update with the region", { regionalCov: 0.4, update: true }, 4],
  ["update with the region, harmonic", { regionalCov: 0.4, update: true, rule: "harmonic", correlation: "markov2" }, 2],
  ["nearest hole", { lengthRule: "nearest" }, 4],
])("design values, %s", (_, change, count) => {
  it("have the mean and the covariances of their law", () => {
    const problem = ninePiles(change);
    const simulation = prepareSimulation({ variants: [{ name: "", problem }], counts: [count], seed: "design" });
    const [variant] = simulation.variants;
    const law = preparedSite(problem).design(count);
    const draws = 1500;
    const values: number[][] = Array.from({ length: law.size }, () => []);
    const regional = Math.sqrt(simulation.ground.profile.regionalVariance);
    for (let k = 0; k < draws; k++) {
      simulation.field.draw((part) => stream("design value", k, part));
      drawErrors(simulation.errors, stream("design value", k, 9));
      const level = regional * stream("design value", k, 10).normal();
      lnDesignValuesRead(variant, 0, simulation.field.inHoles, level, simulation.errors).forEach((value, s) => values[s].push(value));
    }
    expect(values.every((list) => list.length === draws)).toBe(true);
    const of = (s: number, t: number): number => Array.from({ length: law.size }, (_, p) => law.root[s * law.size + p] * law.root[t * law.size + p]).reduce((sum, x) => sum + x, 0);
    for (let s = 0; s < law.size; s++) {
      expect(Math.abs(mean(values[s]) - law.mean)).toBeLessThan(5.6 * Math.sqrt(of(s, s) / draws));
      for (let t = 0; t <= s; t++) expect(Math.abs(covariance(values[s], values[t]) - of(s, t))).toBeLessThan(5.6 * Math.sqrt((of(s, s) * of(t, t) + of(s, t) ** 2) / draws));
    }
    expect(variant.counts[0].ofPile).toEqual(law.ofPile);
  });
});

it("without holes the design value is the rule's on what is assumed", () => {
  for (const rule of ["geometric", "arithmetic", "harmonic", "quartile", "lessdeviations"] as const) {
    const problem = ninePiles({ rule });
    const { places, variant } = prepared(problem, [0, 3]);
    const values = lnDesignValuesRead(variant, 0, new Float64Array(0), 0, errorDraws(places));
    expect([...values]).toEqual([preparedSite(problem).design(0).mean]);
  }
});
