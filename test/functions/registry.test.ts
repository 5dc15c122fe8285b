import { afterEach, describe, expect, it } from "vitest";
import { callFunction, FUNCTIONS } from "../../src/functions/registry.js";
import { functionsMetadata } from "../../src/build/metadata.js";
import { refusal } from "./refusal.js";
import { demonstration } from "./demonstration.js";

/** What a call says in all, be it an answer or a refusal. */
function spoken(id: string, args: readonly unknown[]): string {
  try {
    return JSON.stringify(callFunction(id, args));
  } catch (reason) {
    return (reason as Error).message;
  }
}

describe("calling a function as a worksheet writes it", () => {
  it("gathers exactly the arguments that functions.json calls repeating", async () => {
    const { functions } = await functionsMetadata();
    for (const { id, parameters } of functions) {
      const run = FUNCTIONS.get(id);
      expect([id, run?.length]).toEqual([id, parameters.length]);
      const given = [...parameters.map(() => null), "Seed", 1];
      expect([id, /takes \d+ argument/.test(spoken(id, given))]).toEqual([id, !parameters.some(({ repeating }) => repeating === true)]);
    }
  });

  it("begins to gather right after the last argument before the pairs", async () => {
    const { functions } = await functionsMetadata();
    const gathering = functions.filter(({ parameters }) => parameters.at(-1)?.repeating === true);
    expect(gathering).toHaveLength(14);
    for (const { id, parameters } of gathering) {
      const given = [demonstration(), ...parameters.slice(1, -1).map(() => null), "Wishful COV", 1];
      expect([id, spoken(id, given)]).toEqual([id, expect.stringMatching(/label of pair 1 of the formula is .{1,2}Wishful COV/)]);
    }
  });

  it("gives what Excel's own form of the call gives", () => {
    const site = demonstration();
    const asExcel = FUNCTIONS.get("TOTALCOST")?.(site, 3, ["Stiffness COV", 0.45], { address: "Bid!B3" }); // Excel always adds its invocation object
    expect(callFunction("TOTALCOST", [site, 3, "Stiffness COV", 0.45])).toBe(asExcel);
    expect(callFunction("TotalCost", [site, [[3]], [["Stiffness COV"]], [[0.45]]])).toBe(asExcel);
  });

  it("speaks of the missing argument by name", () => {
    expect(refusal(() => callFunction("TOTALCOST", [demonstration()]))).toEqual(["#VALUE!", "Count is missing; a whole number of holes from 0 to 60 is needed."]);
    expect(refusal(() => callFunction("VARIANCEFACTOR", []))[1]).toContain("Length is blank");
  });

  it("refuses a function that does not exist, and too many arguments", () => {
    expect(refusal(() => callFunction("TOTALPRICE", []))).toEqual(["#VALUE!", "PROBE has no function TOTALPRICE."]);
    expect(refusal(() => callFunction("constructor", []))).toEqual(["#VALUE!", "PROBE has no function constructor."]);
    expect(refusal(() => callFunction("LAYOUT", [demonstration(), 3, "Seed"]))).toEqual(["#VALUE!", "LAYOUT takes 2 arguments; 3 were given."]);
  });
});

describe("the entry that Excel loads", () => {
  const host = globalThis as unknown as { CustomFunctions?: unknown };
  afterEach(() => {
    delete host.CustomFunctions;
  });

  it("binds every id to its body", async () => {
    const bound = new Map<string, unknown>();
    host.CustomFunctions = { associate: (id: string, run: unknown) => bound.set(id, run) };
    await import("../../src/functions/associate.js");
    expect(bound).toEqual(FUNCTIONS);
  });
});
