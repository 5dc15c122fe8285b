import type { Point } from "../investigation/hole-positions.js";
import { hypotenuse } from "../numerics/hypotenuse.js";
import { rowAtDistance } from "./distance-interpolation.js";
import type { Plan } from "./plan.js";
import { ranks, type StructureTables } from "./structure-tables.js";

/** What the holes of one layout see of the ground under the piles, unit field, at one node of ground stiffness. */
export interface LayoutTables {
  readonly holes: number;
  /** Cov(X of pile i at length k, mean of depth group g of hole h): piles x lengths x holes x groups */
  readonly groups: Float64Array;
  /** share of each group among a hole's readings */
  readonly groupShares: Float64Array;
  /** Cov(X of pile i at length k, mean log reading of hole h): piles x lengths x holes */
  readonly means: Float64Array;
  /** Cov(v of form f and rank r under pile i, mean log reading of hole h): piles x forms x ranks x holes */
  readonly curves: Float64Array;
}

/** Looks the hole tables up at the distances between piles and holes. */
export function layoutTables(tables: StructureTables, plan: Plan, holes: readonly Point[], lengths: number, forms: number): LayoutTables {
  const groups = tables.groupShares.length;
  const piles = plan.piles.length;
  const n = holes.length;
  const means = new Float64Array(piles * lengths * n);
  const all = new Float64Array(piles * lengths * n * groups);
  const curves = new Float64Array(piles * forms * ranks * n);
  const row = new Float64Array(lengths * groups);
  const curve = new Float64Array(forms * ranks);
  for (let i = 0; i < piles; i++) {
    for (let h = 0; h < n; h++) {
      const distance = hypotenuse(plan.piles[i].x - holes[h].x, plan.piles[i].y - holes[h].y);
      rowAtDistance(tables.coordinates, tables.holes, lengths * groups, distance, row);
      rowAtDistance(tables.coordinates, tables.curveHoles, forms * ranks, distance, curve);
      for (let k = 0; k < lengths; k++) {
        const at = (i * lengths + k) * n + h;
        for (let g = 0; g < groups; g++) {
          all[at * groups + g] = row[k * groups + g];
          means[at] += row[k * groups + g] * tables.groupShares[g];
        }
      }
      for (let c = 0; c < forms * ranks; c++) curves[(i * forms * ranks + c) * n + h] = curve[c];
    }
  }
  return { holes: n, groups: all, groupShares: tables.groupShares, means, curves };
}
