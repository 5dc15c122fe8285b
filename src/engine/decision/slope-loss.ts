import { lagrangeWeights } from "../numerics/lagrange.js";
import { ringTables } from "../ground/ring-average.js";
import { kilopascals } from "../../units/quantities.js";
import { medianModuli, pileMesh } from "../piles/pile-stiffness.js";
import { solvePile } from "../piles/pile-solution.js";
import { slopeLoss } from "../piles/slope-loss.js";
import type { FamilyKey, FamilyNode, PileFamily } from "./pile-family.js";
import { cellCovariance, type StructureGround } from "./structure-tables.js";

/** Fields that stand for the ground's covariance about a pile, the weightiest ones. */
const fieldCount = 14;

/**
 * Loss of the regression slope of ln stiffness for each unit of ground variance, at all lengths of a family: made at the lengths of
 * the second-order form and interpolated, since it changes slowly.
 *
 * @returns  one value a length, dimensionless
 */
export function slopeLosses(family: PileFamily, key: FamilyKey, node: FamilyNode, ground: StructureGround): Float64Array {
  const made = Float64Array.from(family.formIndices, (k) => {
    const mesh = pileMesh({ diameter: key.diameter, pileModulus: key.pileModulus, poissonRatio: key.poissonRatio, length: node.responses[k].length });
    const moduli = medianModuli(mesh, (depth) => kilopascals(node.modulus * key.shape(depth)));
    const solution = solvePile(mesh, moduli, key.pileModulus);
    const { weights } = node.responses[k];
    return slopeLoss(mesh, moduli, solution, weights, leadingFields(mesh.rings, mesh.levelBounds, weights, ground));
  });
  return family.logLengths.map((x) => {
    const { weights } = lagrangeWeights(family.formLogLengths, x);
    return made.reduce((sum, loss, f) => sum + weights[f] * loss, 0);
  });
}

/**
 * Leading columns of a pivoted Cholesky factor of the ring-mean covariance, each pivot being the cell whose unexplained variance the
 * pile feels most: fields x rings x levels.
 */
function leadingFields(rings: Float64Array, bounds: Float64Array, weights: Float64Array, ground: StructureGround): Float64Array {
  const levels = bounds.length - 1;
  const cells = rings.length * levels;
  const parts = ground.terms.map((term) => ({
    weight: term.weight,
    plan: ringTables(term.plan, rings, Float64Array.of(0)),
    depth: cellCovariance(bounds, bounds, term),
  }));
  const sd = Float64Array.from({ length: levels }, (_, l) => ground.relativeSd((bounds[l] + bounds[l + 1]) / 2));
  const covariance = (a: number, b: number): number => {
    const [ra, la, rb, lb] = [Math.floor(a / levels), a % levels, Math.floor(b / levels), b % levels];
    let sum = 0;
    for (const part of parts) sum += part.weight * part.plan[ra * rings.length + rb] * part.depth[la * levels + lb];
    return sum * sd[la] * sd[lb];
  };
  const left = Float64Array.from({ length: cells }, (_, e) => covariance(e, e));
  const fields = new Float64Array(fieldCount * cells);
  for (let k = 0; k < fieldCount; k++) {
    let pivot = 0;
    for (let e = 1; e < cells; e++) if (left[e] * weights[e] > left[pivot] * weights[pivot]) pivot = e;
    if (left[pivot] <= 1e-9) break;
    const root = Math.sqrt(left[pivot]);
    for (let e = 0; e < cells; e++) {
      let value = covariance(e, pivot);
      for (let p = 0; p < k; p++) value -= fields[p * cells + e] * fields[p * cells + pivot];
      fields[k * cells + e] = value / root;
      left[e] -= fields[k * cells + e] ** 2;
    }
  }
  return fields;
}
