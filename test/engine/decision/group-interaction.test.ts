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

  // By hand: two piles, each settles by its own and alpha times the other's.
  it("adds alpha times the other pile's settlement", () => {
    const { distances, classes } = plan([[0, 0], [4, 0]]);
    const settled = groupInteraction(logLengths, (length) => pile(length, 1e3), distances, classes).settle(Float64Array.of(0.01, 0.03), Float64Array.of(9, 16));
    const alpha = interactionFactor(pile(12, 1e3), 4);
    expect(settled[0] / (0.01 + alpha * 0.03)).toBeCloseTo(1, 4);
    expect(settled[1] / (0.03 + alpha * 0.01)).toBeCloseTo(1, 4);
  });
});
