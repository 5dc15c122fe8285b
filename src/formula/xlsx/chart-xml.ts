import type { NumberLook, PlannedChart, PlannedSeries } from "../../host/workbook.js";
import { ErrorValue, type CellValue } from "../cell-value.js";
import { columnCells } from "./sheet-xml.js";
import { escaped } from "./xml.js";

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const CHART = "http://schemas.openxmlformats.org/drawingml/2006/chart";
const MAIN = "http://schemas.openxmlformats.org/drawingml/2006/main";

const FORMATS: Readonly<Record<NumberLook, string>> = { money: "#,##0", ratio: "0.00", metres: "0.0", percent: "0%" };
/** In the order in which parts are stacked; they differ in lightness as well as in hue. */
const PARTS = ["C9C0AC", "B5472F", "E2A33B", "0B6F7C", "7D7767", "79C7CF"];
const LINE = "23282B";
const SOFT = "5B6165";
const GRID = "E2DDD1";

/** The value that a cell of the chart's own sheet shows. */
export type CellAt = (row: number, column: number) => CellValue;

/**
 * A chart as its part: parts stacked in columns, and lines, edges of a band and marks over them on the same axes.
 *
 * @param sheet  name of the sheet that holds chart and cells
 * @param at     values of its cells, which the file repeats for readers that do not calculate
 */
export function chartXml(chart: PlannedChart, sheet: string, at: CellAt): string {
  const indexed = chart.series.map((series, index) => ({ series, index }));
  const parts = indexed.filter(({ series }) => series.kind === "part");
  const lines = indexed.filter(({ series }) => series.kind !== "part");
  const categories = `<c:cat>${referenceXml(chart.categories, sheet, at, "General")}</c:cat>`;
  const one = ({ series, index }: { series: PlannedSeries; index: number }): string => {
    const isPart = series.kind === "part";
    const values = `<c:val>${referenceXml(series.values, sheet, at, FORMATS[chart.valueLook])}</c:val>`;
    return `<c:ser><c:idx val="${index}"/><c:order val="${index}"/><c:tx><c:v>${escaped(series.name)}</c:v></c:tx>${lookXml(series, parts.findIndex((part) => part.index === index))}${isPart ? '<c:invertIfNegative val="0"/>' : ""}${categories}${values}${isPart ? "" : '<c:smooth val="0"/>'}</c:ser>`;
  };
  const axes = '<c:axId val="111111111"/><c:axId val="222222222"/>';
  const bars = parts.length === 0 ? "" : `<c:barChart><c:barDir val="col"/><c:grouping val="stacked"/><c:varyColors val="0"/>${parts.map(one).join("")}<c:gapWidth val="60"/><c:overlap val="100"/>${axes}</c:barChart>`;
  const curves = lines.length === 0 ? "" : `<c:lineChart><c:grouping val="standard"/><c:varyColors val="0"/>${lines.map(one).join("")}<c:marker val="1"/>${axes}</c:lineChart>`;
  const hidden = indexed.filter(({ series }) => series.hiddenInLegend === true).map(({ index }) => `<c:legendEntry><c:idx val="${index}"/><c:delete val="1"/></c:legendEntry>`).join("");
  return [
    `${HEAD}<c:chartSpace xmlns:c="${CHART}" xmlns:a="${MAIN}"><c:roundedCorners val="0"/><c:chart>`,
    `${titleXml(chart.title, 1300, true)}<c:autoTitleDeleted val="0"/><c:plotArea><c:layout/>${bars}${curves}`,
    `<c:catAx><c:axId val="111111111"/><c:scaling><c:orientation val="minMax"/></c:scaling><c:delete val="0"/><c:axPos val="b"/>${titleXml(chart.categoryTitle, 1000, false)}<c:numFmt formatCode="General" sourceLinked="0"/><c:majorTickMark val="none"/><c:minorTickMark val="none"/><c:tickLblPos val="low"/><c:crossAx val="222222222"/><c:crosses val="autoZero"/><c:auto val="0"/><c:lblAlgn val="ctr"/><c:lblOffset val="100"/><c:noMultiLvlLbl val="0"/></c:catAx>`,
    `<c:valAx><c:axId val="222222222"/><c:scaling><c:orientation val="minMax"/></c:scaling><c:delete val="0"/><c:axPos val="l"/><c:majorGridlines><c:spPr><a:ln w="9525"><a:solidFill><a:srgbClr val="${GRID}"/></a:solidFill></a:ln></c:spPr></c:majorGridlines>${titleXml(chart.valueTitle, 1000, false)}<c:numFmt formatCode="${FORMATS[chart.valueLook]}" sourceLinked="0"/><c:majorTickMark val="none"/><c:minorTickMark val="none"/><c:tickLblPos val="nextTo"/><c:crossAx val="111111111"/><c:crosses val="autoZero"/><c:crossBetween val="between"/></c:valAx>`,
    `</c:plotArea><c:legend><c:legendPos val="b"/>${hidden}<c:overlay val="0"/></c:legend><c:plotVisOnly val="1"/><c:dispBlanksAs val="gap"/></c:chart></c:chartSpace>`,
  ].join("");
}

function titleXml(words: string, size: number, isBold: boolean): string {
  return `<c:title><c:tx><c:rich><a:bodyPr/><a:p><a:pPr><a:defRPr sz="${size}" b="${isBold ? 1 : 0}"/></a:pPr><a:r><a:rPr lang="en-US" sz="${size}" b="${isBold ? 1 : 0}"/><a:t>${escaped(words)}</a:t></a:r></a:p></c:rich></c:tx><c:overlay val="0"/></c:title>`;
}

function lookXml({ kind }: PlannedSeries, part: number): string {
  const filled = (colour: string): string => `<a:solidFill><a:srgbClr val="${colour}"/></a:solidFill>`;
  if (kind === "part") return `<c:spPr>${filled(PARTS[part % PARTS.length]!)}</c:spPr>`;
  if (kind === "line") return `<c:spPr><a:ln w="28575">${filled(LINE)}</a:ln></c:spPr><c:marker><c:symbol val="circle"/><c:size val="5"/><c:spPr>${filled(LINE)}</c:spPr></c:marker>`;
  if (kind === "bound") return `<c:spPr><a:ln w="9525">${filled(SOFT)}<a:prstDash val="dash"/></a:ln></c:spPr><c:marker><c:symbol val="none"/></c:marker>`;
  return `<c:spPr><a:ln w="28575"><a:noFill/></a:ln></c:spPr><c:marker><c:symbol val="circle"/><c:size val="12"/><c:spPr><a:noFill/><a:ln w="22225">${filled(LINE)}</a:ln></c:spPr></c:marker>`;
}

/** Cells with the values that they show, as numbers or, where there is a word among them, as words. */
function referenceXml(range: string, sheet: string, at: CellAt, format: string): string {
  const cells = columnCells(range);
  const values = cells.map(({ row, column }) => at(row, column));
  const areWords = values.some((value) => typeof value === "string" && value !== "");
  const address = range.replace(/\$?([A-Z]+)\$?([0-9]+)/g, "$$$1$$$2");
  const points = values.map((value, k) => {
    const text = areWords ? wordOf(value) : typeof value === "number" ? String(value) : "";
    return text === "" ? "" : `<c:pt idx="${k}"><c:v>${escaped(text)}</c:v></c:pt>`;
  });
  const kind = areWords ? "str" : "num";
  return `<c:${kind}Ref><c:f>'${escaped(sheet.replaceAll("'", "''"))}'!${address}</c:f><c:${kind}Cache>${areWords ? "" : `<c:formatCode>${format}</c:formatCode>`}<c:ptCount val="${cells.length}"/>${points.join("")}</c:${kind}Cache></c:${kind}Ref>`;
}

function wordOf(value: CellValue): string {
  return value instanceof ErrorValue ? value.code : String(value ?? "");
}
