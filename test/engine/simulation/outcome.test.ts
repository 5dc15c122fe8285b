import { describe, expect, it } from "vitest";
import type { Problem } from "../../../src/engine/index.js";
import { sortedPlan } from "../../../src/engine/decision/plan.js";
import { outcomeColumns, priceOutcome, type BuiltPiles } from "../../../src/engine/simulation/outcome.js";
import { kilonewtons, metres } from "../../../src/units/quantities.js";
import { ninePiles } from "../decision/example-problem.js";

// Two piles 5 m apart, loads 1000 and 500 kN, allowable 20 mm: stiffness needed 50 and 25 MN/m. ln K rises by 1 for each unit of
// ln length: K = c L with c of its own for each pile, so that every number below can be had by hand.
const base = ninePiles();
const problem: Problem = {
  ...base,
  building: {
    ...base.building, value: 1e6, allowableSettlement: metres(0.02), damage: [{ distortion: 0.001, share: 0 }, { distortion: 0.003, share: 1 }],
    piles: [[0, 1000], [5, 500]].map(([x, load]) => ({ x: metres(x), y: metres(0), load: kilonewtons(load) })),
  },
  piles: { ...base.piles, shortest: metres(4), longest: metres(20) },
  prices: { ...base.prices, rig: 100, perPile: 10, perPileMetre: 3 },
  delay: { dayCost: 70, daysPerSurprise: 2, surpriseTolerance: 1, foundShare: 0.5 },
};
const plan = sortedPlan(problem.building.piles);
const logLengths = Float64Array.from({ length: 9 }, (_, k) => Math.log(4) + (Math.log(5) * k) / 8);

/** Outcome by name, with needed lengths 50,000 / c and 25,000 / c. */
function outcome(built: readonly [number, number], c: readonly [number, number], foundShare = 0, interaction?: Parameters<typeof priceOutcome>[4]): Record<string, number> {
  const lnStiffness = Float64Array.from({ length: 18 }, (_, at) => Math.log(c[Math.floor(at / 9)]) + logLengths[at % 9]);
  const neededLog = Float64Array.of(50_000 / c[0], 25_000 / c[1]).map((l) => (l > 20 ? Infinity : Math.log(Math.max(l, 4))));
  const piles: BuiltPiles = { lengths: Float64Array.from(built), metres: built[0] + built[1], allowable: true };
  const out = new Float64Array(20);
  priceOutcome({ ...problem, delay: { ...problem.delay, foundShare } }, plan, piles, { logLengths, lnStiffness, neededLog }, interaction, out, 3);
  expect([...out.slice(0, 3), ...out.slice(3 + outcomeColumns.length)].every((value) => value === 0)).toBe(true);
  return Object.fromEntries(outcomeColumns.map((name, k) => [name, out[3 + k]]));
}

describe("priceOutcome", () => {
  // By hand: both need 10 m and have it; both settle 20 mm; 100 + 2 x 10 + 20 x 3 = 180.
  it("prices piles that are just right", () => {
    const found = outcome([10, 10], [5000, 2500]);
    expect(found).toMatchObject({ foundation: 180, delay: 0, surprises: 0, totalMetres: 20, tooShort: 0, damaged: 0 });
    expect(found.overDesign).toBeCloseTo(0, 9);
    expect(found.failure).toBe(0);
  });

  // By hand: pile 1 settles 1000 / (4000 x 10) = 25 mm, pile 2 500 / (5000 x 10) = 10 mm: 15 mm over 5 m = 0.003, all is lost;
  // pile 1 needs 12.5 m, more than 11: a surprise; pile 2 needs 5 m, has 5 m too many.
  it("prices soft ground under one pile and stiff under the other", () => {
    const found = outcome([10, 10], [4000, 5000]);
    expect(found).toMatchObject({ surprises: 1, damaged: 1, delay: 0 });
    expect(found.failure / 1e6).toBeCloseTo(1, 9);
    expect(found.overDesign).toBeCloseTo(5, 9);
  });

  // By hand: the surprise is found and lengthened to 12.5 m: 2 days of 70 and 2.5 m of 3; it settles 20 mm, the other 10: 10 mm over
  // 5 m = 0.002, half is lost.
  it("lengthens a surprise that is found", () => {
    const found = outcome([10, 10], [4000, 5000], 1);
    expect(found.surprises).toBe(1);
    expect(found.delay).toBeCloseTo(147.5, 4);
    expect(found.failure).toBeCloseTo(5e5, 0);
    expect(found.foundation).toBe(180);
  });

  // By hand: half of the two results above.
  it("weighs finding and not finding by their chance", () => {
    const found = outcome([10, 10], [4000, 5000], 0.5);
    expect(found.delay).toBeCloseTo(73.75, 4);
    expect(found.failure).toBeCloseTo(7.5e5, 0);
    expect(found.damaged).toBe(1);
  });

  it("leaves surprises that are not found", () => expect(outcome([10, 10], [4000, 5000], 0).delay).toBe(0));

  // By hand: needs 10.9 m, less than a metre more.
  it("does not mind a need within the tolerance", () => expect(outcome([10, 10], [50_000 / 10.9, 5000], 1)).toMatchObject({ surprises: 0, delay: 0 }));

  // By hand: needs 25 m, more than the rig reaches: lengthened to 20 m, 140 + 10 x 3; settles 1000 / (2000 x 20) = 25 mm, the other 10.
  it("lengthens to the longest where nothing is enough", () => {
    const found = outcome([10, 10], [2000, 5000], 1);
    expect(found.delay).toBeCloseTo(170, 9);
    expect(found.failure).toBeCloseTo(1e6, 3);
  });

  it("finds nothing at the longest length", () => expect(outcome([19.5, 19.5], [2000, 5000], 1)).toMatchObject({ surprises: 0, delay: 0 }));

  // By hand: interaction that doubles the first settlement: 40 and 20 mm, 20 mm over 5 m = 0.004, beyond the last damage point.
  it("judges settlements with what the piles add to each other", () => {
    const seen: number[][] = [];
    const found = outcome([10, 10], [5000, 2500], 0, { settle: (alone, lengths) => { seen.push([...lengths]); return Float64Array.of(2 * alone[0], alone[1]); } });
    expect(found.failure).toBe(1e6);
    expect(seen).toEqual([[10, 10]]);
  });
});
