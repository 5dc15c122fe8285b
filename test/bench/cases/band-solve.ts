import type { BandEnvelope } from "../../../src/engine/numerics/band-envelope.js";
import { complianceBanded } from "../../../src/engine/numerics/banded-cholesky.js";
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

/** What a realisation asks of a finite-element system: what the load moves itself. The peer, whose library has no such call, makes the solution. */
const solved = (name: string, using: Kernels, ratio: number): BenchCase<State, number> => ({
  name: `finite-element solve, banded Cholesky, ${name}`,
  size: `${N} unknowns, half band ${HALF}, one load`,
  rounds: 41,
  target: { ratio },
  setup,
  run: ({ tiles, envelope, load }) => complianceBanded(envelope, (matrix) => matrix.set(tiles), load, using),
  check: (compliance) => {
    if (!(compliance > 0 && compliance < N / HALF)) throw new Error(`A compliance of ${compliance} is none.`);
  },
  peer: {
    name: "band_solve",
    input: ({ band, load }) => ({ band, load, n: N, half: HALF }),
    agree: (ours, theirs) => {
      const product = theirs.reduce((sum, value, i) => sum + value * Math.sin(i), 0);
      if (!(Math.abs(ours / product - 1) < 1e-12)) throw new Error(`LAPACK's solution gives ${product}, ours ${ours}.`);
    },
  },
});

const vector = vectorKernels();

/** In both kinds of kernels, where both are. */
export const bandSolves = [...(vector === undefined ? [] : [solved("WebAssembly", vector, 0.6)]), solved("JavaScript", scalarKernels(), 1.6)];
