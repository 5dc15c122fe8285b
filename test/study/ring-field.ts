import { ringTables } from "../../src/engine/ground/ring-average.js";
import type { SeparableTerm } from "../../src/engine/ground/separable-terms.js";
import { symmetricEigen } from "../../src/engine/numerics/symmetric-eigen.js";
import type { Stream } from "../../src/engine/random/stream.js";

/** A unit normal field of ring means, rings x levels: exact covariances, rings by a root in plan, depth by a root of cell averages. */
export interface RingField {
  readonly rings: number;
  readonly levels: number;
  /** covariance of two cells of the field (ring * levels + level) */
  covariance(a: number, b: number): number;
  draw(numbers: Stream): Float64Array;
}

/** @param terms  separable terms of the correlation; @param radii  of concentric rings, m; @param bounds  depths that bound the levels, m */
export function ringField(terms: readonly SeparableTerm[], radii: Float64Array, bounds: Float64Array): RingField {
  const rings = radii.length;
  const levels = bounds.length - 1;
  const parts = terms.map((term) => {
    const plan = ringTables(term.plan, radii, Float64Array.of(0));
    const depth = new Float64Array(levels * levels);
    for (let i = 0; i < levels; i++) {
      for (let j = 0; j < levels; j++) {
        depth[i * levels + j] = term.verticalCellAverage((bounds[i] + bounds[i + 1] - bounds[j] - bounds[j + 1]) / 2, bounds[i + 1] - bounds[i], bounds[j + 1] - bounds[j]);
      }
    }
    return { weight: term.weight, plan, depth, planFactor: root(plan, rings), depthFactor: root(depth, levels) };
  });
  return {
    rings,
    levels,
    covariance: (a, b) =>
      parts.reduce((sum, { weight, plan, depth }) => sum + weight * plan[Math.floor(a / levels) * rings + Math.floor(b / levels)] * depth[(a % levels) * levels + (b % levels)], 0),
    draw(numbers) {
      const field = new Float64Array(rings * levels);
      const column = new Float64Array(levels);
      const byDepth = new Float64Array(rings * levels);
      for (const { weight, planFactor, depthFactor } of parts) {
        for (let r = 0; r < rings; r++) {
          for (let l = 0; l < levels; l++) column[l] = numbers.normal();
          for (let l = 0; l < levels; l++) {
            let sum = 0;
            for (let k = 0; k < levels; k++) sum += depthFactor[l * levels + k] * column[k];
            byDepth[r * levels + l] = Math.sqrt(weight) * sum;
          }
        }
        for (let r = 0; r < rings; r++) {
          for (let q = 0; q < rings; q++) {
            const factor = planFactor[r * rings + q];
            for (let l = 0; l < levels; l++) field[r * levels + l] += factor * byDepth[q * levels + l];
          }
        }
      }
      return field;
    },
  };
}

/** Symmetric root of a covariance; the long Gaussian terms of a mixture are singular to rounding, which Cholesky refuses. */
function root(covariance: Float64Array, n: number): Float64Array {
  const { values, vectors } = symmetricEigen(covariance, n);
  const out = new Float64Array(n * n);
  for (let k = 0; k < n; k++) {
    const size = Math.sqrt(Math.max(values[k], 0));
    for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) out[i * n + j] += size * vectors[k * n + i] * vectors[k * n + j];
  }
  return out;
}
