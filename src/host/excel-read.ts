import { areaAddress } from "./addresses.js";
import { hasCode } from "./excel-refusal.js";
import type { CellValue, RangeText } from "./workbook.js";
import { WorkbookRefusal } from "./workbook-refusal.js";

/** Cells that are read at once: a site block has some hundred, and Excel on the web sends no more than 5 MB. */
const MOST_CELLS = 100_000;

/**
 * Reads a range, cut to the used part of its sheet as the interface asks.
 *
 * @throws {WorkbookRefusal} more cells than a site block can have
 */
export async function readRange(context: Excel.RequestContext, range: Excel.Range): Promise<RangeText> {
  const sheet = range.worksheet;
  const used = sheet.getUsedRangeOrNullObject(true);
  range.load("rowIndex,columnIndex,rowCount,columnCount");
  used.load("rowIndex,columnIndex,rowCount,columnCount");
  sheet.load("name");
  await context.sync();
  const [lastRow, lastColumn] = used.isNullObject ? [0, 0] : [used.rowIndex + used.rowCount - 1, used.columnIndex + used.columnCount - 1];
  const top = range.rowIndex;
  const left = range.columnIndex;
  const rows = Math.max(1, Math.min(range.rowCount, lastRow - top + 1));
  const columns = Math.max(1, Math.min(range.columnCount, lastColumn - left + 1));
  const address = areaAddress({ top, left, bottom: top + rows - 1, right: left + columns - 1 });
  if (rows * columns > MOST_CELLS) {
    throw new WorkbookRefusal("large", `${sheet.name}!${address} holds ${(rows * columns).toLocaleString("en-US")} cells, and no site block has more than ${MOST_CELLS.toLocaleString("en-US")}. Select the site block alone.`);
  }
  const cut = sheet.getRangeByIndexes(top, left, rows, columns);
  cut.load("values");
  await context.sync();
  return { sheet: sheet.name, address, values: cut.values as CellValue[][] };
}

/** @returns what is selected, the first of several areas; undefined where it is a picture or a chart */
export async function readSelected(context: Excel.RequestContext): Promise<RangeText | undefined> {
  const first = context.workbook.getSelectedRanges().areas.getItemAt(0);
  try {
    return await readRange(context, first);
  } catch (reason) {
    if (hasCode(reason, "InvalidSelection")) return undefined;
    throw reason;
  }
}
