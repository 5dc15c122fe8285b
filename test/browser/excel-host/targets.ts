import type { ChartModel, Place, SeriesModel } from "./model/chart-model.js";
import type { NameModel } from "./model/name-model.js";
import type { SheetModel } from "./model/sheet-model.js";
import type { TableModel } from "./model/table-model.js";
import type { WorkbookModel } from "./model/workbook-model.js";

/** The classes of titles, axes, legends and what belongs to them. */
export type ChartPartName =
  | "ChartAreaFormat" | "ChartAxes" | "ChartAxis" | "ChartAxisFormat" | "ChartAxisTitle" | "ChartAxisTitleFormat" | "ChartBorder" | "ChartFill" | "ChartFont"
  | "ChartGridlines" | "ChartGridlinesFormat" | "ChartLegend" | "ChartLegendEntry" | "ChartLegendEntryCollection" | "ChartLegendFormat" | "ChartLineFormat"
  | "ChartPlotArea" | "ChartPlotAreaFormat" | "ChartSeriesFormat" | "ChartTitle" | "ChartTitleFormat";

/** What an object of each class stands for. */
export interface Targets extends Record<ChartPartName, ChartPart> {
  AddinInternalService: undefined;
  AppRuntimeService: undefined;
  CustomFunctions: undefined;
  CustomFunctionsContainer: undefined;
  Workbook: WorkbookModel;
  Application: WorkbookModel;
  WorkbookProtection: WorkbookModel;
  WorksheetCollection: WorkbookModel;
  Worksheet: SheetModel;
  WorksheetProtection: SheetModel;
  WorksheetFreezePanes: SheetModel;
  PageLayout: SheetModel;
  NamedItemCollection: NamesOf;
  NamedItem: NameModel;
  TableCollection: TablesOf;
  Table: TableModel;
  Range: Place;
  RangeAreas: AreasOf;
  RangeCollection: AreasOf;
  RangeFormat: Place;
  RangeFont: Place;
  RangeFill: Place;
  FormatProtection: Place;
  RangeBorderCollection: Place;
  RangeBorder: { readonly place: Place; readonly edge: string };
  DataValidation: Place;
  ChartCollection: SheetModel;
  Chart: ChartModel;
  ChartSeriesCollection: ChartModel;
  ChartSeries: { readonly chart: ChartModel; readonly series: SeriesModel };
}

export type KindName = keyof Targets;

/** The names of the workbook, or those of one sheet. */
export interface NamesOf {
  readonly book: WorkbookModel;
  readonly sheet: SheetModel | undefined;
}

/** The tables of the workbook, or those of one sheet. */
export interface TablesOf {
  readonly book: WorkbookModel;
  readonly sheet: SheetModel | undefined;
}

/** Several rectangles of one sheet. */
export interface AreasOf {
  readonly sheet: SheetModel;
  readonly areas: readonly Place["area"][];
}

/** A title, an axis, a legend: where its properties are kept, and its path there. */
export interface ChartPart {
  readonly chart: ChartModel;
  readonly path: string;
  readonly properties: Record<string, unknown>;
}
