/** The two error values that may carry a sentence of our own into a cell. */
export type SheetErrorCode = "#VALUE!" | "#N/A";

/** What a function throws where Excel's own error class is absent: same code, same sentence. */
export class SheetError extends Error {
  override readonly name = "SheetError";
  constructor(
    readonly code: SheetErrorCode,
    message: string,
  ) {
    super(message);
  }
}

interface ExcelRuntime {
  /** absent where a page has only the part that registers functions */
  readonly Error?: new (code: string, message: string) => Error;
  readonly ErrorCode: { readonly invalidValue: string; readonly notAvailable: string };
}

/**
 * Makes the error that a host puts into the cell: Excel's own class inside Excel, ours anywhere else.
 *
 * @param code      "#VALUE!" for an input that cannot be used, "#N/A" where no answer exists
 * @param sentence  the reason in words, for the person
 * @returns         an object with that code and that message, to be thrown
 */
export function sheetError(code: SheetErrorCode, sentence: string): Error {
  const excel = (globalThis as unknown as { CustomFunctions?: ExcelRuntime }).CustomFunctions;
  if (excel?.Error === undefined) return new SheetError(code, sentence);
  return new excel.Error(code === "#N/A" ? excel.ErrorCode.notAvailable : excel.ErrorCode.invalidValue, sentence);
}
