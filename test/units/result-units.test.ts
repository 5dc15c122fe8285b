import { describe, expect, it } from "vitest";
import { resultIn, resultUnit } from "../../src/units/result-units.js";

describe("results on their way out", () => {
  // Source: 1 ft = 0.3048 m, 1 in = 25.4 mm, 1 lb = 0.453 592 37 kg, exact (NIST SP 811, Appendix B)
  it("come in US customary units by the exact factors", () => {
    expect(resultIn(3.048, "length", "US")).toBe(10);
    expect(resultIn(0.0254, "settlement", "US")).toBe(1);
    expect(resultIn(45.359237, "mass", "US")).toBeCloseTo(100, 12);
    expect([resultUnit("length", "US"), resultUnit("settlement", "US"), resultUnit("mass", "US")]).toEqual(["ft", "in", "lb"]);
  });

  it("come in SI as they are, settlements in mm", () => {
    expect(resultIn(12.34, "length", "SI")).toBe(12.34);
    expect(resultIn(0.025, "settlement", "SI")).toBe(25);
    expect(resultIn(99.5, "mass", "SI")).toBe(99.5);
    expect([resultUnit("length", "SI"), resultUnit("settlement", "SI"), resultUnit("mass", "SI")]).toEqual(["m", "mm", "kg"]);
  });
});
