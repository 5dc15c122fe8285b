import { describe, expect, it } from "vitest";
import { CATALOGUE, parseSite } from "../../src/inputs/index.js";
import { DEMONSTRATION_VALUES } from "../../src/inputs/demonstration.js";
import { add, checkOf, put, refusalOf, SMALL, without, type Row } from "./block.js";

const layered = add(without(SMALL, "Mean stiffness"), ["Layer list"], [0, 6, 0, 0.4]);

describe("pairs of a formula", () => {
  it("replace inputs, whatever their case and spaces, and leave the block as it was", () => {
    const before = parseSite(SMALL).problem;
    const { problem } = parseSite(SMALL, ["stiffness  cov", 0.4, "HOLE DEPTH", 20, "Length rule", "one"]);
    expect(problem).toEqual({
      ...before,
      ground: { ...before.ground, layers: [{ ...before.ground.layers[0]!, cov: 0.4 }] },
      investigation: { ...before.investigation, holeDepth: 20 },
      piles: { ...before.piles, lengthRule: "one" },
    });
    expect(parseSite(SMALL).problem).toEqual(before);
  });

  it("are in the unit of the block's own row, else in that of the catalogue", () => {
    const rows = put(put(SMALL, "Mean stiffness", 160, "ksf"), "Stiffness COV", 60, "%");
    // Source: 1 ksf = 47.880 258 980 kPa (NIST SP 811, Appendix B, by its exact definitions)
    expect(parseSite(rows, ["Mean stiffness", 100]).problem.ground.layers[0]!.mean).toBeCloseTo(4788.0258980, 6);
    expect(parseSite(rows, ["Stiffness COV", 40]).problem.ground.layers[0]!.cov).toBe(0.4);
    expect(parseSite(rows, ["Pile modulus", 25]).problem.piles.modulus).toBe(25e6);
    expect(parseSite(put(SMALL, "Price per metre of pile", 100, "EUR/ft"), ["Price per metre of pile", 30.48]).problem.prices.perPileMetre).toBeCloseTo(100, 12);
    expect(parseSite(add(SMALL, ["Pile modulus", "default", "ksi"]), ["Pile modulus", 4000]).problem.piles.modulus).toBeCloseTo(27579029.17, 1);
  });

  it("may bring an input that the block lacks, a deliberate zero, or the default", () => {
    expect(parseSite(without(SMALL, "Hole depth"), ["Hole depth", 12]).problem.investigation.holeDepth).toBe(12);
    expect(parseSite(SMALL, ["Price per hole", "none"]).problem.prices.perHole).toBe(0);
    expect(parseSite(SMALL, ["Regional COV", 0]).problem.ground.regionalCov).toBe(0);
    expect(parseSite(add(SMALL, ["Pile modulus", 20, "GPa"]), ["Pile modulus", "default"]).problem.piles.modulus).toBe(30e6);
  });

  it("may come as ranges of one cell, and left empty at the end", () => {
    const { problem } = parseSite(SMALL, ["Stiffness COV", 0.4]);
    expect(parseSite(SMALL, [[["Stiffness COV"]], [[0.4]]]).problem).toEqual(problem);
    expect(parseSite(SMALL, [["Stiffness COV", 0.4]]).problem).toEqual(problem);
    expect(parseSite(SMALL, ["Stiffness COV", 0.4, null, null]).problem).toEqual(problem);
    expect(parseSite(SMALL, [null]).problem).toEqual(parseSite(SMALL).problem);
    expect(parseSite(SMALL, []).problem).toEqual(parseSite(SMALL).problem);
  });

  it("that name another method set the block's own COVs and spacing aside", () => {
    const rows = add(SMALL, ["Method", "SPT"], ["Hole COV", 0.2], ["Reading spacing", 1, "m"]);
    expect(parseSite(rows, ["Method", "Vane"]).problem.investigation).toMatchObject({ readingCov: 0.1, holeCov: 0.094, methodCov: 0.4, readingSpacing: 1 });
    expect(parseSite(rows, ["Method", "CPT"]).problem.investigation).toMatchObject({ readingCov: 0.05, holeCov: 0.058, methodCov: 0.35, readingSpacing: 0.5 });
    expect(parseSite(rows, ["Method", "spt"]).problem.investigation).toMatchObject({ holeCov: 0.2, readingSpacing: 1 });
    expect(parseSite(rows, ["Method", "CPT", "Hole COV", 0.3]).problem.investigation.holeCov).toBe(0.3);
    expect(checkOf(rows, "Hole COV", ["Method", "CPT", "Hole COV", 0.3])).toMatchObject({ value: 0.3, verdict: "replaced by the formula (the block says 0.2)" });
    expect(checkOf(rows, "Hole COV", ["Method", "CPT"])).toMatchObject({ verdict: "set aside: the formula puts another method in place of the block's" });
  });

  it("are told in the check rows", () => {
    expect(checkOf(SMALL, "Stiffness COV", ["Stiffness COV", 0.4])).toEqual({ label: "Stiffness COV", value: 0.4, unit: "", verdict: "replaced by the formula (the block says 0.6)", ok: true, row: 3 });
    expect(checkOf(SMALL, "Pile modulus", ["Pile modulus", 25])).toMatchObject({ value: 25, unit: "GPa", row: undefined });
    expect(checkOf(SMALL, "Pile modulus", ["Pile modulus", 25]).verdict).toMatch(/^replaced by the formula/);
  });
});

describe("pairs that cannot be used", () => {
  it.each<[string, readonly Row[], unknown[], string]>([
    ["odd number", SMALL, ["Stiffness COV", 0.4, "Hole depth"], "The formula ends with 3 cells of label, value pairs; each label needs one value after it, so their number must be even."],
    ["a label alone", SMALL, ["Stiffness COV"], "The formula ends with 1 cell of label, value pairs; each label needs one value after it, so their number must be even."],
    ["unknown label", SMALL, ["Stifness COV", 0.4], 'The label of pair 1 of the formula is "Stifness COV", which is not a known label; is "Stiffness COV" meant?'],
    ["unknown label, nothing near", SMALL, ["Hole depth", 12, "Xyzzy", 0.4], 'The label of pair 2 of the formula is "Xyzzy", which is not a known label; the check rows list all labels.'],
    ["blank label", SMALL, [0, 0.4], "The label of pair 1 of the formula is blank."],
    ["number for a label", SMALL, [0.4, "Stiffness COV"], 'The label of pair 1 of the formula is 0.4; the name of an input is needed, such as "Stiffness COV" or "Hole depth".'],
    ["error for a label", SMALL, ["#N/A", 0.4], 'The label of pair 1 of the formula is "#N/A"; the name of an input is needed, such as "Stiffness COV" or "Hole depth".'],
    ["twice", SMALL, ["Hole depth", 12, "hole depth", 13], "Hole depth (pair 2 of the formula) is replaced twice in the same formula."],
    ["a list", SMALL, ["Pile list", 12], "Pile list (pair 1 of the formula) is a list; only inputs of one value can be replaced by a formula."],
    ["blank value", SMALL, ["Stiffness COV", null], "Stiffness COV (pair 1 of the formula) is blank or zero; write a number, or the word none for a deliberate zero."],
    ["number stored as text", SMALL, ["Stiffness COV", "0.4"], 'Stiffness COV (pair 1 of the formula) is "0.4", a number stored as text; type it again in a cell of number format.'],
    ["error", SMALL, ["Stiffness COV", "#N/A"], "Stiffness COV (pair 1 of the formula) is the error #N/A; a number is needed."],
    ["out of range", SMALL, ["Mean stiffness", -1], "Mean stiffness (pair 1 of the formula) is -1 MPa; it must be from 0.05 MPa to 20000 MPa."],
    ["two inputs at odds", SMALL, ["Longest length", 2], "Longest length (pair 1 of the formula) is 2 m, less than Shortest length (row 17 of the site block) of 3 m."],
    ["depth against a default", SMALL, ["Hole depth", 0.5, "Method", "SPT"], "Hole depth (pair 1 of the formula) is 0.5 m, less than Reading spacing (its default) of 1.5 m: no hole would have a reading."],
    ["no effect: the rule", SMALL, ["Deviations below mean", 1], "Deviations below mean (pair 1 of the formula) changes nothing: it belongs to the design rule mean less deviations, which is not in force."],
    ["no effect: layers", layered, ["Mean stiffness", 9], "Mean stiffness (pair 1 of the formula) changes nothing: Layer list (row 24 of the site block) takes its place."],
    ["no effect: COV of layers", layered, ["Stiffness COV", 0.9], "Stiffness COV (pair 1 of the formula) changes nothing: each layer of the layer list has its own COV."],
  ])("%s", (_, rows, pairs, sentence) => {
    expect(refusalOf(rows, pairs)).toBe(sentence);
  });
});

describe("every input of one value", () => {
  // a pair with the value that the demonstration writes must be taken by each of them
  it.each(CATALOGUE.filter(({ kind }) => kind !== "list").map((entry) => [entry.label, entry] as const))("%s can be replaced", (label, { id }) => {
    const value = DEMONSTRATION_VALUES[id]!.value;
    const rows = id === "deviationsBelowMean" ? add(SMALL, ["Design rule", "mean less deviations"]) : SMALL;
    expect(checkOf(rows, label, [label, value]).ok).toBe(true);
    expect(() => parseSite(rows, [label, value])).not.toThrow();
  });
});
