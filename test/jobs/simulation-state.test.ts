import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { base64Of, figuresOf } from "../../src/jobs/base-64.js";
import { inputsHash } from "../../src/jobs/inputs-hash.js";
import { sha256 } from "../../src/jobs/sha-256.js";
import { loadState, requireState, saveState, StateError, type SimulationState } from "../../src/jobs/simulation-state.js";
import { stateOfText, stateText } from "../../src/jobs/state-text.js";
import { PRODUCT_VERSION } from "../../src/results/index.js";
import { smallTask } from "./small-site.js";

// Figures that a text form is likely to lose: the smallest and largest, a sign of zero, a tenth, all bits of the fraction.
const HARD = Float64Array.of(5e-324, 1.7976931348623157e308, -0, 0.1, -Math.PI, 1 + 2 ** -52);
const LABELS = { units: "SI", money: "EUR" } as const;

function state(): SimulationState {
  return saveState(smallTask(), { elements: [{ from: 0, count: 2, values: HARD }, { from: 5, count: 1, values: HARD.slice(3) }], form: [{ from: 0, count: 3, values: HARD }] }, LABELS);
}

describe("hashes", () => {
  // Source: NIST, FIPS 180-4 examples (from memory), and Node's own implementation for every length about the block's edges.
  it("are SHA-256", () => {
    expect(sha256(new TextEncoder().encode("abc"))).toBe("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
    for (const length of [0, 1, 55, 56, 63, 64, 65, 119, 120, 1000, 100_003]) {
      const bytes = Uint8Array.from({ length }, (_, k) => (k * 131 + 7) & 255);
      expect(sha256(bytes)).toBe(createHash("sha256").update(bytes).digest("hex"));
    }
  });

  it("of inputs know every value and no order of properties", () => {
    const task = smallTask();
    expect(inputsHash(task)).toMatch(/^[0-9a-f]{16}$/);
    expect(inputsHash({ seed: task.seed, counts: task.counts, variants: task.variants, left: undefined } as typeof task)).toBe(inputsHash(task));
    const others = [smallTask({ Seed: 12 }), smallTask({ "Stiffness COV": 0.66 }), smallTask({ "Price per hole": 651 }), { ...task, counts: [0, 1] }, smallTask({ "Group interaction": "on" }), { ...task, counts: [1, 0, 3] }];
    expect(new Set([task, ...others].map(inputsHash)).size).toBe(others.length + 1);
    // text and number, list and nesting stay apart
    expect(new Set([["1"], [1], [[1]], { 0: 1 }, null, "null", [], [null]].map(inputsHash)).size).toBe(8);
  });
});

describe("a saved run", () => {
  it("keeps every bit through a structured clone and through text", () => {
    const kept = loadState(structuredClone(state()), smallTask());
    const read = loadState(stateOfText(stateText(state())), smallTask());
    for (const rows of [kept, read]) {
      expect(rows.elements.map(({ from, count }) => [from, count])).toEqual([[0, 2], [5, 1]]);
      expect(new BigUint64Array(rows.elements[0].values.slice().buffer)).toEqual(new BigUint64Array(HARD.slice().buffer));
      expect(rows.form[0].values).toEqual(HARD);
    }
    expect(stateOfText(stateText(state()))).toEqual(state());
    const long = Float64Array.from({ length: 30_001 }, (_, k) => Math.sin(k));
    expect(figuresOf(base64Of(long))).toEqual(long);
    // the least significant byte first: 1 is 0x3ff0000000000000
    expect(Buffer.from(base64Of(Float64Array.of(1)), "base64").toString("hex")).toBe("000000000000f03f");
  });

  it("is refused for other inputs, with both names", () => {
    const other = smallTask({ "Price per hole": 651 });
    const message = `The saved run belongs to other inputs (${inputsHash(smallTask())}; those of now are ${inputsHash(other)}), so its realisations cannot be used; start anew, or take back what was changed.`;
    expect(() => loadState(state(), other)).toThrow(new StateError(message));
  });

  it("is refused when another version made it, also one whose form is not known", () => {
    const message = `The saved run was made by version 0.0.9 and this is version ${PRODUCT_VERSION}, whose realisations are not the same; start anew, or finish it with the other version.`;
    expect(() => loadState({ ...state(), version: "0.0.9" }, smallTask())).toThrow(new StateError(message));
    expect(() => stateOfText(stateText({ ...state(), version: "0.0.9" }))).toThrow(new StateError(message));
  });

  it("is refused when its realisations are those of older arithmetic", () => {
    const message = `The saved run was made by another build of version ${PRODUCT_VERSION}, whose realisations differ from those of this one in their last digits or in how they are kept; start anew, or finish it with that build.`;
    for (const format of [1, 3, undefined]) expect(() => requireState({ ...state(), format })).toThrow(new StateError(message));
    expect(() => stateOfText(stateText({ ...state(), format: 1 as never }))).toThrow(new StateError(message));
  });

  it("is refused cut short at any place, or with one sign changed", () => {
    const text = stateText(state());
    for (let length = 1; length < text.length - 1; length += 97) expect(() => stateOfText(text.slice(0, length)), `cut at ${length}`).toThrow(StateError);
    const places = [20, text.indexOf('"values":"') + 30, text.length - 10];
    for (const at of places) expect(() => stateOfText(text.slice(0, at) + (text[at] === "A" ? "B" : "A") + text.slice(at + 1))).toThrow(/^The saved run is damaged or cut short/);
  });

  it.each([
    ["nothing", undefined],
    ["text", "seed"],
    ["another object", { format: 1 }],
  ])("is refused when it is %s", (_, found) => {
    expect(() => requireState(found)).toThrow(new StateError("This is no saved simulation."));
  });

  it.each([
    ["rows that are no list", { elements: {} }],
    ["rows without figures", { form: [{ from: 0, count: 1 }] }],
    ["a count that does not divide them", { form: [{ from: 0, count: 4, values: HARD }] }],
    ["a negative index", { elements: [{ from: -1, count: 2, values: HARD }] }],
    ["a task that is not the hash's", { task: smallTask({ Seed: 12 }) }],
  ])("is refused with %s", (_, change) => {
    expect(() => requireState({ ...state(), ...change })).toThrow(/^The saved run is damaged or cut short/);
  });

  it("is no state where the text is another file", () => {
    for (const text of ["", "label,value\nSeed,1\n", "{}", '{"a":1}\nsum 1\n']) expect(() => stateOfText(text)).toThrow(new StateError("This is no saved simulation."));
  });
});
