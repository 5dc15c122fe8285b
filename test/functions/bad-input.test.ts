import { describe, expect, it } from "vitest";
import { callFunction } from "../../src/functions/registry.js";
import { demonstration, rowOf, without } from "./demonstration.js";
import { refusal } from "./refusal.js";

type Block = unknown[][];

/** The demonstration with rows put below a label. */
function withRows(block: Block, label: string, ...rows: unknown[][]): Block {
  const copy = block.map((row) => [...row]);
  copy.splice(rowOf(copy, label), 0, ...rows.map((row) => [...row, "", "", "", ""].slice(0, 4)));
  return copy;
}

/** The demonstration with a list of piles in place of its grid. */
function piles(...rows: unknown[][]): Block {
  const grid = ["Piles along x", "Piles along y", "Spacing along x", "Spacing along y", "Interior load", "Edge load share", "Corner load share"];
  const bare = grid.reduce<Block>((block, label) => without(block, label), demonstration());
  const at = rowOf(bare, "Building");
  return [...bare.slice(0, at), ["Pile list", "", "", ""], ...rows.map((row) => [...row, ""]), ["", "", "", ""], ...bare.slice(at)];
}

/** What CHECK writes beside an input, or beside the whole block. */
function verdicts(block: unknown): string[] {
  return (callFunction("CHECK", [block]) as unknown[][]).map((row) => String(row[3]));
}

// Every way to spoil a block that the project promises to answer in words: the input, the row where it stands, and a word of the reason.
const SPOILED: readonly (readonly [what: string, block: () => Block, label: string, words: RegExp])[] = [
  ["a blank price", () => demonstration({ "Price per hole": "" }), "Price per hole", /blank or zero.*none/],
  ["a price of nothing at all", () => demonstration({ "Price per hole": null }), "Price per hole", /blank or zero/],
  ["a price of 0", () => demonstration({ "Price per metre of pile": 0 }), "Price per metre of pile", /blank or zero/],
  ["text in a number cell", () => demonstration({ "Mean stiffness": "soft" }), "Mean stiffness", /"soft"/],
  ["a number stored as text", () => demonstration({ "Mean stiffness": "11" }), "Mean stiffness", /"11".*text/],
  ["a truth value", () => demonstration({ "Hole depth": true }), "Hole depth", /TRUE/],
  ["an unknown label", () => demonstration().map((row) => (row[0] === "Stiffness COV" ? ["Stifness CV", ...row.slice(1)] : row)), "Stifness CV", /not a known label; is "Stiffness COV" meant/],
  ["a unit of the wrong kind", () => demonstration().map((row) => (row[0] === "Hole depth" ? ["Hole depth", 24, "kPa", ""] : row)), "Hole depth", /kPa/],
  ["a negative COV", () => demonstration({ "Stiffness COV": -0.3 }), "Stiffness COV", /-0\.3/],
  ["an absurd COV", () => demonstration({ "Stiffness COV": 60 }), "Stiffness COV", /60/],
  ["a footprint of zero", () => demonstration({ "Footprint length": 0 }), "Footprint length", /zero/],
  ["an error value as text", () => demonstration({ "Building value": "#DIV/0!" }), "Building value", /error #DIV\/0!/],
  ["an error value as Excel's error object", () => demonstration({ "Building value": { code: "#N/A", message: "" } }), "Building value", /error #N\/A/],
  ["an error value as a data type", () => demonstration({ "Building value": { type: "Error", basicValue: "#REF!" } }), "Building value", /error #REF!/],
  ["an error value among the damage rows", () => withRows(demonstration(), "Damage list", ["#NAME?", 0.1]), "#NAME?", /#NAME\?/],
  ["an input given twice", () => withRows(demonstration(), "Stiffness COV", ["Stiffness COV", 0.5]), "Stiffness COV", /twice/],
];

describe("a spoiled site block", () => {
  it.each(SPOILED)("with %s gives #VALUE! with a sentence that names input and row, and CHECK says the same", (_, make, label, words) => {
    const block = make();
    const [code, sentence] = refusal(() => callFunction("TOTALCOST", [block, 3]));
    expect(code).toBe("#VALUE!");
    expect(sentence).toMatch(words);
    expect(sentence).not.toContain("Something went wrong");
    const rows = block.flatMap((row, index) => (row[0] === label ? [index + 1] : []));
    expect(rows.some((row) => new RegExp(`\\brow ${row}\\b`, "i").test(sentence)), sentence).toBe(true);
    if (!label.startsWith("#")) expect(sentence).toContain(label);
    expect(verdicts(block)).toContain(`refused: ${sentence}`);
    expect(verdicts(block).at(-1)).toMatch(/^\d+ inputs? needs? attention$/);
  });

  it("without a required input names it", () => {
    const block = without(demonstration(), "Building value");
    const [code, sentence] = refusal(() => callFunction("TOTALCOST", [block, 3]));
    expect([code, sentence]).toEqual(["#VALUE!", expect.stringContaining("Building value")]);
    expect(verdicts(block)).toContain(`refused: ${sentence}`);
  });

  it("with two piles in one place names both rows", () => {
    const block = piles([0, 0, 1000], [6, 0, 1000], [6, 0, 900], [0, 6, 800]);
    const [code, sentence] = refusal(() => callFunction("TOTALCOST", [block, 3]));
    expect(code).toBe("#VALUE!");
    const at = rowOf(block, "Pile list");
    expect(sentence).toMatch(new RegExp(`\\b${at + 2}\\b.*\\b${at + 3}\\b`));
    expect(verdicts(block)).toContain(`refused: ${sentence}`);
  });

  it("with a single pile says that a single pile has no distortion", () => {
    const block = piles([0, 0, 1000]);
    const [code, sentence] = refusal(() => callFunction("TOTALCOST", [block, 3]));
    expect(code).toBe("#VALUE!");
    expect(sentence).toMatch(/one pile|single pile/i);
    expect(sentence).toMatch(/distortion/);
    expect(verdicts(block)).toContain(`refused: ${sentence}`);
  });

  it("that is one cell, bare or as a range, is no block", () => {
    for (const block of ["Site", [["Site"]], 0, null, undefined, "#REF!", [[{ code: "#N/A" }]]]) {
      const [code, sentence] = refusal(() => callFunction("TOTALCOST", [block, 3]));
      expect([code, sentence]).toEqual(["#VALUE!", expect.stringContaining("The site block is one cell")]);
      expect(verdicts(block)).toContain(`refused: ${sentence}`);
    }
  });

  it.each([
    ["four whole columns", () => Array.from({ length: 1_048_576 }, () => ["", "", "", ""])],
    ["one whole column", () => Array.from({ length: 1_048_576 }, () => [0])],
    ["10,000 rows of inputs", () => Array.from({ length: 10_000 }, (_, k) => demonstration()[k % 80])],
    ["10,000 rows below the demonstration", () => [...demonstration(), ...Array.from({ length: 10_000 }, () => ["", "", "", ""])]],
  ])("of %s is answered within a second", (_, make) => {
    const block = make();
    const start = performance.now();
    const [code, sentence] = refusal(() => callFunction("TOTALCOST", [block, 3]));
    expect(performance.now() - start).toBeLessThan(1000);
    expect([code, sentence]).toEqual(["#VALUE!", expect.stringMatching(/site block has [\d,]+ (rows|column)|one column/)]);
    expect(verdicts(block)).toContain(`refused: ${sentence}`);
  });
});

describe("a spoiled count", () => {
  it.each([
    [2.5, /2\.5.*whole number/],
    [-1, /-1.*negative/],
    [61, /61.*at most 60/],
    [1e308, /at most 60/],
    ["three", /"three"/],
    ["3", /"3"/],
    ["", /missing/],
    ["#N/A", /#N\/A/],
    [true, /TRUE/],
    [[[1, 2]], /range|cells/],
  ])("%j is answered in words by every function that takes one", (count, words) => {
    for (const id of ["TOTALCOST", "INVESTIGATIONCOST", "FOUNDATIONCOST", "FAILURECOST", "DELAYCOST", "FAILURECHANCE", "CARBON", "OPTIMALCOUNT", "LENGTHTABLE", "LAYOUT"]) {
      expect([id, ...refusal(() => callFunction(id, [demonstration(), count]))]).toEqual([id, "#VALUE!", expect.stringMatching(words)]);
    }
    for (const id of ["PILELENGTH", "CONTINGENCY"]) expect([id, ...refusal(() => callFunction(id, [demonstration(), count, 50]))]).toEqual([id, "#VALUE!", expect.stringMatching(words)]);
    expect(refusal(() => callFunction("SAVING", [demonstration(), count, 2]))).toEqual(["#VALUE!", expect.stringMatching(words)]);
    expect(refusal(() => callFunction("SAVING", [demonstration(), 2, count]))).toEqual(["#VALUE!", expect.stringMatching(words)]);
  });
});

describe("a spoiled pair", () => {
  it.each([
    [["Stiffness COV", ""], /Stiffness COV.*blank or zero/],
    [["Stiffness COV", "high"], /Stiffness COV.*"high"/],
    [["Stifness COV", 0.5], /"Stifness COV".*is "Stiffness COV" meant/],
    [["Stiffness COV"], /must be even/],
    [["Stiffness COV", "#VALUE!"], /Stiffness COV.*#VALUE!/],
    [["Stiffness COV", 0.4, "stiffness cov", 0.5], /twice/],
    [["Pile list", 3], /Pile list.*list/],
    [["", 0.5], /label of pair 1.*blank/],
    [[7, 0.5], /label of pair 1/],
  ])("%j is named, and CHECK says the same", (pairs, words) => {
    const [code, sentence] = refusal(() => callFunction("TOTALCOST", [demonstration(), 3, ...pairs]));
    expect([code, sentence]).toEqual(["#VALUE!", expect.stringMatching(words)]);
    const checked = callFunction("CHECK", [demonstration(), ...pairs]) as unknown[][];
    expect(checked.map((row) => row[3])).toContain(`refused: ${sentence}`);
  });
});

describe("CHECK", () => {
  it("has a row for every input of the block and says that a good block is good", () => {
    const rows = callFunction("CHECK", [demonstration({ "Stiffness COV": 0.6 })]) as unknown[][];
    expect(rows[0]).toEqual(["Input", "Value used", "Unit", "Verdict"]);
    expect(rows.at(-1)).toEqual(["Site block", "", "", "ok: every input can be used"]);
    expect(rows).toContainEqual(["Stiffness COV", 0.6, "", "used"]);
  });

  it("shows what a pair puts in place", () => {
    const rows = callFunction("CHECK", [demonstration({ "Stiffness COV": 0.6 }), "Stiffness COV", 0.45]) as unknown[][];
    expect(rows.find((row) => row[0] === "Stiffness COV")).toEqual(["Stiffness COV", 0.45, "", "replaced by the formula (the block says 0.6)"]);
  });
});

describe("METHODS, GROUNDKINDS and VERSION", () => {
  it("are tables with heads, numbers and a source in every row", () => {
    for (const [id, width] of [["METHODS", 6], ["GROUNDKINDS", 14]] as const) {
      const [head, ...rows] = callFunction(id, []) as unknown[][];
      expect(head).toHaveLength(width);
      expect(rows.length).toBeGreaterThan(5);
      for (const row of rows) {
        expect(row).toHaveLength(width);
        expect(row.slice(1, -1).every((value) => typeof value === "number" && value > 0)).toBe(true);
        expect(String(row.at(-1)).length).toBeGreaterThan(20);
      }
    }
  });

  // Kulhawy & Trautmann (1996), ASCE GSP 58, electric cone tip, from memory: random 5 %, equipment 3 % and procedure 5 % (root of squares 5.8 %)
  it("has the published errors of the electric cone", () => {
    const rows = callFunction("METHODS", []) as unknown[][];
    expect(rows.find((row) => row[0] === "Electric cone")?.slice(1, 3)).toEqual([0.05, 0.058]);
    expect(rows[0].slice(0, 5)).toEqual(["Method", "Reading COV (ratio)", "Hole COV (ratio)", "Method COV (ratio)", "Reading spacing (m)"]);
  });

  // Phoon & Kulhawy (1999a), Can. Geotech. J. 36, scale of fluctuation of vane strength in clay, from memory: horizontal mean 50.7 m, 46 to 60 m
  it("has the published scales of clay", () => {
    const [head, ...rows] = callFunction("GROUNDKINDS", []) as unknown[][];
    const column = head.indexOf("Horizontal scale (m)");
    expect(rows.find((row) => row[0] === "Soft clay")?.slice(column, column + 3)).toEqual([50.7, 46, 60]);
    expect(head.slice(column, column + 3)).toEqual(["Horizontal scale (m)", "Horizontal scale, low (m)", "Horizontal scale, high (m)"]);
  });

  it("names the add-in and its release", () => {
    expect(callFunction("VERSION", [])).toMatch(/^Probeworth \d+\.\d+\.\d+$/);
  });
});
