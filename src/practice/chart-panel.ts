import type { FUniver } from "@univerjs/core/facade";
import { button, chartValues, drawChart } from "./drawn-chart.js";
import type { PracticeWorkbook, SheetChart } from "./practice-workbook.js";

/**
 * Shows the pictures of the sheet in front below the grid, one at a time; or always or never once the person has used the button.
 *
 * @returns  reads the cells again and redraws
 */
export function chartPanel(grid: FUniver, workbook: PracticeWorkbook, figure: HTMLElement, toggle: HTMLButtonElement): () => void {
  let chosen: boolean | undefined;
  let turned = 0;
  const refresh = (): void => {
    const here = workbook.chartsInFront();
    const charts = here.length > 0 ? here : workbook.charts();
    const shown = chosen ?? here.length > 0;
    toggle.setAttribute("aria-pressed", String(shown));
    figure.hidden = !shown;
    if (shown) draw(charts);
  };
  const draw = (charts: readonly SheetChart[]): void => {
    const number = turned % Math.max(1, charts.length);
    const one = charts[number];
    if (one === undefined) {
      const words = document.createElement("figcaption");
      words.textContent = "No sheet of this workbook has a picture. The cost tables and the client brief bring theirs.";
      figure.replaceChildren(words);
      return;
    }
    const next = (): void => {
      turned = number + 1;
      refresh();
      figure.querySelector("button")?.focus();
    };
    const other = charts.length > 1 ? button(`Next picture (${number + 1} of ${charts.length} shown)`, next) : undefined;
    drawChart(figure, one.chart, chartValues(one.chart, one.column), one.sheet, other);
  };
  toggle.addEventListener("click", () => {
    chosen = figure.hidden !== false;
    refresh();
  });
  grid.addEvent(grid.Event.ActiveSheetChanged, () => {
    turned = 0;
    refresh();
  });
  addEventListener("resize", refresh);
  return refresh;
}
