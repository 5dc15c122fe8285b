import { contract, times, timesTransposed } from "../numerics/products.js";
import { pointRingTable, ringTables } from "../ground/ring-average.js";
import type { SeparableTerm } from "../ground/separable-terms.js";
import { kilopascals } from "../../units/quantities.js";
import { slopeLoss } from "../piles/slope-loss.js";
import { cellCovariance, cellValues, depthGroups, overBands, pointCellCovariance } from "./cell-tables.js";
import { distanceCoordinate, distanceGrid } from "./distance-grid.js";
import { lowRankForm } from "./quadratic-form.js";
import type { FamilyNode, PileFamily } from "./pile-family.js";

/** Parts kept of the second-order form at each length. */
export const ranks = 4;
/** Groups of readings in depth that a hole's covariances are kept for. */
const readingGroups = 8;

/**
 * Covariances of the unit field as the piles and holes of one ground structure see it, by horizontal distance:
 * X is the energy-weighted ground of a pile at one of the family's lengths, v a functional of its second-order form.
 */
export interface StructureTables {
  /** the tables' distances, from 0, in the even coordinate of `distanceCoordinate` */
  readonly coordinates: Float64Array;
  /** Cov(X at length k, X at length l of a pile at the distance): distances x lengths x lengths */
  readonly pairs: Float64Array;
  /** Cov(X at length k, mean of depth group g of a hole's readings): distances x lengths x groups */
  readonly holes: Float64Array;
  /** Cov(v of form f and rank r, X at length k of a pile at the distance): distances x forms x ranks x lengths */
  readonly curvePairs: Float64Array;
  /** Cov(v of form f and rank r, mean of a hole's readings): distances x forms x ranks */
  readonly curveHoles: Float64Array;
  /** values of the form's parts: forms x ranks */
  readonly values: Float64Array;
  /** sums of the functionals over the whole ground: forms x ranks */
  readonly curveSums: Float64Array;
  /** expectation of the whole form, and of its parts beyond the kept ranks; variance of the latter: one a form */
  readonly traces: Float64Array;
  readonly restVariances: Float64Array;
  /** the form for a ground that is stiffer everywhere: one a form */
  readonly uniformForms: Float64Array;
  /** loss of the regression slope of ln stiffness for each unit of ground variance: one a form */
  readonly slopeLosses: Float64Array;
  /** readings of each depth group over all readings of a hole */
  readonly groupShares: Float64Array;
}

/** What the tables need of the ground. */
export interface StructureGround {
  readonly terms: readonly SeparableTerm[];
  /** standard deviation of the log ground by depth over the reference one */
  readonly relativeSd: (depth: number) => number;
  readonly readingDepths: Float64Array;
  /** greatest horizontal distance that will be asked for, m */
  readonly reach: number;
}

/**
 * Tables of one family node in one ground structure. All kernels are sums of products of a plan and a depth part, so every
 * table is a sum over the terms of small matrix products.
 */
export function structureTables(family: PileFamily, node: FamilyNode, ground: StructureGround): StructureTables {
  const distances = distanceGrid(ground.reach);
  const cells = family.levelBounds.length - 1;
  const lengths = family.lengths.length;
  const forms = family.formIndices.length;
  const fine = family.rings;
  const rf = fine.length;
  const sd = cellValues(family.levelBounds, ground.relativeSd);
  const weights = node.weights.map((w) => w.map((value, i) => value * sd[i % cells]));
  const groups = depthGroups(ground.readingDepths, readingGroups);
  const tables: StructureTables = {
    coordinates: distances.map(distanceCoordinate),
    pairs: new Float64Array(distances.length * lengths * lengths),
    holes: new Float64Array(distances.length * lengths * groups.length),
    curvePairs: new Float64Array(distances.length * forms * ranks * lengths),
    curveHoles: new Float64Array(distances.length * forms * ranks),
    values: new Float64Array(forms * ranks),
    curveSums: new Float64Array(forms * ranks),
    traces: new Float64Array(forms),
    restVariances: new Float64Array(forms),
    uniformForms: new Float64Array(forms),
    slopeLosses: new Float64Array(forms),
    groupShares: Float64Array.from(groups, (g) => g.length / ground.readingDepths.length),
  };
  const curves = family.formIndices.map((k, f) => curveOf(family, node, k, f, ground, tables));
  const coarse = curves[0].radii;
  const rg = coarse.length;
  const radii = Float64Array.from([...fine, ...coarse]);
  const nr = radii.length;
  for (const term of ground.terms) {
    const plan = ringTables(term.plan, radii, distances);
    const point = pointRingTable(term.plan, radii, distances);
    const depth = cellCovariance(family.levelBounds, family.levelBounds, term);
    const read = groups.map((depths) => pointCellCovariance(depths, family.levelBounds, term, ground.relativeSd));
    const smooth = weights.map((w) => times(w, depth, rf, cells, cells)); // rings x cells: covariance with the ground in each cell, ring by ring
    for (let k = 0; k < lengths; k++) {
      for (let l = 0; l <= k; l++) {
        const v = timesTransposed(smooth[k], weights[l], rf, rf, cells);
        for (let d = 0; d < distances.length; d++) {
          const value = term.weight * contract(plan, d * nr * nr, nr, v, rf, rf);
          tables.pairs[(d * lengths + k) * lengths + l] += value;
          if (l !== k) tables.pairs[(d * lengths + l) * lengths + k] += value;
        }
      }
      for (let g = 0; g < groups.length; g++) {
        const byRing = times(weights[k], read[g], rf, cells, 1);
        for (let d = 0; d < distances.length; d++) {
          let sum = 0;
          for (let r = 0; r < rf; r++) sum += point[d * nr + r] * byRing[r];
          tables.holes[(d * lengths + k) * groups.length + g] += term.weight * sum;
        }
      }
    }
    for (let f = 0; f < forms; f++) {
      const curve = curves[f];
      const bands = curve.bounds.length - 1;
      const bandRead = new Float64Array(bands);
      groups.forEach((depths, g) => pointCellCovariance(depths, curve.bounds, term, ground.relativeSd).forEach((value, b) => (bandRead[b] += value * curve.sd[b] * tables.groupShares[g])));
      const onBands = smooth.map((s) => overBands(s, rf, family.levelBounds, curve.bounds).map((value, i) => value * curve.sd[i % bands]));
      for (let r = 0; r < ranks; r++) {
        const functional = curve.functionals.subarray(r * rg * bands, (r + 1) * rg * bands);
        const row = (f * ranks + r) * lengths;
        for (let k = 0; k < lengths; k++) {
          const v = timesTransposed(functional, onBands[k], rg, rf, bands);
          for (let d = 0; d < distances.length; d++) {
            tables.curvePairs[d * forms * ranks * lengths + row + k] += term.weight * contract(plan, d * nr * nr + rf * nr, nr, v, rg, rf);
          }
        }
        const byRing = times(functional, bandRead, rg, bands, 1);
        for (let d = 0; d < distances.length; d++) {
          let sum = 0;
          for (let g = 0; g < rg; g++) sum += point[d * nr + rf + g] * byRing[g];
          tables.curveHoles[(d * forms + f) * ranks + r] += term.weight * sum;
        }
      }
    }
  }
  return tables;
}

interface Curve {
  readonly radii: Float64Array;
  readonly bounds: Float64Array;
  readonly sd: Float64Array;
  readonly functionals: Float64Array;
}

/** The second-order form of one length by its largest parts; fills the tables' scalars. */
function curveOf(family: PileFamily, node: FamilyNode, k: number, f: number, ground: StructureGround, tables: StructureTables): Curve {
  const form = node.responses[k].form;
  if (form === undefined) throw new Error("The second-order form was not made at this length.");
  const bands = form.levelBounds.length - 1;
  const n = form.radii.length * bands;
  const sd = cellValues(form.levelBounds, ground.relativeSd);
  const covariance = new Float64Array(n * n);
  for (const term of ground.terms) {
    const plan = ringTables(term.plan, form.radii, Float64Array.of(0));
    const depth = cellCovariance(form.levelBounds, form.levelBounds, term);
    for (let i = 0; i < n; i++) {
      const ri = Math.floor(i / bands);
      const bi = i % bands;
      for (let j = 0; j <= i; j++) {
        const bj = j % bands;
        covariance[i * n + j] += term.weight * plan[ri * form.radii.length + Math.floor(j / bands)] * depth[bi * bands + bj] * sd[bi] * sd[bj];
      }
    }
  }
  for (let i = 0; i < n; i++) for (let j = 0; j < i; j++) covariance[j * n + i] = covariance[i * n + j];
  const low = lowRankForm(form.matrix, covariance, n, ranks);
  let keptVariance = 0;
  for (let r = 0; r < ranks; r++) {
    tables.values[f * ranks + r] = low.values[r];
    keptVariance += 2 * low.values[r] ** 2;
    let sum = 0;
    for (let i = 0; i < n; i++) sum += low.functionals[r * n + i];
    tables.curveSums[f * ranks + r] = sum;
  }
  tables.slopeLosses[f] = slopeLoss(family.geometry(k), (depth) => kilopascals(node.modulus * family.shape(depth)), covariance);
  tables.traces[f] = low.trace;
  tables.restVariances[f] = Math.max(low.variance - keptVariance, 0);
  tables.uniformForms[f] = form.matrix.reduce((sum, value) => sum + value, 0);
  return { radii: form.radii, bounds: form.levelBounds, sd, functionals: low.functionals };
}
