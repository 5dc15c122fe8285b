import { describe, expect, it } from "vitest";
import { separableTerms } from "../../../src/engine/ground/separable-terms.js";
import type { CellGroups } from "../../../src/engine/piles/grouped-form.js";
import { standardGroups } from "../../../src/engine/piles/pile-mesh-lines.js";
import { solvePile } from "../../../src/engine/piles/pile-solution.js";
import { medianModuli, pileMesh } from "../../../src/engine/piles/pile-stiffness.js";
import { secondOrderForm } from "../../../src/engine/piles/second-order.js";
import { kilopascals, metres } from "../../../src/units/quantities.js";
import { ringField } from "../../study/ring-field.js";

const median = kilopascals(6000);
const variance = Math.log1p(0.6 ** 2);

/** Curvature along the energy-weighted mean, mean of the form, and what is left, in ground of a structure at COV 0.6. */
function curvature(length: number, horizontalScale: number, verticalScale: number, groupsOf: (mesh: ReturnType<typeof pileMesh>) => CellGroups) {
  const mesh = pileMesh({ diameter: metres(0.5), length: metres(length), pileModulus: kilopascals(3e7), poissonRatio: 0.3 });
  const moduli = medianModuli(mesh, () => median);
  const { matrix, weights, radii, levelBounds } = secondOrderForm(mesh, moduli, solvePile(mesh, moduli, 3e7), groupsOf(mesh));
  const field = ringField(separableTerms({ correlation: "markov", horizontalScale, verticalScale }), radii, levelBounds);
  const n = weights.length;
  const s = Float64Array.from({ length: n * n }, (_, at) => field.covariance(Math.floor(at / n), at % n));
  const ms = new Float64Array(n * n);
  for (let i = 0; i < n; i++) for (let k = 0; k < n; k++) for (let j = 0; j < n; j++) ms[i * n + j] += matrix[i * n + k] * s[k * n + j];
  const h = Float64Array.from(weights, (_, i) => weights.reduce((sum, w, j) => sum + w * s[i * n + j], 0));
  let along = 0;
  let trace = 0;
  let square = 0;
  for (let i = 0; i < n; i++) {
    trace += ms[i * n + i];
    for (let j = 0; j < n; j++) {
      along += h[i] * matrix[i * n + j] * h[j];
      square += ms[i * n + j] * ms[j * n + i];
    }
  }
  const spread = weights.reduce((sum, w, i) => sum + w * h[i], 0);
  return { c: -along / spread ** 2, a: variance * trace, tau: variance * Math.sqrt(2 * square - 2 * (along / spread) ** 2) };
}

// Source: brute force, the same form on all cells of the mesh. The bounds are those that the doc comment promises.
describe("standardGroups against a form on all cells", () => {
  const all = (mesh: ReturnType<typeof pileMesh>): CellGroups => ({
    ringGroups: Int32Array.from(mesh.rings, (_, i) => i),
    levelGroups: Int32Array.from({ length: mesh.levelBounds.length - 1 }, (_, i) => i),
    radii: mesh.rings,
    levelBounds: mesh.levelBounds,
  });
  it("gathers runs of rings and levels, at depths that the mesh has", () => {
    const mesh = pileMesh({ diameter: metres(0.5), length: metres(10), pileModulus: kilopascals(3e7), poissonRatio: 0.3 });
    const { ringGroups, levelGroups, radii, levelBounds } = standardGroups(mesh);
    for (const groups of [ringGroups, levelGroups]) groups.forEach((group, i) => expect(group - (i === 0 ? 0 : groups[i - 1])).toBeLessThanOrEqual(1));
    expect([ringGroups[ringGroups.length - 1] + 1, levelGroups[levelGroups.length - 1] + 1]).toEqual([radii.length, levelBounds.length - 1]);
    levelGroups.forEach((group, level) => {
      expect(mesh.levelBounds[level]).toBeGreaterThanOrEqual(levelBounds[group]);
      expect(mesh.levelBounds[level + 1]).toBeLessThanOrEqual(levelBounds[group + 1]);
    });
    // a group's ground is taken inside it
    radii.forEach((radius, group) => {
      expect(radius).toBeGreaterThan(mesh.columns[ringGroups.indexOf(group)]);
      expect(radius).toBeLessThan(mesh.columns[ringGroups.lastIndexOf(group) + 1]);
    });
  });

  it.each([
    [5, 8, 8],
    [20, 8, 8],
    [10, 12, 3],
  ])("a pile of %s m, scales %s m / %s m", (length, horizontal, vertical) => {
    const fine = curvature(length, horizontal, vertical, all);
    const grouped = curvature(length, horizontal, vertical, standardGroups);
    expect(Math.abs(grouped.c / fine.c - 1)).toBeLessThan(0.04);
    expect(Math.abs(grouped.tau / fine.tau - 1)).toBeLessThan(0.08);
    expect(Math.abs(grouped.a - fine.a)).toBeLessThan(0.0027);
  });
});
