import { factorSemidefinite } from "../numerics/semidefinite-factor.js";
import { sine } from "../numerics/sine.js";
import { symmetricEigen } from "../numerics/symmetric-eigen.js";

/** A quadratic form of a random field by its few largest parts: g' M g = sum of values_r (functionals_r ' g)^2 and a remainder. */
export interface LowRankForm {
  /** ranks; largest absolute value first */
  readonly values: Float64Array;
  /** ranks x n; each functional of the unit field has variance 1, and they are uncorrelated */
  readonly functionals: Float64Array;
  /** expectation of the whole form over the unit field, tr(M S) */
  readonly trace: number;
  /** variance of the whole form over the unit field, 2 tr(M S M S) */
  readonly variance: number;
}

/**
 * Largest parts of a quadratic form in the metric of a field's covariance.
 *
 * With S = L L' the form is z' (L' M L) z of independent standard normals; its leading eigenvectors u give the functionals
 * (M L u)' / value. Found by block power iteration, since only a few parts matter.
 *
 * @param matrix      M, n x n, symmetric, row by row
 * @param covariance  S of the unit field on the same cells, n x n, row by row; not changed
 * @param n           order
 * @param ranks       number of parts, 1 to n
 */
export function lowRankForm(matrix: Float64Array, covariance: Float64Array, n: number, ranks: number): LowRankForm {
  const root = Float64Array.from(covariance);
  factorSemidefinite(root, n, 1e-10);
  const whitened = whiten(matrix, root, n);
  let trace = 0;
  let square = 0;
  for (let i = 0; i < n; i++) {
    trace += whitened[i * n + i];
    for (let j = 0; j < n; j++) square += whitened[i * n + j] ** 2;
  }
  const { values, vectors } = leadingEigen(whitened, n, ranks);
  const functionals = new Float64Array(ranks * n);
  const lu = new Float64Array(n);
  for (let r = 0; r < ranks; r++) {
    if (values[r] === 0) continue;
    for (let i = 0; i < n; i++) {
      let sum = 0;
      for (let k = 0; k <= i; k++) sum += root[i * n + k] * vectors[k * ranks + r];
      lu[i] = sum;
    }
    for (let i = 0; i < n; i++) {
      let sum = 0;
      for (let k = 0; k < n; k++) sum += matrix[i * n + k] * lu[k];
      functionals[r * n + i] = sum / values[r];
    }
  }
  return { values, functionals, trace, variance: 2 * square };
}

/** L' M L. */
function whiten(matrix: Float64Array, root: Float64Array, n: number): Float64Array {
  const ml = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < n; k++) {
      const factor = matrix[i * n + k];
      if (factor === 0) continue;
      for (let j = 0; j <= k; j++) ml[i * n + j] += factor * root[k * n + j];
    }
  }
  const out = new Float64Array(n * n);
  for (let k = 0; k < n; k++) {
    for (let i = 0; i <= k; i++) {
      const factor = root[k * n + i];
      if (factor === 0) continue;
      for (let j = 0; j < n; j++) out[i * n + j] += factor * ml[k * n + j];
    }
  }
  return out;
}

/** Eigenpairs of largest absolute value by block power iteration with a Rayleigh-Ritz step; vectors n x ranks. */
function leadingEigen(a: Float64Array, n: number, ranks: number): { values: Float64Array; vectors: Float64Array } {
  const width = Math.min(n, ranks + 8);
  // A fixed start with no special direction: results may not depend on anything but the matrix.
  let block: Float64Array = Float64Array.from({ length: n * width }, (_, i) => sine(1 + i * 1.7548776662466927));
  for (let iteration = 0; iteration < 6; iteration++) {
    orthonormalise(block, n, width);
    block = times(a, block, n, width);
  }
  orthonormalise(block, n, width);
  const image = times(a, block, n, width);
  const small = new Float64Array(width * width);
  for (let k = 0; k < n; k++) {
    for (let i = 0; i < width; i++) {
      const factor = block[k * width + i];
      for (let j = 0; j < width; j++) small[i * width + j] += factor * image[k * width + j];
    }
  }
  const eigen = symmetricEigen(small, width);
  const order = Array.from({ length: width }, (_, i) => i).sort((i, j) => Math.abs(eigen.values[j]) - Math.abs(eigen.values[i]));
  const values = Float64Array.from({ length: ranks }, (_, r) => (r < width ? eigen.values[order[r]] : 0));
  const vectors = new Float64Array(n * ranks);
  for (let k = 0; k < n; k++) {
    for (let r = 0; r < Math.min(ranks, width); r++) {
      let sum = 0;
      for (let i = 0; i < width; i++) sum += block[k * width + i] * eigen.vectors[order[r] * width + i];
      vectors[k * ranks + r] = sum;
    }
  }
  return { values, vectors };
}

function times(a: Float64Array, block: Float64Array, n: number, width: number): Float64Array {
  const out = new Float64Array(n * width);
  for (let i = 0; i < n; i++) {
    const row = i * width;
    for (let k = 0; k < n; k++) {
      const factor = a[i * n + k];
      const from = k * width;
      for (let j = 0; j < width; j++) out[row + j] += factor * block[from + j];
    }
  }
  return out;
}

/** Gram-Schmidt, twice for safety; a column that vanishes is left at zero. */
function orthonormalise(block: Float64Array, n: number, width: number): void {
  for (let c = 0; c < width; c++) {
    for (let pass = 0; pass < 2; pass++) {
      for (let p = 0; p < c; p++) {
        let dot = 0;
        for (let k = 0; k < n; k++) dot += block[k * width + p] * block[k * width + c];
        for (let k = 0; k < n; k++) block[k * width + c] -= dot * block[k * width + p];
      }
    }
    let norm = 0;
    for (let k = 0; k < n; k++) norm += block[k * width + c] ** 2;
    const scale = norm > 1e-280 ? 1 / Math.sqrt(norm) : 0;
    for (let k = 0; k < n; k++) block[k * width + c] *= scale;
  }
}
