import type { Kilopascals, Metres } from "../../units/quantities.js";
import { cellCovariance, cellValues } from "../decision/cell-tables.js";
import { lowRankForm } from "../decision/quadratic-form.js";
import { ringTables } from "../ground/ring-average.js";
import type { SeparableTerm } from "../ground/separable-terms.js";
import { logarithm } from "../numerics/logarithm.js";
import { energyShares } from "../piles/energy-shares.js";
import type { CellGroups } from "../piles/grouped-form.js";
import type { PileMesh } from "../piles/pile-mesh.js";
import { standardGroups } from "../piles/pile-mesh-lines.js";
import type { PileGeometry } from "../piles/pile-response.js";
import { solvePile } from "../piles/pile-solution.js";
import { medianModuli, pileMesh } from "../piles/pile-stiffness.js";
import { projectLevels } from "../piles/project-levels.js";
import { secondOrderForm } from "../piles/second-order.js";
import { regressionSlope, slopeLoss } from "../piles/slope-loss.js";
import { fullRows, type OrderedRows } from "./ordered-rows.js";

/** Parts of the second-order form that are kept: with a dozen, ln stiffness comes nearer to finite elements by a fiftieth of its error. */
const ranks = 8;
/** Cells of ground that neither the shares nor any part, times its value, feel by more than this are left out: two in five. */
const unfelt = 1e-4;

/** The ground that forms are made for. Standard deviations are those of the logarithm of the modulus. */
export interface FormGround {
  readonly terms: readonly SeparableTerm[];
  /** median modulus at a depth in m, kPa */
  readonly median: (depth: Metres) => Kilopascals;
  /** standard deviation at a depth in m over the reference one */
  readonly relativeSd: (depth: number) => number;
  readonly groundVariance: number;
  readonly regionalVariance: number;
}

/**
 * Head stiffness of one pile length to second order in the realised ground y (log modulus about its median, rings x cells):
 * ln K = lnStiffness + slope (w' y of the ground's own part) + w' (level) + sum over parts of value (functional' y)^2 + rest.
 */
export interface LengthForm {
  readonly mesh: PileMesh;
  /** moduli of the mesh's cells in the median ground, kPa */
  readonly moduli: Float64Array;
  readonly lnStiffness: number;
  readonly slope: number;
  /** sum of the energy shares */
  readonly weightSum: number;
  /** expectation of the parts that are left out */
  readonly rest: number;
  readonly values: Float64Array;
  /** places (ring * cells + cell) in the realised ground that the pile feels */
  readonly felt: Int32Array;
  /** the energy shares, then a functional a part, each over the felt places */
  readonly functionals: OrderedRows;
  /** sums of the functionals over the whole ground, the shares' first */
  readonly sums: Float64Array;
}

/**
 * The form of one pile length, from finite elements in the median ground.
 *
 * It is finer than the one that cell functions use: every ring of the mesh keeps its own ground, and more parts are kept.
 *
 * @param pile    dimensions and pile modulus
 * @param bounds  depths that bound the cells of the realised ground, m
 */
export function lengthForm(pile: PileGeometry, ground: FormGround, bounds: Float64Array): LengthForm {
  const mesh = pileMesh(pile);
  const moduli = medianModuli(mesh, ground.median);
  const solution = solvePile(mesh, moduli, pile.pileModulus);
  const shares = energyShares(mesh, moduli, solution);
  const coarse = standardGroups(mesh);
  const groups: CellGroups = { ...coarse, ringGroups: Int32Array.from(mesh.rings, (_, r) => r), radii: mesh.rings };
  const { groundVariance, regionalVariance } = ground;
  const rings = mesh.rings.length;
  const cells = rings * (bounds.length - 1);
  const bands = groups.levelBounds.length - 1;
  const functionals = new Float64Array((1 + ranks) * cells);
  const values = new Float64Array(ranks);
  functionals.set(projectLevels(shares, rings, mesh.levelBounds, bounds));
  let rest = 0;
  if (groundVariance + regionalVariance > 0) {
    const { matrix } = secondOrderForm(mesh, moduli, solution, groups);
    const n = rings * bands;
    const covariance = fieldCovariance(ground, groups).map((value) => groundVariance * value + regionalVariance);
    // Neighbouring rings are nearly alike in smooth ground: a trace of independent noise keeps the factor from stumbling over rounding.
    for (let i = 0; i < n; i++) covariance[i * n + i] *= 1 + 1e-5;
    const low = lowRankForm(matrix, covariance, n, ranks);
    values.set(low.values);
    rest = low.trace - low.values.reduce((sum, value) => sum + value, 0);
    for (let r = 0; r < ranks; r++) {
      functionals.set(projectLevels(low.functionals.subarray(r * n, (r + 1) * n), rings, groups.levelBounds, bounds), (1 + r) * cells);
    }
  }
  const slope = groundVariance === 0 ? 1 : regressionSlope(slopeLoss(pile, ground.median, fieldCovariance(ground, coarse)), groundVariance);
  const sums = Float64Array.from({ length: 1 + ranks }, (_, r) => functionals.subarray(r * cells, (r + 1) * cells).reduce((sum, value) => sum + value, 0));
  const felt = Int32Array.from({ length: cells }, (_, c) => c).filter((c) => {
    for (let r = 0; r < ranks; r++) if (Math.abs(values[r] * functionals[(1 + r) * cells + c]) > unfelt) return true;
    return Math.abs(functionals[c]) > unfelt;
  });
  const overFelt = Float64Array.from({ length: (1 + ranks) * felt.length }, (_, at) => functionals[Math.floor(at / felt.length) * cells + felt[at % felt.length]]);
  return { mesh, moduli, lnStiffness: -logarithm(solution.compliance), slope, weightSum: sums[0], rest, values, felt, functionals: fullRows(overFelt, 1 + ranks, felt.length), sums };
}

/** Covariance of the field of relative standard deviations between the cells of a form. */
function fieldCovariance(ground: FormGround, { radii, levelBounds }: CellGroups): Float64Array {
  const bands = levelBounds.length - 1;
  const nr = radii.length;
  const n = nr * bands;
  const sd = cellValues(levelBounds, ground.relativeSd);
  const out = new Float64Array(n * n);
  for (const term of ground.terms) {
    const plan = ringTables(term.plan, radii, Float64Array.of(0));
    const depth = cellCovariance(levelBounds, levelBounds, term);
    for (let i = 0; i < n; i++) {
      const ring = Math.floor(i / bands) * nr;
      const band = (i % bands) * bands;
      for (let r = 0, j = i * n; r < nr; r++) {
        const factor = term.weight * plan[ring + r] * sd[i % bands];
        for (let b = 0; b < bands; b++, j++) out[j] += factor * depth[band + b] * sd[b];
      }
    }
  }
  return out;
}
