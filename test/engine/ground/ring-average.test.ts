import { describe, expect, it } from "vitest";
import type { CorrelationName } from "../../../src/engine/ground/correlation.js";
import { pointRingTable, pointToRing, ringTables, ringToRing, type PlanCorrelation } from "../../../src/engine/ground/ring-average.js";
import { separableTerms } from "../../../src/engine/ground/separable-terms.js";
import { choleskyInPlace } from "../../../src/engine/numerics/cholesky.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { gaussLegendre } from "../../../src/engine/numerics/gauss-legendre.js";

const plans: [string, PlanCorrelation][] = (["markov", "gaussian", "spherical", "markov2"] as CorrelationName[]).flatMap((correlation) =>
  [2, 8, 50].map((horizontalScale): [string, PlanCorrelation] => [`${correlation} ${horizontalScale} m`, separableTerms({ correlation, horizontalScale, verticalScale: 1 })[0].plan]),
);

/** Mean over a ring by brute force: panels of 12 points, refined geometrically to the near side and evenly elsewhere. */
function densePointToRing(plan: PlanCorrelation, distance: number, radius: number): number {
  const { nodes, weights } = gaussLegendre(12);
  const edges = [0];
  for (let edge = 1e-7; edge < 0.05; edge *= 2) edges.push(edge);
  for (let k = 1; k <= 90; k++) edges.push(Math.max(edges[edges.length - 1], (Math.PI * k) / 90));
  let mean = 0;
  for (let p = 1; p < edges.length; p++) {
    const width = edges[p] - edges[p - 1];
    nodes.forEach((node, k) => {
      const half = Math.sin((edges[p - 1] + width * node) / 2);
      mean += ((weights[k] * width) / Math.PI) * plan(Math.sqrt((distance - radius) ** 2 + 4 * distance * radius * half * half));
    });
  }
  return mean;
}

/** Mean between two rings by brute force: equal steps around one of them, dense means over the other. */
function denseRingToRing(plan: PlanCorrelation, centres: number, a: number, b: number): number {
  const steps = 300;
  let mean = 0;
  for (let k = 0; k < steps; k++) {
    const angle = ((k + 0.5) * Math.PI) / steps;
    mean += densePointToRing(plan, Math.hypot(centres + a * Math.cos(angle), a * Math.sin(angle)), b) / steps;
  }
  return mean;
}

describe.each(plans)("rings in %s", (_, plan) => {
  it("are seen from a point as brute force sees them, on, near and off the ring", () => {
    for (const radius of [0.25, 1, 6, 75]) {
      for (const share of [0, 0.4, 0.95, 0.999, 1, 1.001, 1.2, 3]) {
        expect(Math.abs(pointToRing(plan, radius * share, radius) - densePointToRing(plan, radius * share, radius))).toBeLessThan(3e-7);
      }
    }
  });

  it("see each other as brute force sees them, concentric, apart, crossing and touching", () => {
    for (const [centres, a, b] of [[0, 2, 2], [0, 2, 5], [6, 0.25, 0.25], [6, 4, 3], [6, 8, 1], [3, 2, 1], [12, 20, 14]]) {
      const exact = centres === 0 ? densePointToRing(plan, a, b) : denseRingToRing(plan, centres, a, b);
      expect(Math.abs(ringToRing(plan, centres, a, b) - exact)).toBeLessThan(1e-5);
    }
  });

  // Independent of each other: the table interpolates a ring seen from points, `ringToRing` evaluates every point.
  it("are tabulated within 1e-4 of their direct means", () => {
    const radii = Float64Array.of(30, 0.25, 1.5, 0.4, 8);
    const distances = Float64Array.of(0, 0.3, 2, 6, 17, 50);
    const table = ringTables(plan, radii, distances);
    const points = pointRingTable(plan, radii, distances);
    distances.forEach((distance, d) =>
      radii.forEach((a, i) => {
        expect(points[d * 5 + i]).toBe(pointToRing(plan, distance, a));
        radii.forEach((b, j) => {
          expect(Math.abs(table[(d * 5 + i) * 5 + j] - ringToRing(plan, distance, a, b)), `rings ${a} and ${b} at ${distance}`).toBeLessThan(1e-4);
          expect(table[(d * 5 + i) * 5 + j]).toBe(table[(d * 5 + j) * 5 + i]);
        });
      }),
    );
  });
});

describe("ring means", () => {
  const plan: PlanCorrelation = (r) => Math.exp(-r);

  // Closed form: a point on its own ring in exp(-u r^2) sees exp(-2 u R^2) I0(2 u R^2), by the series of the Bessel function I0.
  it("meet the Bessel function for the Gaussian correlation", () => {
    for (const y of [0.1, 1, 4, 15]) {
      let bessel = 0;
      for (let k = 0, term = 1; k < 80; k++, term *= (y / 2 / k) ** 2) bessel += term;
      expect(Math.abs(pointToRing((r) => Math.exp((-y * r * r) / 2), 1, 1) - Math.exp(-y) * bessel)).toBeLessThan(1e-8);
    }
  });

  it("are points where a radius is 0", () => {
    expect(pointToRing(plan, 2, 0)).toBeCloseTo(Math.exp(-2), 14);
    expect(pointToRing(plan, 0, 2)).toBeCloseTo(Math.exp(-2), 14);
    expect(ringToRing(plan, 3, 0, 0)).toBeCloseTo(Math.exp(-3), 14);
    expect(ringTables(plan, Float64Array.of(0, 2), Float64Array.of(0, 5))[1]).toBeCloseTo(Math.exp(-2), 14);
    expect(ringTables(plan, Float64Array.of(0), Float64Array.of(5))[0]).toBeCloseTo(Math.exp(-5), 14);
  });

  it("vanish beyond the reach of a correlation that ends", () => {
    expect(pointToRing((r) => Math.max(0, 1 - r), 9, 2)).toBe(0);
    expect(ringToRing((r) => Math.max(0, 1 - r), 9, 2, 1)).toBe(0);
  });

  // The lengths of an earlier call are remembered: other lengths and other correlations must not see them.
  it("do not depend on earlier calls", () => {
    const radii = Float64Array.of(0.3, 2);
    const alone = ringTables(plan, radii, Float64Array.of(0, 4));
    radii[0] = 1.5; // the caller's array is the caller's
    const changed = ringTables(plan, radii, Float64Array.of(0, 4));
    expect(Math.abs(changed[5] - ringToRing(plan, 4, 1.5, 2))).toBeLessThan(1e-4);
    for (let k = 1; k < 12; k++) ringTables((r) => Math.exp(-r / k), Float64Array.of(0.3, 2 + k), Float64Array.of(0, 4 + k));
    expect([...ringTables(plan, Float64Array.of(0.3, 2), Float64Array.of(0, 4))]).toEqual([...alone]);
  });

  // Theory: the means over concentric rings have a positive definite covariance.
  it("have a positive definite covariance", () => {
    const radii = Float64Array.from({ length: 12 }, (_, k) => 0.25 * 1.6 ** k);
    expect(choleskyInPlace(ringTables(plan, radii, Float64Array.of(0)), 12)).toBe(12);
  });

  it("refuse lengths that are none", () => {
    for (const length of [-1, Number.NaN, Infinity]) {
      expect(() => pointToRing(plan, length, 1)).toThrow(DomainError);
      expect(() => pointToRing(plan, 1, length)).toThrow(DomainError);
      expect(() => ringToRing(plan, length, 1, 1)).toThrow(DomainError);
      expect(() => ringToRing(plan, 1, 1, length)).toThrow(DomainError);
      expect(() => ringTables(plan, Float64Array.of(length), Float64Array.of(1))).toThrow(DomainError);
      expect(() => pointRingTable(plan, Float64Array.of(1), Float64Array.of(length))).toThrow(DomainError);
    }
    expect(() => ringTables(plan, new Float64Array(0), Float64Array.of(1))).toThrow(DomainError);
  });
});
