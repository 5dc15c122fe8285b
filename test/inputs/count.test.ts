import { describe, expect, it } from "vitest";
import { InputError, LARGEST_COUNT, parseSite, requireCount } from "../../src/inputs/index.js";
import { add, SMALL } from "./block.js";

const automatic = parseSite(SMALL);
const listed = parseSite(add(SMALL, ["Hole list"], [1, 2], [3, 4], [4, 4]));

describe("a count", () => {
  it("is a whole number up to the hole list's length, or to sixty", () => {
    expect([0, 1, 60].map((count) => requireCount(automatic, count))).toEqual([0, 1, 60]);
    expect(requireCount(listed, 3)).toBe(3);
    expect(requireCount(listed, [[2]])).toBe(2);
    expect(LARGEST_COUNT).toBe(60);
  });

  it.each<[unknown, typeof automatic, string]>([
    [2.5, automatic, "Count is 2.5; a number of holes is a whole number."],
    [-1, automatic, "Count is -1; a number of holes cannot be negative."],
    [61, automatic, "Count is 61; at most 60 holes are priced."],
    [1e300, automatic, "Count is 1e+300; at most 60 holes are priced."],
    [4, listed, "Count is 4, but the hole list holds 3 holes; add rows to it, or take it out so that holes are placed automatically."],
    ["three", automatic, 'Count is "three"; a whole number of holes from 0 to 60 is needed.'],
    ["3", listed, 'Count is "3"; a whole number of holes from 0 to 3 is needed.'],
    [true, automatic, "Count is TRUE; a whole number of holes from 0 to 60 is needed."],
    ["#N/A", automatic, 'Count is "#N/A"; a whole number of holes from 0 to 60 is needed.'],
    [NaN, automatic, 'Count is "#NUM!"; a whole number of holes from 0 to 60 is needed.'],
    [null, automatic, "Count is missing; a whole number of holes from 0 to 60 is needed."],
    [[[1, 2]], automatic, 'Count is "#VALUE!"; a whole number of holes from 0 to 60 is needed.'],
  ])("%s is refused", (count, site, sentence) => {
    expect(() => requireCount(site, count)).toThrow(new InputError(sentence));
  });

  it("is called what the function calls it", () => {
    expect(() => requireCount(automatic, -2, "Largest count")).toThrow("Largest count is -2;");
  });
});
