import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import type { FunctionsJson } from "../../src/build/metadata.js";
import { ErrorValue, type CellValue } from "../../src/formula/cell-value.js";
import { launchBrowser } from "./harness/browser.js";
import { besideExcel } from "./excel-host/beside-excel.js";
import { serveScript, type ScriptSite } from "./excel-host/script-site.js";
import type { Excel as ExcelBeside, ExcelOptions } from "./excel-host/start-excel.js";

// Each function shows what reaches it, because what Excel hands over is what these tests are about.
const SCRIPT = `
const plain = (value) => Array.isArray(value) ? value.map(plain) : value instanceof CustomFunctions.Error ? { error: value.code } : value;
const shown = (value) => JSON.stringify(plain(value));
CustomFunctions.associate({
  SHOW: (...given) => shown(given.slice(0, -1)),
  ONE: (first) => shown(first),
  GIVE: (what) => ({ null: null, undefined: undefined, text: "#VALUE!", nan: NaN, infinite: Infinity, table: [[1, null], ["a", true]], ragged: [[1, 2], [3]] })[what],
  FAIL: (what) => {
    if (what === "value") throw new CustomFunctions.Error(CustomFunctions.ErrorCode.invalidValue, "Depth is blank or zero.");
    if (what === "none") throw new CustomFunctions.Error(CustomFunctions.ErrorCode.notAvailable, "No count is enough.");
    if (what === "zero") throw new CustomFunctions.Error(CustomFunctions.ErrorCode.divisionByZero, "these words are lost");
    throw new RangeError("a bug");
  },
  LATER: (value) => new Promise((resolve) => window.kept.push(() => resolve(value))),
  ENDLESS: (value, invocation) => new Promise(() => { invocation.onCanceled = () => window.kept.push("given up " + value); }),
});
`;
const any = (name: string, more: object = {}): FunctionsJson["functions"][number]["parameters"][number] => ({ name, type: "any", ...more });
const METADATA: FunctionsJson = {
  allowErrorForDataTypeAny: true,
  functions: [
    { id: "SHOW", name: "SHOW", parameters: [any("range", { dimensionality: "matrix" }), any("one"), any("two", { optional: true }), any("pairs", { optional: true, repeating: true })] },
    { id: "ONE", name: "ONE", parameters: [any("one", { type: "number" })] },
    { id: "GIVE", name: "GIVE", parameters: [any("what")] },
    { id: "FAIL", name: "FAIL", parameters: [any("what")] },
    { id: "LATER", name: "LATER", parameters: [any("value")] },
    { id: "ENDLESS", name: "ENDLESS", parameters: [any("value")], options: { cancelable: true } } as FunctionsJson["functions"][number],
    { id: "MISSING", name: "MISSING", parameters: [] },
  ],
};

let browser: Browser;
let site: ScriptSite;
beforeAll(async () => {
  [browser, site] = await Promise.all([launchBrowser(), serveScript(SCRIPT)]);
});
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

interface Cells {
  /** Enters something into a cell, such as ("A1", "=TEST.ONE(2)"), as a person. */
  enter(column: number, row: number, what: unknown): Promise<void>;
  at(column: number, row: number): CellValue;
  why(column: number, row: number): string | undefined;
}

function beside(test: (excel: ExcelBeside, cells: Cells) => Promise<void>, options: Partial<ExcelOptions> = {}): Promise<void> {
  return besideExcel(browser, { address: site.address, metadata: METADATA, namespace: "TEST", ...options }, async (excel) => {
    const sheet = excel.host.book.active;
    await test(excel, {
      enter: (column, row, what) => excel.person(({ book }) => book.write(sheet, { top: row, left: column, bottom: row, right: column }, [[what]], "person")),
      at: (column, row) => sheet.valueAt(row, column),
      why: (column, row) => excel.host.calculator.reasonAt(sheet, row, column),
    });
    expect(excel.host.functions.troubles).toEqual([]);
  });
}

describe("cell functions in the library's own runtime", () => {
  it("get null for what is omitted, rows for a range, one list for the repeating argument", () =>
    beside(async (excel, { enter, at }) => {
      await enter(0, 0, 7);
      await enter(1, 0, "x");
      await enter(3, 0, "=TEST.SHOW(A1:B1,A1)");
      await enter(3, 1, '=TEST.SHOW(A1,,,"Depth",B1)');
      await excel.calculated();
      expect(at(3, 0)).toBe('[[[7,"x"]],7,null,null]');
      expect(at(3, 1)).toBe('[[[7]],null,null,["Depth","x"]]');
    }));

  it.each([[0, "[[[0,0]],0,null,null]"], [null, "[[[null,null]],null,null,null]"]] as const)("get blank cells as %s, by the kind of Excel", (blanks, shown) =>
    beside(async (excel, { enter, at }) => {
      await enter(3, 0, "=TEST.SHOW(A1:B1,A1)");
      await excel.calculated();
      expect(at(3, 0)).toBe(shown);
    }, { blanks }));

  it("get error cells as the platform's error objects where the metadata allows it, and are not called where it does not", async () => {
    await beside(async (excel, { enter, at }) => {
      await enter(0, 0, "#N/A");
      await enter(1, 0, "=1/0");
      await enter(3, 0, "=TEST.SHOW(A1:B1,B1)");
      await enter(3, 1, "=TEST.ONE(B1)");
      await excel.calculated();
      expect(at(3, 0)).toBe('[[[{"error":"#N/A"},{"error":"#DIV/0!"}]],{"error":"#DIV/0!"},null,null]');
      // an argument that must be a number is no place for an error
      expect(at(3, 1)).toEqual(new ErrorValue("#DIV/0!"));
      expect(excel.host.functions.seen.map(({ name }) => name)).toEqual(["SHOW"]);
    });
    await beside(async (excel, { enter, at }) => {
      await enter(0, 0, "#N/A");
      await enter(3, 0, "=TEST.SHOW(A1:B1,1)");
      await excel.calculated();
      expect([at(3, 0), excel.host.functions.seen.length]).toEqual([new ErrorValue("#N/A"), 0]);
    }, { metadata: { functions: METADATA.functions } as FunctionsJson });
  });

  it("give 0 for null, a text for a text that reads like an error, errors for what is no number or no table", () =>
    beside(async (excel, { enter, at }) => {
      const given = ["null", "undefined", "text", "nan", "infinite", "ragged"];
      for (const [row, what] of given.entries()) await enter(0, row, `=TEST.GIVE("${what}")`);
      await enter(2, 0, '=TEST.GIVE("table")');
      await excel.calculated();
      expect(given.map((_, row) => at(0, row))).toEqual([0, 0, "#VALUE!", new ErrorValue("#VALUE!"), new ErrorValue("#NUM!"), new ErrorValue("#VALUE!")]);
      expect([at(2, 0), at(3, 0), at(2, 1), at(3, 1)]).toEqual([1, 0, "a", true]);
    }));

  it("keep the sentence of #VALUE! and #N/A, lose that of other errors, and show bugs as #VALUE!", () =>
    beside(async (excel, { enter, at, why }) => {
      const given = ["value", "none", "zero", "bug"];
      for (const [row, what] of given.entries()) await enter(0, row, `=TEST.FAIL("${what}")`);
      await excel.calculated();
      expect(given.map((_, row) => at(0, row))).toEqual(["#VALUE!", "#N/A", "#DIV/0!", "#VALUE!"].map((code) => new ErrorValue(code)));
      expect([why(0, 0), why(0, 1)]).toEqual(["Depth is blank or zero.", "No count is enough."]);
      expect(why(0, 2)).not.toContain("lost");
      expect(why(0, 3)).not.toContain("a bug");
    }));

  it("show #BUSY! while a promise runs, in the cells that depend on it too, and then the value", () =>
    beside(async (excel, { enter, at }) => {
      await enter(0, 0, "=TEST.LATER(5)");
      await enter(0, 1, "=A1+1");
      await enter(0, 2, "=TEST.SHOW(A1:A2,A2)");
      const busy = new ErrorValue("#BUSY!");
      expect([at(0, 0), at(0, 1), at(0, 2)]).toEqual([busy, busy, busy]);
      await excel.page.waitForFunction(() => window.kept.length === 1);
      expect(excel.host.functions.seen.map(({ name }) => name)).toEqual(["LATER"]);
      await excel.page.evaluate(() => (window.kept[0] as () => void)());
      await expect.poll(() => at(0, 1), { timeout: 10_000 }).toBe(6);
      await excel.calculated();
      expect([at(0, 0), at(0, 2)]).toEqual([5, "[[[5],[6]],6,null,null]"]);
    }));

  it("are cancelled when their formula goes, and not called again while nothing changes", () =>
    beside(async (excel, { enter, at }) => {
      await enter(0, 0, "=TEST.ENDLESS(1)");
      await enter(0, 1, "=TEST.ONE(1)");
      await expect.poll(() => at(0, 1), { timeout: 10_000 }).toBe("1");
      await enter(2, 2, "something else");
      expect(excel.host.functions.seen.map(({ name }) => name)).toEqual(["ENDLESS", "ONE"]);
      await enter(0, 0, "gone");
      await excel.page.waitForFunction(() => window.kept[0] === "given up 1");
      await excel.person(({ calculator }) => calculator.everythingAgain());
      await excel.calculated();
      expect(excel.host.functions.seen.map(({ name }) => name)).toEqual(["ENDLESS", "ONE", "ONE"]);
    }));

  it("show #NAME? without metadata, but #VALUE! where only the body is missing", () =>
    beside(async (excel, { enter, at }) => {
      await enter(0, 0, "=TEST.NOWHERE()");
      // the library's runtime calls what is not there, and reports the exception
      await enter(0, 1, "=TEST.MISSING()");
      await excel.calculated();
      expect([at(0, 0), at(0, 1)]).toEqual(["#NAME?", "#VALUE!"].map((code) => new ErrorValue(code)));
    }));

  it("answer a preview without touching a cell", () =>
    beside(async (excel) => {
      expect(await excel.host.ask("SHOW", [[[1, null]], undefined, "b"])).toEqual({ values: [['[[[1,0]],null,"b",null]']] });
      expect(await excel.host.ask("FAIL", ["none"])).toEqual({ values: [[new ErrorValue("#N/A")]], message: "No count is enough." });
      expect(excel.host.book.active.used(false)).toBe(undefined);
    }));

  it("bring their results once a person is done typing into a cell", () =>
    beside(async (excel, { enter, at }) => {
      await enter(0, 0, "=TEST.LATER(5)");
      await excel.page.waitForFunction(() => window.kept.length === 1);
      excel.host.faults.startEdit();
      await excel.page.evaluate(() => (window.kept[0] as () => void)());
      await excel.page.waitForTimeout(700);
      expect(at(0, 0)).toEqual(new ErrorValue("#BUSY!"));
      excel.host.faults.endEdit();
      await expect.poll(() => at(0, 0), { timeout: 10_000 }).toBe(5);
    }));

  it("stick as Excel's do, until everything is calculated or the formula is entered anew", () =>
    beside(async (excel, { enter, at }) => {
      await enter(0, 0, "=TEST.ONE(1)");
      await enter(0, 1, "=TEST.ONE(2)");
      await excel.calculated();
      const sheet = excel.host.book.active;
      await excel.person(({ calculator }) => {
        calculator.stick(sheet, 0, 0, { shown: "#BUSY!", cure: "calculate" });
        calculator.stick(sheet, 1, 0, { shown: "#NAME?", cure: "enter" });
      });
      expect([at(0, 0), at(0, 1)]).toEqual([new ErrorValue("#BUSY!"), new ErrorValue("#NAME?")]);
      await excel.page.evaluate(() => Excel.run(async (context) => context.workbook.application.calculate("Full")));
      await excel.calculated();
      expect([at(0, 0), at(0, 1)]).toEqual(["1", new ErrorValue("#NAME?")]);
      await excel.page.evaluate(() =>
        Excel.run(async (context) => {
          const cell = context.workbook.worksheets.getActiveWorksheet().getRange("A2").load("formulas");
          await context.sync();
          cell.formulas = cell.formulas;
          await context.sync();
        }),
      );
      await excel.calculated();
      expect(at(0, 1)).toBe("2");
    }));

  it("are left on #BUSY! by a page that starts anew, until everything is calculated", () =>
    beside(async (excel, { enter, at }) => {
      await enter(0, 0, "=TEST.LATER(5)");
      await enter(0, 1, "=TEST.ONE(1)");
      await excel.page.waitForFunction(() => window.kept.length === 1);
      await excel.page.reload();
      await excel.page.evaluate(() => Office.onReady());
      await enter(0, 2, "=TEST.ONE(2)");
      await expect.poll(() => at(0, 2), { timeout: 10_000 }).toBe("2");
      expect([at(0, 0), await excel.page.evaluate(() => window.kept.length)]).toEqual([new ErrorValue("#BUSY!"), 0]);
      await excel.person(({ calculator }) => calculator.everythingAgain());
      await excel.page.waitForFunction(() => window.kept.length === 1);
      await excel.page.evaluate(() => (window.kept[0] as () => void)());
      await expect.poll(() => at(0, 0), { timeout: 10_000 }).toBe(5);
    }));

  it("are called where Excel waits for a command only for what is entered", () =>
    beside(async (excel, { enter, at }) => {
      excel.host.book.calculationMode = "Manual";
      await enter(0, 0, 1);
      await enter(1, 0, "=A1+1");
      await enter(1, 1, "=TEST.ONE(A1)");
      await excel.calculated();
      expect([at(1, 0), at(1, 1)]).toEqual([2, "1"]);
      await enter(0, 0, 10);
      await excel.calculated();
      expect([at(1, 0), at(1, 1)]).toEqual([2, "1"]);
      await excel.page.evaluate(() => Excel.run(async (context) => context.workbook.application.calculate("Recalculate")));
      await excel.calculated();
      expect([at(1, 0), at(1, 1)]).toEqual([11, "10"]);
    }));
});
