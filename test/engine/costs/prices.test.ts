import { describe, expect, it } from "vitest";
import { concreteCarbon, foundationCost, investigationCost, type Prices } from "../../../src/engine/costs/prices.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";

// Invented prices, each a different power of two, so that a price left out, doubled or swapped shows in the sum.
const prices: Prices = {
  mobilisation: 1, perHole: 2, perHoleMetre: 4, perReading: 8, report: 16, daysPerHole: 32, waitingDay: 64, rig: 128, perPile: 256, perPileMetre: 512, carbonPerCubicMetre: 1024,
};

describe("investigationCost", () => {
  // By hand: 1 + 16 once; a hole of 3 m with 5 readings is 2 + 4 x 3 + 8 x 5 + 32 x 64 = 2102.
  it("adds what is paid once and what each hole costs", () => {
    expect(investigationCost(prices, 1, 3, 5)).toBe(17 + 2102);
    expect(investigationCost(prices, 7, 3, 5)).toBe(17 + 7 * 2102);
  });

  it("is nothing for no hole", () => {
    expect(investigationCost(prices, 0, 3, 5)).toBe(0);
  });

  it("refuses parts of a hole and lengths that are none", () => {
    for (const count of [-1, 1.5, Number.NaN]) expect(() => investigationCost(prices, count, 3, 5)).toThrow(DomainError);
    expect(() => investigationCost(prices, 1, -3, 5)).toThrow(DomainError);
    expect(() => investigationCost(prices, 1, 3, Number.NaN)).toThrow(DomainError);
  });
});

describe("foundationCost", () => {
  // By hand: 128 + 9 x 256 + 81.5 x 512.
  it("adds the rig, the piles and the metres", () => {
    expect(foundationCost(prices, 9, 81.5)).toBe(128 + 2304 + 41728);
    expect(foundationCost(prices, 0, 0)).toBe(0);
  });

  it("refuses parts of a pile and metres that are none", () => {
    expect(() => foundationCost(prices, 1.5, 1)).toThrow(DomainError);
    expect(() => foundationCost(prices, 1, -1)).toThrow(DomainError);
    expect(() => foundationCost(prices, 1, Infinity)).toThrow(DomainError);
  });
});

describe("concreteCarbon", () => {
  // By hand: a solid cylinder of 2 m and 10 m holds 31.4159 cubic metres.
  it("is the carbon of a solid cylinder", () => {
    expect(concreteCarbon(prices, 2, 10)).toBeCloseTo(1024 * 31.41592653589793, 9);
    expect(concreteCarbon(prices, 0.5, 0)).toBe(0);
  });

  it("refuses a pile without a diameter", () => {
    for (const diameter of [0, -1, Number.NaN]) expect(() => concreteCarbon(prices, diameter, 1)).toThrow(DomainError);
    expect(() => concreteCarbon(prices, 1, Number.NaN)).toThrow(DomainError);
  });
});
