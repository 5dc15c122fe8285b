import { describe, expect, it } from "vitest";
import { exponential } from "../../../src/engine/numerics/exponential.js";
import fixture from "../../fixtures/numerics/exponential.json";

/** Step from a double above 0 to the next. */
function lastPlace(value: number): number {
  const bits = new BigInt64Array(new Float64Array([value]).buffer);
  bits[0]++;
  return new Float64Array(bits.buffer)[0] - value;
}

describe("exponential", () => {
  // Source: exponential.py, 40 decimal digits; a row's third number is what its second, rounded to a double, leaves out.
  it("is within one unit in the last place of e^x", () => {
    const errors = fixture.rows.map(([x, nearest, rest]) => Math.abs((exponential(x) - nearest) / lastPlace(nearest) - rest));
    expect(errors).toHaveLength(1083);
    expect(Math.max(...errors)).toBeLessThan(1);
    // Most are the nearest double: a slip in the last coefficients would show here first.
    expect(errors.filter((error) => error <= 0.5).length / errors.length).toBeGreaterThan(0.85);
  });

  it("stays finite above the range, is 0 below it, and knows 0", () => {
    expect(exponential(0)).toBe(1);
    expect(exponential(-0)).toBe(1);
    for (const far of [709, 1e300, Infinity]) expect(exponential(far)).toBe(exponential(708));
    for (const far of [-708.0001, -1e300, -Infinity]) expect(exponential(far)).toBe(0);
    expect(exponential(Number.NaN)).toBeNaN();
    expect(exponential(708)).toBeLessThan(Infinity);
    expect(exponential(-708)).toBeGreaterThan(0);
  });
});
