import { describe, expect, it } from "vitest";
import { groupInteraction } from "../../../src/engine/decision/group-interaction.js";
import { interactionFactor, type InteractingPile } from "../../../src/engine/piles/interaction-factor.js";

/** A pile of diameter 1 m in even ground of 1 MPa. */
const pile = (length: number, stiffnessRatio: number, poisson = 0.3): InteractingPile => ({
  length, radius: 0.5, tipShearModulus: 1000 / (2 * (1 + poisson)), averageRatio: 1, poisson, pileModulus: 1000 * stiffnessRatio,
});

describe("groupInteraction", () => {
  const logLengths = Float64Array.from({ length: 8 }, (_, k) => Math.log(5) + 0.3 * k);
  const side = (n: number, spacing: number): [number, number][] => Array.from({ length: n * n }, (_, k) => [spacing * (k % n), spacing * Math.floor(k / n)]);
  const plan = (points: [number, number][]): { distances: Float64Array; classes: Int32Array } => {
    const all = points.flatMap(([x, y]) => points.map(([u, v]) => Math.hypot(x - u, y - v)));
    const distances = [...new Set(all.map((d) => Math.round(d * 1e6) / 1e6))].sort((a, b) => a - b);
    return { distances: Float64Array.from(distances), classes: Int32Array.from(all, (d) => distances.indexOf(Math.round(d * 1e6) / 1e6)) };
  };

  // Source: "Fundamentals of foundation engineering" (open textbook, Newcastle and CAUL), section 6.20: the settlement of common groups
  // of 8 to 16 piles is 2.8 to 4 times that of a single pile under the same mean load; n to the power of 0.4 to 0.6 (Fleming et al. 1985).
  // Undrained ground, spacing 3 diameters, 25 diameters long, moduli 1000: at the upper end, as elastic ground has it.
  it("settles a common group of nine as much as is observed", () => {
    const { distances, classes } = plan(side(3, 3));
    const settled = groupInteraction(logLengths, (length) => pile(length, 1e3, 0.5), distances, classes).settle(new Float64Array(9).fill(1), new Float64Array(9).fill(25));
    const ratio = settled.reduce((sum, s) => sum + s, 0) / 9;
    expect(ratio).toBeGreaterThan(2.8);
    expect(ratio).toBeLessThan(4);
    expect(settled[4]).toBeGreaterThan(settled[1]);
    expect(settled[1]).toBeGreaterThan(settled[0]);
  });

  // Source: Poulos & Davis (1980), settlement ratios of groups under a rigid cap in deep uniform ground, 25 diameters long, moduli 1000,
  // undrained (from memory); beside it our own boundary elements superposed over the pairs of 25 piles give 10.4, 6.6 and 3.9.
  it.each([[2, 2, 2.65], [3, 2, 4.84], [4, 2, 7.44], [5, 2, 10.28], [2, 5, 2.09], [3, 5, 3.48], [2, 10, 1.74], [3, 10, 2.57], [4, 10, 3.42], [5, 10, 4.28]])(
    "settles %d x %d piles %d diameters apart by the published ratio", (n, spacing, published) => {
      const { distances, classes } = plan(side(n, spacing));
      const settled = groupInteraction(logLengths, (length) => pile(length, 1e3, 0.5), distances, classes).settle(new Float64Array(n * n).fill(1), new Float64Array(n * n).fill(25));
      expect(Math.abs(settled.reduce((sum, s) => sum + s, 0) / (n * n) / published - 1)).toBeLessThan(0.08);
    });

  // Closed form: two equal piles settle 1 + alpha times as much as one.
  it("settles two equal piles by 1 + alpha, in factors and in draws alike", () => {
    const { distances, classes } = plan([[0, 0], [4, 0]]);
    const group = groupInteraction(logLengths, (length) => pile(length, 1e3), distances, classes);
    const length = Math.exp(logLengths[3]);
    const alpha = interactionFactor(pile(length, 1e3), 4);
    const lengths = Float64Array.of(length, length);
    expect(group.settle(Float64Array.of(0.02, 0.02), lengths)[0] / 0.02).toBeCloseTo(1 + alpha, 12);
    group.factors(lengths).forEach((factor, k) => expect(factor).toBeCloseTo(k % 3 === 0 ? 1 : alpha, 12));
    const out = new Float64Array(6);
    group.settleDraws(Float64Array.of(0.02, 0.03, 0, 0.02, 0.01, 0.05), new Float64Array(6).fill(3), 3, out);
    const expected = [0.02 * (1 + alpha), 0.03 + alpha * 0.01, alpha * 0.05, 0.02 * (1 + alpha), 0.01 + alpha * 0.03, 0.05];
    out.forEach((settlement, k) => expect(settlement).toBeCloseTo(expected[k], 12));
  });

  // Between two lengths of the table, and at its last: by hand, half way.
  it("takes lengths draw by draw", () => {
    const { distances, classes } = plan([[0, 0], [4, 0]]);
    const group = groupInteraction(logLengths, (length) => pile(length, 1e3), distances, classes);
    const at = (k: number): number => interactionFactor(pile(Math.exp(logLengths[k]), 1e3), 4);
    const out = new Float64Array(4);
    group.settleDraws(Float64Array.of(1, 1, 0, 0), Float64Array.of(2, 7, 5, 7), 2, out);
    expect(out[2]).toBeCloseTo((at(3) + at(4)) / 2, 12);
    expect(out[3]).toBeCloseTo(at(7), 5);
  });

  // By hand: two piles, each settles by its own and alpha times the other's.
  it("adds alpha times the other pile's settlement", () => {
    const { distances, classes } = plan([[0, 0], [4, 0]]);
    const settled = groupInteraction(logLengths, (length) => pile(length, 1e3), distances, classes).settle(Float64Array.of(0.01, 0.03), Float64Array.of(9, 16));
    const alpha = interactionFactor(pile(12, 1e3), 4);
    expect(settled[0] / (0.01 + alpha * 0.03)).toBeCloseTo(1, 4);
    expect(settled[1] / (0.03 + alpha * 0.01)).toBeCloseTo(1, 4);
  });
});
