import { describe, expect, it } from "vitest";
import type { Problem } from "../../../src/engine/index.js";
import { lnDesignValues, outerNodes } from "../../../src/engine/decision/design-law.js";
import { designLengths } from "../../../src/engine/decision/design-lengths.js";
import { holeCovariance } from "../../../src/engine/decision/hole-covariance.js";
import { nodeMoments } from "../../../src/engine/decision/node-moments.js";
import { preparedSite } from "../../../src/engine/decision/prepared-site.js";
import { quadraticWidth } from "../../../src/engine/decision/second-order-terms.js";
import { ranks } from "../../../src/engine/decision/structure-tables.js";
import { lagrangeWeights } from "../../../src/engine/numerics/lagrange.js";
import { stream } from "../../../src/engine/random/stream.js";
import { ninePiles } from "./example-problem.js";

/** x of A x = b, by elimination with the largest pivot. */
function solved(a: number[][], b: number[]): number[] {
  const rows = a.map((row, i) => [...row, b[i]]);
  const n = b.length;
  for (let c = 0; c < n; c++) {
    const best = rows.slice(c).reduce((most, row, k) => (Math.abs(row[c]) > Math.abs(rows[most][c]) ? c + k : most), c);
    [rows[c], rows[best]] = [rows[best], rows[c]];
    for (let r = 0; r < n; r++) if (r !== c) rows[r] = rows[r].map((value, k) => value - (rows[r][c] / rows[c][c]) * rows[c][k]);
  }
  return rows.map((row, i) => row[n] / row[i]);
}

/**
 * By the definition: Q is a sum of value (curve)^2 over parts and what they leave; given the deviations xi of the pile and its neighbours a curve
 * is normal with mean shift + t' C^-1 xi and the variance that is left, so that its square is expected to be mean^2 + variance.
 */
function byDefinition(problem: Problem, count: number, node: number, pile: number): { mean: (xi: number[]) => number; found: (xi: number[]) => number; near: readonly number[]; rest: number; residual: number } {
  const { model, layout, design } = preparedSite(problem);
  const { plan, family, groundVariance: ground, regionalVariance: regional } = model;
  const law = design(count);
  const holes = holeCovariance(model, layout(count), law);
  const { size } = holes;
  const normals = outerNodes(law, problem.seed).normals.subarray(node * size, (node + 1) * size);
  const { lengths } = designLengths(problem, plan, lnDesignValues(law, normals), law.ofPile, "mean");
  const { covariance, quadratic, residual } = nodeMoments(model, holes, normals, lengths, 0);
  const near = plan.nearby[pile];
  const lengthCount = family.lengths.length;
  const forms = family.formIndices.length;
  const onLengths = (j: number) => lagrangeWeights(family.logLengths, Math.log(lengths[j]));
  const onForms = lagrangeWeights(family.formLogLengths, Math.log(lengths[pile])).weights;
  const toNormal = (j: number, k: number): number => {
    const { start, weights } = onLengths(j);
    return [0, 1, 2, 3].reduce((sum, q) => sum + weights[q] * holes.design[(j * lengthCount + start + q) * size + k], 0);
  };
  const between = near.map((i) => near.map((j) => covariance[i * plan.piles.length + j]));
  const parts: { factor: number; shift: number; slopes: number[]; left: number }[] = [];
  let rest = 0;
  let variance = 0;
  for (const b of [0, 1]) {
    const { tables } = model.nodes[b];
    for (let f = 0; f < forms; f++) {
      const share = model.shares[b] * onForms[f];
      rest += share * (ground * tables.traces[f] + regional * tables.uniformForms[f]);
      variance += share * ground ** 2 * tables.restVariances[f];
      for (let r = 0; r < ranks; r++) {
        const part = f * ranks + r;
        const own = ground + regional * tables.curveSums[part] ** 2;
        const seen = Array.from({ length: size }, (_, k) => holes.curves[b][(pile * forms * ranks + part) * size + k]);
        const t = near.map((j) => {
          const { start, weights } = onLengths(j);
          const at = (plan.distanceOf[pile * plan.piles.length + j] * forms * ranks + part) * lengthCount + start;
          return [0, 1, 2, 3].reduce((sum, q) => sum + weights[q] * model.curveCovariance[b][at + q], 0) - seen.reduce((sum, c, k) => sum + c * toNormal(j, k), 0);
        });
        const slopes = solved(between, t);
        const left = Math.max(own - seen.reduce((sum, c) => sum + c * c, 0) - slopes.reduce((sum, s, a) => sum + s * t[a], 0), 0);
        const value = tables.values[part];
        parts.push({ factor: share * value, shift: seen.reduce((sum, c, k) => sum + c * normals[k], 0), slopes, left });
        rest -= share * value * own;
        variance += share * value ** 2 * (2 * left ** 2 + 4 * left * Math.max(own - left, 0));
      }
    }
  }
  const coefficients = quadratic.subarray(pile * quadraticWidth, (pile + 1) * quadraticWidth);
  return {
    near, rest: Math.sqrt(variance), residual: residual[pile],
    mean: (xi) => parts.reduce((sum, { factor, shift, slopes, left }) => sum + factor * ((shift + slopes.reduce((s, slope, a) => s + slope * xi[a], 0)) ** 2 + left), rest),
    found: (xi) => {
      let sum = coefficients[0];
      for (let a = 0, next = 6; a < xi.length; a++) {
        sum += coefficients[1 + a] * xi[a];
        for (let e = 0; e <= a; e++) sum += coefficients[next++] * xi[a] * xi[e];
      }
      return sum;
    },
  };
}

describe("the second-order term", () => {
  it.each([
    ["one design value, middle pile", ninePiles({ regionalCov: 0.2 }), 4, 6, 4],
    ["one design value, corner pile", ninePiles({ scales: [12, 3] }), 1, 27, 0],
    ["a design value a hole", ninePiles({ lengthRule: "nearest", correlation: "ellipsoidal" }), 3, 11, 5],
    ["no holes", ninePiles(), 0, 0, 1],
  ])("is the expectation of the form given the deviations and the design values: %s", (_, problem, count, node, pile) => {
    const { mean, found, near, rest, residual } = byDefinition(problem, count, node, pile);
    const random = stream("second order", count);
    for (let k = 0; k < 6; k++) {
      const xi = near.map(() => (k === 0 ? 0 : random.normal()));
      expect(Math.abs(found(xi) - mean(xi))).toBeLessThan(1e-11);
    }
    expect(Math.abs(mean(near.map(() => 1)) - mean(near.map(() => -1)))).toBeGreaterThan(count === 0 ? -1 : 1e-3); // the linear part is there wherever design values say something
    expect(residual / rest).toBeCloseTo(1, 10);
  });
});
