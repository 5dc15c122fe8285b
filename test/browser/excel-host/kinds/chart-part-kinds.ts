import { accessDenied, invalidArgument } from "../host-error.js";
import { opened, type Kind } from "../kind.js";
import { libraryWords } from "../library-words.js";
import type { ChartPart, ChartPartName } from "../targets.js";
import { checked, type Wanted } from "./properties.js";

/** What one class of the parts of a chart has: properties that take values, and parts of its own. */
interface PartOf {
  readonly values?: Readonly<Record<string, () => Wanted>>;
  readonly parts?: Readonly<Record<string, ChartPartName>>;
}

const text = (): Wanted => "text";
const number = (): Wanted => "number";
const truth = (): Wanted => "boolean";
const colour = (): Wanted => "colour";
const word = (list: string) => (): Wanted => libraryWords(list);

const PARTS: Readonly<Record<ChartPartName, PartOf>> = {
  ChartAreaFormat: { parts: { fill: "ChartFill", font: "ChartFont", border: "ChartBorder" } },
  ChartAxes: { parts: { categoryAxis: "ChartAxis", valueAxis: "ChartAxis" } },
  ChartAxis: {
    values: { maximum: number, minimum: number, majorUnit: number, minorUnit: number, numberFormat: text, visible: truth, tickLabelPosition: word("ChartAxisTickLabelPosition"), reversePlotOrder: truth },
    parts: { title: "ChartAxisTitle", majorGridlines: "ChartGridlines", minorGridlines: "ChartGridlines", format: "ChartAxisFormat" },
  },
  ChartAxisFormat: { parts: { font: "ChartFont", line: "ChartLineFormat" } },
  ChartAxisTitle: { values: { text, visible: truth }, parts: { format: "ChartAxisTitleFormat" } },
  ChartAxisTitleFormat: { parts: { font: "ChartFont" } },
  ChartBorder: { values: { color: colour, lineStyle: word("ChartLineStyle"), weight: number } },
  ChartFill: {},
  ChartFont: { values: { bold: truth, italic: truth, color: colour, name: text, size: number, underline: word("ChartUnderlineStyle") } },
  ChartGridlines: { values: { visible: truth }, parts: { format: "ChartGridlinesFormat" } },
  ChartGridlinesFormat: { parts: { line: "ChartLineFormat" } },
  ChartLegend: { values: { position: word("ChartLegendPosition"), visible: truth, overlay: truth }, parts: { format: "ChartLegendFormat", legendEntries: "ChartLegendEntryCollection" } },
  ChartLegendEntry: { values: { visible: truth } },
  ChartLegendEntryCollection: {},
  ChartLegendFormat: { parts: { fill: "ChartFill", font: "ChartFont" } },
  ChartLineFormat: { values: { color: colour, lineStyle: word("ChartLineStyle"), weight: number } },
  ChartPlotArea: { parts: { format: "ChartPlotAreaFormat" } },
  ChartPlotAreaFormat: { parts: { fill: "ChartFill", border: "ChartBorder" } },
  ChartSeriesFormat: { parts: { fill: "ChartFill", line: "ChartLineFormat" } },
  ChartTitle: { values: { text, visible: truth, overlay: truth }, parts: { format: "ChartTitleFormat" } },
  ChartTitleFormat: { parts: { font: "ChartFont", fill: "ChartFill", border: "ChartBorder" } },
};

/** What a part can do besides taking values. */
const MORE: Partial<Record<ChartPartName, Pick<Kind<ChartPart>, "call" | "open" | "items">>> = {
  ChartFill: {
    call: {
      setSolidColor: (part, given) => put(part, "color", checked("ChartFill.setSolidColor", "colour", given.any(0))),
      clear: (part) => put(part, "color", null),
    },
  },
  ChartLineFormat: { call: { clear: (part) => put(part, "lineStyle", "None") } },
  ChartLegendEntryCollection: {
    items: (part) => part.chart.series.map((_, index) => opened("ChartLegendEntry", { ...part, path: `${part.path}${index}/` })),
    open: {
      getItemAt: (part, given) => {
        const index = given.integer(0);
        if (index >= part.chart.series.length) throw invalidArgument(`ChartLegendEntryCollection.getItemAt: the legend has ${part.chart.series.length} entries`);
        return opened("ChartLegendEntry", { ...part, path: `${part.path}${index}/` });
      },
    },
    call: { getCount: ({ chart }) => chart.series.length },
  },
};

/** Titles, axes, legends and what belongs to them. */
export const chartPartKinds = Object.fromEntries(
  Object.entries(PARTS).map(([name, { values = {}, parts = {} }]) => {
    const more = MORE[name as ChartPartName] ?? {};
    const kind: Kind<ChartPart> = {
      ...more,
      get: Object.fromEntries(Object.keys(values).map((each) => [each, ({ path, properties }: ChartPart) => properties[path + each] ?? null])),
      set: Object.fromEntries(Object.entries(values).map(([each, wanted]) => [each, (part: ChartPart, value: unknown) => put(part, each, checked(`${name}.${each}`, wanted(), value))])),
      open: { ...more.open, ...Object.fromEntries(Object.entries(parts).map(([each, to]) => [each, (part: ChartPart) => opened(to, { ...part, path: `${part.path}${each}/` })])) },
    };
    return [name, kind];
  }),
) as unknown as { readonly [K in ChartPartName]: Kind<ChartPart> };

function put({ chart, path, properties }: ChartPart, name: string, value: unknown): void {
  if (chart.sheet.protection !== undefined && chart.sheet.protection.allowEditObjects !== true) throw accessDenied(`${chart.sheet.name} is protected`);
  properties[path + name] = value;
}
