import { describe, expect, it } from "vitest";
import { cellsFrom, pairsFrom, siteFrom, takePair } from "../../src/functions/site-argument.js";
import { demonstration } from "./demonstration.js";

describe("the site argument", () => {
  it("takes a range as it is and a bare cell as a range of one", () => {
    expect(cellsFrom([["a", 1], ["b", 2]])).toEqual([["a", 1], ["b", 2]]);
    expect(cellsFrom("a")).toEqual([["a"]]);
    expect(cellsFrom(undefined)).toEqual([[null]]);
  });
});

describe("the trailing pairs", () => {
  it.each([null, undefined, [], [null], [""], [[[""]]], [null, null]])("are empty for %j", (given) => {
    expect(pairsFrom(given)).toEqual([]);
  });

  it("are the same list, cells bare or as ranges of one", () => {
    expect(pairsFrom(["Stiffness COV", 0.6])).toEqual(["Stiffness COV", 0.6]);
    expect(pairsFrom([[["Stiffness COV"]], [[0.6]]])).toEqual(["Stiffness COV", 0.6]);
  });

  it("leave out a pair of two blank cells, which desktop Excel sends as zeros", () => {
    expect(pairsFrom(["", null, "Stiffness COV", 0.6])).toEqual(["Stiffness COV", 0.6]);
    expect(pairsFrom([0, 0, "Stiffness COV", 0.6])).toEqual(["Stiffness COV", 0.6]);
  });

  it("keep a label whose value is blank, so that it is refused by name and not priced by default", () => {
    expect(pairsFrom(["Stiffness COV", ""])).toEqual(["Stiffness COV", ""]);
    expect(pairsFrom(["Stiffness COV", null])).toEqual(["Stiffness COV", null]);
    expect(pairsFrom(["Stiffness COV", 0])).toEqual(["Stiffness COV", 0]);
  });

  it("keep a label without a value, so that the odd number of cells is refused", () => {
    expect(pairsFrom(["Seed", 7, "Stiffness COV"])).toEqual(["Seed", 7, "Stiffness COV"]);
    expect(() => siteFrom(demonstration(), ["Seed", 7, "Stiffness COV"])).toThrow(/3 cells.*number must be even/);
  });
});

describe("a pair that belongs to the function itself", () => {
  it("is taken out whatever its case, the last one wins, the rest stays in order", () => {
    expect(takePair(["Stiffness COV", 0.6, " pile ", 2, "PILE", 3, "Seed", 7], "Pile")).toEqual({ value: 3, rest: ["Stiffness COV", 0.6, "Seed", 7] });
    expect(takePair(["Pile diameter", 0.6], "Pile")).toEqual({ value: undefined, rest: ["Pile diameter", 0.6] });
  });

  it("counts as blank, not as absent, when its value is missing", () => {
    expect(takePair(["Pile"], "Pile")).toEqual({ value: null, rest: [] });
    expect(takePair(["Pile", 2, "Seed"], "Pile")).toEqual({ value: 2, rest: ["Seed"] });
  });
});
