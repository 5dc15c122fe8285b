import type { FUniver } from "@univerjs/core/facade";
import type { RangeText, Workbook } from "../host/workbook.js";
import { drawCostChart } from "./cost-chart.js";

/** The names of cells that the chart draws: the demonstration workbook defines the first, each client brief one more. */
const CELLS = /^CostByCount\d*$/i;

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
    const all = await cellsToDraw(workbook);
    if (turn !== drawing) return;
    const front = grid.getActiveWorkbook()?.getActiveSheet().getSheetName();
    const here = all.find(({ sheet }) => sheet === front);
    const cells = here ?? all[0];
    const shown = chosen ?? here !== undefined;
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

async function cellsToDraw(workbook: Workbook): Promise<RangeText[]> {
  const names = (await workbook.names()).filter((name) => CELLS.test(name));
  const ranges = await Promise.all(names.map((name) => workbook.readName(name)));
  return ranges.filter((range) => range !== undefined);
}
