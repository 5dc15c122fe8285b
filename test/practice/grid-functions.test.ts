import { ArrayValueObject, ErrorType, ErrorValueObject, NullValueObject, NumberValueObject, StringValueObject, type BaseValueObject } from "@univerjs/engine-formula";
import { expect, it } from "vitest";
import { FUNCTIONS } from "../../src/functions/registry.js";
import { templateRows } from "../../src/inputs/index.js";
import { CellReasons } from "../../src/practice/cell-reasons.js";
import { functionDescriptions, gridFunctions } from "../../src/practice/grid-functions.js";

const number = (value: number) => NumberValueObject.create(value);
const text = (value: string) => StringValueObject.create(value);

function range(rows: readonly (readonly (string | number | null)[])[]): BaseValueObject {
  const cell = (value: string | number | null) => (value === null || value === "" ? NullValueObject.create() : typeof value === "number" ? number(value) : text(value));
  return ArrayValueObject.create({ calculateValueList: rows.map((row) => row.map(cell)), rowCount: rows.length, columnCount: rows[0]!.length, unitId: "", sheetId: "", row: 0, column: 0 });
}

function called(id: string, ...variants: BaseValueObject[]) {
  const reasons = new CellReasons();
  const [Made, name] = gridFunctions(reasons).find(([, each]) => each === `PROBE.${id}`)!;
  const made = new Made(name);
  made.setRefInfo("book", "sheet", 4, 2);
  const result = made.calculate(...variants) as BaseValueObject;
  return { result, reasons: reasons.at("sheet", 4, 2) };
}

it("offers every function under its dotted name", () => {
  expect(gridFunctions(new CellReasons()).map(([, name]) => name).sort()).toEqual([...FUNCTIONS.keys()].map((id) => `PROBE.${id}`).sort());
});

// Source: Vanmarcke (1983), Markov correlation at T = theta: (1 + e^-2)/2
it("gives a number from numbers, bare or as single cells", () => {
  for (const argument of [number(3), range([[3]])]) {
    const { result, reasons } = called("VARIANCEFACTOR", argument, number(3));
    expect(result.isNumber()).toBe(true);
    expect(result.getValue()).toBeCloseTo((1 + Math.exp(-2)) / 2, 12);
    expect(reasons).toEqual([]);
  }
});

it("gives a table from a range, text as text", () => {
  const { result } = called("CHECK", range(templateRows()));
  expect(result.isArray()).toBe(true);
  const rows = (result as ArrayValueObject).getArrayValue();
  expect(rows.length).toBeGreaterThan(30);
  expect(rows.every((row) => row.length === 4 && row.every((cell) => cell?.isString() === true || cell?.isNumber() === true))).toBe(true);
  expect(rows.flat().map((cell) => cell!.getValue())).toContain("Mean stiffness");
});

it("turns a refusal into #VALUE! and keeps its sentence for the cell", () => {
  const { result, reasons } = called("SETTLEMENT", number(1000), text("ten"));
  expect(result.isError()).toBe(true);
  expect(result.getValue()).toBe(ErrorType.VALUE);
  expect(reasons).toHaveLength(1);
  expect(reasons[0]).toMatch(/Length.*"ten"/);
});

it("turns the absence of an answer into #N/A with its sentence", () => {
  // 20 MN on a 0.3 m pile in 1 MPa ground: no length up to 60 m keeps it within 1 mm
  const { result, reasons } = called("DESIGNLENGTH", number(20000), number(0.3), number(1), number(30), number(1));
  expect(result.getValue()).toBe(ErrorType.NA);
  expect(reasons).toHaveLength(1);
});

it("tells a function that an argument is an error, a blank or left out", () => {
  expect(called("SETTLEMENT", ErrorValueObject.create(ErrorType.DIV_BY_ZERO), number(10)).reasons[0]).toMatch(/#DIV\/0!/);
  expect(called("SETTLEMENT", number(1000), NullValueObject.create()).reasons[0]).toMatch(/Length is blank/);
  expect(called("SETTLEMENT", number(1000), number(10)).reasons[0]).toMatch(/Diameter is blank/);
});

it("describes each function with its arguments, optional and repeating ones marked", () => {
  const [told] = functionDescriptions([{ id: "X", description: "Does it.", parameters: [{ name: "a_m", description: "Length, m." }, { name: "b", optional: true }, { name: "c", repeating: true }] }]);
  expect(told).toMatchObject({ functionName: "PROBE.X", description: "Does it.", functionParameter: [{ name: "a_m", detail: "Length, m.", require: 1, repeat: 0 }, { require: 0 }, { repeat: 1 }] });
});
