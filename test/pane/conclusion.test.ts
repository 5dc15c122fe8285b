import { describe, expect, it } from "vitest";
import { conclude, tableStep } from "../../src/pane/model/conclusion.js";
import { numberWriter } from "../../src/pane/model/numbers.js";
import { countRow } from "./tables.js";

const writer = numberWriter("en-GB");
const near = { notDistinguishable: true };
const table = [countRow(0, 9000), countRow(1, 5000), countRow(2, 4210, near), countRow(3, 4200, near), countRow(4, 4225, near), countRow(5, 4400)];

// Sentences are part of the design; figures follow by hand from the table above (step 1, two standard errors = 20).
describe("the conclusion", () => {
  it("states the cheapest count, its cost and two standard errors", () => {
    const words = conclude(table, 3, undefined, "", writer);
    expect(words.count).toBe(3);
    expect(words.answer).toBe("Three holes cost least in all: 4,200 expected, give or take 20.");
  });

  it("states the saving against the client's count", () => {
    expect(conclude(table, 3, 1, "", writer).comparison).toBe("That is 800 less than the one hole your client proposes, at 5,000.");
    expect(conclude(table, 3, 0, "", writer).comparison).toBe("That is 4,800 less than the proposal to buy none, at 9,000.");
  });

  it("claims no saving that the accuracy does not bear, nor one on the count itself, nor on a count not tried", () => {
    expect(conclude(table, 3, 4, "", writer).comparison).toBe("At this accuracy it cannot be told from the four holes your client proposes, at 4,225.");
    expect(conclude(table, 3, 3, "", writer).comparison).toBe("That is the count your client proposes.");
    expect(conclude(table, 3, 9, "", writer).comparison).toBe("Nine holes are not among the counts tried (0 to 5), so no saving can be stated.");
    expect(conclude(table, 3, undefined, "", writer).comparison).toMatch(/^State the count/);
  });

  it("names the counts that cannot be told from the cheapest, and only those", () => {
    expect(conclude(table, 3, undefined, "", writer).remarks).toEqual(["2 and 4 holes cannot be told from the cheapest: the difference is within two of its standard errors."]);
  });

  it("warns where the cheapest is the largest count tried, is none, or leaves piles too short", () => {
    const falling = [countRow(0, 900), countRow(1, 500)];
    expect(conclude(falling, 1, undefined, "", writer).remarks.join(" ")).toContain("largest count tried");
    const none = [countRow(0, 500), countRow(1, 900)];
    expect(conclude(none, 0, undefined, "", writer).answer).toMatch(/^Buying no holes costs least in all: 500 expected/);
    expect(conclude(none, 0, undefined, "", writer).remarks.join(" ")).toContain("law requires comes first");
    const short = [countRow(0, 900), countRow(1, 500, { tooShortChance: 0.12 }), countRow(2, 700)];
    expect(conclude(short, 1, undefined, "", writer).remarks).toEqual(["In 12\u00a0% of cases even the longest pile is not enough; those cases are priced at the longest length."]);
  });

  it("agrees in number with one hole", () => {
    const one = [countRow(0, 900), countRow(1, 500), countRow(2, 700)];
    expect(conclude(one, 1, undefined, "", writer).answer).toMatch(/^One hole costs least/);
  });

  it("rounds by the smallest error of the table, so that one poor row does not blur the others", () => {
    expect(tableStep([countRow(0, 9000, { standardError: 900 }), countRow(1, 4200, { standardError: 12 })])).toBe(1);
  });

  it("names the person's money, cut short", () => {
    expect(conclude(table, 3, 1, "EUR", writer).answer).toBe("Three holes cost least in all: 4,200\u00a0EUR expected, give or take 20.");
    expect(conclude(table, 3, 1, "EUR", writer).comparison).toContain("800\u00a0EUR less");
    expect(conclude(table, 3, 1, "x".repeat(50), writer).answer).toContain(`${"x".repeat(11)}\u2026 expected`);
  });
});
