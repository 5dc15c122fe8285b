import { areaAddress, areaOf, type Area } from "./addresses.js";
import { addChart } from "./excel-chart.js";
import { applyLook } from "./excel-looks.js";
import { applyValidation } from "./excel-validation.js";
import { contentBlocks, lookAreas, type Block } from "./planned-blocks.js";
import type { SheetPlan } from "./workbook.js";

/** Excel measures columns in points, 72 to the inch; plans in pixels of 96 to the inch. */
const POINTS = 0.75;

/**
 * Fills a new sheet: values first, because formats of cells that are written later are lost on some platforms, then looks, then
 * what draws them.
 */
export async function fillSheet(context: Excel.RequestContext, sheet: Excel.Worksheet, plan: SheetPlan, namespace: string): Promise<void> {
  // Widths before values: numbers in a narrow column would show as ### until the next request.
  (plan.columnWidths ?? []).forEach((pixels, column) => {
    sheet.getRangeByIndexes(0, column, 1, 1).format.columnWidth = pixels * POINTS;
  });
  await writeBlocks(context, sheet, contentBlocks(plan.cells, namespace));
  for (const { top, left, bottom, right, style, look } of lookAreas(plan.cells)) {
    const range = sheet.getRangeByIndexes(top, left, bottom - top + 1, right - left + 1);
    applyLook(range, style, look, { rows: bottom > top, columns: right > left });
  }
  for (const cell of plan.cells) applyValidation(sheet, cell);
  if (plan.frozenRows !== undefined && plan.frozenRows > 0) sheet.freezePanes.freezeRows(plan.frozenRows);
  if (plan.onePage === true) layPage(sheet, plan);
  await context.sync();
  if (plan.charts === undefined || plan.charts.length === 0) return;
  plan.charts.forEach((chart, k) => addChart(sheet, chart, k));
  await context.sync();
}

async function writeBlocks(context: Excel.RequestContext, sheet: Excel.Worksheet, blocks: readonly Block[]): Promise<void> {
  const [block, ...others] = blocks;
  if (block === undefined) return;
  sheet.getRangeByIndexes(block.row, block.column, block.cells.length, block.cells[0]!.length).formulas = block.cells;
  // The last block goes with the looks; the others each go alone, because together they would be too large.
  if (others.length === 0) return;
  await context.sync();
  await writeBlocks(context, sheet, others);
}

function layPage(sheet: Excel.Worksheet, plan: SheetPlan): void {
  const { pageLayout } = sheet;
  pageLayout.orientation = plan.standing === true ? "Portrait" : "Landscape";
  pageLayout.zoom = { horizontalFitToPages: 1, verticalFitToPages: 1 };
  pageLayout.centerHorizontally = true;
  pageLayout.setPrintArea(plan.printed ?? areaAddress(everything(plan)));
}

/** The cells that a plan fills and draws. */
function everything({ cells, charts }: SheetPlan): Area {
  const areas: Area[] = [...cells.map(({ row, column }) => ({ top: row, left: column, bottom: row, right: column })), ...(charts ?? []).map(({ place }) => areaOf(place))];
  return { top: 0, left: 0, bottom: Math.max(0, ...areas.map(({ bottom }) => bottom)), right: Math.max(0, ...areas.map(({ right }) => right)) };
}
