import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { lnDesignValue } from "../../../src/engine/simulation/design-value.js";
import type { DesignRuleName } from "../../../src/engine/investigation/design-rule.js";

const of = (name: DesignRuleName, readings: readonly number[], deviations = 0.5): number => Math.exp(lnDesignValue({ name, deviations, update: false }, Float64Array.from(readings, Math.log)));

describe("lnDesignValue", () => {
  // Source: by hand. Readings 1, 2, 4, 8: mean 3.75; harmonic 4 / (1 + 1/2 + 1/4 + 1/8) = 32/15; inclusive lower quartile 1 + 0.75 (2 - 1) = 1.75;
  // logs 0, 1, 2, 3 times ln 2: mean 1.5, standard deviation root(5/3).
  it.each([
    ["geometric", 2 ** 1.5],
    ["arithmetic", 3.75],
    ["harmonic", 32 / 15],
    ["quartile", 1.75],
    ["lessdeviations", 2 ** (1.5 - 0.5 * Math.sqrt(5 / 3))],
  ] as const)("%s of 1, 2, 4, 8", (name, expected) => {
    expect(of(name, [8, 1, 4, 2]) / expected).toBeCloseTo(1, 12);
  });

  it.each(["geometric", "arithmetic", "harmonic", "quartile"] as const)("%s of one reading is that reading", (name) => expect(of(name, [7])).toBeCloseTo(7, 12));

  // Identity: a design value is a modulus.
  it.each(["geometric", "arithmetic", "harmonic", "quartile", "lessdeviations"] as const)("%s scales with the readings, however large", (name) => {
    const readings = [3, 9, 1, 5, 5, 2];
    expect(of(name, readings.map((r) => r * 1e200)) / of(name, readings) / 1e200).toBeCloseTo(1, 9);
  });

  it("refuses deviations of a single reading", () => expect(() => of("lessdeviations", [7])).toThrow(DomainError));
});
