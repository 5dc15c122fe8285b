import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { arcCosine, arcSine } from "../../../src/engine/numerics/arc-sine.js";
import { DomainError } from "../../../src/engine/numerics/domain-error.js";
import { exponential } from "../../../src/engine/numerics/exponential.js";
import { exponentialLessOne } from "../../../src/engine/numerics/exponential-less-one.js";
import { hyperbolicCosine, hyperbolicSine, hyperbolicTangent, inverseHyperbolicSine } from "../../../src/engine/numerics/hyperbolic.js";
import { hypotenuse } from "../../../src/engine/numerics/hypotenuse.js";
import { logarithm, logarithmOfOnePlus } from "../../../src/engine/numerics/logarithm.js";
import { sine } from "../../../src/engine/numerics/sine.js";
import fixture from "../../fixtures/numerics/elementary.json";

interface Family {
  readonly name: keyof typeof fixture;
  readonly of: (x: number) => number;
  /** units in the last place that an error may have */
  readonly units: number;
  /** places about which the function must rise with every double, where it is built of several formulas */
  readonly rises?: readonly number[];
  /** at which nothing comes out but exactly this */
  readonly exact: readonly (readonly [number, number])[];
}

const LN2 = Math.LN2;
const halves = [-30.5, -2.5, -1.5, -0.5, 0.5, 1.5, 2.5, 30.5].map((k) => k * LN2);
const families: readonly Family[] = [
  { name: "exponential", of: exponential, units: 0.95, rises: halves, exact: [[0, 1], [-0, 1], [NaN, NaN]] },
  {
    name: "exponentialLessOne", of: exponentialLessOne, units: 0.85, rises: [...halves, 1e-17, -1e-17],
    exact: [[0, 0], [-0, -0], [-Infinity, -1], [-40, -1], [Infinity, Infinity], [710, Infinity], [5e-324, 5e-324], [NaN, NaN]],
  },
  {
    name: "logarithm", of: logarithm, units: 0.8, rises: [0.7071067811865476, 1, 1.4142135623730951, 2.8284271247461903, 2.2250738585072014e-308],
    exact: [[1, 0], [0, -Infinity], [-0, -Infinity], [Infinity, Infinity], [-1, NaN], [-Infinity, NaN], [NaN, NaN]],
  },
  {
    name: "logarithmOfOnePlus", of: logarithmOfOnePlus, units: 0.85, rises: [0.41421356237309515, -0.2928932188134524, 1, 1e16],
    exact: [[0, 0], [-0, -0], [-1, -Infinity], [-1.5, NaN], [Infinity, Infinity], [5e-324, 5e-324], [NaN, NaN]],
  },
  { name: "sine", of: sine, units: 0.8, rises: [0.7853981633974483, -0.7853981633974483, 0.1, 6.283185307179586], exact: [[0, 0], [-0, -0], [5e-324, 5e-324]] },
  { name: "arcSine", of: arcSine, units: 0.85, rises: [0.5, -0.5, 0.9], exact: [[0, 0], [1, 1.5707963267948966], [-1, -1.5707963267948966], [1.0000000000000002, NaN], [NaN, NaN]] },
  { name: "arcCosine", of: arcCosine, units: 0.85, exact: [[1, 0], [0, 1.5707963267948966], [-1, Math.PI], [-1.0000000000000002, NaN], [NaN, NaN]] },
  { name: "hyperbolicTangent", of: hyperbolicTangent, units: 2, exact: [[0, 0], [Infinity, 1], [-Infinity, -1], [NaN, NaN]] },
  { name: "hyperbolicSine", of: hyperbolicSine, units: 1.8, rises: [20], exact: [[0, 0], [NaN, NaN]] },
  { name: "hyperbolicCosine", of: hyperbolicCosine, units: 1.4, exact: [[0, 1], [NaN, NaN]] },
  { name: "inverseHyperbolicSine", of: inverseHyperbolicSine, units: 1.5, exact: [[0, 0], [Infinity, Infinity], [-Infinity, -Infinity], [NaN, NaN]] },
];

const number = new Float64Array(1);
const bits = new BigInt64Array(number.buffer);

/** The next double away from 0. */
function next(x: number): number {
  number[0] = x;
  bits[0]++;
  return number[0];
}

/** What the last place of a number is worth. */
const lastPlace = (value: number): number => next(Math.abs(value)) - Math.abs(value);

describe.each(families)("$name", ({ name, of, units, exact }) => {
  // Source: elementary.py, 60 decimal digits.
  it(`is within ${units} units in the last place`, () => {
    const entries = fixture[name];
    const errors = entries.map(([x, value, rest]) => Math.abs(of(x) - value - rest) / lastPlace(value));
    const worst = errors.reduce((most, error, i) => (error > errors[most] ? i : most), 0);
    expect(entries.length).toBeGreaterThan(80);
    expect(errors[worst], `at ${entries[worst][0]}`).toBeLessThan(units);
    expect(errors.every((error) => error >= 0)).toBe(true);
  });

  it("has the right limits", () => {
    for (const [x, value] of exact) expect(of(x), `at ${x}`).toBe(value);
  });
});

// Root searches halve an interval until a sign changes: a step down between two formulas would lead them astray.
it.each(families.filter(({ rises }) => rises !== undefined))("$name never falls from one double to the next", ({ of, rises = [] }) => {
  for (const place of rises) {
    let x = place - 1000 * lastPlace(place);
    let before = of(x);
    for (let k = 0; k < 2000; k++) {
      const beyond = next(x);
      const after = of(beyond);
      if ((after - before) * (beyond - x) < 0) expect.fail(`${x} gives ${before}, ${beyond} gives ${after}`);
      [x, before] = [beyond, after];
    }
  }
});

// Identities: whole triples; symmetry.
it("hypotenuse knows the triples of Pythagoras", () => {
  for (const [a, b, c] of [[3, 4, 5], [5, 12, 13], [-8, 15, 17], [20, -21, 29], [0, 7, 7], [0, 0, 0]]) {
    expect(hypotenuse(a, b)).toBe(c);
    expect(hypotenuse(b, a)).toBe(c);
  }
});

it("sine refuses an angle that it could not reduce", () => {
  for (const angle of [1.1e6, -1.1e6, Infinity, NaN]) expect(() => sine(angle)).toThrow(DomainError);
});

// Pinned from our own output, beside the references above: kept realisations hold these bits, so that whoever moves one must raise the
// version of what is saved.
it("gives the digits that kept realisations were made of", () => {
  const all = families.flatMap(({ name, of }) => fixture[name].map(([x]) => of(x)));
  expect(createHash("sha256").update(new Uint8Array(Float64Array.from(all).buffer)).digest("hex")).toBe("c881398cbd9b794e8a674e4c035af6da7c4b6512e638bc5f665df3c15b1e7860");
});
