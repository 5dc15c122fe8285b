import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { automaticHoles } from "../../../src/engine/investigation/hole-positions.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { metres } from "../../../src/units/quantities.js";

const square = { centre: { x: metres(0), y: metres(0) }, length: metres(15), width: metres(15) };
const sorted = (points: { x: number; y: number }[]): string[] => points.map((p) => `${p.x.toFixed(6)} ${p.y.toFixed(6)}`).sort();

describe("automatic holes", () => {
  // Identity: equal cells of a square are a regular grid.
  it.each([
    [1, [[0, 0]]],
    [4, [[-3.75, -3.75], [3.75, -3.75], [-3.75, 3.75], [3.75, 3.75]]],
    [9, [-5, 0, 5].flatMap((y) => [-5, 0, 5].map((x) => [x, y]))],
    [16, [-5.625, -1.875, 1.875, 5.625].flatMap((y) => [-5.625, -1.875, 1.875, 5.625].map((x) => [x, y]))],
  ])("%i in a square stand on a regular grid", (count, expected) => {
    expect(sorted(automaticHoles(square, count))).toEqual(sorted(expected.map(([x, y]) => ({ x, y }))));
  });

  // Identity: where the rectangle is cut into equal squares no hole serves more than its square, so they stand in the middles of these.
  it.each([[2, 1], [3, 1], [3, 2], [4, 3], [5, 2], [5, 4], [7, 5]])("%i x %i stand on their grid, either way round", (a, b) => {
    const middles = (n: number): number[] => Array.from({ length: n }, (_, i) => 6 * (i - (n - 1) / 2));
    const grid = middles(a).flatMap((u) => middles(b).map((v) => ({ x: u, y: v })));
    expect(sorted(automaticHoles({ ...square, length: metres(6 * a), width: metres(6 * b) }, a * b))).toEqual(sorted(grid));
    expect(sorted(automaticHoles({ ...square, length: metres(6 * b), width: metres(6 * a) }, a * b))).toEqual(sorted(grid.map(({ x, y }) => ({ x: y, y: x }))));
  });

  // By hand: rows of 3, 2 and 3 in a square of 16 m, each as high as its share of the holes (6, 4 and 6 m); any other even sharing leaves a
  // farther corner. Eight in two rows leave a corner of cells of 4 x 8 m, 4.47 m away; these 4.01 m.
  it("eight in a square stand in rows of three, two and three, cells of equal area", () => {
    const holes = automaticHoles({ ...square, length: metres(16), width: metres(16) }, 8);
    const rows = [[-5, -16 / 3], [-5, 0], [-5, 16 / 3], [0, -4], [0, 4], [5, -16 / 3], [5, 0], [5, 16 / 3]].map(([v, u]) => ({ x: u, y: v }));
    const either = [sorted(rows), sorted(rows.map(({ x, y }) => ({ x: y, y: x })))];
    expect(either).toContainEqual(sorted(holes));
  });

  // The rule itself, on a finer grid of points: of all ways to share the holes among rows, none whose farthest point is nearer by more than the coarser grid
  // can tell, and of those that are alike none with a smaller mean square.
  it("leave no point of the rectangle farther away than another sharing among rows would", () => {
    const cover = (length: number, width: number, holes: readonly { x: number; y: number }[]): { farthest: number; meanSquare: number } => {
      const squares: number[] = [];
      for (let i = 0; i <= 60; i++) for (let j = 0; j <= 60; j++) squares.push(Math.min(...holes.map((p) => (p.x - (i / 60 - 0.5) * length) ** 2 + (p.y - (j / 60 - 0.5) * width) ** 2)));
      return { farthest: Math.sqrt(Math.max(...squares)), meanSquare: squares.reduce((sum, d) => sum + d, 0) / squares.length };
    };
    const sharings = (length: number, width: number, count: number): { x: number; y: number }[][] =>
      Array.from({ length: count }, (_, k) => k + 1).flatMap((rows) => {
        const longer = (row: number): boolean => (row < rows / 2 ? row < Math.ceil((count % rows) / 2) : rows - 1 - row < Math.floor((count % rows) / 2));
        const shares = Array.from({ length: rows }, (_, row) => Math.floor(count / rows) + Number(longer(row)));
        return [[length, width, false], [width, length, true]].map(([along, across, turned]) => {
          let served = 0;
          return shares.flatMap((n) => {
            const v = (Number(across) * (served + n / 2)) / count - Number(across) / 2;
            served += n;
            return Array.from({ length: n }, (_, i) => ({ u: (Number(along) * (i + 0.5)) / n - Number(along) / 2, v })).map(({ u, v: w }) => (turned === true ? { x: w, y: u } : { x: u, y: w }));
          });
        });
      });
    for (const [length, width] of [[15, 15], [30, 20], [40, 11], [9, 26], [21, 17]]) {
      for (let count = 1; count <= 13; count++) {
        const found = cover(length, width, automaticHoles({ ...square, length: metres(length), width: metres(width) }, count));
        const others = sharings(length, width, count).map((holes) => cover(length, width, holes));
        const nearest = Math.min(...others.map(({ farthest }) => farthest));
        expect(found.farthest, `${count} in ${length} x ${width}`).toBeLessThanOrEqual(nearest * 1.05);
        const alike = others.filter(({ farthest }) => farthest <= found.farthest * (1 + 1e-9));
        expect(found.meanSquare, `${count} in ${length} x ${width}`).toBeLessThanOrEqual(Math.min(...alike.map(({ meanSquare }) => meanSquare)) * 1.02);
      }
    }
  });

  it("none for a count of zero", () => expect(automaticHoles(square, 0)).toEqual([]));

  it("stay inside the rectangle, as many as asked, and balance about its centre along one axis", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 40 }), fc.double({ min: 2, max: 200, noNaN: true }), fc.double({ min: 2, max: 200, noNaN: true }), (count, length, width) => {
        const holes = automaticHoles({ centre: { x: metres(7), y: metres(-3) }, length: metres(length), width: metres(width) }, count);
        expect(holes).toHaveLength(count);
        for (const hole of holes) {
          expect(Math.abs(hole.x - 7)).toBeLessThan(length / 2);
          expect(Math.abs(hole.y + 3)).toBeLessThan(width / 2);
        }
        const meanX = holes.reduce((sum, p) => sum + p.x, 0) / count;
        const meanY = holes.reduce((sum, p) => sum + p.y, 0) / count;
        expect(Math.min(Math.abs(meanX - 7) / length, Math.abs(meanY + 3) / width)).toBeLessThan(1e-9);
      }),
      { numRuns: 60, seed: 1 },
    );
  });

  it.each([-1, 1.5, 401, NaN])("refuse a count of %d", (count) => {
    expect(() => automaticHoles(square, count)).toThrow(DomainError);
  });
  it("refuse a footprint of zero", () => {
    expect(() => automaticHoles({ ...square, width: metres(0) }, 1)).toThrow("above 0 m both ways");
  });
});
