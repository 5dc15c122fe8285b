import { areaAddress } from "./addresses.js";
import type { CellValidation, PlannedCell } from "./workbook.js";

/** Signs of a list that stands in the rule itself. */
const LONGEST_LIST = 255;
/** Signs of the words beside a cell and of those that refuse. */
const LONGEST_WORDS = 255;

/** Makes Excel refuse what a cell of the plan may not hold, and say what it may hold beside the selected cell. */
export function applyValidation(sheet: Excel.Worksheet, cell: PlannedCell): void {
  const { row, column, validation } = cell;
  if (validation === undefined) return;
  const { dataValidation } = sheet.getCell(row, column);
  const address = areaAddress({ top: row, left: column, bottom: row, right: column });
  const words = validation.words.slice(0, LONGEST_WORDS);
  dataValidation.rule = ruleOf(validation, address);
  dataValidation.ignoreBlanks = true;
  dataValidation.prompt = { showPrompt: true, title: "", message: words };
  dataValidation.errorAlert = { showAlert: true, style: "Stop", title: "Not accepted here", message: words };
}

function ruleOf(validation: CellValidation, address: string): Excel.DataValidationRule {
  if (validation.kind === "number") return numberRule(validation, address);
  const list = validation.choices.join(",");
  // A list in the rule itself has no way to write a comma within a word.
  const fits = list.length <= LONGEST_LIST && !validation.choices.some((choice) => /[,"]/.test(choice));
  return fits ? { list: { inCellDropDown: true, source: list } } : { custom: { formula: `=OR(${validation.choices.map((word) => isWord(address, word)).join(",")})` } };
}

function numberRule({ least, most, whole, orWords = [] }: Extract<CellValidation, { kind: "number" }>, address: string): Excel.DataValidationRule {
  if (orWords.length === 0 && least !== undefined && most !== undefined) {
    const range = { formula1: least, formula2: most, operator: "Between" as const };
    return whole === true ? { wholeNumber: range } : { decimal: range };
  }
  // The conditions are one after the other, because AND asks all of them and a comparison of a text with a number means nothing.
  const conditions = [...(least === undefined ? [] : [`${address}>=${least}`]), ...(most === undefined ? [] : [`${address}<=${most}`]), ...(whole === true ? [`${address}=INT(${address})`] : [])];
  const number = conditions.length === 0 ? `ISNUMBER(${address})` : `IF(ISNUMBER(${address}),AND(${conditions.join(",")}),FALSE)`;
  return { custom: { formula: `=OR(${[number, ...orWords.map((word) => isWord(address, word))].join(",")})` } };
}

/** A comparison of texts does not see capitals. */
function isWord(address: string, word: string): string {
  return `TRIM(${address})="${word.replaceAll('"', '""')}"`;
}
