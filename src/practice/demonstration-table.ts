import { Calculation } from "../formula/calculation.js";
import { ErrorValue, type CellValue } from "../formula/cell-value.js";
import { demonstrationBook } from "../formula/demonstration.js";
import { gridFunctions } from "./grid-functions.js";

/**
 * Calculates the demonstration workbook without a page and reads its table of costs.
 *
 * @returns  the cells as aligned text, and a closing sentence with the cheapest number of holes
 * @throws {Error} with the cell's own sentence, where a cell of the table is an error
 */
export function demonstrationTable(): string {
  const calculation = new Calculation(demonstrationBook(), gridFunctions);
  try {
    const [head, ...rows] = cells(calculation, "CostByCount");
    const cheapest = cells(calculation, "Cheapest")[0]![0]!;
    const best = rows.find((row) => row[0] === cheapest)!;
    const words = [head!.map(String), ...rows.map((row) => row.map(money))];
    return `${aligned(words)}\n\nCheapest: ${String(cheapest)} holes, ${money(best.at(-1)!)} in all.`;
  } finally {
    calculation.dispose();
  }
}

function cells(calculation: Calculation, name: string): CellValue[][] {
  const { values, reason } = calculation.formula(name, 0);
  if (values.flat().some((value) => value instanceof ErrorValue)) throw new Error(`The demonstration could not be priced: ${reason ?? "a cell of it is an error."}`);
  return values.map((row) => [...row]);
}

function aligned(rows: readonly (readonly string[])[]): string {
  const widths = rows[0]!.map((_, column) => Math.max(...rows.map((row) => row[column]!.length)));
  return rows.map((row) => row.map((word, column) => word.padStart(widths[column]!)).join("  ")).join("\n");
}

function money(value: CellValue): string {
  return Math.round(Number(value)).toLocaleString("en-US");
}
