import { describe, expect, it } from "vitest";
import { costTableText } from "../../src/results/index.js";
import { countRow, ROWS } from "./rows.js";

describe("the table of counts in a terminal", () => {
  it("is rounded to four figures of the largest total, marked and closed by a sentence", () => {
    expect(costTableText(ROWS, "SI")).toBe(
      [
        "Holes  Investigation  Foundation  Failure  Delay    Total    +/-  Chance cheapest  Carbon, kg CO2e",
        "    0              0      81,200  120,400  3,200  204,800  1,000              0 %           34,600",
        "    1          6,400      79,000   61,000  1,900  148,300    810             62 %           33,000  cheapest",
        "    2          9,800      78,400   58,800  1,500  148,500    790             38 %           32,500  cannot be told from it",
        "",
        "Cheapest: 1 hole, total 148,300; 2 cannot be told from it.",
      ].join("\n"),
    );
  });

  it("names every count that cannot be told from the cheapest", () => {
    const near = [1, 2, 3, 4].map((count) => countRow({ count, total: 1000 + count, notDistinguishable: true }));
    expect(costTableText(near, "SI")).toContain("Cheapest: 1 hole, total 1,001; 2, 3 and 4 cannot be told from it.");
  });

  it("names none where the cheapest stands alone, and keeps small sums whole", () => {
    const alone = [countRow({ count: 2, total: 7.4, notDistinguishable: true }), countRow({ count: 3, total: 9.6 })];
    expect(costTableText(alone, "SI")).toMatch(/Cheapest: 2 holes, total 7\.$/);
    expect(costTableText(alone, "SI", "EUR")).toMatch(/Cheapest: 2 holes, total EUR 7\.$/);
  });

  it("says so when no counts were asked for", () => {
    expect(costTableText([], "SI")).toContain("No counts were asked for.");
  });
});
