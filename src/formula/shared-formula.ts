import { moved, readReference, writtenReference } from "./addresses.js";
import { tokens } from "./tokens.js";

/**
 * The formula of a cell that shares the formula of another: its references moved as copying moves them.
 *
 * @param formula  of the first cell, without "="
 * @param rows     rows from the first cell down to this one
 * @param columns  columns from the first cell to the right
 */
export function sharedFormula(formula: string, rows: number, columns: number): string {
  return tokens(formula)
    .map(({ kind, text, raw }) => {
      const reference = kind === "reference" ? readReference(text) : undefined;
      return reference === undefined ? raw : raw.slice(0, raw.length - text.length) + writtenReference(moved(reference, rows, columns));
    })
    .join("");
}
