import * as Plot from "@observablehq/plot";
import type { RangeText } from "../host/workbook.js";
import { savePicture } from "./save-picture.js";

/** What the chart shows, out of the cells: one row a count. */
export interface CostRows {
  /** names of the parts, in the order of the columns */
  readonly parts: readonly string[];
  readonly rows: readonly { readonly count: number; readonly parts: readonly number[]; readonly total: number }[];
}

/**
 * Reads a table of costs: a head row, then one row a count; first column the count, last the total, the parts between.
 *
 * @returns  undefined where a count or a cost is not a number
 */
export function costRows(cells: RangeText): CostRows | undefined {
  const [head, ...body] = cells.values;
  if (head === undefined || head.length < 3 || body.length === 0) return undefined;
  if (!body.every((row) => row.every((value) => typeof value === "number"))) return undefined;
  return {
    parts: head.slice(1, -1).map(String),
    rows: (body as number[][]).map((row) => ({ count: row[0]!, parts: row.slice(1, -1), total: row.at(-1)! })),
  };
}

/** Draws the cells' costs against the count into a figure: parts stacked, total as a line, the cheapest marked. */
export function drawCostChart(figure: HTMLElement, cells: RangeText | undefined): void {
  const costs = cells === undefined ? undefined : costRows(cells);
  if (costs === undefined) {
    const words = document.createElement("figcaption");
    words.textContent =
      cells === undefined
        ? "No range is named CostByCount; the chart draws its cells."
        : `The chart waits for numbers in ${cells.sheet}!${cells.address}.`;
    figure.replaceChildren(words);
    return;
  }
  const cheapest = costs.rows.reduce((best, row) => (row.total < best.total ? row : best));
  const stacked = costs.rows.flatMap((row) => row.parts.map((cost, index) => ({ count: row.count, part: costs.parts[index]!, cost })));
  const colours = costs.parts.map((_, index) => `var(--part-${index + 1})`);
  const caption = document.createElement("figcaption");
  const title = document.createElement("strong");
  title.textContent = `Expected cost by number of holes; cheapest ${cheapest.count}`;
  caption.append(title, ...costs.parts.map((part, index) => key(part, colours[index]!)), key("Total", "var(--ink)"));
  const plot = Plot.plot({
    width: Math.max(280, figure.clientWidth - 24),
    height: Math.max(120, figure.clientHeight - 40),
    marginLeft: 70,
    marginBottom: 34,
    style: { background: "transparent", fontSize: "12px" },
    x: { label: "Number of holes", type: "band" },
    y: { label: null, grid: true, tickFormat: "~s", zero: true },
    color: { domain: [...costs.parts], range: colours },
    marks: [
      Plot.barY(stacked, { x: "count", y: "cost", fill: "part", order: [...costs.parts], title: (bar: (typeof stacked)[number]) => `${bar.part}, ${bar.count} holes: ${money(bar.cost)}` }),
      Plot.lineY(costs.rows, { x: "count", y: "total", stroke: "var(--ink)", strokeWidth: 1.5 }),
      Plot.dot(costs.rows, { x: "count", y: "total", fill: "var(--ink)", r: 2.5, title: (row: (typeof costs.rows)[number]) => `${row.count} holes: ${money(row.total)}` }),
      Plot.dot([cheapest], { x: "count", y: "total", stroke: "var(--chosen)", strokeWidth: 3, r: 7 }),
      Plot.ruleY([0], { stroke: "var(--rule)" }),
    ],
  });
  plot.setAttribute("role", "img");
  plot.setAttribute("aria-label", `${title.textContent}, at ${money(cheapest.total)} in all.`);
  const save = document.createElement("button");
  save.type = "button";
  save.textContent = "Save picture";
  save.addEventListener("click", () => savePicture(plot as SVGSVGElement, figure, `cost-by-count-${cells!.sheet.toLowerCase().replace(/[^a-z0-9]+/g, "-")}.svg`));
  caption.append(save);
  figure.replaceChildren(caption, plot);
}

function key(words: string, colour: string): HTMLElement {
  const entry = document.createElement("span");
  const patch = document.createElement("i");
  patch.style.background = colour;
  entry.append(patch, words);
  return entry;
}

function money(value: number): string {
  return Math.round(value).toLocaleString("en-US");
}
