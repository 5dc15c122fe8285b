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

/** Where two lists of bits part first; to show all of them takes minutes. */
function parting(ours: readonly bigint[][], theirs: readonly bigint[][]): string {
  if (ours.length !== theirs.length) return `${ours.length} lists, and ${theirs.length}`;
  for (let k = 0; k < ours.length; k++) {
    if (ours[k].length !== theirs[k].length) return `list ${k}: ${ours[k].length} numbers, and ${theirs[k].length}`;
    const at = ours[k].findIndex((value, i) => value !== theirs[k][i]);
    if (at >= 0) return `list ${k}, number ${at}: ${ours[k][at]}, and ${theirs[k][at]}`;
  }
  return "nowhere";
}

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
        expect(parting(found, solved(scalar, envelope, tiles, right, 2 * pairs, firstRow))).toBe("nowhere");
      }),
      { seed: 21, numRuns: 400, endOnFailure: true }, // a smaller example says no more than the bits do
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
    expect(parting(found, solved(scalar, mesh.envelope, tiles, right, 2, 0))).toBe("nowhere");
  });

  // Powers of all sizes, those beyond the range and those where the power of two changes among them.
  it("for rows of draws, settlements and distortions", () => {
    const piles = 7;
    const pairs = [[0, 1], [1, 2], [4, 0], [6, 5], [3, 6]];
    for (const draws of [2, 16, 128]) {
      const found = both().map((kernels) => {
        const random = stream("draws", draws);
        const table = 0, factors = table + 2 * piles * draws, numbers = factors + 8, places = numbers + 24, ofPairs = places + 4, out = ofPairs + 2 * pairs.length;
        const { doubles, ints } = kernels.room(out + (piles + 3) * draws);
        for (let k = 0; k < out; k++) doubles[k] = random.normal();
        const given: bigint[][] = [];
        const row = (place: number, rows = 1): number => given.push(bits(doubles.subarray(place, place + rows * draws)));
        for (let count = 0; count <= piles; count++) {
          doubles.fill(count - 2.5, out, out + draws);
          kernels.addRows(out, factors, count, table, draws);
          row(out);
        }
        [4, 0, 1, 2, 3, 0].forEach((k, at) => (ints[2 * places + at] = table + k * draws));
        for (const size of [0, 1, 20, 400, 1e5]) {
          doubles[numbers + 2] = size * random.normal();
          doubles[numbers + 1] = size;
          kernels.settle(out, out + draws, numbers, places, draws);
          row(out);
          row(out + draws);
        }
        pairs.forEach((pair, k) => ints.set(pair, 2 * (ofPairs + 2 * k)));
        for (let k = 0; k < piles * draws; k++) doubles[out + 2 * draws + k] = random.normal();
        for (let count = 0; count <= pairs.length; count++) {
          kernels.largestDistortion(out, out + 2 * draws, ofPairs, count, draws);
          row(out);
        }
        return given;
      });
      expect(parting(found[0], found[1])).toBe("nowhere");
    }
  });

  // By the definitions, with the language's own exponential.
  it("give sums, settlements and distortions", () => {
    for (const kernels of both()) {
      const { doubles, ints } = kernels.room(200);
      const numbers = [30, 0.1, -2, 1.1, 0.2, 0.3, -0.4, 0.5, ...Array.from({ length: 15 }, (_, k) => 0.01 * (k + 1))];
      const z = [0.5, -1];
      const x = [[0.3, 0.4], [-0.2, 1], [1.5, -0.1], [0.7, 0.6], [-1.1, 2]];
      doubles.set([...z, ...x.flat()], 0);
      doubles.set(numbers, 20);
      ints.set([0, 2, 4, 6, 8, 10], 100);
      kernels.settle(60, 70, 20, 50, 2);
      for (let m = 0; m < 2; m++) {
        let ln = numbers[2] + numbers[1] * z[m];
        for (let a = 0, k = 8; a < 5; a++) {
          ln += numbers[3 + a] * x[a][m];
          for (let e = 0; e <= a; e++, k++) ln += numbers[k] * x[a][m] * x[e][m];
        }
        expect(doubles[60 + m]).toBeCloseTo(ln, 13);
        expect(doubles[70 + m] / (30 * Math.exp(-ln))).toBeCloseTo(1, 14);
      }
      doubles.set([10, 20], 80);
      doubles.set([1, 2, 3, 4, 5], 90);
      kernels.addRows(80, 90, 5, 2, 2);
      for (let m = 0; m < 2; m++) expect(doubles[80 + m]).toBeCloseTo(10 * (m + 1) + x.reduce((sum, row, k) => sum + (k + 1) * row[m], 0), 13);
      ints.set([0, 4], 240);
      doubles[121] = 1 / 5;
      ints.set([2, 1], 244);
      doubles[123] = 1 / 2;
      kernels.largestDistortion(130, 2, 120, 2, 2);
      for (let m = 0; m < 2; m++) expect(doubles[130 + m]).toBeCloseTo(Math.max(Math.abs(x[0][m] - x[4][m]) / 5, Math.abs(x[2][m] - x[1][m]) / 2), 14);
    }
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
    return String(kernels().factor).includes("[native code]");
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
