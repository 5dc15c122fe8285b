import { describe, expect, it } from "vitest";
import { countsFrom } from "../../src/functions/counts-argument.js";
import { parseSite, type Site } from "../../src/inputs/index.js";
import { demonstration } from "./demonstration.js";

const site: Site = parseSite(demonstration());
const listed = (holes: number, counts?: number[]): Site =>
  ({ ...site, counts, problem: { ...site.problem, investigation: { ...site.problem.investigation, holes: Array.from({ length: holes }, () => ({ x: 0, y: 0 })) } } }) as unknown as Site;

describe("the counts of a table", () => {
  it("run from 0 to a single number", () => {
    expect(countsFrom(3, site)).toEqual([0, 1, 2, 3]);
    expect(countsFrom([[0]], site)).toEqual([0]);
  });

  it("are the cells of a range in the person's order, repeats kept, blank cells at its end left out", () => {
    expect(countsFrom([[4], [2], [2], [""], [null]], site)).toEqual([4, 2, 2]);
    expect(countsFrom([[1, 2, 4]], site)).toEqual([1, 2, 4]);
  });

  it("are the site's own where the argument is blank, or 0 to 12 where the site has none", () => {
    expect(countsFrom(null, { ...site, counts: [0, 3, 6] })).toEqual([0, 3, 6]);
    expect(countsFrom([[""]], { ...site, counts: undefined })).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12]);
    expect(countsFrom(undefined, listed(2))).toEqual([0, 1, 2]);
  });

  it("name the cell that cannot be used", () => {
    expect(() => countsFrom([[1], ["two"]], site)).toThrow('Count in cell 2 of the range is "two"; a whole number of holes');
    expect(() => countsFrom([[1], [""], [2]], site)).toThrow("Count in cell 2 of the range is missing");
    expect(() => countsFrom([[1], [5]], listed(4))).toThrow("Count in cell 2 of the range is 5, but the hole list holds 4 holes");
    expect(() => countsFrom(5, listed(4))).toThrow("Largest count is 5, but the hole list holds 4 holes");
    expect(() => countsFrom(61, site)).toThrow("Largest count is 61; at most 60 holes are priced.");
  });

  it("refuse more counts than there are", () => {
    expect(() => countsFrom(Array.from({ length: 121 }, () => [1]), site)).toThrow("Counts is a range of 121 cells; mark only the counts to compare, at most 120.");
    expect(countsFrom([...Array.from({ length: 120 }, () => [1]), [""], [""]], site)).toHaveLength(120);
  });

  it("refuse a whole column at once", () => {
    const column = Array.from({ length: 1_048_576 }, () => [0]);
    const start = performance.now();
    expect(() => countsFrom(column, site)).toThrow("Counts is a range of 1048576 rows; mark only the counts to compare, at most 120.");
    expect(performance.now() - start).toBeLessThan(1000);
  });
});
