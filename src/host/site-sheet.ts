import { CATALOGUE, templateRows } from "../inputs/index.js";
import type { PlannedCell, SheetPlan } from "./workbook.js";

const TITLE_ROWS = 2;
const COLUMNS = "ABCD";

/**
 * The sheet that holds a site block ready to be filled in: the template's rows below a title, inputs marked, and the
 * defined name Site over the block.
 *
 * @param title  stands above the block, outside the named range
 * @param name   of the sheet
 */
export function siteSheet(title = "Site block", name = "Site"): SheetPlan {
  const rows = templateRows();
  const cells: PlannedCell[] = [{ row: 0, column: 0, value: title, style: "title" }];
  rows.forEach((row, index) => cells.push(...rowCells(row, index + TITLE_ROWS)));
  return {
    name,
    cells,
    names: [{ name: "Site", range: `A${TITLE_ROWS + 1}:${COLUMNS[3]}${TITLE_ROWS + rows.length}` }],
    columnWidths: [190, 130, 86, 560],
  };
}

const KINDS = new Map(CATALOGUE.map((entry) => [entry.label.toLowerCase(), entry.kind]));
const SECTIONS = new Set(CATALOGUE.map((entry) => entry.section.toLowerCase()));

function rowCells(row: readonly (string | number)[], at: number): PlannedCell[] {
  const label = String(row[0] ?? "").toLowerCase();
  const kind = KINDS.get(label);
  const filled = row.map((value, column) => ({ row: at, column, value })).filter(({ value }) => value !== "");
  if (SECTIONS.has(label)) return [0, 1, 2, 3].map((column) => ({ row: at, column, value: row[column] ?? "", style: "section" }));
  if (kind === "list") return filled.map((cell) => ({ ...cell, style: cell.column === 0 ? "label" : "note" }));
  if (kind !== undefined) {
    return [
      { row: at, column: 0, value: row[0]!, style: "label" },
      { row: at, column: 1, value: row[1] ?? "", style: "input", ...(kind.startsWith("money") ? { look: "money" as const } : {}) },
      { row: at, column: 2, value: row[2] ?? "", style: "note" },
      { row: at, column: 3, value: row[3] ?? "", style: "note" },
    ];
  }
  // what is left are the rows of a list: a head of words, or values
  const values = filled.some(({ value }) => typeof value === "number");
  return filled.map((cell) => ({ ...cell, style: values ? "input" : "head" }));
}
