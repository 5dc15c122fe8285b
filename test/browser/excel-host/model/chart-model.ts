import type { Area } from "../../../../src/formula/addresses.js";
import type { SheetModel } from "./sheet-model.js";

/** A range on a sheet. */
export interface Place {
  readonly sheet: SheetModel;
  readonly area: Area;
}

/** One line, bar or set of points of a chart. */
export interface SeriesModel {
  values: Place | undefined;
  categories: Place | undefined;
  /** whatever was set, by its path such as "format/line/color" */
  readonly properties: Record<string, unknown>;
}

/** A chart on a sheet. */
export interface ChartModel {
  readonly id: string;
  readonly sheet: SheetModel;
  readonly source: Place;
  /** the cells that it lies over, once it was placed */
  position: Area | undefined;
  readonly series: SeriesModel[];
  readonly properties: Record<string, unknown>;
}
