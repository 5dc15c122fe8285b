import type { CheckRow } from "../inputs/index.js";
import type { ResultTable } from "./result-table.js";

/**
 * What the site block was understood to say, one row an input, and whether all of it can be used.
 *
 * @param rows  the inputs as checked
 * @returns     the last row is the verdict on the whole block
 */
export function checkTable(rows: readonly CheckRow[]): ResultTable {
  const faults = rows.filter((row) => !row.ok).length;
  const verdict = faults === 0 ? "ok: every input can be used" : `${faults} ${faults === 1 ? "input needs" : "inputs need"} attention`;
  return {
    title: "Check of the site block",
    columns: ["Input", "Value used", "Unit", "Verdict"].map((label) => ({ label, unit: "" })),
    rows: [...rows.map((row) => [row.label, row.value, row.unit, row.verdict]), ["Site block", "", "", verdict]],
    notes: [],
  };
}
