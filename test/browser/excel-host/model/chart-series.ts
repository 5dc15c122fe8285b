import type { Area } from "../../../../src/formula/addresses.js";
import type { Place, SeriesModel } from "./chart-model.js";

/**
 * The series that Excel makes of a range: a first row of texts gives their names, a first column of texts (or, of points,
 * any first column) the categories.
 *
 * @param by  "Auto" takes the longer side
 */
export function seriesFrom(source: Place, by: string, chartType: string): SeriesModel[] {
  const { sheet, area } = source;
  const isByColumns = by === "Columns" || (by === "Auto" && area.bottom - area.top >= area.right - area.left);
  const at = (line: number, place: number): unknown => (isByColumns ? sheet.valueAt(area.top + place, area.left + line) : sheet.valueAt(area.top + line, area.left + place));
  const lines = isByColumns ? area.right - area.left + 1 : area.bottom - area.top + 1;
  const places = isByColumns ? area.bottom - area.top + 1 : area.right - area.left + 1;
  const isText = (value: unknown): boolean => typeof value === "string";
  const hasNames = places > 1 && Array.from({ length: lines }, (_, line) => at(line, 0)).some(isText);
  const first = hasNames ? 1 : 0;
  const hasCategories = lines > 1 && (/^XY|^Bubble/i.test(chartType) || isText(at(0, first)));
  const slice = (line: number): Place => ({ sheet, area: part(area, isByColumns, line, first) });
  if (lines * places === 1 && at(0, 0) === null) return [];
  return Array.from({ length: lines - (hasCategories ? 1 : 0) }, (_, index) => {
    const line = index + (hasCategories ? 1 : 0);
    const name = hasNames ? at(line, 0) : undefined;
    return { values: slice(line), categories: hasCategories ? slice(0) : undefined, properties: typeof name === "string" || typeof name === "number" ? { name: String(name) } : {} };
  });
}

function part(area: Area, isByColumns: boolean, line: number, first: number): Area {
  return isByColumns
    ? { top: area.top + first, bottom: area.bottom, left: area.left + line, right: area.left + line }
    : { top: area.top + line, bottom: area.top + line, left: area.left + first, right: area.right };
}
