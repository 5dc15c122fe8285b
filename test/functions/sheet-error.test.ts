import { afterEach, describe, expect, it } from "vitest";
import { SheetError, sheetError } from "../../src/functions/sheet-error.js";

const host = globalThis as { CustomFunctions?: unknown };

describe("the error that a cell shows", () => {
  afterEach(() => {
    delete host.CustomFunctions;
  });

  it("is our own class with code and sentence where Excel is absent", () => {
    const error = sheetError("#VALUE!", "Count is blank.");
    expect(error).toBeInstanceOf(SheetError);
    expect(error).toMatchObject({ code: "#VALUE!", message: "Count is blank." });
    expect(sheetError("#N/A", "No holes.")).toMatchObject({ code: "#N/A", message: "No holes." });
  });

  it("is Excel's class inside Excel, with the code of its own enumeration", () => {
    class ExcelError {
      constructor(
        readonly code: string,
        readonly message: string,
      ) {}
    }
    host.CustomFunctions = { Error: ExcelError, ErrorCode: { invalidValue: "excel's invalid value", notAvailable: "excel's not available" } };
    expect(sheetError("#VALUE!", "Count is blank.")).toBeInstanceOf(ExcelError);
    expect(sheetError("#VALUE!", "Count is blank.")).toMatchObject({ code: "excel's invalid value", message: "Count is blank." });
    expect(sheetError("#N/A", "No holes.")).toMatchObject({ code: "excel's not available", message: "No holes." });
  });

  it("is our own class where a page has the registration part of Excel's runtime only", () => {
    host.CustomFunctions = { associate: () => undefined };
    expect(sheetError("#VALUE!", "Count is blank.")).toBeInstanceOf(SheetError);
  });
});
