import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { designLength, type DesignTask } from "../../../src/engine/piles/design-length.js";
import { randolphWrothSettlement } from "../../../src/engine/piles/randolph-wroth.js";
import { kilonewtons, kilopascals, metres } from "../../../src/units/quantities.js";

interface Numbers {
  load: number;
  diameter: number;
  soilModulus: number;
  pileModulus: number;
  allowable: number;
  poisson: number;
  shortest: number;
  longest: number;
  step?: number;
}
const usual: Numbers = { load: 1000, diameter: 0.5, soilModulus: 8e3, pileModulus: 3e7, allowable: 0.025, poisson: 0.3, shortest: 3, longest: 25 };
const design = (changes: Partial<Numbers> = {}) => designLength({ ...usual, ...changes } as DesignTask);
const settlement = (n: Numbers, length: number) => randolphWrothSettlement(kilonewtons(n.load), metres(length), metres(n.diameter), kilopascals(n.soilModulus), kilopascals(n.pileModulus), n.poisson);

const tasks = fc.record({
  load: fc.double({ min: 1, max: 20000, noNaN: true }),
  diameter: fc.double({ min: 0.2, max: 2, noNaN: true }),
  soilModulus: fc.double({ min: 500, max: 5e6, noNaN: true }),
  pileModulus: fc.double({ min: 1e6, max: 2e8, noNaN: true }),
  allowable: fc.double({ min: 0.001, max: 0.2, noNaN: true }),
  poisson: fc.double({ min: 0, max: 0.5, noNaN: true }),
  shortest: fc.double({ min: 2.5, max: 10, noNaN: true }),
  longest: fc.double({ min: 10, max: 120, noNaN: true }),
});

describe("designLength", () => {
  // Source: brute force. Settlement on 1,500 lengths, no use of the root finder or of any derivative.
  it("finds what a scan of all lengths finds", () => {
    fc.assert(
      fc.property(tasks, (n) => {
        const found = design(n);
        const count = 1500;
        const lengths = Array.from({ length: count + 1 }, (_, i) => n.shortest * (n.longest / n.shortest) ** (i / count));
        const first = lengths.findIndex((length) => settlement(n, length) <= n.allowable);
        if (first < 0) {
          // between two scanned lengths the greatest stiffness may still reach what is needed, by a hair
          if (found.allowable) expect(settlement(n, found.length) / n.allowable).toBeCloseTo(1, 6);
          else expect(found.length).toBe(n.longest);
          return;
        }
        expect(found.allowable).toBe(true);
        expect(found.length).toBeLessThanOrEqual(lengths[first] * (1 + 1e-9));
        expect(found.length).toBeGreaterThanOrEqual(lengths[Math.max(first - 1, 0)] * (1 - 1e-9));
        expect(settlement(n, found.length)).toBeLessThanOrEqual(n.allowable * (1 + 1e-8));
      }),
      { seed: 2, numRuns: 200, endOnFailure: true },
    );
  });

  it("meets the allowable settlement exactly between its limits", () => {
    const { length, allowable } = design();
    expect(allowable).toBe(true);
    expect(length).toBeGreaterThan(3);
    expect(Math.abs(settlement(usual, length) / 0.025 - 1)).toBeLessThan(1e-9);
  });

  it("grows with the load", () => {
    fc.assert(
      fc.property(tasks, fc.double({ min: 1, max: 3, noNaN: true }), (n, factor) => {
        expect(design({ ...n, load: n.load * factor }).length).toBeGreaterThanOrEqual(design(n).length * (1 - 1e-9));
      }),
      { seed: 3, numRuns: 300 },
    );
  });

  it("does not change when load and all stiffnesses grow by one factor", () => {
    fc.assert(
      fc.property(tasks, fc.constantFrom(0.125, 2, 1024), (n, factor) => {
        const scaled = design({ ...n, load: n.load * factor, soilModulus: n.soilModulus * factor, pileModulus: n.pileModulus * factor });
        expect(Math.abs(scaled.length / design(n).length - 1)).toBeLessThan(1e-9);
      }),
      { seed: 4, numRuns: 300 },
    );
  });

  it("takes the shortest length where that is enough", () => expect(design({ load: 10 })).toEqual({ length: 3, allowable: true }));
  it("flags the longest length where that is not enough", () => expect(design({ load: 1e5 })).toEqual({ length: 25, allowable: false }));
  it("takes the shortest length without a load", () => expect(design({ load: 0 })).toEqual({ length: 3, allowable: true }));

  describe("a compressible pile in stiff ground, where stiffness falls again beyond some length", () => {
    const slender = { ...usual, soilModulus: 3e5, longest: 100 };
    const lengths = Array.from({ length: 2000 }, (_, i) => 3 + (97 * i) / 1999);
    const best = Math.min(...lengths.map((length) => settlement({ ...slender, load: 1 }, length)));
    const atLongest = settlement({ ...slender, load: 1 }, 100);

    it("has its greatest stiffness inside the range", () => expect(best).toBeLessThan(atLongest * 0.98));
    it("finds the rising side although the longest length is too soft", () => {
      const load = (slender.allowable / (best + atLongest)) * 2;
      const { length, allowable } = design({ ...slender, load });
      expect(allowable).toBe(true);
      expect(Math.abs(settlement({ ...slender, load }, length) / slender.allowable - 1)).toBeLessThan(1e-9);
      expect(settlement({ ...slender, load }, length * 0.99)).toBeGreaterThan(slender.allowable);
    });
    it("finds the greatest stiffness to a hair", () => {
      const load = (slender.allowable / best) * (1 - 1e-9);
      expect(design({ ...slender, load }).allowable).toBe(true);
    });
    it("flags a load that no length can carry", () => expect(design({ ...slender, load: (slender.allowable / best) * 1.001 })).toEqual({ length: 100, allowable: false }));
  });

  describe("with a length step", () => {
    const free = design().length;
    it.each([0.25, 0.5, 1, 3])("rounds up to the next multiple of %s m above the shortest", (step) => {
      const { length, allowable } = design({ step });
      expect(allowable).toBe(true);
      expect((length - 3) / step).toBeCloseTo(Math.round((length - 3) / step), 9);
      expect(length).toBeGreaterThanOrEqual(free);
      expect(length - free).toBeLessThan(step);
    });
    it("does not add a step to a length that is a multiple already", () => {
      // some of these roots end a rounding error above the multiple, some below
      for (let k = 1; k < 40; k++) {
        const load = (1000 * 0.025) / settlement(usual, 3 + 0.5 * k);
        expect(design({ load, step: 0.5 }).length).toBeCloseTo(3 + 0.5 * k, 8);
      }
    });
    it("stops at the longest length", () => expect(design({ step: 7, longest: free + 0.1 }).length).toBe(free + 0.1));
    it("says so where rounding up passes the greatest stiffness", () => {
      // 11 m is stiffest in this ground; 93 m, the only multiple in range, settles 18 % more
      const stiff = { ...usual, soilModulus: 3e5, longest: 100, step: 90 };
      const load = 0.95 * (0.025 / settlement({ ...stiff, load: 1 }, 11));
      expect(design({ ...stiff, load })).toEqual({ length: 93, allowable: false });
      expect(design({ ...stiff, load, step: 0.5 }).allowable).toBe(true);
    });
  });

  it.each([
    ["a negative load", { load: -1 }],
    ["no diameter", { diameter: 0 }],
    ["no soil modulus", { soilModulus: 0 }],
    ["an infinite soil modulus", { soilModulus: Infinity }],
    ["no pile modulus", { pileModulus: 0 }],
    ["no allowable settlement", { allowable: 0 }],
    ["Poisson's ratio above a half", { poisson: 0.6 }],
    ["a longest length below the shortest", { longest: 2 }],
    ["a negative step", { step: -1 }],
    ["a shortest length below about a diameter", { shortest: 0.3 }],
    ["a load that is no number", { load: NaN }],
  ])("refuses %s", (_, changes) => expect(() => design(changes)).toThrow(DomainError));
});
