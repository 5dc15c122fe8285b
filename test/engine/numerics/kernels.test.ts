import vm from "node:vm";
import fc from "fast-check";
import { afterEach, describe, expect, it, vi } from "vitest";
import { bandEnvelope, type BandEnvelope } from "../../../src/engine/numerics/band-envelope.js";
import type { Kernels } from "../../../src/engine/numerics/kernels.js";
import { scalarKernels } from "../../../src/engine/numerics/scalar-kernels.js";
import { vectorKernels } from "../../../src/engine/numerics/vector-kernels.js";
import { medianModuli, pileMesh } from "../../../src/engine/piles/pile-stiffness.js";
import { stream } from "../../../src/engine/random/stream.js";
import { kilopascals, metres } from "../../../src/units/quantities.js";

/** Bits of numbers, because 0 and -0 are equal and not the same. */
const bits = (values: Float64Array): bigint[] => [...new BigUint64Array(values.slice().buffer)];

const both = (): readonly [Kernels, Kernels] => [scalarKernels(), vectorKernels()!];

/** Tiles, table of rows and right-hand sides behind one another, as the kernels want them. */
function laidOut(kernels: Kernels, { rows, size, tileRows }: BandEnvelope, tiles: Float64Array, right: Float64Array): { doubles: Float64Array; at: number } {
  const at = size + tileRows;
  const { doubles, ints } = kernels.room(at + right.length);
  doubles.set(tiles);
  ints.set(rows, 2 * size);
  doubles.set(right, at);
  return { doubles, at };
}

/** All that the three banded kernels give: what factor says, the factor, and the right-hand sides after either half. */
function solved(kernels: Kernels, envelope: BandEnvelope, tiles: Float64Array, right: Float64Array, columns: number, firstRow: number): bigint[][] {
  const { size, tileRows } = envelope;
  const { doubles, at } = laidOut(kernels, envelope, tiles, right);
  const failed = kernels.factor(0, size, tileRows);
  if (failed > 0) return [[BigInt(failed)]]; // what is left of the matrix then is nobody's
  const out = [bits(doubles.subarray(0, size))];
  kernels.forward(0, size, tileRows, firstRow, at, columns);
  out.push(bits(doubles.subarray(at, at + right.length)));
  kernels.backward(0, size, tileRows, firstRow, at, columns);
  out.push(bits(doubles.subarray(at, at + right.length)));
  return out;
}

describe("kernels in WebAssembly and in JavaScript give the same bits", () => {
  const [scalar, vector] = both();

  it("for any envelope, matrix and number of columns, positive definite or not", () => {
    let failures = 0;
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 60 }), fc.integer({ min: 0, max: 59 }), fc.integer({ min: 1, max: 5 }), fc.integer(), fc.double({ min: 0, max: 1, noNaN: true }), (n, wide, pairs, seed, start) => {
        const random = stream(String(seed));
        const envelope = bandEnvelope(Int32Array.from({ length: n }, (_, i) => Math.max(0, i - Math.floor(random.uniform() * (wide + 1)))));
        // Numbers of all sizes, zeros of both signs among them, everywhere in the tiles.
        const number = (): number => (random.uniform() < 0.1 ? (random.uniform() < 0.5 ? 0 : -0) : random.normal() * 10 ** Math.round(4 * random.normal()));
        const tiles = Float64Array.from({ length: envelope.size }, number);
        for (let row = 0; row < envelope.tileRows; row++) {
          for (let r = 0; r < 4; r++) tiles[(envelope.rows[2 * row + 1] + row) * 16 + 5 * r] = 10 ** (4 + 14 * random.uniform());
        }
        const firstRow = Math.floor(start * (envelope.tileRows - 1));
        const right = Float64Array.from({ length: 4 * (envelope.tileRows - firstRow) * 2 * pairs }, number);
        const found = solved(vector, envelope, tiles, right, 2 * pairs, firstRow);
        if (found.length === 1) failures++;
        expect(found).toEqual(solved(scalar, envelope, tiles, right, 2 * pairs, firstRow));
      }),
      { seed: 21, numRuns: 400 },
    );
    expect(failures).toBeGreaterThan(20); // both kinds were met
    expect(failures).toBeLessThan(380);
  });

  it.each([3, 10, 25])("for the stiffness of a pile of %i m in scattered ground", (length) => {
    const mesh = pileMesh({ diameter: metres(0.5), length: metres(length), pileModulus: kilopascals(3e7), poissonRatio: 0.3 });
    const random = stream("kernels", length);
    const moduli = medianModuli(mesh, () => kilopascals(6000)).map((e) => e * Math.exp(0.6 * random.normal()));
    const tiles = new Float64Array(mesh.envelope.size);
    const levels = mesh.levelBounds.length - 1;
    const packed = mesh.upper.length / (moduli.length / 2);
    for (let k = 0; k < mesh.upper.length; k++) {
      const element = Math.floor(k / packed);
      const cell = Math.floor(element / (levels / 2)) * levels + 2 * (element % (levels / 2));
      if (mesh.places[k] >= 0) tiles[mesh.places[k]] += moduli[cell] * mesh.upper[k] + moduli[cell + 1] * mesh.lower[k];
    }
    for (let i = mesh.unknowns; i < 4 * mesh.envelope.tileRows; i++) tiles[tiles.length - 16 + 5 * (i % 4)] = 1;
    const right = Float64Array.from({ length: 4 * mesh.envelope.tileRows * 2 }, () => random.normal());
    const found = solved(vector, mesh.envelope, tiles, right, 2, 0);
    expect(found).toHaveLength(3);
    expect(found).toEqual(solved(scalar, mesh.envelope, tiles, right, 2, 0));
  });

  it("keep what stands in their memory when more is asked for", () => {
    for (const kernels of both()) {
      kernels.room(10).doubles.set([1, 2, 3]);
      const { doubles, ints } = kernels.room(300_000);
      expect([...doubles.subarray(0, 4)]).toEqual([1, 2, 3, 0]);
      expect(doubles.length).toBeGreaterThanOrEqual(300_000);
      expect(ints.buffer).toBe(doubles.buffer);
      expect(kernels.room(5).doubles.length).toBeGreaterThanOrEqual(300_000);
    }
  });
});

describe("where WebAssembly cannot be had, JavaScript works", () => {
  afterEach(() => vi.unstubAllGlobals());

  const chosen = async (): Promise<boolean> => {
    vi.resetModules();
    const { kernels } = await import("../../../src/engine/numerics/chosen-kernels.js");
    const { doubles } = kernels().room(20);
    return doubles.length % 8192 === 0; // WebAssembly has whole pages only
  };

  it("takes WebAssembly where it is", async () => {
    expect(await chosen()).toBe(true);
  });

  it("does without it", async () => {
    vi.stubGlobal("WebAssembly", undefined);
    expect(vectorKernels()).toBeUndefined();
    expect(await chosen()).toBe(false);
  });

  // A context that refuses to compile, as a page does whose content security policy lacks 'wasm-unsafe-eval'.
  it("does where compiling is refused", async () => {
    const { WebAssembly: refusing } = vm.runInContext("({ WebAssembly })", vm.createContext({}, { codeGeneration: { strings: true, wasm: false } })) as { WebAssembly: unknown };
    vi.stubGlobal("WebAssembly", refusing);
    expect(vectorKernels()).toBeUndefined();
    expect(await chosen()).toBe(false);
  });

  it("does where 128-bit vectors are not known", async () => {
    const refusing = {
      Module: class {
        constructor() {
          throw new WebAssembly.CompileError("invalid value type 0x7b");
        }
      },
    };
    vi.stubGlobal("WebAssembly", refusing);
    expect(await chosen()).toBe(false);
  });
});
