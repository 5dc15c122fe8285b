import { describe, expect, it } from "vitest";
import { CATALOGUE, isRequired, parseSite, SECTIONS } from "../../src/inputs/index.js";
import { normaliseLabel, nearestLabel } from "../../src/inputs/labels.js";
import { add, checkOf, put, SMALL, without, withoutGrid, type Row } from "./block.js";

describe.each(CATALOGUE.map((entry) => [entry.label, entry] as const))("%s", (label, entry) => {
  it("has a section, a help sentence and what its kind needs", () => {
    expect(SECTIONS).toContain(entry.section);
    expect(entry.help).toMatch(/^[A-Z].{30,300}\.$/);
    expect(entry.help).not.toMatch(/\b(undefined|NaN)\b/);
    if (entry.kind === "choice") expect(entry.choices!.length).toBeGreaterThan(1);
    else if (entry.kind === "list") expect(entry.columns!.length * entry.maximumRows!).toBeGreaterThan(0);
    else if (entry.kind !== "seed") expect(entry.maximum!).toBeGreaterThan(entry.minimum!);
  });

  it("has a default within its own range, and a zero that fits it", () => {
    if (entry.kind === "choice") expect(entry.choices!.map(({ value }) => value)).toContain(entry.fallback);
    else if (typeof entry.fallback === "number" && entry.fallback !== 0) {
      expect(entry.fallback).toBeGreaterThanOrEqual(entry.minimum!);
      expect(entry.fallback).toBeLessThanOrEqual(entry.maximum!);
    }
    if (entry.fallback === 0) expect(["accepted", "none"]).toContain(entry.zero);
    if (entry.zero === "accepted") expect(entry.fallback).toBe(0); // a blank cell may then arrive as 0 and change nothing
    if (entry.kind === "money" || entry.kind === "moneyPerLength") expect(entry.zero).toBe("none");
  });

  it("is found by its label alone", () => {
    expect(CATALOGUE.filter((other) => normaliseLabel(other.label) === normaliseLabel(label))).toEqual([entry]);
    expect(SECTIONS.map(normaliseLabel)).not.toContain(normaliseLabel(label));
    expect(nearestLabel(label)).toBe(label);
    expect(nearestLabel(`${label}k`)).toBe(label);
  });
});

describe("the catalogue", () => {
  it("names each input once", () => {
    expect(new Set(CATALOGUE.map(({ id }) => id)).size).toBe(CATALOGUE.length);
  });

  it("lists the sections in the order of the template", () => {
    expect([...new Set(CATALOGUE.map(({ section }) => section))]).toEqual(SECTIONS);
  });

  it("requires what no default can stand for", () => {
    expect(CATALOGUE.filter(isRequired).map(({ label }) => label)).toEqual([
      "Mean stiffness", "Stiffness COV", "Horizontal scale", "Vertical scale", "Piles along x", "Piles along y", "Spacing along x", "Interior load",
      "Building value", "Allowable settlement", "Pile diameter", "Shortest length", "Longest length", "Hole depth", "Price per hole", "Price per metre of hole", "Price per metre of pile",
    ]);
    for (const label of CATALOGUE.filter(isRequired).map((entry) => entry.label)) expect(() => parseSite(without(SMALL, label))).toThrow(`${label} is missing`);
  });
});

/** Every figure of the problem, and the block that moves it. A field that no input reaches would be missing here. */
const REACH: readonly [path: string, rows: readonly Row[]][] = [
  ["ground.layers", put(SMALL, "Mean stiffness", 9)],
  ["ground.layers", put(SMALL, "Stiffness COV", 0.3)],
  ["ground.layers", add(SMALL, ["Increase with depth", 1])],
  ["ground.layers", add(without(SMALL, "Mean stiffness"), ["Layer list"], [0, 8, 0, 0.5])],
  ["ground.correlation", add(SMALL, ["Correlation", "spherical"])],
  ["ground.horizontalScale", put(SMALL, "Horizontal scale", 21)],
  ["ground.verticalScale", put(SMALL, "Vertical scale", 3)],
  ["ground.regionalCov", add(SMALL, ["Regional COV", 0.2])],
  ["ground.poissonRatio", add(SMALL, ["Poisson's ratio", 0.2])],
  ["building.piles", put(SMALL, "Piles along x", 3)],
  ["building.piles", put(SMALL, "Piles along y", 2)],
  ["building.piles", put(SMALL, "Spacing along x", 6)],
  ["building.piles", put(SMALL, "Spacing along y", 6)],
  ["building.piles", put(SMALL, "Interior load", 900)],
  ["building.piles", add(SMALL, ["Edge load share", 0.5])],
  ["building.piles", add(SMALL, ["Corner load share", 0.5])],
  ["building.piles", add(withoutGrid(SMALL), ["Pile list"], [0, 0, 500], [5, 5, 500])],
  ["building.footprint", add(SMALL, ["Footprint length", 40])],
  ["building.footprint", add(SMALL, ["Footprint width", 40])],
  ["building.value", put(SMALL, "Building value", 5)],
  ["building.damage", add(SMALL, ["Damage list"], ["1/400", 0], ["1/100", 1])],
  ["building.allowableSettlement", put(SMALL, "Allowable settlement", 20)],
  ["piles.diameter", put(SMALL, "Pile diameter", 0.6)],
  ["piles.modulus", add(SMALL, ["Pile modulus", 25])],
  ["piles.shortest", put(SMALL, "Shortest length", 4)],
  ["piles.longest", put(SMALL, "Longest length", 24)],
  ["piles.lengthStep", add(SMALL, ["Length step", 0.5])],
  ["piles.lengthRule", add(SMALL, ["Length rule", "one"])],
  ["piles.groupInteraction", add(SMALL, ["Group interaction", "on"])],
  ["investigation.readingCov", add(SMALL, ["Reading COV", 0.3])],
  ["investigation.holeCov", add(SMALL, ["Hole COV", 0.3])],
  ["investigation.methodCov", add(SMALL, ["Method COV", 0.3])],
  ["investigation.methodCov", add(SMALL, ["Method", "Pressuremeter"])],
  ["investigation.readingSpacing", add(SMALL, ["Reading spacing", 1])],
  ["investigation.holeDepth", put(SMALL, "Hole depth", 16)],
  ["investigation.holes", add(SMALL, ["Hole list"], [1, 2])],
  ["investigation.designRule", add(SMALL, ["Design rule", "quartile"])],
  ["investigation.designRule", add(SMALL, ["Deviations below mean", 1])],
  ["investigation.designRule", add(SMALL, ["Regional COV", 0.2])],
  ["prices.mobilisation", add(SMALL, ["Mobilisation", 7])],
  ["prices.perHole", put(SMALL, "Price per hole", 7)],
  ["prices.perHoleMetre", put(SMALL, "Price per metre of hole", 7)],
  ["prices.perReading", add(SMALL, ["Price per reading", 7])],
  ["prices.report", add(SMALL, ["Report", 7])],
  ["prices.daysPerHole", add(SMALL, ["Days per hole", 7])],
  ["prices.waitingDay", add(SMALL, ["Price of a waiting day", 7])],
  ["prices.rig", add(SMALL, ["Piling rig", 7])],
  ["prices.perPile", add(SMALL, ["Price per pile", 7])],
  ["prices.perPileMetre", put(SMALL, "Price per metre of pile", 7)],
  ["prices.carbonPerCubicMetre", add(SMALL, ["Carbon of concrete", 300])],
  ["delay.dayCost", add(SMALL, ["Price of a delay day", 7])],
  ["delay.daysPerSurprise", add(SMALL, ["Days per surprise", 7])],
  ["delay.surpriseTolerance", add(SMALL, ["Surprise tolerance", 7])],
  ["delay.foundShare", add(SMALL, ["Share found on site", 0.7])],
  ["seed", add(SMALL, ["Seed", 7])],
];

const at = (value: unknown, path: string): unknown => path.split(".").reduce((part, key) => (part as Record<string, unknown>)[key], value);

describe("every field of the problem", () => {
  it.each(REACH)("%s is moved by an input (%#)", (path, rows) => {
    const before = parseSite(SMALL).problem;
    const after = parseSite(rows).problem;
    expect(at(after, path)).not.toEqual(at(before, path));
  });

  it("stands in the list above", () => {
    const { problem } = parseSite(SMALL);
    const fields = Object.entries(problem).flatMap(([part, value]) => (typeof value === "object" ? Object.keys(value).map((key) => `${part}.${key}`) : [part]));
    expect(new Set(REACH.map(([path]) => path))).toEqual(new Set(fields));
  });

  it("is weighed with regional knowledge unless the person says no", () => {
    const rows = add(SMALL, ["Regional COV", 0.2], ["Regional update", "no"]);
    expect(parseSite(rows).problem.investigation.designRule.update).toBe(false);
    expect(checkOf(rows, "Regional update")).toMatchObject({ value: "no", verdict: "used" });
  });
});
