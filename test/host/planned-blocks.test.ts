import { describe, expect, it } from "vitest";
import { areaAddress, areaOf, columnLetters } from "../../src/host/addresses.js";
import { freeDefinedName, freeSheetName } from "../../src/host/free-name.js";
import { inNamespace } from "../../src/host/namespace.js";
import { contentBlocks, lookAreas } from "../../src/host/planned-blocks.js";
import type { PlannedCell } from "../../src/host/workbook.js";

describe("what a plan writes", () => {
  it("stands where the plan says, with blanks between", () => {
    const cells: PlannedCell[] = [
      { row: 2, column: 1, value: 7 },
      { row: 3, column: 3, formula: "=PROBE.VERSION()", value: "ignored" },
      { row: 9, column: 9, style: "result" },
    ];
    expect(contentBlocks(cells, "PROBEDEV")).toEqual([{ row: 2, column: 1, cells: [[7, "", ""], ["", "", "=PROBEDEV.VERSION()"]] }]);
    expect(contentBlocks([{ row: 0, column: 0, style: "head" }], "PROBE")).toEqual([]);
  });

  // What a sheet makes of typed texts: 1/500 and 3 May are dates, 1e5 and 12 numbers, =A1 and +1 formulas, TRUE a truth value.
  it.each(["1/500", "1e5", "12", "=A1", "+1", "-", "@x", "TRUE", "false", "#N/A", "3 May", "May 3", "Mar-26", "'x", "m2", "1 % of it"])("keeps the text %s a text", (text) => {
    expect(contentBlocks([{ row: 0, column: 0, value: text }], "PROBE")[0]!.cells).toEqual([[`'${text}`]]);
  });

  it("leaves words as they are", () => {
    for (const text of ["Stiffness COV", "none", "a long remark with the number 4 in it, which nobody takes for a date"]) expect(contentBlocks([{ row: 0, column: 0, value: text }], "PROBE")[0]!.cells).toEqual([[text]]);
  });

  it("is cut into blocks that are not too large, without losing a row", () => {
    const cells = Array.from({ length: 400 }, (_, row): PlannedCell => ({ row, column: row % 3, value: `remark ${"x".repeat(50)} no. ${row}` }));
    const blocks = contentBlocks(cells, "PROBE", 2000);
    expect(blocks.length).toBeGreaterThan(10);
    for (const { cells: own } of blocks) expect(JSON.stringify(own).length).toBeLessThanOrEqual(2100);
    expect(blocks.flatMap(({ row, cells: own }) => own.map((line, k) => [row + k, line.filter((value) => value !== "").length]))).toEqual(cells.map(({ row }) => [row, 1]));
    const longRow = contentBlocks([{ row: 0, column: 0, value: "x".repeat(5000) }, { row: 1, column: 0, value: 1 }], "PROBE", 2000);
    expect(longRow.map(({ cells: own }) => own.length)).toEqual([1, 1]);
  });
});

// Identity: painted one by one, the areas give every cell the look that the plan gives it, and no cell twice.
it("gives every cell its look once, in few areas", () => {
  const cells = Array.from({ length: 300 }, (_, k): PlannedCell => ({ row: Math.floor(k / 10), column: k % 10, value: 1, style: k % 10 < 3 ? "input" : "result", ...(k % 10 === 9 ? { look: "percent" } : {}) }));
  const areas = lookAreas([...cells].reverse());
  const painted = new Map<string, string>();
  for (const { top, left, bottom, right, style, look } of areas) {
    for (let row = top; row <= bottom; row++) {
      for (let column = left; column <= right; column++) {
        expect(painted.has(`${row},${column}`)).toBe(false);
        painted.set(`${row},${column}`, `${style} ${look}`);
      }
    }
  }
  expect(painted).toEqual(new Map(cells.map(({ row, column, style, look }) => [`${row},${column}`, `${style} ${look}`])));
  expect(areas).toHaveLength(3);
  const apart: PlannedCell[] = [0, 2].map((row) => ({ row, column: 0, value: 1, style: "input" }));
  expect(lookAreas(apart).map(({ top, bottom }) => [top, bottom])).toEqual([[0, 0], [2, 2]]);
});

it("rewrites the namespace outside texts and sheet names only", () => {
  expect(inNamespace("=PROBE.TOTALCOST(Site,4)", "PROBE")).toBe("=PROBE.TOTALCOST(Site,4)");
  expect(inNamespace(`=probe.TOTALCOST('PROBE.X'!A1,"PROBE.X")+XPROBE.Y(1)+PROBE.VERSION()&"a ""PROBE.Z"`, "PROBEDEV")).toBe(`=PROBEDEV.TOTALCOST('PROBE.X'!A1,"PROBE.X")+XPROBE.Y(1)+PROBEDEV.VERSION()&"a ""PROBE.Z"`);
  expect(inNamespace("=PROBEDEV.VERSION()", "PROBEDEV")).toBe("=PROBEDEV.VERSION()");
});

it("reads and writes addresses", () => {
  for (const address of ["A1", "B4", "A1:D60", "Z9:AA10", "XFD1048576"]) expect(areaAddress(areaOf(address))).toBe(address);
  expect([0, 25, 26, 701, 702].map(columnLetters)).toEqual(["A", "Z", "AA", "ZZ", "AAA"]);
  expect(() => areaOf("$A$1")).toThrow(/not an address/);
});

it("takes free names, in any case and within a sheet name's length", () => {
  expect(freeSheetName("Site", ["site", "SITE (2)"])).toBe("Site (3)");
  expect(freeSheetName("Example INVESTIGATIONCOST abcdef", ["Example INVESTIGATIONCOST abcdef"])).toBe("Example INVESTIGATIONCOST ab (2)".slice(0, 27) + " (2)");
  expect(freeSheetName("x".repeat(31), ["x".repeat(31)])).toHaveLength(31);
  expect(freeDefinedName("Site", ["SITE", "Site2"])).toBe("Site3");
});
