import type { DesignLaw } from "./design-law.js";
import type { LayoutTables } from "./layout.js";
import type { SiteModel } from "./site-model.js";
import { ranks } from "./structure-tables.js";

/**
 * What the design values say of each pile's ground, in the units of ln stiffness: covariances with the independent standard normals
 * behind the design values (one where all piles share a value, one a hole where each follows its nearest).
 */
export interface HoleCovariance {
  /** number of those normals; 0 without holes */
  readonly size: number;
  /** Cov(Z of pile i at length k, normal s): piles x lengths x size */
  readonly design: Float64Array;
  /** per node, Cov(v of form f and rank r under pile i, normal s): piles x forms x ranks x size */
  readonly curves: readonly [Float64Array, Float64Array];
  /** what each group of readings tells beyond the mean: piles x lengths x columns; empty where the rule is linear */
  readonly beyond: Float64Array;
  /** share of each column among all readings */
  readonly columnShares: Float64Array;
}

/** Scales the hole tables of the two nodes to the problem. */
export function holeCovariance(model: SiteModel, tables: readonly [LayoutTables, LayoutTables] | undefined, law: DesignLaw): HoleCovariance {
  const { groundVariance, regionalVariance, slopes, weightSums, shares, nodes } = model;
  const piles = model.plan.piles.length;
  const lengths = slopes.length;
  const parts = model.family.formIndices.length * ranks;
  if (tables === undefined || law.size === 0) {
    const none = new Float64Array(0);
    return { size: 0, design: none, curves: [none, none], beyond: none, columnShares: none };
  }
  const n = tables[0].holes;
  const blend = (a: number, b: number): number => shares[0] * a + shares[1] * b;
  const means = tables[0].means.map((value, at) => groundVariance * slopes[Math.floor(at / n) % lengths] * blend(value, tables[1].means[at]));
  const design = toNormals(law, means, piles * lengths, n, (row) => regionalVariance * weightSums[row % lengths]);
  const curves = tables.map((t, b) => {
    const scaled = t.curves.map((unit) => groundVariance * unit);
    return toNormals(law, scaled, piles * parts, n, (row) => regionalVariance * nodes[b].tables.curveSums[row % parts]);
  }) as unknown as [Float64Array, Float64Array];
  const groups = tables[0].groupShares.length;
  const columns = n * groups;
  const beyond = new Float64Array(law.bend === 0 ? 0 : piles * lengths * columns);
  if (law.bend !== 0) {
    for (let row = 0; row < piles * lengths; row++) {
      let mean = 0;
      for (let h = 0; h < n; h++) mean += means[row * n + h] / n;
      for (let c = 0; c < columns; c++) {
        const at = row * columns + c;
        beyond[at] = groundVariance * slopes[row % lengths] * blend(tables[0].groups[at], tables[1].groups[at]) - mean;
      }
    }
  }
  const columnShares = Float64Array.from({ length: columns }, (_, c) => tables[0].groupShares[c % groups] / n);
  return { size: law.size, design, curves, beyond, columnShares };
}

/** From covariances with each hole's mean log reading (plus what the site's level adds) to covariances with the normals. */
function toNormals(law: DesignLaw, perHole: Float64Array, rows: number, holes: number, level: (row: number) => number): Float64Array {
  const { size, root, gain } = law;
  const out = new Float64Array(rows * size);
  for (let row = 0; row < rows; row++) {
    const at = row * size;
    if (size === 1) {
      for (let h = 0; h < holes; h++) out[at] += perHole[row * holes + h] / holes;
      out[at] = (gain * (out[at] + level(row))) / root[0];
      continue;
    }
    for (let s = 0; s < size; s++) {
      let value = gain * (perHole[row * holes + s] + level(row));
      for (let p = 0; p < s; p++) value -= root[s * size + p] * out[at + p];
      out[at + s] = root[s * size + s] > 0 ? value / root[s * size + s] : 0;
    }
  }
  return out;
}
