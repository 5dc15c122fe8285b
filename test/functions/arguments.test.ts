import { describe, expect, it } from "vitest";
import { above0, numberFrom, oneCell, optionalNumberFrom, PERCENTILE } from "../../src/functions/arguments.js";
import { InputError } from "../../src/inputs/index.js";

const LENGTH = above0("length", "m");

describe("one value out of an argument", () => {
  it.each([[5, 5], [[[5]], 5], [[5], 5], ["a", "a"], [[["a"]], "a"], [true, true]])("takes %j as %j, bare or as a single cell", (given, value) => {
    expect(oneCell(given, "Count")).toBe(value);
  });

  it.each([null, undefined, "", "  ", [[""]], [[null]], [[]], []])("takes %j as blank", (given) => {
    expect(oneCell(given, "Count")).toBeNull();
    expect(optionalNumberFrom(given, "Poisson's ratio", LENGTH)).toBeUndefined();
    expect(() => numberFrom(given, "Length", LENGTH)).toThrow("Length is blank; it must be a length above 0 m.");
  });

  it("refuses a range of several cells", () => {
    expect(() => oneCell([[1, 2]], "Count")).toThrow(new InputError("Count is a range of several cells; one cell or one value is accepted."));
    expect(() => oneCell([[1], [2]], "Count")).toThrow("Count is a range of several cells");
  });

  // the forms in which hosts hand an error value over: its name, the code of Excel's error class, a data type with a basic value
  it.each([["#N/A"], [[["#DIV/0!"]]], [{ code: "#REF!", message: "" }], [{ type: "Error", basicValue: "#NUM!" }]])("names the error in %j", (given) => {
    const name = /#[A-Z0-9/!]+/.exec(JSON.stringify(given))?.[0] ?? "";
    expect(() => numberFrom(given, "Count", LENGTH)).toThrow(new InputError(`Count holds the error ${name}; clear that error first.`));
  });

  it("does not take an ordinary text for an error because it starts with a number sign", () => {
    expect(oneCell("#4 bar", "Model")).toBe("#4 bar");
  });

  it("takes an object of no known kind for an error, never for a number", () => {
    expect(() => numberFrom({ value: 3 }, "Count", LENGTH)).toThrow("Count holds the error #VALUE!");
  });

  it.each([
    ["five", 'Length is "five", which is text; it must be a length above 0 m.'],
    ["12.5", 'Length is "12.5", which is a number stored as text; it must be a length above 0 m.'],
    [true, "Length is TRUE; it must be a length above 0 m."],
    [0, "Length is 0; it must be a length above 0 m."],
    [-3, "Length is -3; it must be a length above 0 m."],
    [Number.NaN, "Length holds the error #NUM!; clear that error first."],
  ])("refuses %j and says what was found and what is accepted", (given, sentence) => {
    expect(() => numberFrom(given, "Length", LENGTH)).toThrow(new InputError(sentence));
  });

  it("keeps a message readable when a cell holds a page of text", () => {
    expect(() => numberFrom("x".repeat(5000), "Length", LENGTH)).toThrow(/^.{1,120}$/);
  });

  it("takes a percentile between 0 and 100, both excluded", () => {
    expect(numberFrom(0.5, "Percentile", PERCENTILE)).toBe(0.5);
    for (const wrong of [0, 100, -1, 101]) expect(() => numberFrom(wrong, "Percentile", PERCENTILE)).toThrow("it must be a percentile above 0 and below 100");
  });
});
