import * as Plot from "@observablehq/plot";
import type { NumberLook, PlannedChart } from "../host/workbook.js";
import { savePicture } from "./save-picture.js";

type Cell = string | number | boolean | null;

/** A chart with the numbers of its cells. */
export interface ChartValues {
  readonly categories: readonly (string | number)[];
  /** in the order of the plan; undefined for a cell without a number */
  readonly series: readonly (readonly (number | undefined)[])[];
}

/**
 * Reads a chart's cells.
 *
 * @param column  the values of a column of cells
 * @returns       undefined where a cell that must hold a number holds none, as while a sheet is in error
 */
export function chartValues(chart: PlannedChart, column: (range: string) => readonly Cell[]): ChartValues | undefined {
  const categories = column(chart.categories);
  if (!categories.every((value) => typeof value === "number" || (typeof value === "string" && value !== ""))) return undefined;
  const series = chart.series.map(({ values }) => column(values).map((value) => (typeof value === "number" ? value : undefined)));
  const isWhole = chart.series.every(({ kind }, k) => kind === "mark" || series[k]!.every((value) => value !== undefined));
  return isWhole ? { categories: categories as (string | number)[], series } : undefined;
}

interface Point {
  readonly category: string | number;
  readonly name: string;
  readonly value: number;
}

/**
 * Draws a chart into a figure: parts stacked, lines with their points, an error band between its edges, marked points ringed.
 *
 * @param values  undefined: a sentence says what the chart waits for
 * @param sheet   name of the sheet, for that sentence and for the file in which the picture is kept
 * @param extra   a further control for the caption
 */
export function drawChart(figure: HTMLElement, chart: PlannedChart, values: ChartValues | undefined, sheet: string, extra?: HTMLElement): void {
  const caption = document.createElement("figcaption");
  if (values === undefined) {
    caption.append(`The chart waits for numbers in ${sheet}!${chart.series[0]!.values}.`, ...(extra === undefined ? [] : [extra]));
    figure.replaceChildren(caption);
    return;
  }
  const points = chart.series.map(({ name }, k) => values.series[k]!.flatMap((value, r): Point[] => (value === undefined ? [] : [{ category: values.categories[r]!, name, value }])));
  const of = (kind: string): number[] => chart.series.flatMap((series, k) => (series.kind === kind ? [k] : []));
  const parts = of("part");
  const lines = of("line");
  const colours = coloursOf(chart);
  const least = parts.length > 0 && lines.length > 0 ? points[lines[0]!]!.reduce((best, point) => (point.value < best.value ? point : best)) : undefined;
  const say = written(chart.valueLook);
  const tip = ({ name, category, value }: Point): string => `${name}, ${category}: ${say(value)}`;
  const title = document.createElement("strong");
  title.textContent = least === undefined ? chart.title : `${chart.title}; cheapest ${least.category}`;
  const save = button("Save picture", () => {
    const picture = figure.querySelector("svg");
    if (picture !== null) savePicture(picture, figure, `${`${chart.title} ${sheet}`.toLowerCase().replace(/[^a-z0-9]+/g, "-")}.svg`);
  });
  const keyed = chart.series.flatMap((series, k) => (series.kind === "mark" || series.hiddenInLegend === true ? [] : [key(series.name, colours[k]!)]));
  caption.append(title, ...keyed, ...(extra === undefined ? [] : [extra]), save);
  // the picture takes the room that the caption leaves, which may need two lines
  figure.replaceChildren(caption);
  const plot = Plot.plot({
    width: Math.max(280, figure.clientWidth - 24),
    height: Math.max(120, figure.clientHeight - caption.offsetHeight - 16),
    marginLeft: 70,
    marginBottom: 34,
    style: { background: "transparent", fontSize: "12px" },
    x: { label: chart.categoryTitle, type: parts.length > 0 ? "band" : "point", domain: [...values.categories] },
    y: { label: chart.valueTitle, labelArrow: "none", grid: true, tickFormat: "~s", zero: parts.length > 0, nice: true },
    color: { domain: parts.map((k) => chart.series[k]!.name), range: parts.map((k) => colours[k]!) },
    marks: [
      ...(parts.length > 0 ? [Plot.barY(parts.flatMap((k) => points[k]!), { x: "category", y: "value", fill: "name", order: parts.map((k) => chart.series[k]!.name), title: tip })] : []),
      ...band(of("bound").map((k) => points[k]!)),
      ...lines.flatMap((k) => [
        Plot.lineY(points[k]!, { x: "category", y: "value", stroke: colours[k]!, strokeWidth: 1.5 }),
        Plot.dot(points[k]!, { x: "category", y: "value", fill: colours[k]!, r: 2.5, title: tip }),
      ]),
      ...of("mark").map((k) => Plot.dot(points[k]!, { x: "category", y: "value", stroke: "var(--chosen)", strokeWidth: 2, r: 6, title: tip })),
      ...(least === undefined ? [] : [Plot.dot([least], { x: "category", y: "value", stroke: "var(--chosen)", strokeWidth: 3, r: 7 })]),
      ...(parts.length > 0 ? [Plot.ruleY([0], { stroke: "var(--rule)" })] : []),
    ],
  });
  plot.setAttribute("role", "img");
  plot.setAttribute("aria-label", `${title.textContent}. ${chart.words}`);
  figure.append(plot);
}

/** A button of the caption. */
export function button(words: string, pressed: () => void): HTMLButtonElement {
  const made = document.createElement("button");
  made.type = "button";
  made.textContent = words;
  made.addEventListener("click", pressed);
  return made;
}

/** Colours of lines that stand alone; the palest of the parts would be lost on paper. */
const LINES = ["var(--part-4)", "var(--part-2)", "var(--ink)", "var(--part-3)"];

/** Parts have the colours of the page's parts; a line over parts stands out from all of them. */
function coloursOf({ series }: PlannedChart): string[] {
  const hasParts = series.some(({ kind }) => kind === "part");
  let parts = 0;
  let lines = 0;
  return series.map(({ kind }) => (kind === "part" ? `var(--part-${(parts++ % 4) + 1})` : kind === "line" && !hasParts ? LINES[lines++ % LINES.length]! : "var(--ink)"));
}

function band(edges: readonly (readonly Point[])[]): Plot.Markish[] {
  const [lower, upper] = edges;
  if (lower === undefined || upper === undefined) return [];
  const between = lower.map(({ category, value }, k) => ({ category, low: value, high: upper[k]!.value }));
  return [
    Plot.areaY(between, { x: "category", y1: "low", y2: "high", fill: "var(--ink)", fillOpacity: 0.14 }),
    ...[lower, upper].map((edge) => Plot.lineY(edge, { x: "category", y: "value", stroke: "var(--ink)", strokeWidth: 0.75, strokeDasharray: "4 3" })),
  ];
}

function key(words: string, colour: string): HTMLElement {
  const entry = document.createElement("span");
  const patch = document.createElement("i");
  patch.style.background = colour;
  entry.append(patch, words);
  return entry;
}

function written(look: NumberLook): (value: number) => string {
  if (look === "percent") return (value) => `${(100 * value).toFixed(1)} %`;
  const digits = { money: 0, ratio: 2, metres: 1 }[look];
  return (value) => value.toLocaleString("en-US", { minimumFractionDigits: digits, maximumFractionDigits: digits });
}
