import { describe, expect, it } from "vitest";
import { holeCovariance } from "../../../src/engine/decision/hole-covariance.js";
import { nodeMoments } from "../../../src/engine/decision/node-moments.js";
import { preparedSite } from "../../../src/engine/decision/prepared-site.js";
import { fieldCorrelation } from "../../../src/engine/ground/field-correlation.js";
import { designDistribution } from "../../../src/engine/investigation/design-distribution.js";
import type { DesignRuleName } from "../../../src/engine/investigation/design-rule.js";
import { readingSums } from "../../../src/engine/investigation/reading-sums.js";
import { stream } from "../../../src/engine/random/stream.js";
import { metres } from "../../../src/units/quantities.js";
import { ninePiles } from "./example-problem.js";

const readings = 24;
const spacing = 0.5;
const scale = 2;
const variance = 0.25;

/** The design value of each rule from log readings, written out anew. */
const rules: Readonly<Record<"harmonic" | "arithmetic" | "lessdeviations", (logs: readonly number[]) => number>> = {
  harmonic: (logs) => -Math.log(logs.reduce((sum, x) => sum + Math.exp(-x), 0) / logs.length),
  arithmetic: (logs) => Math.log(logs.reduce((sum, x) => sum + Math.exp(x), 0) / logs.length),
  lessdeviations: (logs) => {
    const mean = logs.reduce((sum, x) => sum + x, 0) / logs.length;
    return mean - Math.sqrt(logs.reduce((sum, x) => sum + (x - mean) ** 2, 0) / (logs.length - 1));
  },
};

describe("how the spread of the ground hangs on the design value", () => {
  // Independent method: draws. The ground at the first reading, given the design value: the slope of its squared residual over the design value is
  // -bend G / v, G the mean square of what single readings tell beyond their mean. Half a million draws know it to a few per cent.
  it.each(Object.keys(rules) as (keyof typeof rules)[])("%s: as draws have it", (name) => {
    const sums = readingSums([{ x: metres(0), y: metres(0) }], spacing, new Float64Array(readings).fill(1), fieldCorrelation({ correlation: "markov", horizontalScale: metres(10), verticalScale: metres(scale) }));
    const { bend } = designDistribution({ name: name as DesignRuleName, deviations: 1, update: false }, sums, 0, { ground: variance, regional: 0, reading: 0, hole: 0, method: 0 });
    const rho = Math.exp((-2 * spacing) / scale);
    const source = stream("bend", 1);
    const draws = 150_000;
    const [z, d] = [new Float64Array(draws), new Float64Array(draws)];
    for (let m = 0; m < draws; m++) {
      let x = source.normal();
      const logs = [x];
      for (let k = 1; k < readings; k++) logs.push((x = rho * x + Math.sqrt(1 - rho ** 2) * source.normal()));
      const scaled = logs.map((value) => value * Math.sqrt(variance));
      z[m] = scaled[0];
      d[m] = rules[name](scaled);
    }
    const mean = (values: Float64Array): number => values.reduce((sum, value) => sum + value, 0) / draws;
    const [meanZ, meanD] = [mean(z), mean(d)];
    const v = mean(d.map((value) => (value - meanD) ** 2));
    const c = mean(z.map((value, m) => (value - meanZ) * (d[m] - meanD)));
    const squares = z.map((value, m) => (value - meanZ - (c / v) * (d[m] - meanD)) ** 2);
    const meanSquare = mean(squares);
    const slope = mean(squares.map((value, m) => (value - meanSquare) * (d[m] - meanD))) / v;
    const told = Array.from({ length: readings }, (_, k) => variance * rho ** k);
    const average = told.reduce((sum, value) => sum + value, 0) / readings;
    const expected = (-bend * told.reduce((sum, value) => sum + (value - average) ** 2, 0)) / readings / v;
    expect(Math.abs(slope / expected - 1)).toBeLessThan(0.3);
  });

  // The same in the piles' moments: to the first order the covariance falls by the bend times what single readings tell beyond their mean.
  it("enters the covariance of the piles with its sign and its size", () => {
    const site = preparedSite(ninePiles({ rule: "harmonic", cov: 0.8, scales: [6, 2] }));
    const law = site.design(4);
    expect(law.bend).toBe(1);
    const holes = holeCovariance(site.model, site.layout(4), law);
    const at = 5;
    const { lengths } = site.model.family;
    const n = site.model.plan.piles.length;
    const covariance = (bend: number): Float64Array => nodeMoments(site.model, holes, Float64Array.of(0), new Float64Array(n).fill(lengths[at]), bend).covariance;
    const step = 1e-4;
    const [low, high] = [covariance(-step), covariance(step)];
    const columns = holes.columnShares.length;
    const beyond = (i: number, g: number): number => holes.beyond[(i * lengths.length + at) * columns + g];
    let largest = 0;
    for (let i = 0; i < n; i++) {
      // what single readings tell beyond their mean has no mean
      const told = holes.columnShares.map((share, g) => share * beyond(i, g));
      expect(Math.abs(told.reduce((sum, value) => sum + value, 0))).toBeLessThan(1e-3 * told.reduce((sum, value) => sum + Math.abs(value), 0));
      for (let j = 0; j < n; j++) {
        const gram = holes.columnShares.reduce((sum, share, g) => sum + share * beyond(i, g) * beyond(j, g), 0);
        expect((low[i * n + j] - high[i * n + j]) / (2 * step)).toBeCloseTo(gram, 8);
        largest = Math.max(largest, gram);
      }
    }
    expect(largest).toBeGreaterThan(1e-5);
  });
});
