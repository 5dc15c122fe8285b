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
