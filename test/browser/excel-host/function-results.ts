import { ERROR_CODES, ErrorValue, type CellValue } from "../../../src/formula/cell-value.js";

/** A result as the library's runtime sends it: number of the call, success, value, code of the failure. */
export type RawResult = readonly [id: number, succeeded: boolean, value: unknown, code?: number];

/** What a cell gets from a call, and the words that came with an error. */
export interface FunctionResult {
  readonly values: readonly (readonly CellValue[])[];
  readonly message?: string;
}

/** The runtime's own numbers of failures and the error values that Excel shows for them. */
const FAILURES: Readonly<Record<number, string>> = { 0: "#VALUE!", 1: "#N/A", 2: "#VALUE!", 3: "#VALUE!", 4: "#VALUE!", 5: "#DIV/0!", 6: "#NUM!", 7: "#VALUE!", 8: "#NULL!", 9: "#NAME?", 10: "#NAME?" };
/** Words reach the cell with these two alone. */
const WITH_WORDS: ReadonlySet<string> = new Set(["#VALUE!", "#N/A"]);

/** Turns what a function gave into what its cell shows. */
export function functionResult([, succeeded, value, code]: RawResult): FunctionResult {
  if (!succeeded) {
    const error = FAILURES[code ?? 0] ?? "#VALUE!";
    return { values: [[new ErrorValue(error)]], ...(typeof value === "string" && value !== "" && WITH_WORDS.has(error) ? { message: value } : {}) };
  }
  if (!Array.isArray(value)) return { values: [[cellOf(value)]], ...wordsOf(value) };
  const rows = value as unknown[];
  const width = Array.isArray(rows[0]) ? rows[0].length : 0;
  // Excel shows a table only if all its rows are equally long
  if (width === 0 || !rows.every((row) => Array.isArray(row) && row.length === width)) return { values: [[new ErrorValue("#VALUE!")]] };
  return { values: (rows as unknown[][]).map((row) => row.map(cellOf)), ...(rows as unknown[][]).flat().map(wordsOf).find(({ message }) => message !== undefined) };
}

/** A text that reads like an error stays a text; null and what is missing become 0. */
function cellOf(value: unknown): CellValue {
  if (value === null || value === undefined) return 0;
  if (typeof value === "number" || typeof value === "string" || typeof value === "boolean") return value;
  const error = errorOf(value);
  return new ErrorValue(error !== undefined && ERROR_CODES.has(error.code) ? error.code : "#VALUE!");
}

function wordsOf(value: unknown): { message?: string } {
  const error = errorOf(value);
  return typeof error?.message === "string" && WITH_WORDS.has(error.code) ? { message: error.message } : {};
}

function errorOf(value: unknown): { code: string; message?: unknown } | undefined {
  return typeof value === "object" && value !== null && "valueType" in value && value.valueType === "CustomFunctionError" && "code" in value ? (value as { code: string }) : undefined;
}
