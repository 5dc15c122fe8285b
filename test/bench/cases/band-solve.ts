import type { BandEnvelope } from "../../../src/engine/numerics/band-envelope.js";
import { factorBanded, solveBanded } from "../../../src/engine/numerics/banded-cholesky.js";
import type { Kernels } from "../../../src/engine/numerics/kernels.js";
import { scalarKernels } from "../../../src/engine/numerics/scalar-kernels.js";
import { vectorKernels } from "../../../src/engine/numerics/vector-kernels.js";
import type { BenchCase } from "../bench-case.js";
import { bandInTiles } from "./band-in-tiles.js";

const N = 3300; // an axisymmetric mesh of 11 x 50 eight-node elements, numbered along the radius
const HALF = 71;

interface State {
  /** row by row, as the peer takes it, and as ours does */
  readonly band: Float64Array;
  readonly envelope: BandEnvelope;
  readonly tiles: Float64Array;
  readonly load: Float64Array;
}

function setup(): State {
  const band = new Float64Array(N * (HALF + 1));
  // a fixed stream of its own: what is timed is the solution, so any well-conditioned matrix of this shape does
  let seed = 12345;
  for (let i = 0; i < N; i++) {
    for (let k = 0; k < HALF; k++) {
      seed = (Math.imul(seed, 1103515245) + 12345) & 0x7fffffff;
      if (i - HALF + k >= 0) band[i * (HALF + 1) + k] = seed / 0x7fffffff - 0.5;
    }
    band[i * (HALF + 1) + HALF] = HALF; // the diagonal outweighs its row: positive definite
  }
  return { band, ...bandInTiles(band, N, HALF), load: Float64Array.from({ length: N }, (_, i) => Math.sin(i)) };
}

/** A x, by the definition. */
function product(band: Float64Array, x: Float64Array): Float64Array {
  const y = new Float64Array(N);
  for (let i = 0; i < N; i++) {
    for (let j = Math.max(0, i - HALF); j <= i; j++) {
      const a = band[i * (HALF + 1) + j - i + HALF];
      y[i] += a * x[j];
      if (j !== i) y[j] += a * x[i];
    }
  }
  return y;
}

/** Factor and one solution of a finite-element system. */
const solved = (name: string, using: Kernels, ratio: number): BenchCase<State, Float64Array> => ({
  name: `finite-element solve, banded Cholesky, ${name}`,
  size: `${N} unknowns, half band ${HALF}, one load`,
  rounds: 41,
  target: { ratio },
  setup,
  run: ({ tiles, envelope, load }) => {
    const factor = tiles.slice();
    const x = load.slice();
    factorBanded(factor, envelope, using);
    solveBanded(factor, envelope, x, 1, 0, using);
    return x;
  },
  check: (x, { band, load }) => {
    const residual = product(band, x).reduce((worst, value, i) => Math.max(worst, Math.abs(value - load[i])), 0);
    if (!(residual < 1e-10)) throw new Error(`A x differs from the load by ${residual}.`);
  },
  peer: {
    name: "band_solve",
    input: ({ band, load }) => ({ band, load, n: N, half: HALF }),
    agree: (ours, theirs) => {
      const worst = ours.reduce((most, value, i) => Math.max(most, Math.abs(value - theirs[i])), 0);
      if (!(worst < 1e-12)) throw new Error(`LAPACK's solution differs by ${worst}.`);
    },
  },
});

const vector = vectorKernels();

/** In both kinds of kernels, where both are. */
export const bandSolves = [...(vector === undefined ? [] : [solved("WebAssembly", vector, 0.6)]), solved("JavaScript", scalarKernels(), 1.6)];
