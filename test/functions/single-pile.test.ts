import { describe, expect, it } from "vitest";
import { callFunction } from "../../src/functions/registry.js";
import { refusal } from "./refusal.js";

const settlement = (...args: unknown[]): number => callFunction("SETTLEMENT", args) as number;

/**
 * Head settlement by another route than the closed form: the load-transfer equation E A w'' = 2 pi G w / zeta with the base of a rigid punch,
 * integrated upwards from the base by classical Runge-Kutta. zeta = ln(2.5 (1 - nu) L / r0) and the base stiffness 4 r0 G / (1 - nu) are those of
 * Randolph & Wroth (1978), ASCE JGED 104 GT12 (formulas from memory; their printed worked sheet confirms zeta, head settlement and base share).
 */
function byIntegration(load: number, length: number, diameter: number, soil: number, pile: number, nu: number): number {
  const radius = diameter / 2;
  const shear = soil / (2 * (1 + nu));
  const axial = pile * Math.PI * radius ** 2;
  const shaft = (2 * Math.PI * shear) / Math.log((2.5 * (1 - nu) * length) / radius);
  const steps = 4000;
  const h = length / steps;
  let w = 1;
  let force = (4 * radius * shear) / (1 - nu);
  for (let k = 0; k < steps; k++) {
    const w1 = force / axial, f1 = shaft * w;
    const w2 = (force + (h / 2) * f1) / axial, f2 = shaft * (w + (h / 2) * w1);
    const w3 = (force + (h / 2) * f2) / axial, f3 = shaft * (w + (h / 2) * w2);
    const w4 = (force + h * f3) / axial, f4 = shaft * (w + h * w3);
    w += (h / 6) * (w1 + 2 * w2 + 2 * w3 + w4);
    force += (h / 6) * (f1 + 2 * f2 + 2 * f3 + f4);
  }
  return (load / force) * w;
}

describe("SETTLEMENT", () => {
  it.each([
    [1000, 10, 0.5, 8, 30, 0.3],
    [4000, 13, 1.5, 35, 30, 0.2], // the printed sheet's pile and load on ground of its average modulus, its stiffer base left out
    [300, 25, 0.3, 3, 210, 0.49],
    [750, 40, 0.6, 60, 25, 0],
  ])("of %d kN on %d m x %f m in %d MPa, pile %d GPa, ratio %f agrees with integrating the load transfer", (load, length, diameter, soil, pile, nu) => {
    const metres = byIntegration(load, length, diameter, soil * 1000, pile * 1e6, nu);
    expect(Math.abs(settlement(load, length, diameter, soil, pile, nu) / (1000 * metres) - 1)).toBeLessThan(1e-9); // both are exact but for rounding and h^4
  });

  it("of a rigid pile is load over shaft plus base stiffness", () => {
    // Randolph & Wroth (1978) rigid pile, from memory: P / (G r0 w) = 4 / (1 - nu) + 2 pi L / (zeta r0)
    const [load, length, diameter, soil, nu] = [1000, 10, 0.5, 8, 0.3];
    const shear = (soil * 1000) / (2 * (1 + nu));
    const zeta = Math.log((2.5 * (1 - nu) * length) / 0.25);
    const rigid = (1000 * load) / (shear * 0.25 * (4 / (1 - nu) + (2 * Math.PI * length) / (zeta * 0.25)));
    expect(Math.abs(settlement(load, length, diameter, soil, 1e7, nu) / rigid - 1)).toBeLessThan(1e-5);
  });

  it("takes 0.3 for Poisson's ratio when none is given", () => {
    expect(settlement(1000, 10, 0.5, 8, 30)).toBe(settlement(1000, 10, 0.5, 8, 30, 0.3));
    expect(settlement(1000, 10, 0.5, 8, 30, null)).toBe(settlement(1000, 10, 0.5, 8, 30, 0.3));
  });

  it("is proportional to the load and unchanged in form when load and both moduli grow together", () => {
    const once = settlement(1000, 10, 0.5, 8, 30);
    expect(settlement(3000, 10, 0.5, 8, 30)).toBeCloseTo(3 * once, 10);
    expect(settlement(3000, 10, 0.5, 24, 90)).toBeCloseTo(once, 10);
  });
});

describe("DESIGNLENGTH", () => {
  it.each([
    [1000, 0.5, 8, 30, 25],
    [850, 0.5, 8, 30, 25],
    [2000, 0.9, 30, 30, 10],
  ])("for %d kN is the length that settles just the allowable amount", (load, diameter, soil, pile, allowable) => {
    const length = callFunction("DESIGNLENGTH", [load, diameter, soil, pile, allowable]) as number;
    expect(length).toBeGreaterThan(3);
    expect(Math.abs(settlement(load, length, diameter, soil, pile) / allowable - 1)).toBeLessThan(1e-6);
  });

  it("is the shortest considered where that is enough, 3 m unless another is given", () => {
    expect(callFunction("DESIGNLENGTH", [10, 0.5, 50, 30, 25])).toBe(3);
    expect(callFunction("DESIGNLENGTH", [10, 0.5, 50, 30, 25, 0.3, 7.5])).toBe(7.5);
  });

  it("gives no length, and says so, where even the longest settles too much", () => {
    expect(refusal(() => callFunction("DESIGNLENGTH", [1000, 0.5, 8, 30, 25, null, 3, 6]))).toEqual(["#N/A", "No pile from 3 to 6 m settles 25 mm or less under this load."]);
    expect(refusal(() => callFunction("DESIGNLENGTH", [50_000, 0.5, 8, 30, 25]))).toEqual(["#N/A", "No pile from 3 to 60 m settles 25 mm or less under this load."]);
  });
});

describe("refusals of the single pile", () => {
  it.each([
    ["SETTLEMENT", [0, 10, 0.5, 8, 30], "Load is 0; it must be a load above 0 kN."],
    ["SETTLEMENT", [1000, 10, 0.5, "8 MPa", 30], 'Soil modulus is "8 MPa", which is text; it must be a Young\'s modulus above 0 MPa.'],
    ["SETTLEMENT", [1000, 10, 0.5, 8], "Pile modulus is blank; it must be a Young's modulus above 0 GPa."],
    ["SETTLEMENT", [1000, 10, 0.5, 8, 30, 0.5], "Poisson's ratio is 0.5; it must be a ratio from 0 to below 0.5."],
    ["SETTLEMENT", [1000, 10, -0.5, 8, 30], "Diameter is -0.5; it must be a diameter above 0 m."],
    ["DESIGNLENGTH", [1000, 0.5, 8, 30, 0], "Allowable settlement is 0; it must be a settlement above 0 mm."],
    ["DESIGNLENGTH", [1000, 0.5, 8, 30, 25, 0.3, 9, 6], "Longest length is 6 m, below the shortest of 9 m."],
    ["DESIGNLENGTH", [1000, 0.5, "#DIV/0!", 30, 25], "Soil modulus holds the error #DIV/0!; clear that error first."],
  ])("%s%j", (id, args, sentence) => {
    expect(refusal(() => callFunction(id, args))).toEqual(["#VALUE!", sentence]);
  });

  it("speaks in words about a pile that is wider than the formula can bear", () => {
    const [code, sentence] = refusal(() => callFunction("SETTLEMENT", [1000, 0.1, 2, 8, 30]));
    expect(code).toBe("#VALUE!");
    expect(sentence).toMatch(/length|Length/);
    expect(sentence).not.toContain("Something went wrong");
  });
});
