import { describe, expect, it } from "vitest";
import { designLength } from "../../../src/engine/piles/design-length.js";
import { profileDesign } from "../../../src/engine/piles/profile-design.js";
import { randolphWroth } from "../../../src/engine/piles/randolph-wroth.js";
import { pileResponse } from "../../../src/engine/piles/pile-stiffness.js";
import { kilonewtons, kilopascals, metres } from "../../../src/units/quantities.js";

const pile = { diameter: metres(0.6), pileModulus: kilopascals(30e6), poisson: 0.3, shortest: metres(4), longest: metres(28) };
const allowable = metres(0.025);

describe("design length in ground that changes with depth", () => {
  // Identity: in uniform ground the layered form is the uniform one, solved there by another method.
  it.each([400, 900, 1500])("agrees with the uniform design under %d kN", (load) => {
    const layered = profileDesign({ ...pile, shape: () => 1 })(kilonewtons(load), 9000, allowable, metres(0));
    const uniform = designLength({ ...pile, load: kilonewtons(load), soilModulus: kilopascals(9000), allowable });
    expect(layered.allowable).toBe(uniform.allowable);
    expect(Math.abs(layered.length - uniform.length)).toBeLessThan(1e-3);
  });

  // Closed form: Randolph & Wroth with stiffness growing linearly (rho = average over tip), evaluated at the answer, gives the allowable settlement.
  it("settles as allowed at the answer where stiffness grows with depth", () => {
    const shape = (z: number): number => 1 + 0.2 * z;
    const { length } = profileDesign({ ...pile, shape })(kilonewtons(1800), 4000, allowable, metres(0));
    expect(length).toBeGreaterThan(4);
    const tip = shape(length);
    const { stiffness } = randolphWroth({
      length, radius: metres(0.3), baseRatio: 1, tipShearModulus: (4000 * tip) / 2.6, averageRatio: (1 + 0.1 * length) / tip,
      baseStiffnessRatio: tip / (1 + 0.2 * (length + 0.6)), poisson: 0.3, pileModulus: 30e6,
    });
    expect(Math.abs((1800 / stiffness / 0.025) - 1)).toBeLessThan(1e-4);
  });

  // Independent method: finite elements in the same profile. The closed form is known to agree within about a tenth (common practice).
  it.each([
    ["stiffening", (z: number) => 1 + 0.2 * z],
    ["two layers", (z: number) => (z < 6 ? 1 : 3)],
  ])("predicts within 15 %% of finite elements: %s", (_, shape) => {
    const { length } = profileDesign({ ...pile, shape })(kilonewtons(1500), 5000, allowable, metres(0));
    const response = pileResponse({ diameter: pile.diameter, pileModulus: pile.pileModulus, poissonRatio: 0.3, length }, (z) => kilopascals(5000 * shape(z)), { withForm: false });
    expect(Math.abs(1500 / Math.exp(response.lnStiffness) / 0.025 - 1)).toBeLessThan(0.15);
  });

  // Independent method: finite elements. A short pile whose tip just stands in a far stiffer layer has a radius of influence near or inside
  // its shaft by the published form, which then made it ten times too stiff or refused it; the form is up to 1.6 times stiff for stubby piles.
  it.each([8, 20, 60, 300])("takes no short pile for rigid because its tip stands in a layer %i times as stiff", (times) => {
    const shape = (z: number): number => (z < 1.8 ? 1 : times);
    const stubby = { diameter: metres(1), pileModulus: kilopascals(30e6), poisson: 0.3, shortest: metres(2), longest: metres(2.2) };
    const { lnStiffness } = pileResponse({ diameter: stubby.diameter, pileModulus: stubby.pileModulus, poissonRatio: 0.3, length: stubby.shortest }, (z) => kilopascals(5000 * shape(z)), { withForm: false });
    const settlement = 1000 / Math.exp(lnStiffness);
    const design = profileDesign({ ...stubby, shape });
    expect(design(kilonewtons(1000), 5000, metres(settlement), metres(0))).toEqual({ length: 2, allowable: true });
    const half = design(kilonewtons(1000), 5000, metres(settlement / 2), metres(0));
    expect(half.allowable && half.length === 2).toBe(false);
  });

  it("rounds up to the step and says when nothing is enough", () => {
    const design = profileDesign({ ...pile, shape: (z) => 1 + 0.05 * z });
    const free = design(kilonewtons(1500), 8000, allowable, metres(0)).length;
    const stepped = design(kilonewtons(1500), 8000, allowable, metres(0.5)).length;
    expect(stepped).toBeGreaterThanOrEqual(free - 1e-3);
    expect(stepped - free).toBeLessThan(0.5 + 1e-3);
    expect((stepped - 4) / 0.5).toBeCloseTo(Math.round((stepped - 4) / 0.5), 9);
    expect(design(kilonewtons(9000), 3000, allowable, metres(0))).toEqual({ length: 28, allowable: false });
  });

  /** Whether a length is enough, asked of a design that may not be shorter. */
  const isEnough = (shape: (z: number) => number, load: number, length: number): boolean => {
    const found = profileDesign({ ...pile, shortest: metres(length), longest: metres(length * 1.1), shape })(kilonewtons(load), 5000, allowable, metres(0));
    return found.allowable && found.length === length;
  };

  // Hand-made: stiff between 8 and 8.6 m, very soft below: a pile that ends above the stiff layer or in it is enough, one that ends in the
  // soft ground only when it is far longer.
  it("takes no step that leads out of the ground that made a shorter pile enough", () => {
    const shape = (z: number): number => (z >= 8.6 ? 0.1 : z > 8 ? 20 : 1);
    expect(profileDesign({ ...pile, shape })(kilonewtons(900), 5000, allowable, metres(0)).length).toBeLessThan(8);
    const { length } = profileDesign({ ...pile, shape })(kilonewtons(900), 5000, allowable, metres(2.5));
    const steps = [6.5, 9, 11.5, 14, 16.5, 19, 21.5, 24].map((step) => [step, isEnough(shape, 900, step)]);
    expect(steps.find(([, enough]) => enough)).toEqual([length, true]);
    expect(length).toBeGreaterThan(9);
  });

  // Hand-made: a stiff metre over hardly any ground at all: enough from about 7.5 m to 8 m and nowhere else, and of whole steps never.
  it("finds the only stretch of lengths that is enough, and says when every step misses it", () => {
    const shape = (z: number): number => (z >= 9 ? 0.02 : z > 8 ? 3 : 1);
    const design = profileDesign({ ...pile, shape });
    const found = design(kilonewtons(900), 5000, allowable, metres(0));
    expect(found.allowable).toBe(true);
    expect([found.length - 0.3, found.length - 0.01, found.length + 0.01, 9, 15, 27].map((length) => isEnough(shape, 900, length))).toEqual([false, false, true, false, false, false]);
    expect(design(kilonewtons(900), 5000, allowable, metres(2.5))).toEqual({ length: 28, allowable: false });
  });

  it("tries the last stretch up to the longest length", () => {
    const shape = (z: number): number => 1 + 0.05 * z;
    const { length } = profileDesign({ ...pile, shape })(kilonewtons(1500), 8000, allowable, metres(0));
    const close = profileDesign({ ...pile, longest: metres(length + 0.02), shape })(kilonewtons(1500), 8000, allowable, metres(0));
    expect(close.allowable).toBe(true);
    expect(Math.abs(close.length - length)).toBeLessThan(2e-3);
  });
});
