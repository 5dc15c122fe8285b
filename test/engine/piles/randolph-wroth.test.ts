import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { randolphWroth, randolphWrothSettlement } from "../../../src/engine/piles/randolph-wroth.js";
import { kilonewtons, kilopascals, metres } from "../../../src/units/quantities.js";

const settlement = (load: number, length: number, diameter: number, soil: number, pile: number, poisson: number) =>
  randolphWrothSettlement(kilonewtons(load), metres(length), metres(diameter), kilopascals(soil), kilopascals(pile), poisson);

describe("randolphWrothSettlement", () => {
  // Source: independent method. The form's own assumptions as a boundary value problem: a column on springs of stiffness
  // 2 pi G / zeta along the shaft and 4 G r0 / (1 - nu) at the base, integrated from the base upwards by Runge-Kutta.
  it("solves the column on springs that it stands for", () => {
    const [length, radius, soil, pile, poisson] = [17, 0.3, 12e3, 25e6, 0.35];
    const shear = soil / (2 * (1 + poisson));
    const zeta = Math.log((2.5 * (1 - poisson) * length) / radius);
    const spring = (2 * Math.PI * shear) / zeta;
    const axial = pile * Math.PI * radius ** 2;
    let w = 1;
    let force = ((4 * shear * radius) / (1 - poisson)) * w;
    const steps = 400;
    const dz = length / steps;
    for (let i = 0; i < steps; i++) {
      const slope = (ww: number, ff: number) => [ff / axial, spring * ww] as const;
      const [a1, b1] = slope(w, force);
      const [a2, b2] = slope(w + (dz / 2) * a1, force + (dz / 2) * b1);
      const [a3, b3] = slope(w + (dz / 2) * a2, force + (dz / 2) * b2);
      const [a4, b4] = slope(w + dz * a3, force + dz * b3);
      w += (dz / 6) * (a1 + 2 * a2 + 2 * a3 + a4);
      force += (dz / 6) * (b1 + 2 * b2 + 2 * b3 + b4);
    }
    expect(Math.abs(settlement(force, length, 2 * radius, soil, pile, poisson) / w - 1)).toBeLessThan(1e-9);
  });

  // Source: identity, settlement is homogeneous of degree 0 in load and moduli.
  it("does not change when load and all stiffnesses grow by one factor", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 100, noNaN: true }), fc.double({ min: 3, max: 40, noNaN: true }), fc.double({ min: 1e3, max: 1e5, noNaN: true }), fc.double({ min: 0, max: 0.5, noNaN: true }), (factor, length, soil, poisson) => {
        const one = settlement(900, length, 0.5, soil, 3e7, poisson);
        const other = settlement(900 * factor, length, 0.5, soil * factor, 3e7 * factor, poisson);
        expect(Math.abs(other / one - 1)).toBeLessThan(1e-12);
      }),
      { seed: 1 },
    );
  });

  it("is zero without a load", () => expect(settlement(0, 10, 0.5, 8e3, 3e7, 0.3)).toBe(0));

  const good = [1000, 10, 0.5, 8e3, 3e7, 0.3] as const;
  it.each([
    ["a negative load", 0, -1],
    ["an infinite load", 0, Infinity],
    ["no length", 1, 0],
    ["a length below the reach of the form", 1, 0.1],
    ["no diameter", 2, 0],
    ["no soil modulus", 3, 0],
    ["a soil modulus that is no number", 3, NaN],
    ["no pile modulus", 4, 0],
    ["a negative Poisson's ratio", 5, -0.1],
    ["Poisson's ratio above a half", 5, 0.51],
  ])("refuses %s", (_, index, value) => {
    const bad = [...good] as number[];
    bad[index] = value;
    expect(() => settlement(bad[0], bad[1], bad[2], bad[3], bad[4], bad[5])).toThrow(DomainError);
  });
});

describe("randolphWroth", () => {
  const pile = { length: metres(10), radius: metres(0.25), baseRatio: 1, tipShearModulus: 3e3, averageRatio: 1, baseStiffnessRatio: 1, poisson: 0.3, pileModulus: 3e7 };
  it.each([["baseRatio"], ["averageRatio"], ["baseStiffnessRatio"]] as const)("refuses a %s of zero", (key) => {
    expect(() => randolphWroth({ ...pile, [key]: 0 })).toThrow(DomainError);
  });
  // Source: the same paper's rigid limit, P / (G r0 w) = 4 eta / ((1 - nu) xi) + 2 pi rho L / (zeta r0).
  it("tends to the rigid pile", () => {
    const { stiffness, zeta } = randolphWroth({ ...pile, pileModulus: 3e14 });
    expect(Math.abs(stiffness / (3e3 * 0.25) / (4 / 0.7 + (2 * Math.PI * 40) / zeta) - 1)).toBeLessThan(1e-6);
  });
});
