import { describe, expect, it } from "vitest";
import { neighbourPairs } from "../../../src/engine/decision/neighbour-pairs.js";
import { metres } from "../../../src/units/quantities.js";

const points = (list: [number, number][]): { x: ReturnType<typeof metres>; y: ReturnType<typeof metres> }[] => list.map(([x, y]) => ({ x: metres(x), y: metres(y) }));

describe("neighbours of a pile plan", () => {
  // Identity: on a rectangular grid the closed-disc rule keeps the sides and drops the diagonals, whatever the angle of the grid.
  it.each([0, 0.3, 1.1])("of a 4 x 3 grid turned by %d rad are its 17 sides", (angle) => {
    const grid: [number, number][] = [];
    for (let j = 0; j < 3; j++) {
      for (let i = 0; i < 4; i++) {
        const x = 6.5 * i + 100;
        const y = 6 * j - 40;
        grid.push([x * Math.cos(angle) - y * Math.sin(angle), x * Math.sin(angle) + y * Math.cos(angle)]);
      }
    }
    const pairs = neighbourPairs(points(grid));
    expect(pairs).toHaveLength(17);
    for (const pair of pairs) expect(Math.min(Math.abs(pair.distance - 6.5), Math.abs(pair.distance - 6))).toBeLessThan(1e-9);
  });

  // Hand-made: the disc on the long side of a flat triangle holds the third pile, so only the short sides are neighbours.
  it("of a flat triangle are its short sides", () => {
    expect(neighbourPairs(points([[0, 0], [10, 0], [5, 1]])).map((p) => [p.first, p.second])).toEqual([[0, 2], [1, 2]]);
  });

  it("of a single pile are none", () => expect(neighbourPairs(points([[0, 0]]))).toEqual([]));
});
