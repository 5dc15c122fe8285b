import { describe, expect, it } from "vitest";
import { KILOGRAMS_PER_POUND, METRES_PER_FOOT, METRES_PER_INCH, NEWTONS_PER_KILOGRAM_FORCE, NEWTONS_PER_POUND_FORCE } from "../../src/units/factors.js";
import { readUnit, toInner } from "../../src/units/read-unit.js";
import type { UnitKind } from "../../src/units/unit-table.js";

// Independent of the code: the definitions as whole numbers (foot 3048e-4 m, pound 45359237e-8 kg, gravity 980665e-5 m/s2), multiplied
// exactly with BigInt and rounded once at the end.
const exact = (numerator: bigint, denominator: bigint): number => Number((numerator * 10n ** 40n) / denominator) / 1e40;
const POUND_FORCE = 45359237n * 980665n; // e-13 N

describe("the exact factors", () => {
  it("are those of their definitions", () => {
    expect(METRES_PER_FOOT).toBe(3048 / 10000);
    expect(METRES_PER_INCH).toBe(254 / 10000);
    expect(KILOGRAMS_PER_POUND).toBe(45359237 / 1e8);
    expect(NEWTONS_PER_KILOGRAM_FORCE).toBe(980665 / 1e5);
    expect(NEWTONS_PER_POUND_FORCE).toBe(Number(POUND_FORCE) / 1e13);
  });
});

// Source: NIST Special Publication 811 (2008), Appendix B.8, factors as printed to seven figures (from memory). One printed unit in the
// last place is 1e-7 to 1e-6 of the value, and half of it is the tolerance. [kind, unit, printed factor to SI, SI value of our inner unit]
const PRINTED: readonly [UnitKind, string, number, number][] = [
  ["length", "ft", 0.3048, 1],
  ["length", "in", 0.0254, 1],
  ["force", "lbf", 4.448222, 1000],
  ["force", "kip", 4448.222, 1000],
  ["force", "tonf", 8896.443, 1000],
  ["force", "tf", 9806.65, 1000],
  ["pressure", "psi", 6894.757, 1000],
  ["pressure", "ksi", 6894757, 1000],
  ["pressure", "psf", 47.88026, 1000],
  ["massPerVolume", "lb/ft3", 16.01846, 1],
  ["massPerVolume", "lb/yd3", 0.5932764, 1],
];

describe.each(PRINTED)("%s in %s", (kind, unit, printed, inner) => {
  it(`is ${printed} in SI, as printed`, () => {
    expect(Math.abs((toInner(1, readUnit(unit, kind)!) * inner) / printed - 1)).toBeLessThan(5e-7);
  });
});

// Source: the definitions, by exact arithmetic. Double rounding costs at most three units in the last place, 7e-16.
const DERIVED: readonly [UnitKind, string, number][] = [
  ["force", "kip", exact(POUND_FORCE, 10n ** 13n)],
  ["force", "tonf US", exact(2n * POUND_FORCE, 10n ** 13n)],
  ["force", "tonf UK", exact(224n * POUND_FORCE, 10n ** 15n)],
  ["force", "tf", exact(980665n, 10n ** 5n)],
  ["pressure", "psf", exact(POUND_FORCE * 10n ** 8n, 10n ** 16n * 3048n ** 2n)],
  ["pressure", "ksf", exact(POUND_FORCE * 10n ** 8n, 10n ** 13n * 3048n ** 2n)],
  ["pressure", "tsf", exact(2n * POUND_FORCE * 10n ** 8n, 10n ** 13n * 3048n ** 2n)],
  ["pressure", "psi", exact(POUND_FORCE * 10n ** 8n, 10n ** 16n * 254n ** 2n)],
  ["pressure", "ksi", exact(POUND_FORCE * 10n ** 8n, 10n ** 13n * 254n ** 2n)],
  ["pressurePerLength", "psf/ft", exact(POUND_FORCE * 10n ** 12n, 10n ** 16n * 3048n ** 3n)],
  ["pressurePerLength", "tsf/m", exact(2n * POUND_FORCE * 10n ** 8n, 10n ** 13n * 3048n ** 2n)],
  ["pressurePerLength", "psi/ft", exact(POUND_FORCE * 10n ** 12n, 10n ** 16n * 254n ** 2n * 3048n)],
  ["massPerVolume", "lb/ft3", exact(45359237n * 10n ** 12n, 10n ** 8n * 3048n ** 3n)],
  ["massPerVolume", "lb/yd3", exact(45359237n * 10n ** 12n, 27n * 10n ** 8n * 3048n ** 3n)],
];

describe.each(DERIVED)("%s in %s", (kind, unit, value) => {
  it("follows from the definitions to the last figures", () => {
    expect(Math.abs(toInner(1, readUnit(unit, kind)!) / value - 1)).toBeLessThan(7e-16);
  });
});

describe("powers of ten", () => {
  // Source: definition of the prefixes. Exactly equal, so that 9 mm and 0.009 m are one and the same site; 9 x 0.001 would be 0.009000000000000001.
  it.each<[UnitKind, string, number, number]>([
    ["length", "mm", 9, 0.009], ["length", "mm", 35, 0.035], ["length", "cm", 35, 0.35], ["pressure", "Pa", 9, 0.009], ["pressure", "MPa", 12.3, 12300],
    ["pressure", "GPa", 30, 30e6], ["force", "N", 9, 0.009], ["force", "MN", 1.5, 1500], ["ratio", "%", 35, 0.35],
    ["pressurePerLength", "MPa/m", 0.7, 700], ["pressurePerLength", "kPa/m", 500, 500], ["massPerVolume", "t/m3", 0.25, 250],
  ])("%s in %s: %s is %s", (kind, unit, written, inner) => {
    expect(toInner(written, readUnit(unit, kind)!)).toBe(inner);
  });
});
