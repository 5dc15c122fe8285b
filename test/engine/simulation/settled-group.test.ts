import { describe, expect, it } from "vitest";
import { assess, estimate, prepareSimulation, simulateElements, simulateForm, type SimulationTask } from "../../../src/engine/index.js";
import { interactionFactor } from "../../../src/engine/piles/interaction-factor.js";
import { kilonewtons, metres } from "../../../src/units/quantities.js";
import { ninePiles } from "../decision/example-problem.js";

describe("two piles in even ground", () => {
  const base = ninePiles({ cov: 0, covs: [0, 0, 0] });
  const first = 1e-5;
  const full = 0.1;
  const problem = (groupInteraction: boolean) => ({
    ...base,
    building: {
      ...base.building,
      piles: [{ x: metres(0), y: metres(0), load: kilonewtons(1000) }, { x: metres(4), y: metres(0), load: kilonewtons(600) }],
      damage: [{ distortion: first, share: 0 }, { distortion: full, share: 1 }], allowableSettlement: metres(1),
    },
    piles: { ...base.piles, groupInteraction },
  });
  const alpha = interactionFactor({ length: 3, radius: 0.25, tipShearModulus: 8000 / 2.6, averageRatio: 1, poisson: 0.3, pileModulus: 30e6 }, 4);
  const distortion = (failure: number): number => first + (failure / base.building.value) * (full - first);

  // Closed form: s1 + alpha s2 less s2 + alpha s1 is 1 - alpha of what the two differ alone.
  it("differ by 1 - alpha of what they differ alone, in the cells", () => {
    const [alone, together] = [false, true].map((on) => distortion(assess(problem(on), 0).failure));
    expect(alone).toBeGreaterThan(0.001);
    expect(together / alone).toBeCloseTo(1 - alpha, 6);
  });
  it("differ by 1 - alpha of what they differ alone, in the simulation", () => {
    const [alone, together] = [false, true].map((on) => distortion(simulateElements(prepareSimulation({ variants: [{ name: "", problem: problem(on) }], counts: [0], seed: "even" }), 0)[1]));
    expect(alone).toBeGreaterThan(0.001);
    expect(together / alone).toBeCloseTo(1 - alpha, 6);
  });
});

// The two models answer the same question by different ways: within 6 % and the errors of the simulation, and some thousands. Where surprises
// are found, lengthened piles reach further than they did as designed, and the cells must know how far.
describe.each([
  ["", {}, 1500],
  ["half of the surprises found", { foundShare: 0.5 }, 1500],
  ["nearly all found in very variable ground", { foundShare: 0.9, cov: 1 }, 4000],
])("the cells' failure cost where piles settle each other, %s", (_, change, forms) => {
  const problem = ninePiles({ ...change, groupInteraction: true });
  const task: SimulationTask = { variants: [{ name: "", problem }], counts: [0, 1, 4, 9], seed: "group" };
  const simulation = prepareSimulation(task);
  const { rows } = estimate(
    task,
    Array.from({ length: 12 }, (_, k) => simulateElements(simulation, k)),
    Array.from({ length: forms }, (_, k) => simulateForm(simulation, k)),
  );
  const alone = ninePiles(change);

  it.each(rows.map((row) => [row.count, row] as const))("%d holes", (count, row) => {
    const { failure, failureChance } = assess(problem, count);
    expect(Math.abs(failure - row.failure)).toBeLessThan(5 * row.errors.failure + 0.06 * row.failure + 3000);
    expect(Math.abs(failureChance - row.failureChance)).toBeLessThan(5 * row.failureChanceError + 0.03);
    expect(failure).toBeGreaterThan(1.04 * assess(alone, count).failure);
  });
});
