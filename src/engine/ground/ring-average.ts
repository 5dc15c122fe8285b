import { arcSine } from "../numerics/arc-sine.js";
import { requireDomain } from "../numerics/domain-error.js";
import { gaussLegendre } from "../numerics/gauss-legendre.js";
import { sine } from "../numerics/sine.js";
import { pointsOfRing, ringGeometry, type RingGeometry } from "./ring-geometry.js";

/** Correlation in plan by distance, m: from 1 at 0, not increasing, tending to 0. */
export type PlanCorrelation = (distance: number) => number;

/** Correlations below this are left out of the angle's range, so that the points stand where the correlation is. */
const NEGLIGIBLE = 1e-8;

/**
 * Mean of a plan correlation over a ring, seen from a point.
 *
 * The angle from the point's own side is folded, phi = phi_end t^2, which removes the kink where the point lies near the
 * ring, and ends where the correlation does.
 *
 * @param plan  correlation by distance
 * @param distance  from the ring's centre to the point, m, >= 0
 * @param radius  of the ring, m, >= 0
 * @returns the mean, 0 to 1; absolute error below 3e-7 for the ground's correlations, relative below 1e-5 above 0.001
 * @throws {DomainError} a length is negative or not finite
 */
export function pointToRing(plan: PlanCorrelation, distance: number, radius: number): number {
  requireLength("Distance", distance);
  requireLength("Ring radius", radius);
  return meanOverRing(plan, reachOf(plan), distance, radius);
}

/**
 * Mean of a plan correlation between the points of two rings.
 *
 * @param plan  correlation by distance
 * @param centreDistance  distance of the rings' centres, m, >= 0
 * @param radiusA  of one ring, m, >= 0
 * @param radiusB  of the other
 * @returns the mean, 0 to 1; absolute error below 1e-5 for the ground's correlations
 * @throws {DomainError} a length is negative or not finite
 */
export function ringToRing(plan: PlanCorrelation, centreDistance: number, radiusA: number, radiusB: number): number {
  requireLength("Distance", centreDistance);
  requireLength("Ring radius", radiusA);
  requireLength("Ring radius", radiusB);
  const reach = reachOf(plan);
  const outer = Math.max(radiusA, radiusB);
  const inner = Math.min(radiusA, radiusB);
  if (centreDistance === 0 || inner === 0) return meanOverRing(plan, reach, centreDistance + inner, outer);
  const { distances, weights } = pointsOfRing(centreDistance, inner, outer, gaussLegendre(24));
  return distances.reduce((sum, distance, k) => sum + weights[k] * meanOverRing(plan, reach, distance, outer), 0);
}

/**
 * `pointToRing` for many distances and rings.
 *
 * @param plan  correlation by distance
 * @param radii  of the rings, m, any order
 * @param distances  from the rings' common centre, m, any order
 * @returns means, distances x radii, row by row
 * @throws {DomainError} a length is negative or not finite
 */
export function pointRingTable(plan: PlanCorrelation, radii: Float64Array, distances: Float64Array): Float64Array {
  requireLengths(radii, distances);
  const reach = reachOf(plan);
  const table = new Float64Array(distances.length * radii.length);
  distances.forEach((distance, d) => radii.forEach((radius, r) => (table[d * radii.length + r] = meanOverRing(plan, reach, distance, radius))));
  return table;
}

/**
 * `ringToRing` for many centre distances and all pairs of rings, through a table of each ring seen from a point.
 *
 * What depends on lengths only (which points of one ring see the other from where) is kept for the next plan correlation.
 *
 * @param plan  correlation by distance
 * @param radii  of the rings, m, any order
 * @param distances  of the centres, m, any order; at 0 rings are concentric
 * @returns means, distances x radii x radii, symmetric in the radii; error below 1e-4 for correlations that reach further
 *   than a quarter of the smallest radius
 * @throws {DomainError} a length is negative or not finite
 */
export function ringTables(plan: PlanCorrelation, radii: Float64Array, distances: Float64Array): Float64Array {
  requireLengths(radii, distances);
  const reach = reachOf(plan);
  const geometry = ringGeometry(radii, distances);
  const seen = Array.from(radii, (radius, r) => geometry.grids[r].map((distance) => meanOverRing(plan, reach, distance, radius)));
  const nr = radii.length;
  const table = new Float64Array(distances.length * nr * nr);
  for (let i = 0; i < nr; i++) {
    for (let j = 0; j <= i; j++) {
      const [outer, inner] = radii[i] >= radii[j] ? [i, j] : [j, i];
      for (let d = 0; d < distances.length; d++) {
        const value =
          distances[d] === 0 || radii[inner] === 0
            ? meanOverRing(plan, reach, distances[d] + radii[inner], radii[outer])
            : interpolatedMean(seen[outer], geometry, (d * nr + outer) * nr + inner);
        table[(d * nr + i) * nr + j] = table[(d * nr + j) * nr + i] = value;
      }
    }
  }
  return table;
}

/** Weighted sum over a pair's points of a table interpolated by cubics. */
function interpolatedMean(table: Float64Array, geometry: RingGeometry, pair: number): number {
  const { starts, places, fractions, weights } = geometry;
  let sum = 0;
  for (let k = starts[pair]; k < starts[pair + 1]; k++) {
    const f = fractions[k];
    const p = places[k];
    const below = f * (f - 1);
    const above = (f + 1) * (f - 2);
    sum += weights[k] * ((above * (f - 1) * table[p + 1] - above * f * table[p + 2]) / 2 + below * ((f + 1) * table[p + 3] - (f - 2) * table[p]) / 6);
  }
  return sum;
}

const rule = gaussLegendre(16);

function meanOverRing(plan: PlanCorrelation, reach: number, distance: number, radius: number): number {
  const near = distance - radius;
  if (Math.abs(near) > reach) return 0;
  const product = 4 * distance * radius;
  if (product === 0) return plan(Math.abs(near));
  const share = (reach * reach - near * near) / product;
  const end = share >= 1 ? Math.PI : 2 * arcSine(Math.sqrt(share));
  let sum = 0;
  for (let k = 0; k < rule.nodes.length; k++) {
    const t = rule.nodes[k];
    const half = sine((end * t * t) / 2);
    sum += rule.weights[k] * t * plan(Math.sqrt(near * near + product * half * half));
  }
  return (2 * end * sum) / Math.PI;
}

/** Distance beyond which a correlation is negligible, m. */
function reachOf(plan: PlanCorrelation): number {
  let far = 1;
  while (plan(far) > NEGLIGIBLE && far < 1e12) far *= 2;
  let near = far;
  while (plan(near) <= NEGLIGIBLE && near > 1e-12) near /= 2;
  far = near * 2;
  for (let k = 0; k < 30; k++) {
    const middle = (near + far) / 2;
    if (plan(middle) > NEGLIGIBLE) near = middle;
    else far = middle;
  }
  return far;
}

function requireLength(name: string, value: number): void {
  requireDomain(value >= 0 && value < Infinity, name, value, "0 m or above");
}

function requireLengths(radii: Float64Array, distances: Float64Array): void {
  requireDomain(radii.length > 0 && distances.length > 0, "Number of rings or distances", 0, "above 0");
  for (const radius of radii) requireLength("Ring radius", radius);
  for (const distance of distances) requireLength("Distance", distance);
}
