import { describe, expect, it } from "vitest";
import { investigationCost } from "../../src/engine/index.js";
import { METHODS, parseSite, templateRows } from "../../src/inputs/index.js";
import { inputsHash } from "../../src/jobs/inputs-hash.js";
import { offeredMethods, orderInWords, orderOf, RULES, usualChoices, type Refusal, type RunChoices } from "../../src/pane/model/run-choices.js";
import type { RunOrder } from "../../src/pane/run-order.js";

const cells = templateRows();
const site = parseSite(cells);
const usual = usualChoices(site);
/** A method that is not the block's. */
const other = METHODS.find(({ name }) => name !== site.method)!;
const make = (change: Partial<RunChoices>): RunOrder | Refusal => orderOf(site, cells, { ...usual, ...change }, "Site!A1:D60", 5);
const order = (change: Partial<RunChoices>): RunOrder => {
  const made = make(change);
  if ("part" in made) throw new Error(made.sentence);
  return made;
};
const refusal = (change: Partial<RunChoices>): Refusal => {
  const made = make(change);
  if (!("part" in made)) throw new Error("nothing was refused");
  return made;
};

describe("the choices of a run", () => {
  it("begin with what the block itself asks for, and stop at the price of one more hole", () => {
    const { problem } = site;
    // Source: identity, the engine's own price of an investigation
    const hole = investigationCost(problem, 2) - investigationCost(problem, 1);
    expect(Number(usual.sum)).toBeCloseTo(hole, -1);
    const made = order({});
    expect(made.task).toEqual({ variants: [{ name: site.method, problem }], counts: site.counts, seed: problem.seed });
    expect(made.target).toEqual({ regret: Number(usual.sum) });
    expect(made).toMatchObject({ place: "Site!A1:D60", at: 5, money: site.money, units: site.units, block: inputsHash(problem) });
  });

  it("offer every method of the table and every design rule of the block", () => {
    expect(offeredMethods(site)).toEqual(METHODS.map(({ name }) => name));
    expect(RULES.map(({ value }) => value)).toEqual(["geometric", "arithmetic", "harmonic", "quartile", "lessdeviations"]);
  });

  it("put methods and rules side by side, each with its own errors, and leave the ground alike", () => {
    const made = order({ methods: [site.method, other.name], rules: ["geometric", "quartile"] });
    expect(made.task.variants.map(({ name }) => name)).toEqual([`${site.method}, geometric mean`, `${site.method}, lower quartile`, `${other.name}, geometric mean`, `${other.name}, lower quartile`]);
    const [, , third, last] = made.task.variants;
    expect(third!.problem.investigation.readingCov).toBe(other.readingCov);
    expect(last!.problem.investigation.designRule.name).toBe("quartile");
    expect(new Set(made.task.variants.map(({ problem }) => JSON.stringify([problem.ground, problem.building, problem.piles]))).size).toBe(1);
  });

  it("take a price per hole of their own for a method", () => {
    const made = order({ methods: [site.method, other.name], prices: { [other.name]: "2500", [site.method]: "" } });
    expect(made.task.variants[1]!.problem.prices.perHole).toBe(2500);
    expect(made.task.variants[0]!.problem.prices.perHole).toBe(site.problem.prices.perHole);
  });

  it("let piles settle their neighbours as the block says, unless the person says otherwise", () => {
    const settling = (block: readonly (readonly unknown[])[], choice: boolean | undefined): boolean[] => {
      const usual = usualChoices(parseSite(block));
      const made = orderOf(parseSite(block), block, { ...usual, interaction: choice ?? usual.interaction, methods: [site.method, other.name] }, "", 0);
      return "part" in made ? [] : made.task.variants.map(({ problem }) => problem.piles.groupInteraction);
    };
    const on = [...templateRows(), ["Group interaction", "on"]].filter(([label], k, all) => label !== "Group interaction" || k === all.length - 1);
    expect([settling(templateRows(), undefined), settling(templateRows(), true)]).toEqual([[false, false], [true, true]]);
    expect([settling(on, undefined), settling(on, false)]).toEqual([[true, true], [false, false]]);
  });

  it("read counts as the block does", () => {
    expect(order({ counts: "0 to 3" }).task.counts).toEqual([0, 1, 2, 3]);
    expect(order({ counts: "8, 2,4" }).task.counts).toEqual([2, 4, 8]);
  });

  it.each<[string, Partial<RunChoices>, Refusal["part"], RegExp]>([
    ["counts that are none", { counts: "2.5" }, "counts", /Counts/],
    ["more grounds than fit into memory", { stop: "number", realisations: "90000" }, "target", /^With 13 cases \(ways times counts\) at most 36,002 grounds fit into memory\. Ask for fewer, or name fewer counts or ways\.$/],
    ["no method", { methods: [] }, "methods", /at least one method/],
    ["no rule", { rules: [] }, "rules", /at least one design rule/],
    ["more ways than can be looked at", { methods: METHODS.slice(0, 4).map(({ name }) => name), rules: ["geometric", "quartile"] }, "methods", /are 8 ways; at most 6/],
    ["more cases than can be run", { methods: METHODS.slice(0, 6).map(({ name }) => name), counts: "0 to 30" }, "counts", /186 cases; at most 120/],
    ["a sum of nothing", { sum: "0" }, "target", /above 0/],
    ["a blank sum", { sum: " " }, "target", /above 0/],
    ["no grounds", { stop: "number", realisations: "0" }, "target", /whole number from 2/],
    ["half a ground", { stop: "number", realisations: "2.5" }, "target", /whole number/],
    ["grounds without end", { stop: "number", realisations: "1e9" }, "target", /100,000/],
    ["a price below nothing", { prices: { [site.method]: "-3" } }, "methods", /must be above 0/],
  ])("refuse %s in a sentence", (_what, change, part, sentence) => {
    const refused = refusal(change);
    expect(refused.part).toBe(part);
    expect(refused.sentence).toMatch(sentence);
    expect(refused.sentence).toMatch(/\.$/);
  });

  it("are called by their ways and counts", () => {
    expect(orderInWords(order({ methods: [site.method, other.name], counts: "0 to 4" }))).toBe(`${site.method}; ${other.name}; 0 to 4 holes`);
    expect(orderInWords({ ...order({}), task: { ...order({}).task, counts: [1] } })).toMatch(/; one hole$/);
  });
});
