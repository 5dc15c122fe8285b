import { describe, expect, it } from "vitest";
import { DomainError } from "../../src/engine/index.js";
import { answer, NoAnswer } from "../../src/functions/answer.js";
import { InputError } from "../../src/inputs/index.js";
import { failing, refusal } from "./refusal.js";

describe("the wrapper around every function", () => {
  it("hands values through as they are", () => {
    expect(answer(() => 0.1 + 0.2)).toBe(0.1 + 0.2);
    expect(answer(() => "Probeworth")).toBe("Probeworth");
    expect(answer(() => [["Count", 1], [true, ""]])).toEqual([["Count", 1], [true, ""]]);
  });

  it("writes nothing as empty text, because Excel shows a null as 0", () => {
    expect(answer(() => [[null, undefined, 0]])).toEqual([["", "", 0]]);
  });

  it("puts the sentence of a refused input or argument into the cell unchanged", () => {
    expect(refusal(() => answer(failing(new InputError("Per hole in row 31 is blank or zero."))))).toEqual(["#VALUE!", "Per hole in row 31 is blank or zero."]);
    expect(refusal(() => answer(failing(new DomainError("Length is -1; it must be 0 m or more."))))).toEqual(["#VALUE!", "Length is -1; it must be 0 m or more."]);
  });

  it("shows #N/A where the inputs are fine and there is nothing to answer", () => {
    expect(refusal(() => answer(failing(new NoAnswer("A count of 0 has no holes to place."))))).toEqual(["#N/A", "A count of 0 has no holes to place."]);
  });

  it("keeps the reason of a bug and says whose fault it is", () => {
    const [code, sentence] = refusal(() => answer(failing(new TypeError("x is not a function."))));
    expect(code).toBe("#VALUE!");
    expect(sentence).toBe("Something went wrong inside PROBE: x is not a function. Please report it together with the site block.");
    expect(refusal(() => answer(failing("out of memory")))[1]).toContain("out of memory");
  });

  it.each([Number.NaN, Infinity, -Infinity])("never lets %s out, alone or inside a table", (value) => {
    expect(refusal(() => answer(() => value))[1]).toContain(`a result came out as ${String(value)}`);
    expect(refusal(() => answer(() => [["Total", 1], ["Total", value]]))[1]).toContain(`a result came out as ${String(value)}`);
  });

  it("never lets an object into a cell", () => {
    expect(refusal(() => answer(() => [[{}]]))[1]).toContain("a result came out as object");
  });
});
