import type { SheetPlan } from "../../host/workbook.js";

/**
 * A new sheet with one example formula, its text beside it, and room below for what it spills.
 *
 * @param id       the function's id
 * @param formula  the formula, beginning with "="
 */
export function exampleSheet(id: string, formula: string): SheetPlan {
  return {
    name: `Example ${id}`.slice(0, 31), // the longest name that a sheet may bear
    cells: [
      { row: 0, column: 0, value: `Example of ${id}`, style: "title" },
      { row: 1, column: 0, value: `The formula below reads ${formula}`, style: "note" },
      { row: 3, column: 0, formula, style: "result" },
    ],
    columnWidths: Array.from({ length: 9 }, () => 120),
  };
}
