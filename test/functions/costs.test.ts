import { describe, expect, it } from "vitest";
import { callFunction } from "../../src/functions/registry.js";
import { demonstration } from "./demonstration.js";
import { refusal } from "./refusal.js";

const site = demonstration();
const value = (id: string, ...args: unknown[]): number => callFunction(id, [site, ...args]) as number;
const rows = (id: string, ...args: unknown[]): (string | number)[][] => callFunction(id, [site, ...args]) as (string | number)[][];
const PARTS = ["INVESTIGATIONCOST", "FOUNDATIONCOST", "FAILURECOST", "DELAYCOST"];

// Identities between functions; the figures themselves are held to outside references in the engine's own tests.
describe("the cost of a count", () => {
  it.each([0, 1, 4])("of %d holes in all is the sum of its four parts", (count) => {
    const parts = PARTS.map((id) => value(id, count));
    expect(value("TOTALCOST", count)).toBeCloseTo(parts.reduce((sum, part) => sum + part, 0), 6);
    for (const part of parts.slice(1)) expect(part).toBeGreaterThan(0);
  });

  it("has an investigation part that follows the price list of the block", () => {
    const prices = { Mobilisation: 2800, Report: 3500, "Price per hole": 450, "Price per metre of hole": 48, "Hole depth": 24, "Days per hole": 0.5, "Price of a waiting day": 1200 };
    const priced = (count: number): unknown => callFunction("INVESTIGATIONCOST", [demonstration(prices), count]);
    const hole = 450 + 24 * 48 + 0.5 * 1200; // by hand
    expect(priced(0)).toBe(0);
    expect(priced(1)).toBeCloseTo(2800 + 3500 + hole, 6);
    expect(priced(5)).toBeCloseTo(2800 + 3500 + 5 * hole, 6);
  });

  it("comes with a chance of damage between 0 and 1 that holes bring down", () => {
    expect(value("FAILURECHANCE", 0)).toBeLessThan(1);
    expect(value("FAILURECHANCE", 4)).toBeGreaterThan(0);
    expect(value("FAILURECHANCE", 4)).toBeLessThan(value("FAILURECHANCE", 0));
  });

  it("answers a pair at the end as if the block said so", () => {
    expect(value("TOTALCOST", 4, "Stiffness COV", 0.4)).toBe(callFunction("TOTALCOST", [demonstration({ "Stiffness COV": 0.4 }), 4]));
    expect(value("TOTALCOST", 4, "stiffness cov", 0.4, "Building value", 8_400_000)).not.toBe(value("TOTALCOST", 4, "Stiffness COV", 0.4));
  });
});

describe("SAVING", () => {
  it("is the total now less the total then, and turns its sign when the question is turned", () => {
    expect(value("SAVING", 1, 4)).toBeCloseTo(value("TOTALCOST", 1) - value("TOTALCOST", 4), 6);
    expect(value("SAVING", 4, 1)).toBeCloseTo(-value("SAVING", 1, 4), 6);
    expect(value("SAVING", 2, 2)).toBe(0);
    expect(refusal(() => value("SAVING", 2, 2.5))).toEqual(["#VALUE!", "To is 2.5; a number of holes is a whole number."]);
    expect(refusal(() => value("SAVING", -1, 2))).toEqual(["#VALUE!", "From is -1; a number of holes cannot be negative."]);
  });
});

describe("COSTTABLE and OPTIMALCOUNT", () => {
  it("has a row a count that says what the single functions say", () => {
    const [head, ...body] = rows("COSTTABLE", 5);
    expect(head).toEqual(["Count (holes)", "Investigation (EUR)", "Foundation (EUR)", "Failure (EUR)", "Delay (EUR)", "Total (EUR)", "Standard error (EUR)", "Chance cheapest (0 to 1)", "Carbon (kg CO2e)"]);
    expect(body.map((row) => row[0])).toEqual([0, 1, 2, 3, 4, 5]);
    for (const [count, ...row] of body) {
      expect([...PARTS, "TOTALCOST"].map((id) => value(id, count))).toEqual(row.slice(0, 5));
      expect(value("CARBON", count)).toBe(row[7]);
    }
    expect(body.reduce((sum, row) => sum + Number(row[7]), 0)).toBeCloseTo(1, 9);
  });

  it("keeps the order and the repeats of a range, and gives a repeated count its whole chance twice", () => {
    const once = rows("COSTTABLE", [[4], [1]]);
    const twice = rows("COSTTABLE", [[4], [1], [4]]);
    expect(twice.map((row) => row[0])).toEqual(["Count (holes)", 4, 1, 4]);
    expect(twice[3]).toEqual(twice[1]);
    expect(twice.slice(0, 3)).toEqual(once);
  });

  it("gives the counts of the block when none are given, and keeps the pairs apart", () => {
    expect(rows("COSTTABLE")).toEqual(callFunction("COSTTABLE", [site, 12]));
    expect(callFunction("COSTTABLE", [demonstration({ Counts: "2 to 4" }), null, "Seed", 5])).toHaveLength(4);
  });

  it("agree on the cheapest", () => {
    const body = rows("COSTTABLE", 8).slice(1);
    const cheapest = body.reduce((best, row) => (Number(row[5]) < Number(best[5]) ? row : best));
    expect(value("OPTIMALCOUNT", 8)).toBe(cheapest[0]);
    expect(value("OPTIMALCOUNT", 0)).toBe(0);
  });
});

describe("CONTINGENCY", () => {
  it("is nothing at the median, grows with the percentile and is negative below", () => {
    expect(value("CONTINGENCY", 4, 50)).toBe(0);
    expect(value("CONTINGENCY", 4, 80)).toBeGreaterThan(0);
    expect(value("CONTINGENCY", 4, 95)).toBeGreaterThan(value("CONTINGENCY", 4, 80));
    expect(value("CONTINGENCY", 4, 20)).toBeLessThanOrEqual(0);
    expect(refusal(() => value("CONTINGENCY", 4, 100))).toEqual(["#VALUE!", "Percentile is 100; it must be a percentile above 0 and below 100."]);
    expect(refusal(() => value("CONTINGENCY", 4))).toEqual(["#VALUE!", "Percentile is blank; it must be a percentile above 0 and below 100."]);
  });
});

describe("the units of results", () => {
  const american = demonstration({ "Units of results": "US" });
  const inUs = (id: string, ...args: unknown[]): number => callFunction(id, [american, ...args]) as number;

  it("leave money and chances alone and turn metres into feet, kilograms into pounds", () => {
    // 1 ft = 0.3048 m, 1 lb = 0.453 592 37 kg, exactly (international yard and pound agreement, 1959)
    expect(inUs("TOTALCOST", 4)).toBe(value("TOTALCOST", 4));
    expect(inUs("FAILURECHANCE", 4)).toBe(value("FAILURECHANCE", 4));
    expect(inUs("CARBON", 4) * 0.45359237).toBeCloseTo(value("CARBON", 4), 6);
    expect(inUs("PILELENGTH", 4, 80) * 0.3048).toBeCloseTo(value("PILELENGTH", 4, 80), 9);
    expect((callFunction("COSTTABLE", [american, 1]) as string[][])[0][8]).toBe("Carbon (lb CO2e)");
  });
});
