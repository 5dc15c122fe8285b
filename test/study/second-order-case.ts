import { separableTerms, type GroundStructure } from "../../src/engine/ground/separable-terms.js";
import { energyShares } from "../../src/engine/piles/energy-shares.js";
import { solvePile } from "../../src/engine/piles/pile-solution.js";
import { pileMesh, pileResponse } from "../../src/engine/piles/pile-stiffness.js";
import { regressionSlope, slopeLoss } from "../../src/engine/piles/slope-loss.js";
import type { Stream } from "../../src/engine/random/stream.js";
import { kilopascals, metres } from "../../src/units/quantities.js";
import { ringField } from "./ring-field.js";

/** One structure, variation and length. */
export interface StudyCase {
  readonly label: string;
  readonly ground: GroundStructure;
  readonly cov: number;
  readonly length: number;
}

/** What is the same for all cases: d = 0.5 m, Ep = 30 GPa, mean 8 MPa, Poisson's ratio 0.3. */
export const diameter = 0.5;
export const pileModulus = 3e7;
export const mean = 8000;
export const poissonRatio = 0.3;

export interface Spread {
  readonly mean: number;
  readonly sd: number;
}

/** Direct finite elements against the expansion on the same fields; all of ln stiffness. */
export interface StudyResult {
  readonly stiffness: Spread;
  /** direct less predicted: energy shares alone, with the form, with the form and the closed slope */
  readonly first: Spread;
  readonly second: Spread;
  readonly sloped: Spread;
  /** correlation of direct and predicted with the form and the slope */
  readonly correlation: number;
  /** slope on sigma X: sampled by Stein's lemma with its standard error, and in closed form */
  readonly slope: { readonly sampled: number; readonly error: number; readonly closed: number };
  /** ln K = ln K0 + a + beta x - c (x^2 - Var x) + tau z fitted to the fields by least squares, and from the form alone */
  readonly fitted: { readonly a: number; readonly c: number; readonly tau: number };
  readonly formula: { readonly a: number; readonly c: number; readonly tau: number };
}

const spread = (values: number[]): Spread => {
  const middle = values.reduce((sum, v) => sum + v, 0) / values.length;
  return { mean: middle, sd: Math.sqrt(values.reduce((sum, v) => sum + (v - middle) ** 2, 0) / (values.length - 1)) };
};
const dot = (a: ArrayLike<number>, b: ArrayLike<number>) => Array.prototype.reduce.call(a, (sum, x, i) => (sum as number) + (x as number) * b[i], 0) as number;

/**
 * Runs one case on antithetic pairs of fields.
 *
 * @param pairs  number of pairs; twice as many direct solves
 * @param fields  the stream of the k-th pair
 */
export function runCase(study: StudyCase, pairs: number, fields: (k: number) => Stream): StudyResult {
  const variance = Math.log1p(study.cov ** 2);
  const sigma = Math.sqrt(variance);
  const median = mean * Math.exp(-variance / 2);
  const geometry = { diameter: metres(diameter), length: metres(study.length), pileModulus: kilopascals(pileModulus), poissonRatio };
  const ground = () => kilopascals(median);
  const response = pileResponse(geometry, ground);
  const form = response.form!;
  const mesh = pileMesh(geometry);
  const fine = response.rings.length;
  const levels = response.levelBounds.length - 1;
  const cells = fine * levels;
  // The form's rings are drawn with the mesh's own: their ground is taken at their radius and averaged over their levels.
  const field = ringField(separableTerms(study.ground), Float64Array.from([...response.rings, ...form.radii]), response.levelBounds);
  const bands = form.levelBounds.length - 1;
  const count = form.radii.length * bands;
  const parts = Array.from({ length: count }, (_, group) => {
    const ring = fine + Math.floor(group / bands);
    const inBand = Array.from({ length: levels }, (_, l) => l).filter((l) => form.levelGroups[l] === group % bands);
    const height = (l: number) => response.levelBounds[l + 1] - response.levelBounds[l];
    const total = inBand.reduce((sum, l) => sum + height(l), 0);
    return inBand.map((l) => ({ cell: ring * levels + l, share: height(l) / total }));
  });
  const own = Float64Array.from({ length: cells }, (_, i) => dot(response.weights, Float64Array.from({ length: cells }, (_, j) => field.covariance(i, j)))); // h = S w
  const varianceOfX = dot(own, response.weights);
  const quadratic = (g: Float64Array) => {
    const grouped = parts.map((list) => list.reduce((sum, { cell, share }) => sum + share * g[cell], 0));
    let q = 0;
    for (let i = 0; i < count; i++) for (let j = 0; j < count; j++) q += grouped[i] * form.matrix[i * count + j] * grouped[j];
    return q;
  };

  const covariance = new Float64Array(count * count);
  for (let i = 0; i < count; i++) {
    for (let j = 0; j < count; j++) for (const a of parts[i]) for (const b of parts[j]) covariance[i * count + j] += a.share * b.share * field.covariance(a.cell, b.cell);
  }
  const closed = regressionSlope(slopeLoss(geometry, ground, covariance), variance);
  const withX = parts.map((list) => list.reduce((sum, { cell, share }) => sum + share * dot(response.weights, Float64Array.from({ length: cells }, (_, j) => field.covariance(cell, j))), 0));
  let along = 0;
  let trace = 0;
  let square = 0;
  const ms = new Float64Array(count * count);
  for (let i = 0; i < count; i++) {
    for (let k = 0; k < count; k++) {
      along += withX[i] * form.matrix[i * count + k] * withX[k];
      for (let j = 0; j < count; j++) ms[i * count + j] += form.matrix[i * count + k] * covariance[k * count + j];
    }
  }
  for (let i = 0; i < count; i++) {
    trace += ms[i * count + i];
    for (let j = 0; j < count; j++) square += ms[i * count + j] * ms[j * count + i];
  }
  const c = -along / varianceOfX ** 2;
  const formula = { a: variance * trace, c, tau: variance * Math.sqrt(2 * square - 2 * c ** 2 * varianceOfX ** 2) };

  const direct: number[] = [];
  const x: number[] = [];
  const q: number[] = [];
  const slopes: number[] = [];
  for (let k = 0; k < pairs; k++) {
    const g = field.draw(fields(k));
    let slope = 0;
    for (const sign of [1, -1]) {
      const moduli = Float64Array.from({ length: cells }, (_, cell) => median * Math.exp(sign * sigma * g[cell]));
      const solution = solvePile(mesh, moduli, pileModulus);
      direct.push(-Math.log(solution.compliance) - response.lnStiffness);
      x.push(sign * sigma * dot(response.weights, g.subarray(0, cells)));
      q.push(variance * quadratic(g));
      slope += dot(own, energyShares(mesh, moduli, solution)) / varianceOfX / 2;
    }
    slopes.push(slope);
  }
  const predicted = x.map((v, i) => closed * v + q[i]);
  const slope = spread(slopes);
  const both = [spread(direct), spread(predicted)];
  return {
    stiffness: both[0],
    first: spread(direct.map((y, i) => y - x[i])),
    second: spread(direct.map((y, i) => y - x[i] - q[i])),
    sloped: spread(direct.map((y, i) => y - predicted[i])),
    correlation: direct.reduce((sum, y, i) => sum + (y - both[0].mean) * (predicted[i] - both[1].mean), 0) / (direct.length - 1) / (both[0].sd * both[1].sd),
    slope: { sampled: slope.mean, error: slope.sd / Math.sqrt(pairs), closed },
    fitted: fit(direct, x, variance * varianceOfX),
    formula,
  };
}

/** Least squares of y on 1, x and x^2 - Var x. Antithetic pairs make x orthogonal to the other two. */
function fit(y: number[], x: number[], variance: number): { a: number; c: number; tau: number } {
  const n = y.length;
  const slope = dot(x, y) / dot(x, x);
  const curve = x.map((v) => v * v - variance);
  const m = curve.reduce((sum, v) => sum + v, 0) / n;
  const c = -curve.reduce((sum, v, i) => sum + (v - m) * y[i], 0) / curve.reduce((sum, v) => sum + (v - m) ** 2, 0);
  const a = y.reduce((sum, v) => sum + v, 0) / n + c * m;
  const rest = y.reduce((sum, v, i) => sum + (v - a - slope * x[i] + c * curve[i]) ** 2, 0);
  return { a, c, tau: Math.sqrt(rest / (n - 3)) };
}
