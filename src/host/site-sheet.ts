import { CATALOGUE, templateRows } from "../inputs/index.js";
import { siteValidation } from "./site-validation.js";
import type { PlannedCell, SheetPlan } from "./workbook.js";

/**
 * The sheet that holds a site block ready to be filled in: the template's rows with inputs marked and held to what they may be, and the defined name
 * Site over them. The block begins in the first row, so that a sentence about "row 12" means row 12 of the sheet.
 */
export function siteSheet(): SheetPlan {
  const rows = templateRows();
  return {
    name: "Site",
    cells: rows.flatMap((row, index) => rowCells(row, index)),
    names: [{ name: "Site", range: `A1:D${rows.length}` }],
    columnWidths: [190, 130, 86, 560],
  };
}

const ENTRIES = new Map(CATALOGUE.map((entry) => [entry.label.toLowerCase(), entry]));
const SECTIONS = new Set(CATALOGUE.map((entry) => entry.section.toLowerCase()));

function rowCells(row: readonly (string | number)[], at: number): PlannedCell[] {
  const label = String(row[0] ?? "").toLowerCase();
  const entry = ENTRIES.get(label);
  const kind = entry?.kind;
  const filled = row.map((value, column) => ({ row: at, column, value })).filter(({ value }) => value !== "");
  if (SECTIONS.has(label)) return [0, 1, 2, 3].map((column) => ({ row: at, column, value: row[column] ?? "", style: "section" }));
  if (kind === "list" && (row[1] ?? "") === "") return filled.map((cell) => ({ ...cell, style: cell.column === 0 ? "label" : "note" }));
  if (entry !== undefined && kind !== undefined) {
    const validation = siteValidation(entry);
    return [
      { row: at, column: 0, value: row[0]!, style: "label" },
      { row: at, column: 1, value: row[1] ?? "", style: "input", ...(kind.startsWith("money") ? { look: "money" as const } : {}), ...(validation === undefined ? {} : { validation }) },
      { row: at, column: 2, value: row[2] ?? "", style: "note" },
      { row: at, column: 3, value: row[3] ?? "", style: "note" },
    ];
  }
  // what is left are the rows of a list: a head of words, or values
  const values = filled.some(({ value }) => typeof value === "number");
  return filled.map((cell) => ({ ...cell, style: values ? "input" : "head" }));
}
