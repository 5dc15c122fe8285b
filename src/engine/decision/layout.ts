import type { Point } from "../investigation/hole-positions.js";
import type { ReadingSums } from "../investigation/reading-sums.js";
import { rowAtDistance } from "./distance-interpolation.js";
import type { Plan } from "./plan.js";
import { ranks, type StructureTables } from "./structure-tables.js";

/** What the holes of one layout see of the ground under the piles, unit field, at one node of ground stiffness. */
export interface LayoutTables {
  /** Cov(X of pile i at length k, mean log reading): piles x lengths */
  readonly mean: Float64Array;
  /** Cov(X of pile i at length k, mean of depth group g of hole h): piles x lengths x (holes x groups) */
  readonly groups: Float64Array;
  readonly groupCount: number;
  /** share of each (hole, group) among all readings */
  readonly groupShares: Float64Array;
  /** Cov(v of form f and rank r under pile i, mean log reading): piles x forms x ranks */
  readonly curves: Float64Array;
}

/** Holes and what their readings have in common. */
export interface Layout {
  readonly holes: readonly Point[];
  readonly sums: ReadingSums;
}

/** Looks the hole tables up at the distances between piles and holes. */
export function layoutTables(tables: StructureTables, plan: Plan, holes: readonly Point[], lengths: number, forms: number): LayoutTables {
  const groups = tables.groupShares.length;
  const columns = holes.length * groups;
  const piles = plan.piles.length;
  const mean = new Float64Array(piles * lengths);
  const all = new Float64Array(piles * lengths * columns);
  const curves = new Float64Array(piles * forms * ranks);
  const row = new Float64Array(lengths * groups);
  const curve = new Float64Array(forms * ranks);
  for (let i = 0; i < piles; i++) {
    for (let h = 0; h < holes.length; h++) {
      const distance = Math.hypot(plan.piles[i].x - holes[h].x, plan.piles[i].y - holes[h].y);
      rowAtDistance(tables.coordinates, tables.holes, lengths * groups, distance, row);
      rowAtDistance(tables.coordinates, tables.curveHoles, forms * ranks, distance, curve);
      for (let k = 0; k < lengths; k++) {
        for (let g = 0; g < groups; g++) {
          const value = row[k * groups + g];
          all[(i * lengths + k) * columns + h * groups + g] = value;
          mean[i * lengths + k] += (value * tables.groupShares[g]) / holes.length;
        }
      }
      for (let c = 0; c < forms * ranks; c++) curves[i * forms * ranks + c] += curve[c] / holes.length;
    }
  }
  const groupShares = Float64Array.from({ length: columns }, (_, c) => tables.groupShares[c % groups] / holes.length);
  return { mean, groups: all, groupCount: columns, groupShares, curves };
}
