import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { energyShares } from "../../../src/engine/piles/energy-shares.js";
import { standardGroups } from "../../../src/engine/piles/pile-mesh-lines.js";
import type { PileMesh } from "../../../src/engine/piles/pile-mesh.js";
import { solvePile } from "../../../src/engine/piles/pile-solution.js";
import { medianModuli, pileMesh } from "../../../src/engine/piles/pile-stiffness.js";
import { secondOrderForm } from "../../../src/engine/piles/second-order.js";
import { regressionSlope, slopeLoss } from "../../../src/engine/piles/slope-loss.js";
import { stream } from "../../../src/engine/random/stream.js";
import { kilopascals, metres } from "../../../src/units/quantities.js";

const pileModulus = kilopascals(3e7);
const geometry = { diameter: metres(0.5), length: metres(8), pileModulus, poissonRatio: 0.35 };
const mesh = pileMesh(geometry);
const levels = mesh.levelBounds.length - 1;
const cells = mesh.rings.length * levels;
const groups = standardGroups(mesh);
const bands = groups.levelBounds.length - 1;
const count = groups.radii.length * bands;
const groupOf = (cell: number) => groups.ringGroups[Math.floor(cell / levels)] * bands + groups.levelGroups[cell % levels];
const lnStiffness = (m: PileMesh, moduli: Float64Array, pile: number = pileModulus) => -Math.log(solvePile(m, moduli, pile).compliance);

/** Uneven ground about which everything is differentiated: the derivatives must not lean on even ground. */
const draws = stream("second order", 1);
const base = Float64Array.from({ length: cells }, () => 6e3 * Math.exp(0.4 * draws.normal()));
const solution = solvePile(mesh, base, pileModulus);
const shares = energyShares(mesh, base, solution);
const form = secondOrderForm(mesh, base, solution, groups);

/** The ground with the ln moduli of groups changed. */
const changed = (byGroup: (group: number) => number) => base.map((e, cell) => e * Math.exp(byGroup(groupOf(cell))));

describe("energyShares", () => {
  // Source: central differences of direct solves, error of order step^2 = 1e-6 of the share.
  it("are the derivatives of ln stiffness by the ln moduli of cells", () => {
    const largest = Math.max(...shares);
    for (let cell = 0; cell < cells; cell += 13) {
      const step = 1e-3;
      const moved = (by: number) => lnStiffness(mesh, base.map((e, i) => (i === cell ? e * Math.exp(by) : e)));
      expect(Math.abs((moved(step) - moved(-step)) / (2 * step) - shares[cell])).toBeLessThan(2e-6 * largest + 1e-9);
    }
  });

  // Source: identity (Euler), with the pile's own share by central differences.
  it("sum to all energy together with the pile's", () => {
    const step = 1e-3;
    const own = (lnStiffness(mesh, base, pileModulus * Math.exp(step)) - lnStiffness(mesh, base, pileModulus * Math.exp(-step))) / (2 * step);
    expect(own).toBeGreaterThan(0.005);
    expect(shares.reduce((sum, w) => sum + w, 0) + own).toBeCloseTo(1, 7);
  });
});

describe("secondOrderForm", () => {
  it("sums the shares to the groups", () => {
    const expected = new Float64Array(count);
    shares.forEach((w, cell) => (expected[groupOf(cell)] += w));
    form.weights.forEach((w, g) => expect(Math.abs(w - expected[g])).toBeLessThan(1e-13));
  });

  it("is symmetric", () => {
    for (let i = 0; i < count; i++) for (let j = 0; j < i; j++) expect(form.matrix[i * count + j]).toBe(form.matrix[j * count + i]);
  });

  // Source: central second differences of direct solves along random directions: g' M g = half the second derivative.
  it("is half the second derivative of ln stiffness", () => {
    let largest = 0;
    for (let k = 0; k < 6; k++) {
      const g = Float64Array.from({ length: count }, () => draws.normal());
      const step = 4e-3;
      const at = (by: number) => lnStiffness(mesh, changed((group) => by * g[group]));
      const half = (at(step) - 2 * at(0) + at(-step)) / (2 * step * step);
      let q = 0;
      for (let i = 0; i < count; i++) for (let j = 0; j < count; j++) q += g[i] * form.matrix[i * count + j] * g[j];
      expect(Math.abs(q - half)).toBeLessThan(2e-5 * Math.abs(q) + 4e-6);
      largest = Math.max(largest, Math.abs(q));
    }
    expect(largest).toBeGreaterThan(0.01);
  });

  // Source: identity. Where the pile takes no energy, stiffness is of degree 1 in the ground, so that its logarithm has no
  // curvature for a field that is even everywhere, whatever the ground.
  it("vanishes for an even field where the pile is rigid", () => {
    const rigid = solvePile(mesh, base, 3e12);
    const of = secondOrderForm(mesh, base, rigid, groups);
    const even = of.matrix.reduce((sum, m) => sum + m, 0);
    expect(of.weights.reduce((sum, w) => sum + w, 0)).toBeCloseTo(1, 5);
    expect(Math.abs(even)).toBeLessThan(1e-5);
    expect(Math.abs(form.matrix.reduce((sum, m) => sum + m, 0))).toBeGreaterThan(1e-3);
  });
});

describe("the second-order stiffness against direct solves", () => {
  // Source: direct finite elements in random fields that are even over each group, where the form is exact: what is left is of third order.
  it("leaves an error of third order", () => {
    const worst = [0.1, 0.2].map((size) => {
      const numbers = stream("third order", 7);
      let most = 0;
      for (let k = 0; k < 8; k++) {
        const g = Float64Array.from({ length: count }, () => size * numbers.normal());
        let predicted = -Math.log(solution.compliance);
        for (let i = 0; i < count; i++) {
          predicted += form.weights[i] * g[i];
          for (let j = 0; j < count; j++) predicted += g[i] * form.matrix[i * count + j] * g[j];
        }
        most = Math.max(most, Math.abs(predicted - lnStiffness(mesh, changed((group) => g[group]))));
      }
      return most;
    });
    expect(worst[0]).toBeLessThan(3e-4);
    expect(Math.log2(worst[1] / worst[0])).toBeGreaterThan(2.5);
  });
});

describe("slopeLoss", () => {
  const even = { ...geometry, poissonRatio: 0.3 };
  const evenMesh = pileMesh(even);
  const median = () => kilopascals(6e3);
  /** A covariance of few parts: smooth fields over the groups. */
  const parts = Array.from({ length: 5 }, (_, k) =>
    Float64Array.from({ length: count }, (_, e) => Math.cos((k * Math.PI * ((e % bands) + 0.5)) / bands) * (1 - 0.2 * Math.floor(e / bands)) * (k === 0 ? 0.8 : 0.4)),
  );
  const covariance = new Float64Array(count * count);
  for (const part of parts) for (let i = 0; i < count; i++) for (let j = 0; j < count; j++) covariance[i * count + j] += part[i] * part[j];

  // Source: central differences of the form itself (checked above against direct solves) along h = S w.
  it("is the change of tr(M S) along h", () => {
    const moduli = medianModuli(evenMesh, median);
    const traceAt = (h: Float64Array, by: number) => {
      const moved = moduli.map((e, cell) => e * Math.exp(by * h[groupOf(cell)]));
      const { matrix } = secondOrderForm(evenMesh, moved, solvePile(evenMesh, moved, pileModulus), groups);
      return matrix.reduce((sum, m, at) => sum + m * covariance[at], 0);
    };
    const { weights } = secondOrderForm(evenMesh, moduli, solvePile(evenMesh, moduli, pileModulus), groups);
    const h = new Float64Array(count);
    for (let i = 0; i < count; i++) for (let j = 0; j < count; j++) h[i] += covariance[i * count + j] * weights[j];
    const spread = weights.reduce((sum, w, i) => sum + w * h[i], 0);
    const step = 0.02;
    const loss = -(traceAt(h, step) - traceAt(h, -step)) / (2 * step) / spread;
    expect(Math.abs(slopeLoss(even, median, covariance) / loss - 1)).toBeLessThan(1e-3);
    expect(loss).toBeGreaterThan(0.01);
  });

  it("gives slopes that fall from 1 and stay positive", () => {
    expect(regressionSlope(0.05, 0)).toBe(1);
    expect(regressionSlope(0.05, 0.3)).toBeLessThan(1);
    expect(regressionSlope(0.05, 0.3)).toBeGreaterThan(0.98);
    expect(regressionSlope(0.1, 100)).toBeGreaterThan(0.5);
  });

  it("refuses a covariance of other cells", () => expect(() => slopeLoss(even, median, new Float64Array(25))).toThrow(DomainError));
});
