import { describe, expect, it } from "vitest";
import { storedFormula } from "../../src/formula/xlsx/stored-formula.js";
import { validationsXml } from "../../src/formula/xlsx/validation-xml.js";
import type { CellValidation } from "../../src/host/workbook.js";
import { bookOf, calculationOf } from "./cells.js";

// Source: a workbook that Excel saved with an add-in's functions holds _xldudf_CONTOSO_ADD(1,2) for CONTOSO.ADD(1,2).
describe("formulas in their stored form", () => {
  it("have our functions under one word, whatever their letters, and leave the rest alone", () => {
    expect(storedFormula('=Probe.Total.Cost(Site, B2)&"PROBE.X("&SUM(A1)', "PROBE")).toEqual({ text: '_xldudf_PROBE_TOTAL_COST(Site, B2)&"PROBE.X("&SUM(A1)', isOurs: true });
    expect(storedFormula("PROBE.VERSION()", "PROBEDEV")).toEqual({ text: "_xldudf_PROBEDEV_VERSION()", isOurs: true });
    expect(storedFormula("=PROBE+MYPROBE.X(1)", "PROBE")).toEqual({ text: "PROBE+MYPROBE.X(1)", isOurs: false });
  });
});

describe("rules of what may be typed", () => {
  const ruleOf = (validation: CellValidation): string => validationsXml([{ row: 6, column: 1, validation }]);
  const attribute = (xml: string, name: string): string | undefined => new RegExp(` ${name}="([^"]*)"`).exec(xml)?.[1];
  const formula = (xml: string, k = 1): string => (new RegExp(`<formula${k}>(.*?)</formula${k}>`).exec(xml)?.[1] ?? "").replaceAll("&quot;", '"').replaceAll("&gt;", ">").replaceAll("&lt;", "<").replaceAll("&amp;", "&");
  const words = "Words.";

  it("of plain numbers are Excel's own", () => {
    const within = ruleOf({ kind: "number", least: 0.5, most: 20, words });
    expect([attribute(within, "type"), attribute(within, "operator"), formula(within), formula(within, 2), attribute(within, "sqref")]).toEqual(["decimal", undefined, "0.5", "20", "B7"]);
    const above = ruleOf({ kind: "number", least: 1e-7, whole: true, words });
    expect([attribute(above, "type"), attribute(above, "operator"), formula(above)]).toEqual(["whole", "greaterThanOrEqual", "1E-7"]);
    const below = ruleOf({ kind: "number", most: 3, words });
    expect([attribute(below, "type"), attribute(below, "operator"), formula(below)]).toEqual(["decimal", "lessThanOrEqual", "3"]);
  });

  it("of words are a list, or a formula where the list is too long for the format", () => {
    expect(formula(ruleOf({ kind: "choice", choices: ["soft", "stiff"], words }))).toBe('"soft,stiff"');
    const long = ruleOf({ kind: "choice", choices: ["a".repeat(200), "b".repeat(100)], words });
    expect([attribute(long, "type"), accepts(formula(long), "B".repeat(100)), accepts(formula(long), "soft")]).toEqual(["custom", true, false]);
  });

  /** The formula of a rule, calculated with a value in its cell. */
  function accepts(rule: string, value: string | number): unknown {
    const calculation = calculationOf(bookOf({ S: { B7: value } }));
    const found = calculation.formula(`=${rule}`, 0).values[0]![0];
    calculation.dispose();
    return found;
  }

  it.each([["none", true], ["NONE", true], ['the "usual"', true], [2, true], [20, true], [2.5, false], [1, false], [21, false], ["many", false], ["20", false]])("of numbers or words judge %j: %s", (value, expected) => {
    const xml = ruleOf({ kind: "number", least: 2, most: 20, whole: true, orWords: ["none", 'the "usual"'], words });
    expect(attribute(xml, "type")).toBe("custom");
    expect(accepts(formula(xml), value)).toBe(expected);
  });

  it("show words of at most 255 signs, cut between words", () => {
    const error = attribute(ruleOf({ kind: "number", least: 1, words: "word ".repeat(80).trim() }), "error")!;
    expect(error.length).toBeLessThanOrEqual(255);
    expect(error).toMatch(/^(word )+word\.\.\.$/);
  });
});
