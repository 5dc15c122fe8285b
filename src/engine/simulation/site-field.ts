import type { Point } from "../investigation/hole-positions.js";
import { pointRingTable, ringTables } from "../ground/ring-average.js";
import type { SeparableTerm } from "../ground/separable-terms.js";
import type { Plan } from "../decision/plan.js";
import type { Stream } from "../random/stream.js";
import { addProduct, covarianceRoot, type CovarianceRoot } from "./covariance-root.js";

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

/** One realised ground: a field of mean 0 and variance 1 at every point. */
export interface DrawnField {
  /** means over rings and cells: piles x rings x cells */
  readonly underPiles: Float64Array;
  /** at the reading depths of the holes: holes x depths */
  readonly inHoles: Float64Array;
}

/** Draws the ground, one realisation after another, into room that is made once. */
export interface SiteField extends DrawnField {
  /**
   * Draws a realisation.
   *
   * @param numbers  a stream for each part from 0 to 3; the ground under the piles uses part 0 only, so that it is the same
   *   whatever holes are looked at
   */
  draw(numbers: (part: number) => Stream): void;
}

interface TermRoots {
  readonly scale: number;
  readonly plan: CovarianceRoot;
  readonly depth: CovarianceRoot;
}

/**
 * The joint normal law of all ring means under the piles and all points of the holes, exact for a sum of products of a plan and a
 * depth part: field = sum over terms of root(weight) A Z B', with A A' the plan's and B B' the depth's covariance.
 *
 * @param terms   of the correlation
 * @param places  piles, rings, cells, holes, reading depths
 */
export function siteField(terms: readonly SeparableTerm[], places: FieldPlaces): SiteField {
  const { plan, rings, levelBounds, holes, readingDepths } = places;
  const ringCount = plan.piles.length * rings.length;
  const cells = levelBounds.length - 1;
  const depths = readingDepths.length;
  const roots: TermRoots[] = planCovariances(terms, places).map((covariance, t) => ({
    scale: Math.sqrt(terms[t].weight),
    plan: covarianceRoot(covariance, ringCount + holes.length, ringCount),
    depth: covarianceRoot(depthCovariance(terms[t], levelBounds, readingDepths), cells + depths, cells),
  }));
  const most = (of: (root: TermRoots) => number): number => roots.reduce((max, root) => Math.max(max, of(root)), 0);
  const wide = most((r) => r.plan.columnCount);
  const normals = new Float64Array(most((r) => r.depth.columnCount) * wide);
  const byDepth = new Float64Array(Math.max(cells, depths) * wide);
  const turned = new Float64Array(Math.max(cells, depths) * wide);
  const underPiles = new Float64Array(ringCount * cells);
  const inHoles = new Float64Array(holes.length * depths);

  /** Adds one term to rows of the plan at rows of the depth. */
  const add = (root: TermRoots, planRows: [number, number], depthRows: [number, number], planColumns: number, out: Float64Array): void => {
    const high = depthRows[1] - depthRows[0];
    byDepth.fill(0, 0, high * planColumns);
    addProduct(root.depth, depthRows[0], depthRows[1], normals, root.plan.columnCount, root.scale, byDepth, planColumns);
    for (let i = 0; i < high; i++) for (let q = 0; q < planColumns; q++) turned[q * high + i] = byDepth[i * planColumns + q];
    addProduct(root.plan, planRows[0], planRows[1], turned, high, 1, out, high);
  };
  return {
    underPiles,
    inHoles,
    draw(numbers) {
      underPiles.fill(0);
      inHoles.fill(0);
      const parts = [0, 1, 2, 3].map(numbers);
      for (const root of roots) {
        const { columnCount, firstColumns } = root.plan;
        for (let j = 0; j < root.depth.columnCount; j++) {
          const below = j < root.depth.firstColumns ? 0 : 2;
          for (let q = 0; q < columnCount; q++) normals[j * columnCount + q] = parts[below + (q < firstColumns ? 0 : 1)].normal();
        }
        add(root, [0, ringCount], [0, cells], firstColumns, underPiles);
        if (inHoles.length > 0) add(root, [ringCount, ringCount + holes.length], [cells, cells + depths], columnCount, inHoles);
      }
    },
  };
}

/** Covariance of the depth part between cells, by averages, and reading depths, by points: cells first. */
function depthCovariance(term: SeparableTerm, bounds: Float64Array, points: Float64Array): Float64Array {
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
function planCovariances(terms: readonly SeparableTerm[], { plan, rings, holes }: FieldPlaces): Float64Array[] {
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
  const away = Float64Array.from(holes.flatMap((hole) => plan.piles.map((p) => Math.hypot(p.x - hole.x, p.y - hole.y))));
  terms.forEach((term, t) => {
    const matrix = out[t];
    const seen = holes.length === 0 ? away : pointRingTable(term.plan, rings, away);
    for (let h = 0; h < holes.length; h++) {
      const row = ringCount + h;
      for (let k = 0; k < ringCount; k++) matrix[row * n + k] = matrix[k * n + row] = seen[h * ringCount + k];
      for (let g = 0; g <= h; g++) matrix[row * n + ringCount + g] = matrix[(ringCount + g) * n + row] = term.plan(Math.hypot(holes[h].x - holes[g].x, holes[h].y - holes[g].y));
    }
  });
  return out;
}
