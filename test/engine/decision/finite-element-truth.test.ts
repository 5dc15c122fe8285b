import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { assess, type DesignRuleName } from "../../../src/engine/index.js";
import { ninePiles } from "./example-problem.js";

// Source: Monte Carlo with finite elements under every pile, written independently in another language:
// test/fixtures/decision/finite-element-truth.py (its own mesh, elements, field sampling, design and costs; seeds and versions in the file).
interface Estimate { value: number; standardError: number }
interface Case {
  horizontalScale: number; verticalScale: number; cov: number; regionalCov: number;
  rules: Record<string, Record<string, { failure: Estimate; chance: Estimate; surprises: Estimate }>>;
}
const { cases } = JSON.parse(readFileSync(new URL("../../fixtures/decision/finite-element-truth.json", import.meta.url), "utf8")) as { cases: Case[] };

const holes: Record<string, [number, number][]> = {
  "0": [], "1": [[0, 0]], "4": [[-3.75, -3.75], [3.75, -3.75], [-3.75, 3.75], [3.75, 3.75]], "9": [-5, 0, 5].flatMap((y) => [-5, 0, 5].map((x): [number, number] => [x, y])),
};
const value = 2e6;

const rows = cases.flatMap((c) =>
  Object.entries(c.rules).flatMap(([rule, counts]) => Object.entries(counts).map(([count, truth]) => ({ name: `${c.horizontalScale} m / ${c.verticalScale} m, COV ${c.cov}, regional ${c.regionalCov}, ${rule}, ${count} holes`, c, rule, count, truth }))),
);

describe("the fast model against finite elements under every pile", () => {
  it.each(rows)("$name", ({ c, rule, count, truth }) => {
    const named = ["nearest", "update", "group"].includes(rule) ? "geometric" : (rule as DesignRuleName);
    const found = assess(
      ninePiles({
        scales: [c.horizontalScale, c.verticalScale], cov: c.cov, regionalCov: c.regionalCov, rule: named, update: rule === "update",
        lengthRule: rule === "nearest" ? "nearest" : "load", groupInteraction: rule === "group", ...(count === "0" ? {} : { holes: holes[count] }),
      }),
      Number(count),
    );
    // Three standard errors of the reference, and the model's own error: 3 % where scales are alike, 6 % in flat-lying ground, and 0.1 % of
    // the building value, because small costs hang on rare differences.
    const own = (c.horizontalScale === c.verticalScale ? 0.03 : 0.06) * truth.failure.value + 0.001 * value;
    expect(Math.abs(found.failure - truth.failure.value)).toBeLessThan(3 * truth.failure.standardError + own);
    expect(Math.abs(found.failureChance - truth.chance.value)).toBeLessThan(3 * truth.chance.standardError + 0.02);
    expect(Math.abs(found.surprises - truth.surprises.value)).toBeLessThan(3 * truth.surprises.standardError + 0.03 * truth.surprises.value + 0.03);
  });

  // The cheapest count of the table must be the reference's, or one that the reference cannot tell from it.
  it("the order of counts is the reference's within its errors", () => {
    for (const { c, rule, counts } of cases.flatMap((c) => Object.entries(c.rules).map(([rule, counts]) => ({ c, rule, counts })))) {
      if (["nearest", "update", "group"].includes(rule)) continue;
      const ours = ["1", "4", "9"].map((n) => assess(ninePiles({ scales: [c.horizontalScale, c.verticalScale], cov: c.cov, regionalCov: c.regionalCov, rule: rule as DesignRuleName, holes: holes[n] }), Number(n)).failure);
      const theirs = ["1", "4", "9"].map((n) => counts[n].failure);
      for (let i = 1; i < 3; i++) {
        const fall = theirs[i - 1].value - theirs[i].value;
        const error = Math.hypot(theirs[i - 1].standardError, theirs[i].standardError);
        if (fall > 3 * error) expect(ours[i]).toBeLessThan(ours[i - 1]);
      }
    }
  });
});
