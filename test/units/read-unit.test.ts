import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { commonUnits, fromInner, isTonOfNoStatedSize, kindInWords, readUnit, toInner } from "../../src/units/read-unit.js";
import { UNITS, type UnitKind } from "../../src/units/unit-table.js";

describe.each(UNITS.map((unit) => [unit.symbol, unit] as const))("the unit %s", (symbol, unit) => {
  it("is found by its symbol in any case and with any spaces", () => {
    for (const text of [symbol, symbol.toUpperCase(), symbol.toLowerCase(), ` ${symbol} `, symbol.replace("/", " / "), symbol.replace("/", " per ")]) {
      expect(readUnit(text, unit.kind)).toBe(unit);
    }
  });

  it("is found by each of its other spellings", () => {
    for (const spelling of unit.spellings) expect(readUnit(spelling, unit.kind)).toBe(unit);
  });

  it("gives back what it took, to a unit in the last place of each step", () => {
    fc.assert(fc.property(fc.double({ min: 1e-6, max: 1e9, noNaN: true }), (value) => Math.abs(fromInner(toInner(value, unit), unit) / value - 1) < 1e-15));
  });
});

describe("the table of units", () => {
  it("names no spelling twice within a kind", () => {
    const seen = new Map<string, string>();
    for (const { kind, symbol, spellings } of UNITS) {
      for (const spelling of new Set([symbol.toLowerCase().replace(/\s/g, ""), ...spellings])) {
        const key = `${kind} ${spelling}`;
        expect([key, seen.get(key)]).toEqual([key, undefined]);
        seen.set(key, symbol);
      }
    }
  });

  it("offers the usual units first and only those of the kind", () => {
    expect(commonUnits("length").map(({ symbol }) => symbol)).toEqual(["m", "mm", "cm", "ft", "in"]);
    expect(commonUnits("force").map(({ symbol }) => symbol)).toEqual(["kN", "MN", "N", "kip", "lbf", "tonf US", "tonf UK", "tf"]);
    expect(commonUnits("pressurePerLength").map(({ symbol }) => symbol)).toEqual(["kPa/m", "MPa/m", "psf/ft", "ksf/ft", "tsf/ft"]);
    expect(commonUnits("number")).toEqual([]);
  });
});

describe("reading a unit", () => {
  it.each<[string, UnitKind, string]>([
    ["kN/m²", "pressure", "kPa"], ["MN/m^2", "pressure", "MPa"], ["N per mm2", "pressure", "MPa"], ["lb/ft²", "pressure", "psf"],
    ["feet", "length", "ft"], ["″", "length", "in"], ["Metres", "length", "m"], ["kN/m2/m", "pressurePerLength", "kPa/m"],
    ["MPa per metre", "pressurePerLength", "MPa/m"], ["kgCO2e/m³", "massPerVolume", "kg/m3"], ["kg CO2 eq per m3", "massPerVolume", "kg/m3"],
    ["tonf", "force", "tonf US"], ["tonf (metric)", "force", "tf"], ["kips", "force", "kip"], ["percent", "ratio", "%"], ["d", "days", "days"],
  ])("takes %s as %s: %s", (text, kind, symbol) => {
    expect(readUnit(text, kind)?.symbol).toBe(symbol);
  });

  it("refuses a unit of another kind, and says what it measures", () => {
    expect(readUnit("kN", "pressure")).toBeUndefined();
    expect(readUnit("MPa", "pressurePerLength")).toBeUndefined();
    expect(readUnit("m", "number")).toBeUndefined();
    expect(readUnit("piles", "number")?.symbol).toBe("");
    expect([kindInWords("kN"), kindInWords("ksf"), kindInWords("psf/ft"), kindInWords("furlong")]).toEqual(["a force", "a stiffness or pressure", "a stiffness per depth", undefined]);
  });

  it("guesses no ton", () => {
    for (const ton of ["t", "ton", "Tons", "tonne", "tonnes"]) expect([readUnit(ton, "force"), isTonOfNoStatedSize(ton)]).toEqual([undefined, true]);
    expect(isTonOfNoStatedSize("tonf")).toBe(false);
  });

  it("answers any text, and never takes a long one", () => {
    const kinds: UnitKind[] = ["length", "pressure", "force", "pressurePerLength", "ratio", "days", "massPerVolume", "number"];
    fc.assert(fc.property(fc.string({ unit: "binary", maxLength: 200 }), fc.constantFrom(...kinds), (text, kind) => {
      const unit = readUnit(text, kind);
      return unit === undefined || (unit.kind === kind && Number.isFinite(toInner(1, unit)));
    }));
    expect(readUnit(`m${" ".repeat(100)}`, "length")).toBeUndefined();
    expect(["constructor", "__proto__", "toString"].map((text) => readUnit(text, "length"))).toEqual([undefined, undefined, undefined]);
  });
});
