import { expect, it } from "vitest";
import { lnStiffnessAt, neededLogLength } from "../../../src/engine/simulation/stiffness-curve.js";

const logLengths = Float64Array.from({ length: 9 }, (_, k) => Math.log(4) + 0.2 * k);
const at = (f: (x: number) => number): Float64Array => Float64Array.from(logLengths, f);
/** A cubic in ln length, which interpolation reproduces. */
const cubic = (x: number): number => 8 + 0.7 * x - 0.05 * (x - 2) ** 3;
const two = Float64Array.of(...at(() => 0), ...at(cubic));

it("lnStiffnessAt reads the curve of its pile", () => {
  expect(lnStiffnessAt(logLengths, two, 1, 2.03)).toBeCloseTo(cubic(2.03), 12);
  expect(lnStiffnessAt(logLengths, two, 0, 2.03)).toBeCloseTo(0, 12);
});

// Inverse of the cubic: the needed stiffness is its own value.
it.each([1.5, 1.91, 2.4, 2.8])("neededLogLength finds the length of stiffness at ln length %d", (x) => {
  expect(neededLogLength(logLengths, two, 1, logLengths[0], logLengths[8], cubic(x))).toBeCloseTo(x, 6);
});

it("neededLogLength ends at the limits", () => {
  expect(neededLogLength(logLengths, two, 1, logLengths[0], logLengths[8], 0)).toBe(logLengths[0]);
  expect(neededLogLength(logLengths, two, 1, 1.7, logLengths[8], 0)).toBe(1.7);
  expect(neededLogLength(logLengths, two, 1, logLengths[0], logLengths[8], cubic(logLengths[8]) + 1e-9)).toBe(Infinity);
  expect(neededLogLength(logLengths, two, 1, logLengths[0], 2.2, cubic(2.21))).toBe(Infinity);
  expect(neededLogLength(logLengths, two, 1, logLengths[0], 2.2, cubic(2.19))).toBeCloseTo(2.19, 6);
});

it("neededLogLength looks at no length before the first", () => {
  // Stiff enough at 4 m, too soft from there to 6.6 m: what lies before the start is not built.
  const dips = at((x) => (x < 1.5 ? 12 : 8 + x));
  expect(neededLogLength(logLengths, dips, 0, 1.75, logLengths[8], 10.5)).toBeCloseTo(2.5, 3);
});

it("neededLogLength takes the first of several lengths", () => {
  const dips = at((x) => (x < 2 ? 9 + x : 8 + x));
  const found = neededLogLength(logLengths, dips, 0, logLengths[0], logLengths[8], 10.8);
  expect(found).toBeGreaterThan(1.7);
  expect(found).toBeLessThan(2);
});
