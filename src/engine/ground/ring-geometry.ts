import { arcCosine } from "../numerics/arc-sine.js";
import { gaussLegendre, type QuadratureRule } from "../numerics/gauss-legendre.js";
import { hyperbolicSine, inverseHyperbolicSine } from "../numerics/hyperbolic.js";
import { sine } from "../numerics/sine.js";

/** Points of one ring by their distance from the centre of another, with the share of the ring that each stands for. */
export interface RingPoints {
  readonly distances: Float64Array;
  readonly weights: Float64Array;
}

/** How every pair of rings sees each other at every centre distance; depends on lengths only. */
export interface RingGeometry {
  readonly radii: Float64Array;
  readonly distances: Float64Array;
  /** for each radius the distances at which the ring seen from a point is tabulated */
  readonly grids: readonly Float64Array[];
  /** first point of pair (distance, outer ring, inner ring), and one past its last, in the lists below */
  readonly starts: Int32Array;
  /** first of four tabulated distances around each point, and where it lies between the middle two */
  readonly places: Int32Array;
  readonly fractions: Float64Array;
  readonly weights: Float64Array;
}

/** Spacing of a grid near its ring over the smallest radius, and step of its growth away from the ring. */
const CLOSENESS = 0.1;
const GROWTH = 0.12;
const POINTS = 12;
/** Geometries kept: the fine and the grouped rings of the few pile lengths in use. */
const KEPT = 8;
const kept: RingGeometry[] = [];

/**
 * Points of a ring for a mean of something that bends where it crosses another ring: the angle is cut at the crossing, or at
 * the end nearest to the other ring, and both parts run as the cube of the rule's variable away from it.
 *
 * @param centreDistance  distance of the two centres, m, > 0
 * @param radius  of the ring whose points are made, m, > 0
 * @param other  radius of the ring that is crossed, m, > 0
 * @param rule  quadrature rule on 0 to 1
 * @returns distances of the points from the other ring's centre, and weights that sum to 1
 */
export function pointsOfRing(centreDistance: number, radius: number, other: number, rule: QuadratureRule): RingPoints {
  const cosine = (centreDistance ** 2 + radius ** 2 - other ** 2) / (2 * centreDistance * radius);
  const cut = arcCosine(Math.min(1, Math.max(-1, cosine)));
  const distances: number[] = [];
  const weights: number[] = [];
  for (const span of [-cut, Math.PI - cut]) {
    if (span === 0) continue;
    rule.nodes.forEach((t, k) => {
      const half = sine((cut + span * t * t * t) / 2);
      distances.push(Math.sqrt((centreDistance - radius) ** 2 + 4 * centreDistance * radius * half * half));
      weights.push((rule.weights[k] * 3 * t * t * Math.abs(span)) / Math.PI);
    });
  }
  return { distances: Float64Array.from(distances), weights: Float64Array.from(weights) };
}

/**
 * The geometry of a set of rings at a set of centre distances, from memory when it was made lately.
 *
 * @param radii  of the rings, m, >= 0, any order
 * @param distances  of the centres, m, >= 0, any order
 * @returns the geometry; not to be written to
 */
export function ringGeometry(radii: Float64Array, distances: Float64Array): RingGeometry {
  const known = kept.findIndex((g) => same(g.radii, radii) && same(g.distances, distances));
  const geometry = known >= 0 ? kept.splice(known, 1)[0] : makeGeometry(radii.slice(), distances.slice());
  kept.unshift(geometry);
  kept.length = Math.min(kept.length, KEPT);
  return geometry;
}

function same(a: Float64Array, b: Float64Array): boolean {
  return a.length === b.length && a.every((value, i) => value === b[i]);
}

function makeGeometry(radii: Float64Array, distances: Float64Array): RingGeometry {
  const smallest = radii.reduce((least, r) => (r > 0 ? Math.min(least, r) : least), Infinity);
  const close = CLOSENESS * (smallest < Infinity ? smallest : 1);
  const reach = radii.reduce((a, b) => Math.max(a, b), 0) + distances.reduce((a, b) => Math.max(a, b), 0);
  const sides = Array.from(radii, (radius) => [radius, reach].map((far) => Math.max(5, Math.ceil(inverseHyperbolicSine(far / close) / GROWTH) + 2)));
  const grids = Array.from(radii, (radius, r) => {
    const [inside, outside] = sides[r];
    return Float64Array.from({ length: inside + outside }, (_, k) =>
      k < inside ? Math.abs(radius - close * hyperbolicSine(GROWTH * k)) : radius + close * hyperbolicSine(GROWTH * (k - inside)),
    );
  });
  const nr = radii.length;
  const starts = new Int32Array(distances.length * nr * nr + 1);
  const places: number[] = [];
  const fractions: number[] = [];
  const weights: number[] = [];
  for (let pair = 0; pair < starts.length - 1; pair++) {
    starts[pair] = weights.length;
    const inner = pair % nr;
    const outer = ((pair - inner) / nr) % nr;
    const centreDistance = distances[(pair - inner - outer * nr) / (nr * nr)];
    if (centreDistance === 0 || radii[inner] === 0 || radii[inner] > radii[outer]) continue;
    const points = pointsOfRing(centreDistance, radii[inner], radii[outer], gaussLegendre(POINTS));
    points.distances.forEach((distance, k) => {
      const [inside, outside] = sides[outer];
      const beyond = distance >= radii[outer];
      const place = inverseHyperbolicSine(Math.abs(distance - radii[outer]) / close) / GROWTH;
      const first = Math.min(Math.max(Math.floor(place) - 1, 0), (beyond ? outside : inside) - 4);
      places.push(beyond ? inside + first : first);
      fractions.push(place - first - 1);
      weights.push(points.weights[k]);
    });
  }
  starts[starts.length - 1] = weights.length;
  return { radii, distances, grids, starts, places: Int32Array.from(places), fractions: Float64Array.from(fractions), weights: Float64Array.from(weights) };
}
