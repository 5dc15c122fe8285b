import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { designDistribution } from "../../../src/engine/investigation/design-distribution.js";
import type { DesignRuleName } from "../../../src/engine/investigation/design-rule.js";
import { readingSums } from "../../../src/engine/investigation/reading-sums.js";
import { fieldCorrelation } from "../../../src/engine/ground/field-correlation.js";
import { metres } from "../../../src/units/quantities.js";

// Source: brute-force draws of all readings in another language, test/fixtures/investigation/design-rules.py (seed and versions inside).
interface Case {
  name: string; layout: [number, number][]; readings: number; horizontalScale: number; verticalScale: number; correlation: "markov" | "ellipsoidal";
  cov: number; readingCov: number; holeCov: number; methodCov: number; regionalCov: number;
  rules: Record<DesignRuleName, { mean: number; variance: number; meanError: number; varianceError: number }>;
}
const fixture = JSON.parse(readFileSync(new URL("../../fixtures/investigation/design-rules.json", import.meta.url), "utf8")) as { median: number; cases: Case[] };
const v = (cov: number): number => Math.log1p(cov ** 2);

/** Exact for the geometric mean (only the draws scatter); relative error of the variance and absolute error of the mean for the rest. */
const accuracy: Record<DesignRuleName, { mean: number; variance: number }> = {
  geometric: { mean: 0, variance: 0 },
  arithmetic: { mean: 0.002, variance: 0.02 },
  harmonic: { mean: 0.002, variance: 0.02 },
  lessdeviations: { mean: 0.002, variance: 0.01 },
  quartile: { mean: 0.003, variance: 0.04 },
};

describe.each(fixture.cases)("design value of $name", (c) => {
  const holes = c.layout.map(([x, y]) => ({ x: metres(x), y: metres(y) }));
  const sums = readingSums(holes, 0.5, new Float64Array(c.readings).fill(1), fieldCorrelation(c));
  const variances = { ground: v(c.cov), regional: v(c.regionalCov), reading: v(c.readingCov), hole: v(c.holeCov), method: v(c.methodCov) };
  const level = Math.log(fixture.median) - v(c.regionalCov) / 2;
  it.each(Object.keys(accuracy) as DesignRuleName[])("%s", (name) => {
    const found = designDistribution({ name, deviations: 0.5, update: false }, sums, level, variances);
    const drawn = c.rules[name];
    // Five standard errors of the draws fail by chance less than once in a million.
    expect(Math.abs(found.mean - drawn.mean)).toBeLessThan(accuracy[name].mean + 5 * drawn.meanError);
    expect(Math.abs(found.variance / drawn.variance - 1)).toBeLessThan(accuracy[name].variance + (5 * drawn.varianceError) / drawn.variance);
  });
});
