import { areaOf } from "./addresses.js";
import { FORMATS } from "./excel-looks.js";
import type { PlannedChart, PlannedSeries } from "./workbook.js";

const INK = "#1F2A30";
const GRID = "#E3E6E8";
/** Shades of the parts from below, those of the pane; they differ in lightness, so that a printer without colours keeps them apart. */
const PARTS = ["#C9C0AC", "#B5472F", "#E2A33B", "#0B6F7C", "#7D7767", "#79C7CF"];
const LINES = ["#0B6F7C", "#B5472F", "#7D7767", "#E2A33B"];

/** Draws a plan's chart as Excel's own chart, whose cells may be changed by hand afterwards. */
export function addChart(sheet: Excel.Worksheet, plan: PlannedChart, number: number): void {
  const hasParts = plan.series.some(({ kind }) => kind === "part");
  // Excel wants cells to begin with and makes series of them as it sees fit: one column gives exactly one, which then becomes ours.
  const chart = sheet.charts.add(hasParts ? "ColumnStacked" : "LineMarkers", sheet.getRange(plan.series[0]!.values), "Columns");
  const { top, left, bottom, right } = areaOf(plan.place);
  chart.setPosition(sheet.getCell(top, left), sheet.getCell(bottom, right));
  chart.name = number === 0 ? plan.title : `${plan.title} ${number + 1}`;
  chart.title.text = plan.title;
  chart.title.format.font.size = 12;
  chart.legend.position = "Bottom";
  let parts = 0;
  let lines = 0;
  plan.series.forEach((planned, k) => {
    const series = k === 0 ? chart.series.getItemAt(0) : chart.series.add(planned.name);
    series.name = planned.name;
    series.setValues(sheet.getRange(planned.values));
    series.setXAxisValues(sheet.getRange(plan.categories));
    dress(series, planned, hasParts, planned.kind === "part" ? parts++ : planned.kind === "line" ? lines++ : 0);
  });
  const { categoryAxis, valueAxis } = chart.axes;
  categoryAxis.title.text = plan.categoryTitle;
  valueAxis.title.text = plan.valueTitle;
  valueAxis.numberFormat = FORMATS[plan.valueLook];
  valueAxis.majorGridlines.format.line.color = GRID;
  plan.series.forEach(({ hiddenInLegend }, k) => {
    if (hiddenInLegend === true) chart.legend.legendEntries.getItemAt(k).visible = false;
  });
}

function dress(series: Excel.ChartSeries, { kind }: PlannedSeries, hasParts: boolean, k: number): void {
  switch (kind) {
    case "part":
      series.chartType = "ColumnStacked";
      series.gapWidth = 60;
      series.format.fill.setSolidColor(PARTS[k % PARTS.length]!);
      return;
    case "line":
      series.chartType = "LineMarkers";
      lineOf(series, hasParts ? INK : LINES[k % LINES.length]!, "Continuous", 1.75);
      markerOf(series, "Circle", 5, hasParts ? INK : LINES[k % LINES.length]!);
      return;
    case "bound":
      series.chartType = "Line";
      lineOf(series, INK, "Dash", 0.75);
      series.markerStyle = "None";
      return;
    case "mark":
      series.chartType = "LineMarkers";
      series.format.line.lineStyle = "None";
      markerOf(series, "Diamond", 11, INK);
      series.markerBackgroundColor = "#FFFFFF";
      return;
  }
}

function lineOf(series: Excel.ChartSeries, colour: string, style: "Continuous" | "Dash", weight: number): void {
  series.format.line.lineStyle = style;
  series.format.line.color = colour;
  series.format.line.weight = weight;
  series.smooth = false;
}

function markerOf(series: Excel.ChartSeries, style: "Circle" | "Diamond", size: number, colour: string): void {
  series.markerStyle = style;
  series.markerSize = size;
  series.markerForegroundColor = colour;
  series.markerBackgroundColor = colour;
}
