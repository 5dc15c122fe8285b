import { DomainError } from "../engine/index.js";
import { InputError } from "../inputs/index.js";
import { sheetError } from "./sheet-error.js";

/** The inputs are fine and yet there is no answer to give; the cell shows #N/A with the sentence. */
export class NoAnswer extends Error {
  override readonly name = "NoAnswer";
}

/** What a cell may hold. */
export type CellValue = string | number | boolean;

/**
 * Runs a function's body and turns whatever goes wrong into an error value with a sentence. The one catch at the sheet.
 *
 * @param work  the body; null and undefined in its result become empty text, because Excel shows them as 0
 * @returns     what the body gave, every number finite
 * @throws {SheetError} or Excel's own error class: "#VALUE!" for inputs, ranges and bugs; "#N/A" for NoAnswer
 */
export function answer(work: () => number): number;
export function answer(work: () => string): string;
export function answer(work: () => readonly (readonly unknown[])[]): CellValue[][];
export function answer(work: () => unknown): unknown {
  try {
    const result = work();
    return Array.isArray(result) ? result.map((row: readonly unknown[]) => row.map(usable)) : usable(result);
  } catch (reason) {
    throw inWords(reason);
  }
}

function usable(value: unknown): CellValue {
  if (value === null || value === undefined) return "";
  if (typeof value === "number" && !Number.isFinite(value)) throw new Error(`a result came out as ${String(value)}`);
  if (typeof value === "number" || typeof value === "string" || typeof value === "boolean") return value;
  throw new Error(`a result came out as ${typeof value}`);
}

function inWords(reason: unknown): Error {
  if (reason instanceof InputError || reason instanceof DomainError) return sheetError("#VALUE!", reason.message);
  if (reason instanceof NoAnswer) return sheetError("#N/A", reason.message);
  const words = reason instanceof Error ? reason.message : String(reason);
  return sheetError("#VALUE!", `Something went wrong inside PROBE: ${words.replace(/\.$/, "")}. Please report it together with the site block.`);
}
