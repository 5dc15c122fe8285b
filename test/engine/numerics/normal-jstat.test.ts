import jstat from "jstat";
import { expect, it } from "vitest";
import { normalDensity, normalDistribution, normalQuantile } from "../../../src/engine/numerics/normal.js";

// Another implementation by other hands: jstat 1.9.6, good to 1e-7 between the chances 1e-9 and 1 - 1e-9, which bounds the tolerance.
const { normal } = jstat.jStat;

it("the normal law agrees with another implementation of it", () => {
  for (let x = -5.9; x <= 5.9; x += 0.07) {
    expect(Math.abs(normalDistribution(x) / normal.cdf(x, 0, 1) - 1)).toBeLessThan(2e-7);
    expect(Math.abs(normalDensity(x) / normal.pdf(x, 0, 1) - 1)).toBeLessThan(1e-12);
  }
});

it("its quantile agrees too", () => {
  for (const p of [1e-9, 1e-6, 1e-3, 0.05, 0.25, 0.5 + 1e-6, 0.75, 0.95, 0.999, 1 - 1e-6]) {
    expect(Math.abs(normalQuantile(p) - normal.inv(p, 0, 1))).toBeLessThan(2e-7);
  }
});
