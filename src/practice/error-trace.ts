import type { FUniver } from "@univerjs/core/facade";
import { deserializeRangeWithSheet, sequenceNodeType } from "@univerjs/engine-formula";
import type { FWorkbook, FWorksheet } from "@univerjs/sheets/facade";
import type { CellReasons } from "./cell-reasons.js";
import { cellName } from "./cell-name.js";

/** Where an error comes from and why. */
export interface ErrorSource {
  /** the cell whose own formula failed: "B4", or "Site!B4" from another sheet */
  readonly place: string;
  readonly sentences: readonly string[];
}

const DEEPEST = 8;
const MOST_CELLS = 5000;

const USUAL: Record<string, string> = {
  "#NAME?": "The formula holds a name that nobody has defined; our functions begin with PROBE. and a name such as Site stands for a range.",
  "#DIV/0!": "The formula divides by zero or by a blank cell.",
  "#REF!": "The formula points at cells that no longer exist.",
  "#SPILL!": "The result needs more room; clear the cells below and to the right of this one.",
  "#NUM!": "A number in the formula is outside what the function accepts.",
  "#N/A": "What the formula looks for was not found.",
  "#VALUE!": "A value in the formula is of the wrong kind, such as text where a number is needed.",
  "#CYCLE!": "The formula depends on its own result.",
};

/**
 * Finds the sentence behind an error value: that of the cell itself, or, where the cell only passes an error on, that of
 * the first cell its formula reads that holds one.
 */
export function errorSource(grid: FUniver, reasons: CellReasons, sheet: FWorksheet, row: number, column: number): ErrorSource {
  const book = grid.getActiveWorkbook() as FWorkbook;
  let at = { sheet, row, column };
  const seen = new Set<string>();
  for (let depth = 0; depth < DEEPEST; depth++) {
    const sentences = ownSentences(reasons, at);
    const key = `${at.sheet.getSheetId()}:${at.row}:${at.column}`;
    const before = sentences.length > 0 || seen.has(key) ? undefined : failedPrecedent(grid, book, at);
    if (before === undefined) {
      const place = cellName(at.row, at.column);
      const value = String(at.sheet.getRange(at.row, at.column).getValue() ?? "");
      return {
        place: at.sheet.getSheetId() === sheet.getSheetId() ? place : `${at.sheet.getSheetName()}!${place}`,
        sentences: sentences.length > 0 ? sentences : [USUAL[value] ?? "The formula gives an error."],
      };
    }
    seen.add(key);
    at = before;
  }
  return { place: cellName(at.row, at.column), sentences: ["The error is passed on through many cells; look at the first of them."] };
}

/** True for "#N/A" and its kind. */
export function isErrorText(value: unknown): boolean {
  return typeof value === "string" && (value in USUAL || /^#(NULL!|CALC!|ERROR!)$/.test(value));
}

interface Place {
  readonly sheet: FWorksheet;
  readonly row: number;
  readonly column: number;
}

/** Sentences outlive the formula that they were said of: they count only where one of our functions stands and gave the error. */
function ownSentences(reasons: CellReasons, { sheet, row, column }: Place): readonly string[] {
  const cell = sheet.getRange(row, column);
  const ours = /\bPROBE\.\w/i.test(cell.getFormula()) && /^#(VALUE!|N\/A)$/.test(String(cell.getValue() ?? ""));
  return ours ? reasons.at(sheet.getSheetId(), row, column) : [];
}

function failedPrecedent(grid: FUniver, book: FWorkbook, at: Place): Place | undefined {
  const formula = at.sheet.getRange(at.row, at.column).getFormula();
  if (formula === "") return undefined;
  for (const node of grid.getFormula().sequenceNodesBuilder(formula) ?? []) {
    if (typeof node === "string") continue;
    const text = node.nodeType === sequenceNodeType.DEFINED_NAME ? book.getDefinedName(node.token)?.getFormulaOrRefString() : node.nodeType === sequenceNodeType.REFERENCE ? node.token : undefined;
    if (text === undefined) continue;
    const { sheetName, range } = deserializeRangeWithSheet(text.replace(/^=/, ""));
    const sheet = sheetName === "" ? at.sheet : book.getSheetByName(sheetName);
    if (sheet === null) continue;
    const last = Math.min(range.endRow || sheet.getLastRow(), sheet.getLastRow());
    const right = Math.min(range.endColumn || sheet.getLastColumn(), sheet.getLastColumn());
    let looked = 0;
    for (let row = range.startRow || 0; row <= last; row++) {
      for (let column = range.startColumn || 0; column <= right && looked < MOST_CELLS; column++, looked++) {
        if (isErrorText(sheet.getRange(row, column).getValue())) return { sheet, row, column };
      }
    }
  }
  return undefined;
}
