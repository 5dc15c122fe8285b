import { choleskyInPlace } from "./cholesky.js";
import { DomainError } from "./domain-error.js";
import { symmetricEigen } from "./symmetric-eigen.js";

/**
 * Lower factor of a covariance that rounding or interpolation may have left a little short of positive semi-definite, in place: where
 * Cholesky meets a negative pivot, the nearest semi-definite matrix (negative eigenvalues set to zero) is factored instead.
 *
 * @param a          n x n, row by row; on return the lower factor
 * @param n          order, > 0
 * @param tolerance  a pivot at or below this share of its own diagonal entry counts as zero
 * @throws {DomainError} the matrix is not near a covariance: a negative eigenvalue is above a tenth of the largest
 * @source Higham (1988), Computing a nearest symmetric positive semidefinite matrix, Linear Algebra Appl. 103
 */
export function factorSemidefinite(a: Float64Array, n: number, tolerance: number): void {
  const kept = Float64Array.from(a);
  try {
    choleskyInPlace(a, n, tolerance);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const { values, vectors } = symmetricEigen(kept, n);
    const largest = values[n - 1];
    if (!(values[0] >= -0.1 * largest)) throw error;
    a.fill(0);
    for (let k = 0; k < n; k++) {
      if (values[k] <= 1e-12 * largest) continue;
      for (let i = 0; i < n; i++) {
        const factor = values[k] * vectors[k * n + i];
        for (let j = 0; j < n; j++) a[i * n + j] += factor * vectors[k * n + j];
      }
    }
    // Rounding of the rebuilt matrix: a ridge far below its own size keeps every pivot at or above zero.
    for (let i = 0; i < n; i++) a[i * n + i] += 1e-10 * largest;
    choleskyInPlace(a, n, tolerance);
  }
}
