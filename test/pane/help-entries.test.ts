import { beforeAll, describe, expect, it } from "vitest";
import { functionsMetadata } from "../../src/build/metadata.js";
import { callFunction } from "../../src/functions/registry.js";
import { templateRows } from "../../src/inputs/index.js";
import { exampleSheet } from "../../src/pane/model/example-sheet.js";
import { helpEntries, searchHelp, type FunctionMetadata, type HelpEntry } from "../../src/pane/model/help-entries.js";

const small: FunctionMetadata[] = [
  { id: "ZETA", name: "ZETA", parameters: [] },
  {
    id: "ALPHA",
    name: "ALPHA",
    description: "First letter",
    parameters: [
      { name: "site", description: "Site block" },
      { name: "count", description: "Holes" },
      { name: "rule", optional: true },
      { name: "pairs", repeating: true },
    ],
  },
  { id: "ODD", name: "ODD", parameters: [{ name: "nobody_knows" }] },
];

describe("help made from the metadata", () => {
  const entries = helpEntries(small, "PROBEDEV");

  it("writes the call as a person types it, optional arguments in brackets", () => {
    expect(entries.map((entry) => [entry.id, entry.call])).toEqual([
      ["ALPHA", "PROBEDEV.ALPHA(site, count, [rule], [pairs, \u2026])"],
      ["ODD", "PROBEDEV.ODD(nobody_knows)"],
      ["ZETA", "PROBEDEV.ZETA()"],
    ]);
    expect(entries[0]!.parameters.map((parameter) => parameter.need)).toEqual(["required", "required", "optional", "optional, may be repeated"]);
  });

  it("makes an example that names the site block, and none where it would have to guess", () => {
    expect(entries[0]!.example("Bid2")).toBe("=PROBEDEV.ALPHA(Bid2, 4)");
    expect(entries[1]!.example("Site")).toBeUndefined();
    expect(entries[2]!.example("Site")).toBe("=PROBEDEV.ZETA()");
  });

  it("finds words in any case, in names, descriptions and arguments, all of them", () => {
    expect(searchHelp(entries, "").length).toBe(3);
    expect(searchHelp(entries, " first  HOLES").map((entry) => entry.id)).toEqual(["ALPHA"]);
    expect(searchHelp(entries, "first nobody")).toEqual([]);
  });

  it("puts the example on a sheet of its own, named within Excel's 31 characters", () => {
    const plan = exampleSheet("A".repeat(40), "=PROBE.X()");
    expect(plan.name.length).toBe(31);
    expect(plan.cells.filter((cell) => cell.formula !== undefined)).toEqual([{ row: 3, column: 0, formula: "=PROBE.X()", style: "result" }]);
    expect(plan.cells.some((cell) => typeof cell.value === "string" && cell.value.startsWith("="))).toBe(false);
  });
});

// Source: the functions themselves. Every example that the help shows must work in a cell as it stands.
describe("every example of the real functions", () => {
  let entries: HelpEntry[];
  beforeAll(async () => {
    entries = helpEntries((await functionsMetadata()).functions, "PROBE");
  });

  it("exists and gives an answer for the template's site block", () => {
    expect(entries.length).toBeGreaterThanOrEqual(20);
    for (const entry of entries) {
      const formula = entry.example("Site");
      expect(formula, entry.id).toBeDefined();
      const [, id, list] = /^=PROBE\.([A-Z0-9.]+)\((.*)\)$/.exec(formula!)!;
      const values = list === "" ? [] : list!.split(", ").map((text) => (text === "Site" ? templateRows() : /^"/.test(text) ? text.slice(1, -1) : Number(text)));
      expect(() => callFunction(id!, values), formula).not.toThrow();
    }
  });
});
