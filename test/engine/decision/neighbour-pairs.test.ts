import fc from "fast-check";
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

  // Hand-made: the disc on (0, 0) and (10, 0) has its centre at (5, 0) and the radius 5; a pile 5.2 m away from the centre lies outside, one 4.8 m inside.
  it.each([[5.2, [[0, 1], [0, 2], [1, 2]]], [7, [[0, 1], [0, 2], [1, 2]]], [4.8, [[0, 2], [1, 2]]]])("of a triangle %d m high keep the long side where the third pile lies outside its disc", (height, expected) => {
    expect(neighbourPairs(points([[0, 0], [10, 0], [5, height]])).map((p) => [p.first, p.second])).toEqual(expected);
  });

  it("do not hang on which pile is listed first", () => {
    expect(neighbourPairs(points([[5, 1], [0, 0], [10, 0]])).map((p) => [p.first, p.second])).toEqual([[0, 1], [0, 2]]);
  });

  // Definition in its other form: nobody nearer to the middle of the two than half their distance. Whole numbers, doubled, keep the rim exact.
  it("are those with an empty disc between them, whatever the plan", () => {
    const place = fc.tuple(fc.integer({ min: -12, max: 12 }), fc.integer({ min: -12, max: 12 }));
    fc.assert(
      fc.property(fc.uniqueArray(place, { minLength: 2, maxLength: 12, selector: ([x, y]) => `${x} ${y}` }), (plan) => {
        const expected = plan.flatMap(([x, y], i) => plan.slice(i + 1).map(([u, v], k) => ({ i, j: i + 1 + k, x: x + u, y: y + v, square: (x - u) ** 2 + (y - v) ** 2 })))
          .filter((pair) => plan.every(([x, y], k) => k === pair.i || k === pair.j || (2 * x - pair.x) ** 2 + (2 * y - pair.y) ** 2 > pair.square));
        const found = neighbourPairs(points(plan));
        expect(found.map((p) => [p.first, p.second])).toEqual(expected.map(({ i, j }) => [i, j]));
        found.forEach(({ distance }, k) => expect(distance).toBeCloseTo(Math.sqrt(expected[k].square), 12));
      }),
      { numRuns: 200, seed: 3 },
    );
  });

  it("of a single pile are none", () => expect(neighbourPairs(points([[0, 0]]))).toEqual([]));
});
