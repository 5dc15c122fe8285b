/** An error value of a sheet, such as #N/A. */
export class ErrorValue {
  constructor(readonly code: string) {}
}

/** What a cell holds; null is a blank cell. */
export type CellValue = number | string | boolean | null | ErrorValue;

/** The error value of a circle of cells; no file format stores it, so it never leaves the formula line. */
export const CIRCULAR = "#CYCLE!";

/** Error values that the xlsx format stores as they are. */
export const STORED_ERRORS: ReadonlySet<string> = new Set(["#NULL!", "#DIV/0!", "#VALUE!", "#REF!", "#NAME?", "#NUM!", "#N/A", "#GETTING_DATA"]);

/** Error values that a csv may hold as text, and that a formula may name. */
export const ERROR_CODES: ReadonlySet<string> = new Set([...STORED_ERRORS, "#SPILL!", "#CALC!", "#FIELD!", "#BLOCKED!", "#CONNECT!", "#BUSY!", "#UNKNOWN!"]);

/** What each error value says in words where no function gave a better reason. */
export function errorInWords(code: string): string {
  const words: Readonly<Record<string, string>> = {
    "#DIV/0!": "A number is divided by zero or by a blank cell.",
    "#N/A": "No value is available: something that was looked up is not there, or the value was entered as #N/A.",
    "#NAME?": "A name or a function in the formula is not known.",
    "#NULL!": "Two ranges that are written as crossing do not cross.",
    "#NUM!": "A number is too large, too small or outside what the function accepts.",
    "#REF!": "The formula refers to cells that do not exist.",
    "#SPILL!": "The table that the formula gives does not fit into the free cells below and beside it.",
    "#VALUE!": "A text, a range or an error stands where one number is needed.",
    "#CALC!": "The formula gives an empty table.",
    [CIRCULAR]: "The formula refers to itself.",
  };
  return words[code] ?? `The formula gives the error value ${code}.`;
}
