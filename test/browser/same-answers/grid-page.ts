import { demonstrationWorkbook } from "../../../src/host/demonstration-workbook.js";
import type { RangeText } from "../../../src/host/workbook.js";
import { CellReasons } from "../../../src/practice/cell-reasons.js";
import { workbookData } from "../../../src/practice/grid-data.js";
import { startGrid } from "../../../src/practice/grid.js";
import { PracticeWorkbook } from "../../../src/practice/practice-workbook.js";

declare global {
  interface Window {
    /** every sheet's cells as the pane reads them, row by row from the first cell on */
    gridCells(): Promise<Record<string, RangeText["values"]>>;
  }
}

const nameOf = (sheet: string): string => `Whole${sheet}`;
const plans = demonstrationWorkbook().map((plan) => ({ ...plan, names: [...(plan.names ?? []), { name: nameOf(plan.name), range: "A1:Z200" }] }));
const { grid, spilled } = startGrid({ container: document.getElementById("grid")!, workbook: workbookData("demonstration", plans), descriptions: [], reasons: new CellReasons(), dark: false });
const workbook = new PracticeWorkbook(grid, spilled, plans);
window.gridCells = async () => Object.fromEntries(await Promise.all(plans.map(async ({ name }) => [name, (await workbook.readName(nameOf(name)))!.values] as const)));
workbook.onChanged(() => document.body.setAttribute("data-state", "ready"));
