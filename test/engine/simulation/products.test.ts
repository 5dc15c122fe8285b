import { describe, expect, it } from "vitest";
import { stream } from "../../../src/engine/random/stream.js";
import { covarianceRoot } from "../../../src/engine/simulation/covariance-root.js";
import { addRowProducts, fullness, fullRows, orderedRows } from "../../../src/engine/simulation/ordered-rows.js";

const numbers = stream("products", 1);
const table = (n: number): Float64Array => Float64Array.from({ length: n }, () => numbers.normal());

// Independent: sums by the definition. Sizes on both sides of the blocks of three.
it.each([[1, 1, 5], [3, 3, 8], [4, 9, 40], [7, 5, 1], [9, 13, 17]])("%d full rows are multiplied with a table of %d rows of %d numbers", (n, p, m) => {
  const [a, b] = [table(n * m), table(p * m)];
  const out = new Float64Array(n * p);
  addRowProducts(fullRows(a, n, m), b, p, m, 1, out);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < p; j++) {
      let sum = 0;
      for (let k = 0; k < m; k++) sum += a[i * m + k] * b[j * m + k];
      // one sum a result in rising order: the same to the last bit
      expect(out[i * p + j]).toBe(sum);
    }
  }
});

describe.each([5, 6, 7, 13])("ordered rows of a root of order %d", (n) => {
  const half = table(n * n);
  const covariance = new Float64Array(n * n);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) for (let k = 0; k < n; k++) covariance[i * n + j] += half[i * n + k] * half[j * n + k];
  const root = covarianceRoot(covariance, n, 3);
  const rows = orderedRows(root, 3, n, root.columnCount);

  it("are in the order of their last entry and about full up to it", () => {
    rows.ends.forEach((end, t) => t > 0 && expect(end).toBeGreaterThanOrEqual(rows.ends[t - 1]));
    expect([...rows.order].sort((a, b) => a - b)).toEqual(Array.from({ length: n - 3 }, (_, i) => i));
    expect(fullness(rows)).toBeGreaterThan(0.9);
  });

  // Independent: sums over the sparse rows.
  it.each([1, 2, 3, 7])("are multiplied with a table of %d rows", (count) => {
    const stride = root.columnCount + 2;
    const values = table(count * stride);
    const out = new Float64Array((n - 3) * count).fill(0.5);
    addRowProducts(rows, values, count, stride, 2, out);
    for (let i = 0; i < n - 3; i++) {
      for (let j = 0; j < count; j++) {
        let sum = 0;
        for (let k = root.starts[3 + i]; k < root.starts[4 + i]; k++) sum += root.values[k] * values[j * stride + root.columns[k]];
        expect(Math.abs(out[i * count + j] - 0.5 - 2 * sum)).toBeLessThan(1e-11);
      }
    }
  });
});

it("fullness counts what is multiplied", () => {
  // rows (1, 0, 2), (3, 0, 0): four places up to the last entries, three entries
  const rows = orderedRows({ starts: Int32Array.of(0, 2, 3), columns: Int32Array.of(0, 2, 0), values: Float64Array.of(1, 2, 3) }, 0, 2, 3);
  expect([...rows.ends]).toEqual([1, 3]);
  expect(fullness(rows)).toBe(0.75);
});
