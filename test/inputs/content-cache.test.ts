import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { contentCache } from "../../src/inputs/content-cache.js";
import type { Cell } from "../../src/inputs/cells.js";

describe("a cache by content", () => {
  it("finds equal cells, whatever array holds them", () => {
    const cache = contentCache<string>(10);
    cache.keep(["a", 1, null, true], "first");
    expect(cache.find(["a", 1, null, true])).toBe("first");
    expect([["a", 1, null, false], ["a", 1, "", true], ["a", 1, null], ["a", "1", null, true], ["b", 1, null, true]].map((cells) => cache.find(cells))).toEqual(Array(5).fill(undefined));
  });

  it("is not misled by texts that differ only where its digest does not look", () => {
    const cache = contentCache<string>(10);
    cache.keep(["axxbyyc"], "one");
    expect(cache.find(["azzbzzc"])).toBeUndefined();
    cache.keep(["azzbzzc"], "other");
    expect(cache.find(["azzbzzc"])).toBe("other");
  });

  it("keeps what it was given, not what the caller makes of the array later", () => {
    const cache = contentCache<string>(10);
    const cells: Cell[] = ["a", 1];
    cache.keep(cells, "first");
    cells[1] = 2;
    expect(cache.find(["a", 1])).toBe("first");
    expect(cache.find(cells)).toBeUndefined();
  });

  it("forgets the least recently used", () => {
    const cache = contentCache<number>(3);
    for (const k of [1, 2, 3]) cache.keep([k], k);
    cache.find([1]);
    cache.keep([4], 4);
    expect([1, 2, 3, 4].map((k) => cache.find([k]))).toEqual([1, undefined, 3, 4]);
  });

  it("holds whatever was kept last, for any cells", () => {
    const cell = fc.oneof<fc.Arbitrary<Cell>[]>(fc.string({ maxLength: 5 }), fc.double({ noNaN: true }), fc.boolean(), fc.constant(null));
    fc.assert(fc.property(fc.array(fc.tuple(fc.array(cell, { maxLength: 4 }), fc.integer())), (kept) => {
      const cache = contentCache<number>(5);
      for (const [cells, value] of kept) {
        cache.keep(cells, value);
        if (cache.find([...cells]) !== value) return false;
      }
      return true;
    }), { numRuns: 300, seed: 27 });
  });
});
