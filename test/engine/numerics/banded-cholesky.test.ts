import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { bandEnvelope, placeInEnvelope, tileEdge, type BandEnvelope } from "../../../src/engine/numerics/band-envelope.js";
import { complianceBanded, factorBanded, solveBanded } from "../../../src/engine/numerics/banded-cholesky.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { scalarKernels } from "../../../src/engine/numerics/scalar-kernels.js";
import { vectorKernels } from "../../../src/engine/numerics/vector-kernels.js";
import { stream } from "../../../src/engine/random/stream.js";
import fixture from "../../fixtures/numerics/numerics.json";

const largest = (a: ArrayLike<number>, b: ArrayLike<number>) => Math.max(0, ...Array.from(a, (value, i) => Math.abs(value - b[i])));
const KERNELS = [
  { name: "WebAssembly", using: vectorKernels()! },
  { name: "JavaScript", using: scalarKernels() },
];

/** A matrix in tiles from its entries, zero outside the rows' first columns. */
function inTiles(first: ArrayLike<number>, entry: (i: number, j: number) => number): { envelope: BandEnvelope; tiles: Float64Array } {
  const envelope = bandEnvelope(first);
  const tiles = new Float64Array(envelope.size);
  for (let i = 0; i < first.length; i++) for (let j = first[i]; j <= i; j++) tiles[placeInEnvelope(envelope, i, j)] = entry(i, j);
  return { envelope, tiles };
}
const ofBand = (n: number, h: number) => Int32Array.from({ length: n }, (_, i) => Math.max(0, i - h));

/** A positive definite matrix on a random envelope: its diagonal outweighs its rows. */
function randomMatrix(n: number, widest: number, seed: number): { first: Int32Array; entry: (i: number, j: number) => number } {
  const random = stream(String(seed));
  const first = Int32Array.from({ length: n }, (_, i) => Math.max(0, i - Math.floor(random.uniform() * (widest + 1))));
  const values = Float64Array.from({ length: n * n }, () => 2 * random.uniform() - 1);
  return { first, entry: (i, j) => (i === j ? 2 * widest + 1 + random.uniform() : values[i * n + j]) };
}

/** A x, by the definition, for x of several columns. */
function product(first: Int32Array, envelope: BandEnvelope, tiles: Float64Array, x: Float64Array, columns: number): Float64Array {
  const y = new Float64Array(x.length);
  for (let i = 0; i < first.length; i++) {
    for (let j = first[i]; j <= i; j++) {
      const value = tiles[placeInEnvelope(envelope, i, j)];
      for (let c = 0; c < columns; c++) {
        y[i * columns + c] += value * x[j * columns + c];
        if (j < i) y[j * columns + c] += value * x[i * columns + c];
      }
    }
  }
  return y;
}

describe.each(KERNELS)("factorBanded and solveBanded in $name", ({ using }) => {
  // Source: numerics.py, scipy.linalg.cholesky_banded and solveh_banded (LAPACK).
  it.each(fixture.bands)("meet scipy's factor and solutions, n = $n, half bandwidth $halfBandwidth", ({ n, halfBandwidth: h, columns, ...given }) => {
    const { envelope, tiles } = inTiles(ofBand(n, h), (i, j) => given.band[i * h + h + j]!);
    factorBanded(tiles, envelope, using);
    for (let i = 0; i < n; i++) {
      for (let j = Math.max(0, i - h); j <= i; j++) {
        const found = tiles[placeInEnvelope(envelope, i, j)];
        expect(i === j ? 1 / found : found).toBeCloseTo(given.factor[i * h + h + j]!, 13);
      }
    }
    const many = Float64Array.from(given.rhs);
    solveBanded(tiles, envelope, many, columns, 0, using);
    expect(largest(many, given.solution)).toBeLessThan(1e-14);
    const one = Float64Array.from({ length: n }, (_, i) => given.rhs[i * columns]);
    solveBanded(tiles, envelope, one, 1, 0, using);
    expect(largest(one, given.solution.filter((_, at) => at % columns === 0))).toBeLessThan(1e-14);
  });

  // Manufactured: a right-hand side made from a known solution, on envelopes of every shape, so that no tile and no leftover is missed.
  it("give back a known solution at any order, envelope and number of columns", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 40 }), fc.integer({ min: 0, max: 39 }), fc.integer({ min: 1, max: 9 }), fc.integer(), (n, wide, columns, seed) => {
        const { first, entry } = randomMatrix(n, Math.min(wide, n - 1), seed);
        const { envelope, tiles } = inTiles(first, entry);
        const random = stream(String(seed), 1);
        const x = Float64Array.from({ length: n * columns }, () => random.normal());
        const b = product(first, envelope, tiles, x, columns);
        factorBanded(tiles, envelope, using);
        solveBanded(tiles, envelope, b, columns, 0, using);
        expect(largest(b, x)).toBeLessThan(1e-12);
      }),
      { seed: 11, numRuns: 300, endOnFailure: true },
    );
  });

  // Identity: a load below unknown `from` alone leaves the eliminated unknowns above without a part in the forward pass.
  it("solve from an unknown on as from the first, where nothing is loaded above it", () => {
    const { first, entry } = randomMatrix(31, 12, 5);
    const { envelope, tiles } = inTiles(first, entry);
    factorBanded(tiles, envelope, using);
    const from = 3 * tileEdge;
    const whole = Float64Array.from({ length: 31 * 3 }, (_, at) => (at < from * 3 ? 0 : Math.sin(at)));
    const tail = whole.slice(from * 3);
    solveBanded(tiles, envelope, whole, 3, 0, using);
    solveBanded(tiles, envelope, tail, 3, from, using);
    expect([...tail]).toEqual([...whole.subarray(from * 3)]);
  });

  it("give the compliance of a load without the solution", () => {
    const { first, entry } = randomMatrix(45, 17, 6);
    const { envelope, tiles } = inTiles(first, entry);
    const load = Float64Array.from({ length: 45 }, (_, i) => Math.cos(i));
    const compliance = complianceBanded(envelope, (zeros) => tiles.forEach((value, at) => (zeros[at] += value)), load, using);
    factorBanded(tiles, envelope, using);
    const x = load.slice();
    solveBanded(tiles, envelope, x, 1, 0, using);
    expect(Math.abs(compliance / load.reduce((sum, value, i) => sum + value * x[i], 0) - 1)).toBeLessThan(1e-14);
  });

  it("name the row where a matrix is not positive definite", () => {
    const planted = (row: number, value: number) => () => {
      const { envelope, tiles } = inTiles(ofBand(9, 3), (i, j) => (i === j ? (i === row - 1 ? value : 9) : 1));
      factorBanded(tiles, envelope, using);
    };
    for (let row = 1; row <= 9; row++) {
      expect(planted(row, -1)).toThrow(new RegExp(`not positive definite at row ${row}\\.`));
      expect(planted(row, Number.NaN)).toThrow(new RegExp(`row ${row}\\.`));
      expect(planted(row, Infinity)).toThrow(new RegExp(`row ${row}\\.`));
    }
  });

  // Kernels keep their memory between calls: what a larger matrix left there must not reach a smaller one.
  it("forget the matrix before", () => {
    const small = () => inTiles(ofBand(6, 2), (i, j) => (i === j ? 5 + i : 1));
    const alone = small();
    factorBanded(alone.tiles, alone.envelope, using);
    const large = inTiles(ofBand(90, 21), (i, j) => (i === j ? 60 : 1));
    factorBanded(large.tiles, large.envelope, using);
    const after = small();
    factorBanded(after.tiles, after.envelope, using);
    expect([...after.tiles]).toEqual([...alone.tiles]);
    const again = small();
    const load = Float64Array.of(1, 2, 3, 4, 5, 6);
    const twice = [0, 1].map(() => complianceBanded(again.envelope, (zeros) => again.tiles.forEach((value, at) => (zeros[at] += value)), load, using));
    expect(twice[1]).toBe(twice[0]);
  });

  it("refuse wrong shapes", () => {
    const { envelope, tiles } = inTiles(ofBand(6, 2), (i, j) => (i === j ? 5 : 1));
    expect(() => factorBanded(tiles.subarray(1), envelope, using)).toThrow(DomainError);
    expect(() => solveBanded(tiles.subarray(1), envelope, new Float64Array(6), 1, 0, using)).toThrow(DomainError);
    expect(() => solveBanded(tiles, envelope, new Float64Array(5), 1, 0, using)).toThrow(DomainError);
    expect(() => solveBanded(tiles, envelope, new Float64Array(6), 0, 0, using)).toThrow(DomainError);
    expect(() => solveBanded(tiles, envelope, new Float64Array(6), 1, 2, using)).toThrow(DomainError);
    expect(() => solveBanded(tiles, envelope, new Float64Array(6), 1, 8, using)).toThrow(DomainError);
    expect(() => complianceBanded(envelope, () => undefined, new Float64Array(5), using)).toThrow(DomainError);
  });
});

describe("bandEnvelope", () => {
  it("gives every entry a place of its own", () => {
    const first = [0, 0, 1, 1, 4, 2, 6, 0, 8, 8];
    const envelope = bandEnvelope(first);
    const places = first.flatMap((from, i) => Array.from({ length: i + 1 - from }, (_, k) => placeInEnvelope(envelope, i, from + k)));
    expect(new Set(places).size).toBe(places.length);
    expect(places.every((place) => place >= 0 && place < envelope.size)).toBe(true);
  });

  it("refuses first columns out of range", () => {
    expect(() => bandEnvelope([])).toThrow(DomainError);
    expect(() => bandEnvelope([0, 2])).toThrow(DomainError);
    expect(() => bandEnvelope([0, -1])).toThrow(DomainError);
    expect(() => bandEnvelope([0, 0.5])).toThrow(DomainError);
  });
});
