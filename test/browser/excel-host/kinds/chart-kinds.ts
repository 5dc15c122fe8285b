import type { Kind } from "../kind.js";
import type { Targets } from "../targets.js";

type ChartKindName = "ChartCollection" | "Chart" | "ChartSeriesCollection" | "ChartSeries" | "ChartPart";

/** Charts. */
export const chartKinds: { readonly [K in ChartKindName]: Kind<Targets[K]> } = { ChartCollection: {}, Chart: {}, ChartSeriesCollection: {}, ChartSeries: {}, ChartPart: {} };
