import { describe, expect, it } from "vitest";
import { damageShare, type DamagePoint } from "../../src/engine/costs/damage.js";

// Sources: EN 1997-1 Annex H: 1/500 acceptable for many structures, about 1/150 likely to be an ultimate limit state. Skempton &
// MacDonald (1956), Proc. ICE, and Bjerrum (1963), ECSMFE Wiesbaden (from memory): 1/500 safe against cracking, 1/300 first cracking of
// panel walls, 1/150 structural damage. The shares of the building's value between these are the demonstration's own.
const damage: DamagePoint[] = [
  { distortion: 1 / 500, share: 0 },
  { distortion: 1 / 300, share: 0.1 },
  { distortion: 1 / 150, share: 1 },
];

describe("published limits of angular distortion", () => {
  it.each([1 / 2000, 1 / 750, 1 / 600, 1 / 500])("cost nothing where cracking is not expected, %d", (distortion) => expect(damageShare(damage, distortion)).toBe(0));

  it("cost something from first cracking and everything from structural damage", () => {
    expect(damageShare(damage, 1 / 300)).toBe(0.1);
    expect(damageShare(damage, 1 / 299)).toBeGreaterThan(0.1);
    expect(damageShare(damage, 1 / 250)).toBeCloseTo(0.1 + 0.9 * ((1 / 250 - 1 / 300) / (1 / 150 - 1 / 300)), 12);
    expect(damageShare(damage, 1 / 150)).toBe(1);
    expect(damageShare(damage, 1 / 100)).toBe(1);
  });
});
