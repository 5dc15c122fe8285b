import { describe, expect, it } from "vitest";
import { Calculation } from "../../src/formula/calculation.js";
import { ErrorValue } from "../../src/formula/cell-value.js";
import { bookOf, calculationOf, outcomeAt, plain } from "./cells.js";

/** Calculates one formula beside some cells. */
function of(formula: string, cells: Parameters<typeof bookOf>[0] = {}, names: Parameters<typeof bookOf>[2] = [], more: Parameters<typeof bookOf>[1] = {}): unknown[][] {
  return plain(calculationOf(bookOf({ Main: {}, ...cells }, more, names)).formula(formula, 0).values);
}

describe("the order of calculation", () => {
  // Each cell adds 1 to the one above; the sum follows by counting.
  it("follows a chain of 20,000 cells from its far end", () => {
    const chain = Object.fromEntries(Array.from({ length: 20_000 }, (_, k) => [`A${k + 1}`, k === 0 ? 1 : `=A${k}+1`]));
    const calculation = calculationOf(bookOf({ Main: chain }));
    expect(outcomeAt(calculation, "A20000").values).toEqual([[20_000]]);
  });

  it("calculates formulas of the same wording that reach each other through their own place", () => {
    // Each adds its row number to the cell above: 1, 1 + 2, 3 + 3, 6 + 4.
    const same = '=SUM(INDIRECT("A"&(ROW()-1)),ROW())';
    const calculation = calculationOf(bookOf({ Main: { A1: 1, A2: same, A3: same, A4: same } }));
    expect(outcomeAt(calculation, "A4").values).toEqual([[10]]);
    expect(outcomeAt(calculation, "A3").values).toEqual([[6]]);
  });

  it("keeps the sheet of a formula while another sheet's formula of the same wording is calculated", () => {
    const calculation = calculationOf(bookOf({ One: { A1: 1, B1: "=Two!B1+A1" }, Two: { A1: 10, B1: "=A1*2" } }));
    expect(outcomeAt(calculation, "B1").values).toEqual([[21]]);
  });

  it("names the way of a circle and goes on with the other cells", () => {
    const calculation = calculationOf(bookOf({ Main: { A1: "=B1+1", B1: "=C1*2", C1: "=A1", D1: "=A1+1", E1: "=1+1" } }));
    const { values, reason } = outcomeAt(calculation, "A1");
    expect(plain(values)).toEqual([["#CYCLE!"]]);
    expect(reason).toContain("in a circle: Main!A1, Main!B1, Main!C1, Main!A1");
    expect(outcomeAt(calculation, "D1").source).toBe("Main!A1");
    expect(outcomeAt(calculation, "E1").values).toEqual([[2]]);
  });

  it("finds a circle that is longer than the formulas that may lie within each other", () => {
    const circle = Object.fromEntries(Array.from({ length: 500 }, (_, k) => [`A${k + 1}`, `=A${((k + 1) % 500) + 1}+1`]));
    const calculation = calculationOf(bookOf({ Main: circle }));
    expect(plain(outcomeAt(calculation, "A250").values)).toEqual([["#CYCLE!"]]);
    expect(plain(outcomeAt(calculation, "A1").values)).toEqual([["#CYCLE!"]]);
  });

  it("leaves the stored values of a circle in a workbook that iterates", () => {
    const circle = { A1: { value: 7, formula: "B1+1" }, B1: { value: 6, formula: "A1-1" } };
    const { values, isKept, reason } = outcomeAt(calculationOf(bookOf({ Main: circle }, { iterates: true })), "A1");
    expect(values).toEqual([[7]]);
    expect(isKept).toBe(true);
    expect(reason).toContain("iterates");
  });
});

describe("names", () => {
  const names = [{ name: "Rate", meaning: "2" }, { name: "Rate", meaning: "Other!$A$1", sheet: 1 }, { name: "Above", meaning: "A1048576" }, { name: "Twice", meaning: "Rate*2" }, { name: "Round", meaning: "Round+1" }, { name: "Add", meaning: "_xlfn.LAMBDA(_xlpm.x,_xlpm.x+1)" }];

  it("prefers the name of the sheet to that of the workbook", () => {
    const calculation = calculationOf(bookOf({ Main: { B2: "=Rate*10" }, Other: { A1: 5, B2: "=Rate*10", B3: "=Main!Rate*10" } }, {}, names));
    expect(outcomeAt(calculation, "B2", 0).values).toEqual([[20]]);
    expect(outcomeAt(calculation, "B2", 1).values).toEqual([[50]]);
    expect(outcomeAt(calculation, "B3", 1).values).toEqual([[20]]);
  });

  it("moves the references of a name with the cell that uses it", () => {
    // "A1048576" seen from A1 is the cell above, round the edge of the sheet.
    const calculation = calculationOf(bookOf({ Main: { C4: 9, C5: "=Above+1" } }, {}, names));
    expect(outcomeAt(calculation, "C5").values).toEqual([[10]]);
  });

  it("takes names within names, functions as names and names of any case", () => {
    expect(of("=TWICE", {}, names)).toEqual([[4]]);
    expect(of("=Add(4)", {}, names)).toEqual([[5]]);
  });

  it("says that a name stands for itself, or is not there", () => {
    const calculation = calculationOf(bookOf({ Main: {} }, {}, names));
    expect(calculation.formula("=Round", 0).reason).toContain("stands for itself");
    expect(calculation.formula("=Raet", 0).reason).toContain("the nearest is Rate");
  });

  it("does not take a variable of LET for a name", () => {
    expect(of("=LET(Rate,7,Rate+1)", {}, names)).toEqual([[8]]);
    expect(of("=MAP({1,2},LAMBDA(rate,rate*10))", {}, names)).toEqual([[10, 20]]);
  });
});

describe("one value out of a range", () => {
  const cells = { Main: { A1: 1, A2: 2, A3: 3, B2: "=A1:A3*10", B3: "=ABS(A:A)", B4: "=A1:A3", C1: "=SUM(A1:A3*2)", D1: "=@A1:A3", D2: "=>@A1:A3*10", D3: "=>SUM(@A1:A3,@SEQUENCE(3,1,7))", E2: "=_xlfn.SINGLE(A1:A3)" } };

  it("takes the cell of its own row, as a stored ordinary formula does", () => {
    const calculation = calculationOf(bookOf(cells));
    expect(outcomeAt(calculation, "B2").values).toEqual([[20]]);
    expect(outcomeAt(calculation, "B3").values).toEqual([[3]]);
    expect(outcomeAt(calculation, "D1").values).toEqual([[1]]);
    expect(outcomeAt(calculation, "D2").values).toEqual([[20]]);
    expect(outcomeAt(calculation, "D3").values).toEqual([[10]]);
    expect(outcomeAt(calculation, "E2").values).toEqual([[2]]);
  });

  it("is an error beside the range, and none within a function that takes ranges", () => {
    const calculation = calculationOf(bookOf(cells));
    expect(plain(outcomeAt(calculation, "B4").values)).toEqual([["#VALUE!"]]);
    expect(outcomeAt(calculation, "C1").values).toEqual([[12]]);
  });

  it("spills where the formula says so", () => {
    expect(of("=Main!A1:A3*10", { Main: { A1: 1, A2: 2, A3: 3 } })).toEqual([[10], [20], [30]]);
  });
});

describe("tables that spill", () => {
  it("are read from the cells that they fill, whoever is asked first", () => {
    const calculation = calculationOf(bookOf({ Main: { C1: "=SUM(A1:A5)", D1: "=A2*100", E1: "=SUM(_xlfn.ANCHORARRAY(A1))", A1: "=>SEQUENCE(4)" } }));
    expect(outcomeAt(calculation, "D1").values).toEqual([[200]]);
    expect(outcomeAt(calculation, "C1").values).toEqual([[10]]);
    expect(outcomeAt(calculation, "E1").values).toEqual([[10]]);
  });

  it("may stand on each other three deep", () => {
    const calculation = calculationOf(bookOf({ Main: { D1: "=>C1:C3*10", C1: "=>B1:B3+1", B1: "=>SEQUENCE(3)" } }));
    expect(outcomeAt(calculation, "D1").values).toEqual([[20], [30], [40]]);
  });

  it("say what is in their way", () => {
    const calculation = calculationOf(bookOf({ Main: { A1: "=>SEQUENCE(3)", A3: "taken", B1: "=A1" } }));
    const { values, reason } = outcomeAt(calculation, "A1");
    expect(plain(values)).toEqual([["#SPILL!"]]);
    expect(reason).toBe("The formula gives a table over A1:A3, and A3 is not empty.");
    expect(plain(outcomeAt(calculation, "B1").values)).toEqual([["#SPILL!"]]);
  });

  it("do not make a circle of a formula that reads blank cells below them", () => {
    // A2's table could reach C9, which B1 reads as blank; A2 itself depends on B1.
    const calculation = calculationOf(bookOf({ Main: { B1: "=SUM(C8:C9)+1", A2: "=>SEQUENCE(B1)" } }));
    expect(outcomeAt(calculation, "B1").values).toEqual([[1]]);
    expect(outcomeAt(calculation, "A2").values).toEqual([[1]]);
  });

  it("are read anew in cells that were blank when another formula read them", () => {
    // B1 reads A8:A9 before A2, whose length it decides, fills them with 7 and 8
    const calculation = calculationOf(bookOf({ Main: { B1: "=SUM(A8:A9)+8", A2: "=>SEQUENCE(B1)", C1: "=SUM(A8:A9)" } }));
    expect(outcomeAt(calculation, "B1").values).toEqual([[8]]);
    expect(outcomeAt(calculation, "A2").values).toHaveLength(8);
    expect(outcomeAt(calculation, "C1").values).toEqual([[15]]);
  });

  it("fill a fixed rectangle with repeats and #N/A", () => {
    const fixed = (address: string, formula: string, bottom: number, right: number): object => ({ [address]: { formula, placement: { kind: "fixed", area: { top: 0, left: 0, bottom, right } } } });
    expect(plain(outcomeAt(calculationOf(bookOf({ Main: fixed("A1", "{1,2}", 1, 2) as never })), "A1").values)).toEqual([[1, 2, "#N/A"], [1, 2, "#N/A"]]);
    expect(plain(outcomeAt(calculationOf(bookOf({ Main: fixed("A1", "5", 1, 1) as never })), "A1").values)).toEqual([[5, 5], [5, 5]]);
  });
});

describe("errors and their reasons", () => {
  it("names the cell in which an error began, also for a second reader of the same range", () => {
    const calculation = calculationOf(bookOf({ Main: { A1: 1, A2: "=A1/0", B1: "=SUM(A1:A2)", B2: "=SUM(A1:A2)", C1: "=B1+B2", D1: "=SUM(Main!$E$1:E2)", E1: new ErrorValue("#N/A") } }));
    for (const address of ["B1", "B2", "C1"]) expect(outcomeAt(calculation, address).source).toBe("Main!A2");
    expect(outcomeAt(calculation, "D1")).toMatchObject({ source: "Main!E1", reason: "the cell holds the error value #N/A." });
  });

  it("does not blame an error that the formula has caught", () => {
    const calculation = calculationOf(bookOf({ Main: { A1: new ErrorValue("#N/A"), B1: "=IFERROR(A1,0)/0", B2: "=IFERROR(1/0,A1)" } }));
    expect(outcomeAt(calculation, "B1")).toEqual({ values: [[new ErrorValue("#DIV/0!")]], reason: "A number is divided by zero or by a blank cell.", isKept: false, isChanging: false });
    expect(outcomeAt(calculation, "B2").source).toBe("Main!A1");
  });

  it("keeps the stored value of what it cannot calculate, with the reason", () => {
    const kept = { A1: { value: 5, formula: "[1]Prices!A1*2" }, A2: { value: 6, formula: "OTHERADDIN(1)" }, A3: { value: "x", formula: 'GETPIVOTDATA("a",$A$1)' }, A4: { value: null, formula: "OTHERADDIN(1)" }, B1: "=A1+1" };
    const calculation = calculationOf(bookOf({ Main: kept }));
    expect(outcomeAt(calculation, "A1")).toMatchObject({ values: [[5]], isKept: true });
    expect(outcomeAt(calculation, "A1").reason).toContain("another workbook");
    expect(outcomeAt(calculation, "A2").reason).toContain("No function named OTHERADDIN");
    expect(outcomeAt(calculation, "A3")).toMatchObject({ values: [["x"]], isKept: true });
    expect(outcomeAt(calculation, "A4").isKept).toBe(false);
    expect(outcomeAt(calculation, "B1").values).toEqual([[6]]);
  });

  it("does not keep a value where the formula itself is wrong", () => {
    const calculation = calculationOf(bookOf({ Main: { A1: { value: 5, formula: "SUM(1" }, A2: { value: 5, formula: "Nothing!A1" } } }));
    expect(outcomeAt(calculation, "A1")).toMatchObject({ isKept: false, reason: "The formula cannot be read: a closing bracket is missing." });
    expect(outcomeAt(calculation, "A2").reason).toBe("The workbook has no sheet named Nothing; it has Main.");
  });

  it.each([
    ["=SUM(1,2", "a closing bracket is missing"],
    ["=SUM(1))", "a closing bracket has no opening one"],
    ['="abc', "a text has no closing quotation mark"],
    ["=1+", "cannot be read"],
    ["=1 ~ 2", "the sign ~ has no meaning there"],
    ["=SUM((A1,A2))", "joins several ranges with commas"],
    ["=A1:B2 B1:C3", "cells that two ranges share"],
    ["=SUM(Main:Other!A1)", "several sheets at once"],
    ["=A0+1", "has no name A0"],
    ["=XFE1+1", "has no name XFE1"],
    ["=5#", "the sign # stands after something that is not a cell"],
    ["=A1#", "spills no table"],
    ["=PROBE.TOTALCOSTS(1)", "No function named PROBE.TOTALCOSTS is known"],
  ])("says what is wrong with %s", (formula, sentence) => {
    expect(calculationOf(bookOf({ Main: {} })).formula(formula, 0).reason).toContain(sentence);
  });

  it("does not calculate days in a workbook that counts them from 1904", () => {
    const calculation = calculationOf(bookOf({ Main: { A1: { value: 44895, formula: "DATE(2026,12,1)" }, A2: { value: 2, formula: "1+1" } } }, { dates1904: true }));
    expect(outcomeAt(calculation, "A1")).toMatchObject({ values: [[44895]], isKept: true });
    expect(outcomeAt(calculation, "A2").isKept).toBe(false);
  });

  it("marks what changes at each calculation", () => {
    const calculation = calculationOf(bookOf({ Main: { A1: "=RAND()", A2: "=1+1" } }));
    expect(outcomeAt(calculation, "A1").isChanging).toBe(true);
    expect(outcomeAt(calculation, "A2").isChanging).toBe(false);
  });
});

describe("ranges", () => {
  it("reads whole columns in less than a second, however many", () => {
    const calculation = calculationOf(bookOf({ Main: { A1: 1, B9: 2, D500: 3 } }));
    // counted in the processor's time, because other programs may hold the machine
    const began = process.cpuUsage();
    expect(calculation.formula("=SUM(A:D)", 0).values).toEqual([[6]]);
    expect(calculation.formula("=SUM(1:1048576)", 0).values).toEqual([[6]]);
    expect(calculation.formula("=SUMPRODUCT(A:A*B:B)", 0).values).toEqual([[0]]);
    const { user, system } = process.cpuUsage(began);
    expect((user + system) / 1000).toBeLessThan(1000);
    expect(calculation.formula("=ROWS(A:A)", 0).values).toEqual([[1_048_576]]);
  });

  it("prints blank cells of a table apart from zeros, and a single blank cell as a sheet shows it", () => {
    expect(of("=Main!A1:B2", { Main: { A1: 0, B2: "x" } })).toEqual([[0, null], [null, "x"]]);
    expect(of("=Main!A1", { Main: { A2: 1 } })).toEqual([[0]]);
  });

  it("reads the columns of a table by their names", () => {
    const tables = [{ name: "Costs", sheet: 0, area: { top: 0, left: 0, bottom: 4, right: 1 }, headerRows: 1, totalsRows: 1, columns: ["Item", "Price [EUR]"] }];
    const cells = { Main: { A1: "Item", B1: "Price [EUR]", A2: "a", B2: 10, A3: "b", B3: 20, A4: "c", B4: 30, A5: "Sum", B5: 60, C3: "=Costs[[#This Row],[Price '[EUR']]]*2", D3: "=Costs[@[Price '[EUR']]]" } };
    const calculation = calculationOf(bookOf(cells, { tables }));
    expect(calculation.formula("=SUM(Costs[Price '[EUR']])", 0).values).toEqual([[60]]);
    expect(calculation.formula("=SUM(Costs[[#All],[Price '[EUR']]])", 0).values).toEqual([[120]]);
    expect(calculation.formula("=Costs[[#Totals],[Price '[EUR']]]", 0).values).toEqual([[60]]);
    expect(calculation.formula("=ROWS(Costs[])", 0).values).toEqual([[3]]);
    expect(calculation.formula("=Costs[#Headers]", 0).values).toEqual([["Item", "Price [EUR]"]]);
    expect(outcomeAt(calculation, "C3").values).toEqual([[40]]);
    expect(outcomeAt(calculation, "D3").values).toEqual([[20]]);
    expect(calculation.formula("=SUM(Costs[Prize])", 0).reason).toBe("The table Costs has no column named Prize.");
    expect(calculation.formula("=SUM(Cost[Price])", 0).reason).toBe("The workbook has no table named Cost.");
  });

  it("leaves subtotals, hidden rows and filtered rows out of a subtotal as a sheet does", () => {
    const cells = { A1: 1, A2: 2, A3: "=SUBTOTAL(9,A1:A2)", A4: 4, A5: "=SUBTOTAL(9,A1:A4)", A6: "=SUBTOTAL(109,A1:A4)" };
    const book = bookOf({ Main: cells });
    expect(outcomeAt(calculationOf(book), "A5").values).toEqual([[7]]);
    const hidden = { ...book, sheets: [{ ...book.sheets[0]!, hiddenRows: new Set([1]) }] };
    expect(outcomeAt(calculationOf(hidden), "A5").values).toEqual([[7]]);
    expect(outcomeAt(calculationOf(hidden), "A6").values).toEqual([[5]]);
    const filtered = { ...book, sheets: [{ ...book.sheets[0]!, hiddenRows: new Set([1]), filteredRows: new Set([1]) }] };
    expect(outcomeAt(calculationOf(filtered), "A5").values).toEqual([[5]]);
  });
});

it("keeps two workbooks apart that are open at once", () => {
  const [first, second] = [1, 2].map((value) => new Calculation(bookOf({ Main: { A1: value, A2: value } }), () => []));
  expect(first!.formula("=SUM(A1:A2)", 0).values).toEqual([[2]]);
  expect(second!.formula("=SUM(A1:A2)", 0).values).toEqual([[4]]);
  expect(first!.formula("=SUM(A1:A2)*1", 0).values).toEqual([[2]]);
});
