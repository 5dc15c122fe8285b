import type { Plan } from "../decision/plan.js";
import { pointRingTable, ringTables } from "../ground/ring-average.js";
import type { SeparableTerm } from "../ground/separable-terms.js";
import type { Point } from "../investigation/hole-positions.js";
import { hypotenuse } from "../numerics/hypotenuse.js";

/** Where the ground is looked at. */
export interface FieldPlaces {
  readonly plan: Plan;
  /** radii of the rings about every pile, m */
  readonly rings: Float64Array;
  /** depths that bound the cells over which rings are averaged, m */
  readonly levelBounds: Float64Array;
  /** holes of all counts and methods together */
  readonly holes: readonly Point[];
  /** depths at which any hole is read, m */
  readonly readingDepths: Float64Array;
}

/** Covariance of the depth part between cells, by averages, and reading depths, by points: cells first. */
export function depthCovariance(term: SeparableTerm, bounds: Float64Array, points: Float64Array): Float64Array {
  const cells = bounds.length - 1;
  const n = cells + points.length;
  const middle = (i: number): number => (i < cells ? (bounds[i] + bounds[i + 1]) / 2 : points[i - cells]);
  const thickness = (i: number): number => (i < cells ? bounds[i + 1] - bounds[i] : 0);
  const out = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) out[i * n + j] = out[j * n + i] = term.verticalCellAverage(middle(i) - middle(j), thickness(i), thickness(j));
  }
  return out;
}

/** Distances looked up at a time: what depends on lengths only is kept between the terms, and must stay small. */
const atATime = 64;

/** Covariance of each term's plan part between the rings of all piles and the holes: rings pile by pile, then holes. */
export function planCovariances(terms: readonly SeparableTerm[], { plan, rings, holes }: FieldPlaces): Float64Array[] {
  const piles = plan.piles.length;
  const nr = rings.length;
  const ringCount = piles * nr;
  const n = ringCount + holes.length;
  const out = terms.map(() => new Float64Array(n * n));
  for (let start = 0; start < plan.distances.length; start += atATime) {
    const distances = plan.distances.slice(start, start + atATime);
    terms.forEach((term, t) => {
      const table = ringTables(term.plan, rings, distances);
      for (let i = 0; i < piles; i++) {
        for (let j = 0; j < piles; j++) {
          const d = plan.distanceOf[i * piles + j] - start;
          if (d < 0 || d >= distances.length) continue;
          for (let r = 0; r < nr; r++) for (let s = 0; s < nr; s++) out[t][(i * nr + r) * n + j * nr + s] = table[(d * nr + r) * nr + s];
        }
      }
    });
  }
  const away = Float64Array.from(holes.flatMap((hole) => plan.piles.map((p) => hypotenuse(p.x - hole.x, p.y - hole.y))));
  terms.forEach((term, t) => {
    const matrix = out[t];
    const seen = holes.length === 0 ? away : pointRingTable(term.plan, rings, away);
    for (let h = 0; h < holes.length; h++) {
      const row = ringCount + h;
      for (let k = 0; k < ringCount; k++) matrix[row * n + k] = matrix[k * n + row] = seen[h * ringCount + k];
      for (let g = 0; g <= h; g++) matrix[row * n + ringCount + g] = matrix[(ringCount + g) * n + row] = term.plan(hypotenuse(holes[h].x - holes[g].x, holes[h].y - holes[g].y));
    }
  });
  return out;
}
