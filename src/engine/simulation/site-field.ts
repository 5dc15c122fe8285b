import type { SeparableTerm } from "../ground/separable-terms.js";
import type { Stream } from "../random/stream.js";
import { addProduct, covarianceRoot, type CovarianceRoot } from "./covariance-root.js";
import { normalSource } from "./normal-source.js";
import { depthCovariance, planCovariances, type FieldPlaces } from "./place-covariance.js";
import { addRowProducts, fullness, orderedRows, type OrderedRows } from "./ordered-rows.js";

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

/** Roots of one term. Well-filled ones are written out, because then a blocked product is twice as fast as a sparse one. */
interface TermRoots {
  readonly scale: number;
  readonly plan: CovarianceRoot;
  readonly depth: CovarianceRoot;
  /** rings and cells, holes and reading depths: plan and depth rows of each, written out; undefined for roots that are mostly empty */
  readonly written: readonly { readonly plan: OrderedRows; readonly depth: OrderedRows }[] | undefined;
}

/** Below this share of entries a root is left sparse. */
const wellFilled = 0.4;

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
  const rows = ringCount + holes.length;
  const cells = levelBounds.length - 1;
  const depths = readingDepths.length;
  const levels = cells + depths;
  const roots = planCovariances(terms, places).map((covariance, t): TermRoots => {
    const ofPlan = covarianceRoot(covariance, rows, ringCount);
    const ofDepth = covarianceRoot(depthCovariance(terms[t], levelBounds, readingDepths), levels, cells);
    const written = [
      { plan: orderedRows(ofPlan, 0, ringCount, ofPlan.firstColumns), depth: orderedRows(ofDepth, 0, cells, ofDepth.firstColumns) },
      { plan: orderedRows(ofPlan, ringCount, rows, ofPlan.columnCount), depth: orderedRows(ofDepth, cells, levels, ofDepth.columnCount) },
    ];
    // The rings decide for the holes too: what is drawn under the piles must not depend on where holes stand.
    const isFull = Math.min(fullness(written[0].plan), fullness(written[0].depth)) > wellFilled;
    return { scale: Math.sqrt(terms[t].weight), plan: ofPlan, depth: ofDepth, written: isFull ? written : undefined };
  });
  const wide = roots.reduce((most, { plan: { columnCount } }) => Math.max(most, columnCount), 0);
  const high = roots.reduce((most, { depth: { columnCount } }) => Math.max(most, columnCount), 0);
  const normals = new Float64Array(high * wide);
  const byDepth = new Float64Array(Math.max(cells, depths) * wide);
  const turned = new Float64Array(Math.max(cells, depths) * wide);
  const underPiles = new Float64Array(ringCount * cells);
  const inHoles = new Float64Array(holes.length * depths);

  const addFull = (root: TermRoots, part: { plan: OrderedRows; depth: OrderedRows }, out: Float64Array): void => {
    const { columns } = part.plan;
    byDepth.fill(0, 0, part.depth.order.length * columns);
    addRowProducts(part.depth, normals, columns, root.depth.columnCount, root.scale, byDepth);
    addRowProducts(part.plan, byDepth, part.depth.order.length, columns, 1, out);
  };
  const addSparse = (root: TermRoots, planRows: [number, number], depthRows: [number, number], columns: number, out: Float64Array): void => {
    const count = depthRows[1] - depthRows[0];
    byDepth.fill(0, 0, count * columns);
    addProduct(root.depth, depthRows[0], depthRows[1], normals, root.plan.columnCount, root.scale, byDepth, columns);
    for (let i = 0; i < count; i++) for (let q = 0; q < columns; q++) turned[q * count + i] = byDepth[i * columns + q];
    addProduct(root.plan, planRows[0], planRows[1], turned, count, 1, out, count);
  };
  return {
    underPiles,
    inHoles,
    draw(numbers) {
      underPiles.fill(0);
      inHoles.fill(0);
      const sources = [0, 1, 2, 3].map((part) => normalSource(numbers(part)));
      for (const root of roots) {
        const { plan: p, depth: d, written } = root;
        // Normals by plan column and depth column, in blocks of the first and the other columns; each block has a source of its own.
        const [outer, inner] = written === undefined ? [d, p] : [p, d];
        for (let o = 0; o < outer.columnCount; o++) {
          const o1 = o < outer.firstColumns ? 0 : 1;
          const source = (i1: number): number => (written === undefined ? 2 * o1 + i1 : o1 + 2 * i1);
          const row = o * inner.columnCount;
          sources[source(0)].fill(normals, row, row + inner.firstColumns);
          sources[source(1)].fill(normals, row + inner.firstColumns, row + inner.columnCount);
        }
        if (written === undefined) {
          addSparse(root, [0, ringCount], [0, cells], p.firstColumns, underPiles);
          if (inHoles.length > 0) addSparse(root, [ringCount, rows], [cells, levels], p.columnCount, inHoles);
        } else {
          addFull(root, written[0], underPiles);
          if (inHoles.length > 0) addFull(root, written[1], inHoles);
        }
      }
    },
  };
}
