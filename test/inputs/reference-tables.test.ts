import { describe, expect, it } from "vitest";
import { GROUND_KINDS, METHODS } from "../../src/inputs/index.js";

// Source: Kulhawy & Trautmann (1996), Estimation of in-situ test uncertainty, ASCE GSP 58, 269-286, table of COVs in percent (from memory):
// [method, equipment, procedure, random, total as printed]. Our split must give the printed total back: random and hole part, root of squares.
const PRINTED: readonly [string, number, number, number, number][] = [
  ["Electric cone", 3, 5, 5, 7],
  ["Mechanical cone", 5, 10, 10, 15],
  ["Field vane", 5, 8, 10, 14],
  ["Flat dilatometer", 5, 5, 8, 11],
  ["Pressuremeter", 5, 12, 10, 16],
  ["Self-boring pressuremeter", 8, 15, 8, 19],
];

describe("the method table", () => {
  it.each(PRINTED)("%s has the printed parts", (name, equipment, procedure, random, total) => {
    const method = METHODS.find((row) => row.name === name)!;
    expect(method.readingCov).toBeCloseTo(random / 100, 10);
    expect(Math.abs(method.holeCov - Math.hypot(equipment, procedure) / 100)).toBeLessThan(0.0005001); // rounded to three decimals
    expect(Math.abs(100 * Math.hypot(method.readingCov, method.holeCov) - total)).toBeLessThan(0.8); // the printed total of the electric cone is cut, not rounded
  });

  it("gives the standard penetration test the middle of its recommended range", () => {
    // Source: as above: random 12 to 15 %, recommended total 15 to 45 % (from memory)
    const spt = METHODS.find(({ also }) => also.includes("spt"))!;
    expect(spt.readingCov).toBeCloseTo((0.12 + 0.15) / 2, 10);
    expect(Math.hypot(spt.readingCov, spt.holeCov)).toBeCloseTo((0.15 + 0.45) / 2, 3);
  });

  it("takes transformation and laboratory error from their tables", () => {
    // Source: Phoon & Kulhawy (1999), Can. Geotech. J. 36 (from memory): cone resistance to undrained strength 35 %; E_D from N in silt 40 to 60 %;
    // strength in triaxial compression, laboratory error 8 to 38 %, mean 19 %
    const of = (name: string) => METHODS.find((row) => row.name === name)!;
    expect([of("Electric cone").methodCov, of("Mechanical cone").methodCov]).toEqual([0.35, 0.35]);
    expect(of("Standard penetration test").methodCov).toBe((0.4 + 0.6) / 2);
    expect(of("Samples and triaxial tests").readingCov).toBe(0.19);
  });

  it("says in each row where its numbers come from, and marks what is from memory or common practice", () => {
    for (const { name, source, readingSpacing, also } of METHODS) {
      expect([name, /from memory/.test(source), /common practice/.test(source)]).toEqual([name, true, true]);
      expect(readingSpacing).toBeGreaterThan(0);
      expect(also.every((word) => word === word.toLowerCase())).toBe(true);
    }
    const spellings = METHODS.flatMap(({ name, also }) => [name.toLowerCase(), ...also]);
    expect(new Set(spellings).size).toBe(spellings.length);
  });
});

describe("the kinds of ground", () => {
  // Source: Phoon & Kulhawy (1999a), tables of scales of fluctuation and of inherent variability (from memory)
  it("have the published scales and COVs", () => {
    const of = (name: string) => GROUND_KINDS.find((row) => row.name === name)!;
    for (const clay of ["Soft clay", "Firm clay", "Stiff clay"]) {
      expect(of(clay)).toMatchObject({ verticalScale: { low: 0.8, typical: 2.5, high: 6.1 }, horizontalScale: { low: 46, typical: 50.7, high: 60 }, cov: { low: 0.06, typical: 0.32, high: 0.8 } });
    }
    for (const sand of ["Loose sand", "Medium dense sand", "Dense sand"]) {
      expect(of(sand)).toMatchObject({ verticalScale: { low: 0.1, typical: 0.9, high: 2.2 }, horizontalScale: { low: 3, typical: 47.9, high: 80 }, cov: { low: 0.28, typical: 0.42, high: 0.68 } });
    }
    expect(of("Silt").cov).toEqual({ low: 0.07, typical: 0.36, high: 0.67 });
  });

  it("grow stiffer in the order in which they are listed, and mark what is common practice", () => {
    const typical = (names: string[]) => names.map((name) => GROUND_KINDS.find((row) => row.name === name)!.stiffness.typical);
    for (const row of [typical(["Soft clay", "Firm clay", "Stiff clay"]), typical(["Loose sand", "Medium dense sand", "Dense sand"])]) expect([...row].sort((a, b) => a - b)).toEqual(row);
    for (const { name, source, ...ranges } of GROUND_KINDS) {
      expect([name, /common practice/.test(source)]).toEqual([name, true]);
      for (const { low, typical: middle, high } of Object.values(ranges)) expect(low < middle && middle < high).toBe(true);
    }
  });
});
