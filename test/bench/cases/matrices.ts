import type { BandEnvelope } from "../../../src/engine/numerics/band-envelope.js";
import { factorBanded, solveBanded } from "../../../src/engine/numerics/banded-cholesky.js";
import { choleskyInPlace, multiplyLower } from "../../../src/engine/numerics/cholesky.js";
import { symmetricEigen } from "../../../src/engine/numerics/symmetric-eigen.js";
import { stream } from "../../../src/engine/random/stream.js";
import type { BenchCase } from "../bench-case.js";
import { bandInTiles } from "./band-in-tiles.js";

/** Throws when two answers differ by more than rounding. */
function same(ours: Float64Array, theirs: Float64Array, tolerance: number): void {
  const worst = ours.reduce((most, value, i) => Math.max(most, Math.abs(value - theirs[i])), 0);
  if (!(worst < tolerance) || ours.length !== theirs.length) throw new Error(`The peer's answer differs by ${worst}.`);
}

interface BandState {
  readonly band: Float64Array;
  readonly envelope: BandEnvelope;
  readonly tiles: Float64Array;
  readonly loads: Float64Array;
}

/** A band factored once and solved for the columns of a second-order form; the loads are such that every unknown is 1. */
function bandCase(n: number, half: number, columns: number, ratio: number): BenchCase<BandState, Float64Array> {
  return {
    name: `band solve, ${columns} ${columns === 1 ? "load" : "loads"}`,
    size: `${n} unknowns, half band ${half}`,
    rounds: 25,
    target: { ratio },
    setup: () => {
      const random = stream("bench", n, half);
      const band = new Float64Array(n * (half + 1));
      const loads = new Float64Array(n * columns);
      for (let i = 0; i < n; i++) {
        for (let j = Math.max(0, i - half); j <= i; j++) {
          const value = i === j ? half + 1 : random.uniform() - 0.5;
          band[i * (half + 1) + j - i + half] = value;
          for (let c = 0; c < columns; c++) {
            loads[i * columns + c] += value;
            if (j < i) loads[j * columns + c] += value;
          }
        }
      }
      return { band, ...bandInTiles(band, n, half), loads };
    },
    run: ({ tiles, envelope, loads }) => {
      const factor = tiles.slice();
      const x = loads.slice();
      factorBanded(factor, envelope);
      solveBanded(factor, envelope, x, columns);
      return x;
    },
    check: (x) => same(x, new Float64Array(x.length).fill(1), 1e-12),
    peer: {
      name: "band_solve_many",
      input: ({ band, loads }) => ({ band, loads, n, half }),
      agree: (ours, theirs) => same(ours, theirs, 1e-12),
    },
  };
}

/** A Markov covariance on even steps, a hundred times over because one is too short for a clock. */
function choleskyCase(n: number): BenchCase<Float64Array, Float64Array> {
  const times = 100;
  return {
    name: `Cholesky ${n}`,
    size: `${n} x ${n}, ${times} times`,
    rounds: 25,
    target: {},
    setup: () => Float64Array.from({ length: n * n }, (_, at) => Math.exp(-Math.abs(Math.floor(at / n) - (at % n)) / 10)),
    run: (matrix) => {
      let factor = matrix;
      for (let k = 0; k < times; k++) {
        factor = matrix.slice();
        choleskyInPlace(factor, n);
      }
      return factor;
    },
    // An AR(1) process: every pivot after the first is sqrt(1 - rho^2).
    check: (factor) => same(Float64Array.of(factor[n * n - 1]), Float64Array.of(Math.sqrt(-Math.expm1(-0.2))), 1e-12),
    peer: { name: "cholesky", input: (matrix) => ({ matrix, n, times }), agree: (ours, theirs) => same(ours, theirs, 1e-13) },
  };
}

interface ProductState {
  readonly factor: Float64Array;
  readonly normals: Float64Array;
}

const piles = 40;
const count = 4096;

const correlatedDraws: BenchCase<ProductState, Float64Array> = {
  name: "correlated draws",
  size: `${piles} piles, ${count} draws through a triangular factor`,
  rounds: 25,
  target: {},
  setup: () => {
    const random = stream("bench", piles);
    const factor = Float64Array.from({ length: piles * piles }, (_, at) => (at % piles <= Math.floor(at / piles) ? random.normal() : 0));
    return { factor, normals: Float64Array.from({ length: piles * count }, () => random.normal()) };
  },
  run: ({ factor, normals }) => {
    const out = new Float64Array(piles * count);
    multiplyLower(factor, piles, normals, out, count);
    return out;
  },
  check: (out, { factor, normals }) => same(out.subarray(0, 1), Float64Array.of(factor[0] * normals[0]), 1e-13),
  peer: { name: "product", input: ({ factor, normals }) => ({ factor, normals, n: piles }), agree: (ours, theirs) => same(ours, theirs, 1e-11) },
};

const order = 160;

const eigenvalues: BenchCase<Float64Array, Float64Array> = {
  name: "symmetric eigenvalues and vectors",
  size: `${order} x ${order}`,
  rounds: 25,
  target: {},
  setup: () => {
    const random = stream("bench", order);
    const matrix = new Float64Array(order * order);
    for (let i = 0; i < order; i++) for (let j = 0; j <= i; j++) matrix[i * order + j] = matrix[j * order + i] = random.normal();
    return matrix;
  },
  run: (matrix) => symmetricEigen(matrix, order).values,
  check: (values, matrix) => {
    let trace = 0;
    for (let i = 0; i < order; i++) trace += matrix[i * order + i];
    same(Float64Array.of(values.reduce((a, b) => a + b)), Float64Array.of(trace), 1e-10);
  },
  peer: { name: "eigenvalues", input: (matrix) => ({ matrix, n: order }), agree: (ours, theirs) => same(ours, theirs, 1e-11) },
};

export const matrices = [bandCase(2400, 43, 1, 1.6), bandCase(2400, 43, 160, 2), choleskyCase(60), choleskyCase(200), correlatedDraws, eigenvalues] as const;
