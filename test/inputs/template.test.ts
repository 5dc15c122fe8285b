import { describe, expect, it } from "vitest";
import { CATALOGUE, checkSite, DEMONSTRATION, parseSite, SECTIONS, templateRows } from "../../src/inputs/index.js";
import { DEFAULT_DAMAGE } from "../../src/inputs/build-building.js";
import type { Row } from "./block.js";

describe("the template", () => {
  it("is a site block without a fault, in four columns", () => {
    const rows = templateRows();
    expect(rows.every((row) => row.length === 4)).toBe(true);
    expect(checkSite(rows).filter(({ ok }) => !ok)).toEqual([]);
    expect(() => parseSite(rows)).not.toThrow();
  });

  it("also where blank cells arrive as 0", () => {
    const zeros = templateRows().map((row) => row.map((cell) => (cell === "" ? 0 : cell)));
    expect(parseSite(zeros as Row[]).problem).toEqual(parseSite(templateRows()).problem);
  });

  it("holds every input but the lists that would take the place of others, under its section, with a remark", () => {
    const rows = templateRows();
    let section = "";
    const found: string[] = [];
    for (const [label, , , note] of rows) {
      if ((SECTIONS as readonly string[]).includes(String(label))) section = String(label);
      const entry = CATALOGUE.find((one) => one.label === label);
      if (entry === undefined) continue;
      expect([label, section]).toEqual([label, entry.section]);
      expect(String(note).length).toBeGreaterThan(5);
      found.push(entry.label);
    }
    expect(found).toEqual(CATALOGUE.map(({ label }) => label).filter((label) => label !== "Pile list" && label !== "Layer list"));
  });

  it("shows the default damage list as rows", () => {
    const rows = templateRows();
    const at = rows.findIndex(([label]) => label === "Damage list");
    expect(rows.slice(at + 1, at + 5).map((row) => row.slice(0, 2))).toEqual([["Distortion", "Share"], ["1/500", 0], ["1/300", 0.1], ["1/150", 1]]);
    expect(parseSite(rows).problem.building.damage).toEqual(DEFAULT_DAMAGE);
  });

  it("belongs to nobody: the bid says that it is invented", () => {
    expect([DEMONSTRATION.title, DEMONSTRATION.bidder].every((words) => words.endsWith("(invented)"))).toBe(true);
  });

  it("is made anew at each call, so that nobody changes another's", () => {
    templateRows()[1]![1] = "spoilt";
    expect(templateRows()[1]![1]).not.toBe("spoilt");
  });
});
