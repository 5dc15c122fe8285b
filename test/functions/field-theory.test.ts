import { describe, expect, it } from "vitest";
import { callFunction } from "../../src/functions/registry.js";
import { refusal } from "./refusal.js";

// Closed forms from memory: Vanmarcke (1983), Random Fields; Fenton & Griffiths (2008), Risk Assessment in Geotechnical Engineering, ch. 3.
// Values computed from those forms with scipy 1.17.1 and checked there by numerical integration to the six decimals given.
// Columns: averaging length over scale of fluctuation, then gamma for the models in this order.
const MODELS = ["markov", "gaussian", "triangular", "spherical", "markov2"];
const GAMMA: readonly (readonly [ratio: number, ...gamma: number[]])[] = [
  [0.1, 0.936538, 0.994797, 0.966667, 0.962521, 0.988602],
  [0.5, 0.735759, 0.887096, 0.833333, 0.815137, 0.838338],
  [1, 0.567668, 0.683257, 0.666667, 0.646094, 0.641026],
  [2, 0.377289, 0.420423, 0.416667, 0.411111, 0.406365],
  [10, 0.095, 0.096817, 0.096667, 0.096444, 0.09625],
  [20, 0.04875, 0.049204, 0.049167, 0.049111, 0.049062],
  [100, 0.00995, 0.009968, 0.009967, 0.009964, 0.009963],
];

describe("VARIANCEFACTOR", () => {
  it.each(GAMMA)("at %f scales meets the computed values of every model to their six decimals", (ratio, ...values) => {
    const scale = 2.5;
    MODELS.forEach((model, k) => {
      expect(Math.abs((callFunction("VARIANCEFACTOR", [ratio * scale, scale, model]) as number) - values[k])).toBeLessThan(0.51e-6);
    });
  });

  it("is the Markov model when no model is named, and 1 for no length", () => {
    // (1 + exp(-2)) / 2, the Markov form at a length of one scale
    for (const model of [undefined, null, "", 0]) expect(callFunction("VARIANCEFACTOR", [4, 4, model])).toBeCloseTo((1 + Math.exp(-2)) / 2, 12);
    expect(callFunction("VARIANCEFACTOR", [0, 4])).toBe(1);
  });
});

describe("CORRELATION", () => {
  // The models' own definitions with their scale of fluctuation (same books, from memory), at lag 0.6 m and scale 2 m
  it.each([
    ["markov", Math.exp(-0.6)],
    ["ellipsoidal", Math.exp(-0.6)],
    ["separable Markov", Math.exp(-0.6)],
    ["gaussian", Math.exp(-Math.PI * 0.09)],
    ["spherical", 1 - 1.5 * 0.225 + 0.5 * 0.225 ** 3], // range 4/3 of the scale: 0.6 / (8/3) = 0.225
    ["triangular", 1 - 0.3],
    ["Second-order Markov", 2.2 * Math.exp(-1.2)],
  ])("follows the definition of %s", (model, value) => {
    expect(callFunction("CORRELATION", [0.6, 2, model])).toBeCloseTo(value, 12);
    expect(callFunction("CORRELATION", [-0.6, 2, model])).toBeCloseTo(value, 12); // a distance has no direction
  });

  it("falls to zero far away without leaving the range from 0 to 1", () => {
    for (const model of MODELS) expect(callFunction("CORRELATION", [1e6, 2, model])).toBe(0);
    expect(callFunction("CORRELATION", [0, 2])).toBe(1);
  });
});

describe("refusals of field theory", () => {
  it.each([
    ["VARIANCEFACTOR", [-1, 4], "Length is -1; it must be a length of 0 m or more."],
    ["VARIANCEFACTOR", [1, 0], "Scale is 0; it must be a scale of fluctuation above 0 m."],
    ["VARIANCEFACTOR", [1, null], "Scale is blank; it must be a scale of fluctuation above 0 m."],
    ["VARIANCEFACTOR", ["4 m", 2], 'Length is "4 m", which is text; it must be a length of 0 m or more.'],
    ["CORRELATION", [1, -2], "Scale is -2; it must be a scale of fluctuation above 0 m."],
    ["CORRELATION", [1, 2, "linear"], 'Model is "linear"; it must be one of markov, ellipsoidal, gaussian, spherical, markov2, triangular.'],
    ["CORRELATION", ["#REF!", 2], "Lag holds the error #REF!; clear that error first."],
  ])("%s%j", (id, args, sentence) => {
    expect(refusal(() => callFunction(id, args))).toEqual(["#VALUE!", sentence]);
  });
});
