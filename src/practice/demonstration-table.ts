import { demonstrationWorkbook } from "../host/demonstration-workbook.js";
import type { CellValue } from "../host/workbook.js";
import { workbookData } from "./grid-data.js";
import { calculateWorkbook } from "./headless.js";
import { PracticeWorkbook } from "./practice-workbook.js";

/**
 * Calculates the demonstration workbook and reads its table of costs.
 *
 * @returns  the cells as aligned text, and a closing sentence with the cheapest number of holes
 * @throws {Error} with the cell's own sentence, where a cell of the table is an error
 */
export async function demonstrationTable(): Promise<string> {
  const { grid, reasons, close } = await calculateWorkbook(workbookData("demonstration", demonstrationWorkbook()));
  try {
    const workbook = new PracticeWorkbook(grid);
    const [table, cheapest] = await Promise.all([workbook.readName("CostByCount"), workbook.readName("Cheapest")]);
    if (table === undefined || cheapest === undefined) throw new Error("The demonstration workbook has lost its names CostByCount and Cheapest.");
    const [head, ...rows] = table.values;
    const best = rows.find((row) => row[0] === cheapest.values[0]?.[0]);
    if (best === undefined || rows.flat().some((value) => typeof value !== "number")) {
      throw new Error(`The demonstration could not be priced. ${reasons.first() ?? ""}`);
    }
    const words = [head!.map(String), ...rows.map((row) => row.map(money))];
    return `${aligned(words)}\n\nCheapest: ${String(best[0])} holes, ${money(best.at(-1)!)} in all.`;
  } finally {
    close();
  }
}

function aligned(rows: readonly (readonly string[])[]): string {
  const widths = rows[0]!.map((_, column) => Math.max(...rows.map((row) => row[column]!.length)));
  return rows.map((row) => row.map((word, column) => word.padStart(widths[column]!)).join("  ")).join("\n");
}

function money(value: CellValue | null): string {
  return Math.round(Number(value)).toLocaleString("en-US");
}
