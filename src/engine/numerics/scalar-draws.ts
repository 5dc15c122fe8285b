import { exponential } from "./exponential.js";

// The twin of src/kernels/draws.ts: the same products and sums in the same order, so that both give the same bits.

/** See `Kernels.addRows`; places count doubles of the memory d. */
export function addRows(d: Float64Array, out: number, factors: number, count: number, table: number, draws: number): void {
  const fours = count & ~3;
  for (let k = 0; k < fours; k += 4) {
    const f0 = d[factors + k], f1 = d[factors + k + 1], f2 = d[factors + k + 2], f3 = d[factors + k + 3];
    const z0 = table + k * draws, z1 = z0 + draws, z2 = z1 + draws, z3 = z2 + draws;
    for (let m = 0; m < draws; m = (m + 1) | 0) {
      d[(out + m) | 0] += f0 * d[(z0 + m) | 0] + f1 * d[(z1 + m) | 0] + f2 * d[(z2 + m) | 0] + f3 * d[(z3 + m) | 0];
    }
  }
  for (let k = fours; k < count; k++) {
    const f = d[factors + k];
    for (let m = 0, z = table + k * draws; m < draws; m = (m + 1) | 0) d[(out + m) | 0] += f * d[(z + m) | 0];
  }
}

/** See `Kernels.settle`; `places` counts ints. */
export function settle(d: Float64Array, ints: Int32Array, ln: number, settlement: number, numbers: number, places: number, draws: number): void {
  const z = ints[places], p0 = ints[places + 1], p1 = ints[places + 2], p2 = ints[places + 3], p3 = ints[places + 4], p4 = ints[places + 5];
  const load = d[numbers], residual = d[numbers + 1], constant = d[numbers + 2];
  const l0 = d[numbers + 3], l1 = d[numbers + 4], l2 = d[numbers + 5], l3 = d[numbers + 6], l4 = d[numbers + 7];
  const q = numbers + 8;
  const q00 = d[q], q10 = d[q + 1], q11 = d[q + 2], q20 = d[q + 3], q21 = d[q + 4], q22 = d[q + 5], q30 = d[q + 6], q31 = d[q + 7];
  const q32 = d[q + 8], q33 = d[q + 9], q40 = d[q + 10], q41 = d[q + 11], q42 = d[q + 12], q43 = d[q + 13], q44 = d[q + 14];
  for (let m = 0; m < draws; m = (m + 1) | 0) {
    const x0 = d[(p0 + m) | 0], x1 = d[(p1 + m) | 0], x2 = d[(p2 + m) | 0], x3 = d[(p3 + m) | 0], x4 = d[(p4 + m) | 0];
    let sum = constant + residual * d[(z + m) | 0];
    sum += (l0 + q00 * x0) * x0;
    sum += (l1 + q10 * x0 + q11 * x1) * x1;
    sum += (l2 + q20 * x0 + q21 * x1 + q22 * x2) * x2;
    sum += (l3 + q30 * x0 + q31 * x1 + q32 * x2 + q33 * x3) * x3;
    sum += (l4 + q40 * x0 + q41 * x1 + q42 * x2 + q43 * x3 + q44 * x4) * x4;
    d[(ln + m) | 0] = sum;
    d[(settlement + m) | 0] = load * exponential(-sum);
  }
}

/** See `Kernels.largestDistortion`; `pairs` counts doubles. */
export function largestDistortion(d: Float64Array, ints: Int32Array, out: number, settlement: number, pairs: number, count: number, draws: number): void {
  d.fill(0, out, out + draws);
  for (let pair = pairs; pair < pairs + 2 * count; pair += 2) {
    const a = settlement + ints[2 * pair] * draws, b = settlement + ints[2 * pair + 1] * draws;
    const inverse = d[pair + 1];
    for (let m = 0; m < draws; m = (m + 1) | 0) {
      const distortion = Math.abs(d[(a + m) | 0] - d[(b + m) | 0]) * inverse;
      if (d[(out + m) | 0] < distortion) d[(out + m) | 0] = distortion;
    }
  }
}
