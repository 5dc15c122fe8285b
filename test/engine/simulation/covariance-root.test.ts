import { describe, expect, it } from "vitest";
import { pointRingTable, ringTables } from "../../../src/engine/ground/ring-average.js";
import { separableTerms } from "../../../src/engine/ground/separable-terms.js";
import { stream } from "../../../src/engine/random/stream.js";
import { addProduct, covarianceRoot, type CovarianceRoot } from "../../../src/engine/simulation/covariance-root.js";

const dense = (root: CovarianceRoot, i: number): Float64Array => {
  const row = new Float64Array(root.columnCount);
  for (let k = root.starts[i]; k < root.starts[i + 1]; k++) row[root.columns[k]] = root.values[k];
  return row;
};
const worstError = (root: CovarianceRoot, covariance: Float64Array, n: number): number => {
  const rows = Array.from({ length: n }, (_, i) => dense(root, i));
  let worst = 0;
  for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) worst = Math.max(worst, Math.abs(rows[i].reduce((sum, a, q) => sum + a * rows[j][q], 0) - covariance[i * n + j]));
  return worst;
};

/** Covariance of concentric rings and of points beside them. */
function ringsAndPoints(correlation: Parameters<typeof separableTerms>[0]["correlation"], scale: number): { covariance: Float64Array; n: number; rings: number } {
  const [{ plan }] = separableTerms({ correlation, horizontalScale: scale, verticalScale: 1 });
  const radii = Float64Array.of(0.12, 0.27, 0.4, 0.7, 1.3, 2.5, 5, 9, 18, 37);
  const points = Float64Array.from({ length: 12 }, (_, k) => 0.9 * k);
  const n = radii.length + points.length;
  const among = ringTables(plan, radii, Float64Array.of(0));
  const seen = pointRingTable(plan, radii, points);
  const covariance = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const [a, b] = [Math.max(i, j), Math.min(i, j)];
      covariance[i * n + j] =
        a < radii.length ? among[a * radii.length + b] : b < radii.length ? seen[(a - radii.length) * radii.length + b] : plan(Math.abs(points[a - radii.length] - points[b - radii.length]));
    }
  }
  return { covariance, n, rings: radii.length };
}

describe("covarianceRoot", () => {
  // Identity: root times its transpose is the matrix. Markov correlations are far from singular; Gaussian ones are nearly so, and the
  // errors of the ring means (3e-7) grow where rings that hardly differ must explain points that do.
  it.each([["markov", 8, 1e-12], ["spherical", 8, 1e-12], ["markov2", 20, 2e-5], ["gaussian", 8, 2e-4], ["gaussian", 80, 2e-5]] as const)(
    "reproduces the covariance of rings and points, %s %d m",
    (correlation, scale, most) => {
      const { covariance, n, rings } = ringsAndPoints(correlation, scale);
      expect(worstError(covarianceRoot(covariance, n, rings), covariance, n)).toBeLessThan(most);
    },
  );

  it("takes no more columns than a smooth correlation has", () => {
    const { covariance, n, rings } = ringsAndPoints("gaussian", 80);
    expect(covarianceRoot(covariance, n, rings).columnCount).toBeLessThan(10);
  });

  it("makes the first rows from the first columns, whatever rows follow", () => {
    const { covariance, n, rings } = ringsAndPoints("gaussian", 8);
    const whole = covarianceRoot(covariance, n, rings);
    const alone = covarianceRoot(Float64Array.from({ length: rings * rings }, (_, at) => covariance[Math.floor(at / rings) * n + (at % rings)]), rings, rings);
    expect(alone.columnCount).toBe(whole.firstColumns);
    for (let i = 0; i < rings; i++) expect(dense(whole, i)).toEqual(Float64Array.of(...dense(alone, i), ...new Float64Array(whole.columnCount - whole.firstColumns)));
  });

  it("gives equal rows for places that are the same", () => {
    const root = covarianceRoot(Float64Array.of(1, 1, 0.5, 1, 1, 0.5, 0.5, 0.5, 1), 3, 1);
    expect(root.columnCount).toBe(2);
    expect(dense(root, 0)).toEqual(dense(root, 1));
  });
});

// Independent: sums by the definition.
it("addProduct adds the scaled product of some rows", () => {
  const { covariance, n, rings } = ringsAndPoints("markov", 8);
  const root = covarianceRoot(covariance, n, rings);
  const numbers = stream("product", 0);
  const stride = 9;
  const width = 7;
  const table = Float64Array.from({ length: root.columnCount * stride }, () => numbers.normal());
  const out = new Float64Array(5 * width).fill(3);
  addProduct(root, 11, 16, table, stride, 2, out, width);
  for (let i = 0; i < 5; i++) {
    for (let c = 0; c < width; c++) {
      const sum = dense(root, 11 + i).reduce((total, a, q) => total + a * table[q * stride + c], 0);
      expect(Math.abs(out[i * width + c] - 3 - 2 * sum)).toBeLessThan(1e-12);
    }
  }
});
