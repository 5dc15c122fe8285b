import { sobolNormals } from "../../../src/engine/numerics/sobol.js";
import { stream } from "../../../src/engine/random/stream.js";
import type { BenchCase } from "../bench-case.js";

const dimensions = 40;
const count = 4096;

/** Mean of a dimension's values, which the evenness of the points holds within a thousandth of 0. */
function requireEven(mean: number): void {
  if (!(Math.abs(mean) < 0.003)) throw new Error(`The mean of a dimension is ${mean}.`);
}

/** Scrambled Sobol points mapped to normals. */
export const quasiRandom: BenchCase<undefined, Float64Array> = {
  name: "scrambled Sobol normals",
  size: `${dimensions} dimensions, ${count} points`,
  rounds: 25,
  target: {},
  setup: () => undefined,
  run: (_, round) => sobolNormals(dimensions, count, stream("bench", round)),
  check: (normals) => {
    for (let d = 0; d < dimensions; d++) requireEven(normals.subarray(d * count, (d + 1) * count).reduce((a, b) => a + b) / count);
  },
  peer: {
    name: "sobol_normals",
    input: () => ({ dimensions, count }),
    agree: (_, means) => means.forEach(requireEven), // both are random: the same evenness is all that can agree
  },
};
