import { isRequired } from "../../inputs/catalogue.js";
import { CATALOGUE } from "../../inputs/index.js";
import type { PlannedCell, SheetPlan } from "../../host/workbook.js";

const VALUE_COLUMN = 1;

/**
 * The site sheet without the demonstration's figures: inputs that every job must state are left blank, so that none is priced
 * by accident with an invented figure; the others say that their default or automatic value is used. Units and remarks stay.
 */
export function blankSite(plan: SheetPlan): SheetPlan {
  const labels = new Map(plan.cells.filter(({ column }) => column === 0).map(({ row, value }) => [row, String(value ?? "").toLowerCase()]));
  const entries = new Map(CATALOGUE.map((entry) => [entry.label.toLowerCase(), entry]));
  const cells = plan.cells.map((cell): PlannedCell => {
    const entry = entries.get(labels.get(cell.row) ?? "");
    // rows of the damage list stand under no label of their own
    if (entry === undefined) return cell.style === "input" ? { ...cell, value: "" } : cell;
    if (cell.column !== VALUE_COLUMN || cell.style !== "input") return cell;
    return { ...cell, value: isRequired(entry) ? "" : entry.automatic === undefined ? "default" : "automatic" };
  });
  return { ...plan, cells };
}
