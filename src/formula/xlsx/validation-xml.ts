import type { CellValidation, PlannedCell } from "../../host/workbook.js";
import { cellAddress } from "../addresses.js";
import { escaped } from "./xml.js";

/** The format's limits: signs of a list within quotation marks, and of the words that a refusal shows. */
const LONGEST_LIST = 255;
const LONGEST_WORDS = 255;

/**
 * What may be written into the cells of a sheet, as an element of its part.
 *
 * @returns "" where everything may be written everywhere
 */
export function validationsXml(cells: readonly PlannedCell[]): string {
  const rules = cells.flatMap((cell) => (cell.validation === undefined ? [] : [ruleXml(cell, cell.validation)]));
  return rules.length === 0 ? "" : `<dataValidations count="${rules.length}">${rules.join("")}</dataValidations>`;
}

function ruleXml({ row, column }: PlannedCell, validation: CellValidation): string {
  const address = cellAddress(row, column);
  const [kind, formulas] = condition(address, validation);
  const elements = formulas.map((formula, k) => `<formula${k + 1}>${escaped(formula)}</formula${k + 1}>`).join("");
  return `<dataValidation${kind} allowBlank="1" showErrorMessage="1" errorTitle="Not accepted" error="${escaped(shortened(validation.words))}" sqref="${address}">${elements}</dataValidation>`;
}

/** The attributes of the rule's kind, and its formulas. */
function condition(address: string, validation: CellValidation): [string, string[]] {
  if (validation.kind === "choice") {
    const list = validation.choices.join(",");
    if (list.length <= LONGEST_LIST && !validation.choices.some((choice) => /[,"]/.test(choice))) return [' type="list"', [`"${list}"`]];
    return [' type="custom"', [isOneOf(address, validation.choices)]];
  }
  const { least, most, whole = false, orWords = [] } = validation;
  if (orWords.length === 0) {
    const kind = ` type="${whole ? "whole" : "decimal"}"`;
    if (least !== undefined && most !== undefined) return [kind, [written(least), written(most)]];
    if (least !== undefined) return [`${kind} operator="greaterThanOrEqual"`, [written(least)]];
    if (most !== undefined) return [`${kind} operator="lessThanOrEqual"`, [written(most)]];
  }
  const tests = [`ISNUMBER(${address})`, ...(least === undefined ? [] : [`${address}>=${written(least)}`]), ...(most === undefined ? [] : [`${address}<=${written(most)}`]), ...(whole ? [`${address}=INT(${address})`] : [])];
  // a comparison of a text with a number is true in a sheet, so the number must be asked for first
  const isNumber = tests.slice(1).reduce((formula, test) => `IF(${formula},${test},FALSE)`, tests[0]!);
  return [' type="custom"', [orWords.length === 0 ? isNumber : `IF(${isNumber},TRUE,${isOneOf(address, orWords)})`]];
}

/** A sheet compares texts without regard to case. */
function isOneOf(address: string, words: readonly string[]): string {
  return `OR(${words.map((word) => `${address}="${word.replaceAll('"', '""')}"`).join(",")})`;
}

function shortened(words: string): string {
  return words.length <= LONGEST_WORDS ? words : `${words.slice(0, LONGEST_WORDS - 3).replace(/\s+\S*$/, "")}...`;
}

function written(number: number): string {
  return String(number).toUpperCase();
}
