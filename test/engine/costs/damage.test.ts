import { describe, expect, it } from "vitest";
import { damageShare, type DamagePoint } from "../../../src/engine/costs/damage.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";

// Invented shares at published distortions: see test/published/angular-distortion.test.ts for the distortions.
const damage: DamagePoint[] = [
  { distortion: 1 / 500, share: 0 },
  { distortion: 1 / 300, share: 0.1 },
  { distortion: 1 / 150, share: 1 },
];

describe("damageShare", () => {
  // By hand: straight lines between the points.
  it("is nothing below the first point, straight between, level beyond the last", () => {
    expect(damageShare(damage, 0)).toBe(0);
    expect(damageShare(damage, 1 / 501)).toBe(0);
    expect(damageShare(damage, (1 / 500 + 1 / 300) / 2)).toBeCloseTo(0.05, 14);
    expect(damageShare(damage, 0.005)).toBeCloseTo(0.55, 14); // halfway between 1/300 and 1/150
    expect(damageShare(damage, 1)).toBe(1);
    expect(damageShare(damage, Infinity)).toBe(1);
  });

  it("meets its points exactly", () => {
    for (const { distortion, share } of damage) expect(damageShare(damage, distortion)).toBe(share);
  });

  it("may begin with a step and may be a single point", () => {
    const step = [{ distortion: 0.004, share: 0.3 }];
    expect(damageShare(step, 0.00399)).toBe(0);
    expect(damageShare(step, 0.004)).toBe(0.3);
    expect(damageShare(step, 0.1)).toBe(0.3);
  });

  it("refuses an empty list and distortions that are none", () => {
    expect(() => damageShare([], 0.001)).toThrow(DomainError);
    expect(() => damageShare(damage, -1e-9)).toThrow(DomainError);
    expect(() => damageShare(damage, Number.NaN)).toThrow(DomainError);
  });
});
