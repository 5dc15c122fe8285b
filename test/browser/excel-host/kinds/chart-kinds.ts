import { accessDenied, invalidArgument, itemNotFound } from "../host-error.js";
import { opened, type Kind, type Opened } from "../kind.js";
import { libraryWords } from "../library-words.js";
import type { ChartModel, SeriesModel } from "../model/chart-model.js";
import { seriesFrom } from "../model/chart-series.js";
import type { SheetModel } from "../model/sheet-model.js";
import type { Targets } from "../targets.js";
import { placeOn } from "./places.js";
import { checked } from "./properties.js";

/** The charts of a sheet. */
export const chartsKind: Kind<SheetModel> = {
  get: { count: ({ charts }) => charts.length },
  items: ({ charts }) => charts.map((chart) => opened("Chart", chart)),
  item: (sheet, key) => found(sheet, key) ?? missing(key),
  open: {
    getItem: (sheet, given) => found(sheet, given.text(0)) ?? missing(given.text(0)),
    getItemOrNullObject: (sheet, given) => found(sheet, given.text(0)),
    getItemAt: ({ charts }, given) => {
      const chart = charts[given.integer(0)];
      if (chart === undefined) throw invalidArgument("ChartCollection.getItemAt");
      return opened("Chart", chart);
    },
    add: (sheet, given) => {
      refuse(sheet);
      const chartType = given.choice(0, libraryWords("ChartType"), "");
      const source = given.object(1, "Range");
      if (source === undefined) throw invalidArgument("the chart's source is no range");
      const by = given.choice(2, libraryWords("ChartSeriesBy"), "Auto");
      const number = sheet.charts.length + 1;
      const series = seriesFrom(source, by, chartType);
      const chart: ChartModel = { id: `{chart-${sheet.id}-${number}}`, sheet, source, position: undefined, series, properties: { name: `Chart ${number}`, chartType } };
      sheet.charts.push(chart);
      return opened("Chart", chart);
    },
  },
  call: { getCount: ({ charts }) => charts.length },
};

/** One chart. */
export const chartKind: Kind<ChartModel> = {
  id: ({ id }) => id,
  get: { id: ({ id }) => id, ...properties(["name", "chartType", "height", "width", "top", "left"]).get },
  set: {
    name: (chart, value) => put(chart, "name", checked("Chart.name", "text", value)),
    chartType: (chart, value) => put(chart, "chartType", checked("Chart.chartType", libraryWords("ChartType"), value)),
    ...Object.fromEntries(["height", "width", "top", "left"].map((name) => [name, (chart: ChartModel, value: unknown) => put(chart, name, checked(`Chart.${name}`, "number", value))])),
  },
  open: {
    title: (chart) => opened("ChartTitle", { chart, path: "title/", properties: chart.properties }),
    legend: (chart) => opened("ChartLegend", { chart, path: "legend/", properties: chart.properties }),
    axes: (chart) => opened("ChartAxes", { chart, path: "axes/", properties: chart.properties }),
    format: (chart) => opened("ChartAreaFormat", { chart, path: "format/", properties: chart.properties }),
    plotArea: (chart) => opened("ChartPlotArea", { chart, path: "plotArea/", properties: chart.properties }),
    series: (chart) => opened("ChartSeriesCollection", chart),
    worksheet: ({ sheet }) => opened("Worksheet", sheet),
  },
  call: {
    setPosition: (chart, given, { book }) => {
      refuse(chart.sheet);
      const start = given.object(0, "Range") ?? placeOn(book, chart.sheet, given.text(0));
      const end = given.object(1, "Range") ?? (given.any(1) === undefined ? start : placeOn(book, chart.sheet, given.text(1)));
      if (start.sheet !== chart.sheet || end.sheet !== chart.sheet) throw invalidArgument("a chart is placed on its own sheet");
      chart.position = { top: start.area.top, left: start.area.left, bottom: end.area.bottom, right: end.area.right };
    },
    delete: (chart) => {
      refuse(chart.sheet);
      chart.sheet.charts.splice(chart.sheet.charts.indexOf(chart), 1);
    },
  },
};

/** The series of a chart. */
export const seriesCollectionKind: Kind<ChartModel> = {
  get: { count: ({ series }) => series.length },
  items: (chart) => chart.series.map((each) => opened("ChartSeries", { chart, series: each })),
  open: {
    getItemAt: (chart, given) => {
      const series = chart.series[given.integer(0)];
      if (series === undefined) throw invalidArgument(`ChartSeriesCollection.getItemAt: the chart has ${chart.series.length} series`);
      return opened("ChartSeries", { chart, series });
    },
    add: (chart, given) => {
      refuse(chart.sheet);
      const name = given.optionalText(0);
      const at = given.any(1) === undefined ? chart.series.length : given.integer(1);
      const series: SeriesModel = { values: undefined, categories: undefined, properties: name === undefined ? {} : { name } };
      chart.series.splice(at, 0, series);
      return opened("ChartSeries", { chart, series });
    },
  },
  call: { getCount: ({ series }) => series.length },
};

const SERIES_PROPERTIES = ["chartType", "markerStyle", "markerSize", "markerBackgroundColor", "markerForegroundColor", "smooth", "gapWidth", "overlap", "axisGroup", "hasDataLabels"];
type SeriesOf = Targets["ChartSeries"];

/** One series. */
export const seriesKind: Kind<SeriesOf> = {
  get: {
    name: ({ chart, series }) => series.properties.name ?? `Series${chart.series.indexOf(series) + 1}`,
    ...Object.fromEntries(SERIES_PROPERTIES.map((name) => [name, ({ chart, series }: SeriesOf) => series.properties[name] ?? (name === "chartType" ? chart.properties.chartType : null)])),
  },
  set: Object.fromEntries(["name", ...SERIES_PROPERTIES].map((name) => [name, (of: SeriesOf, value: unknown) => setOfSeries(of, name, value)])),
  open: { format: ({ chart, series }) => opened("ChartSeriesFormat", { chart, path: "format/", properties: series.properties }) },
  call: {
    setValues: ({ series }, given) => {
      series.values = given.object(0, "Range") ?? refusePlace();
    },
    setXAxisValues: ({ series }, given) => {
      series.categories = given.object(0, "Range") ?? refusePlace();
    },
    delete: ({ chart, series }) => {
      chart.series.splice(chart.series.indexOf(series), 1);
    },
  },
};

function setOfSeries({ chart, series }: SeriesOf, name: string, value: unknown): void {
  refuse(chart.sheet);
  const wanted = {
    name: "text", chartType: libraryWords("ChartType"), markerStyle: libraryWords("ChartMarkerStyle"), markerSize: "number", markerBackgroundColor: "colour",
    markerForegroundColor: "colour", smooth: "boolean", gapWidth: "number", overlap: "number", axisGroup: libraryWords("ChartAxisGroup"), hasDataLabels: "boolean",
  } as const;
  const taken = checked(`ChartSeries.${name}`, wanted[name as keyof typeof wanted], value);
  const [least, most] = { markerSize: [2, 72], gapWidth: [0, 500], overlap: [-100, 100] }[name] ?? [-Infinity, Infinity];
  if (typeof taken === "number" && (taken < least! || taken > most!)) throw invalidArgument(`ChartSeries.${name} takes ${least} to ${most}`);
  series.properties[name] = taken;
}

function properties(names: readonly string[]): Required<Pick<Kind<ChartModel>, "get">> {
  return { get: Object.fromEntries(names.map((name) => [name, (chart: ChartModel) => chart.properties[name] ?? null])) };
}

function put(chart: ChartModel, name: string, value: unknown): void {
  refuse(chart.sheet);
  chart.properties[name] = value;
}

function refuse(sheet: SheetModel): void {
  if (sheet.protection !== undefined && sheet.protection.allowEditObjects !== true) throw accessDenied(`${sheet.name} is protected`);
}

function refusePlace(): never {
  throw invalidArgument("a series takes its numbers from a range");
}

function found({ charts }: SheetModel, key: unknown): Opened | null {
  const chart = charts.find(({ id, properties: { name } }) => key === id || (typeof key === "string" && String(name).toLowerCase() === key.toLowerCase()));
  return chart === undefined ? null : opened("Chart", chart);
}

function missing(key: unknown): never {
  throw itemNotFound(`the chart ${String(key)}`);
}
