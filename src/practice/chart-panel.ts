import type { FUniver } from "@univerjs/core/facade";
import type { Workbook } from "../host/workbook.js";
import { drawCostChart } from "./cost-chart.js";

/** The name of the cells that the chart draws; the demonstration workbook defines it. */
const CELLS = "CostByCount";

/**
 * Shows the chart while the sheet of its cells is in front, or always or never once the person has used the button.
 *
 * @returns  reads the cells again and redraws
 */
export function chartPanel(grid: FUniver, workbook: Workbook, figure: HTMLElement, button: HTMLButtonElement): () => Promise<void> {
  let chosen: boolean | undefined;
  let drawing = 0;
  const refresh = async () => {
    const turn = ++drawing;
    const cells = await workbook.readName(CELLS);
    if (turn !== drawing) return;
    const shown = chosen ?? (cells !== undefined && grid.getActiveWorkbook()?.getActiveSheet().getSheetName() === cells.sheet);
    button.setAttribute("aria-pressed", String(shown));
    figure.hidden = !shown;
    if (shown) drawCostChart(figure, cells);
  };
  button.addEventListener("click", () => {
    chosen = figure.hidden !== false;
    void refresh();
  });
  grid.addEvent(grid.Event.ActiveSheetChanged, () => void refresh());
  addEventListener("resize", () => void refresh());
  return refresh;
}
