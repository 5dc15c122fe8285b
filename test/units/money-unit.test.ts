import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { pricesPerMetre, readMoneyUnit } from "../../src/units/money-unit.js";

describe("a money unit", () => {
  it.each([
    ["EUR", "EUR", ""], ["  us dollars ", "us dollars", ""], ["£/m", "£", "m"], ["USD per ft", "USD", "ft"], ["per m", "", "m"],
    ["GBP each", "GBP", ""], ["EUR / day", "EUR", "day"], ["", "", ""], ["Persian rial", "Persian rial", ""],
  ])("%s is %s for each %s", (text, currency, per) => {
    expect(readMoneyUnit(text)).toEqual({ currency, per });
  });

  it.each(["MPa", "m", "kN/m", "1000 EUR", "EUR 000", "%", "x".repeat(61)])("%s is not money", (text) => {
    expect(readMoneyUnit(text)).toBeUndefined();
  });

  it("has a price per metre: a price per foot is 1/0.3048 of it", () => {
    // Source: 1 ft = 0.3048 m exactly (NIST SP 811, Appendix B); 30.48 money per ft is 100 money per m
    expect(pricesPerMetre("m")).toBe(1);
    expect(pricesPerMetre("")).toBe(1);
    expect(30.48 * pricesPerMetre("feet")!).toBeCloseTo(100, 12);
    expect([pricesPerMetre("mm"), pricesPerMetre("day"), pricesPerMetre("kN")]).toEqual([undefined, undefined, undefined]);
  });

  it("answers any text", () => {
    fc.assert(fc.property(fc.string({ unit: "binary", maxLength: 100 }), (text) => {
      const unit = readMoneyUnit(text);
      return unit === undefined || (unit.currency.length <= 200 && !/\d/.test(unit.currency));
    }));
  });
});
