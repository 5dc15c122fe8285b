import { tableStep } from "../model/conclusion.js";
import { costDrawing, describeCosts, type CostDrawing } from "../model/cost-drawing.js";
import { moneyAxis } from "../model/money-axis.js";
import { shorten, type NumberWriter } from "../model/numbers.js";
import { element, freshId } from "../parts/element.js";
import { keySwatch, keySymbol } from "../parts/key-symbols.js";
import { textTable } from "../parts/text-table.js";
import { watchWidth } from "../parts/width.js";
import type { PricedTable, ResultsStore } from "../results-store.js";

/**
 * Cost against count: the total on an axis of its own, its parts from zero below it, and the figures as a table.
 *
 * @param store   the figures
 * @param writer  writes the numbers
 */
export function costPanel(store: ResultsStore, writer: NumberWriter): HTMLElement {
  const title = freshId("title");
  const words = element("figcaption", { class: "unseen" });
  const totalTitle = element("p", { class: "axis-title" });
  const partTitle = element("p", { class: "axis-title" });
  const totals = element("div", { class: "picture" });
  const parts = element("div", { class: "picture" });
  const totalKey = element("ul", { class: "key" });
  const partKey = element("ul", { class: "key" });
  const table = element("div");
  const folded = element("details", { class: "group" }, element("summary", {}, element("span", { class: "group-name" }, "All figures as a table")), table);
  const panel = element(
    "section",
    { "aria-labelledby": title },
    element("h2", { id: title }, "Cost against number of holes"),
    element("figure", {}, totalTitle, totals, totalKey, partTitle, parts, partKey, words),
    element("p", { class: "hint" }, "Most of the error is common to all counts, so the differences between them are surer than the band."),
    folded,
  );
  let drawing: CostDrawing | undefined;
  let money = "";
  const draw = async (): Promise<void> => {
    const { drawParts, drawTotals } = await import("../drawings/cost-chart.js");
    const width = totals.clientWidth;
    if (drawing === undefined || width === 0) return;
    const axis = moneyAxis(drawing.partAxis[1], writer);
    const unit = [axis.unit, shorten(money, 12)].filter((word) => word !== "").join(" ");
    const inUnit = unit === "" ? "" : `, ${unit}`;
    totalTitle.textContent = `Total${inUnit}; axis not from zero`;
    partTitle.textContent = `Its parts${inUnit}; from zero`;
    totals.replaceChildren(drawTotals(drawing, width, axis.write));
    parts.replaceChildren(drawParts(drawing, width, axis.write, drawing.parts.map(fillOf)));
  };
  let shown: PricedTable | undefined;
  store.subscribe((state) => {
    if (state.table === undefined || state.table === shown) return;
    shown = state.table;
    money = shown.money;
    drawing = costDrawing(shown.rows, shown.cheapest);
    words.textContent = describeCosts(shown.rows, shown.cheapest, writer);
    totalKey.replaceChildren(...keyOfTotals(drawing));
    partKey.replaceChildren(...[...drawing.parts].reverse().map((part) => element("li", {}, keySwatch(fillOf(part)), part)));
    table.replaceChildren(figuresOf(shown, writer));
    void draw();
  });
  watchWidth(totals, () => void draw());
  return panel;
}

function fillOf(part: string): string {
  return `var(--pane-part-${part.toLowerCase()})`;
}

function keyOfTotals(drawing: CostDrawing): HTMLElement[] {
  const made = [
    element("li", {}, keySymbol("cheapest"), "cheapest"),
    element("li", {}, keySymbol("total"), "total, two standard errors either way"),
  ];
  if (drawing.points.filter((point) => point.inSet).length > 1) made.splice(1, 0, element("li", {}, keySymbol("set"), "cannot be told from it"));
  if (drawing.points.some((point) => point.above)) made.push(element("li", {}, keySymbol("above"), "above the axis"));
  return made;
}

function figuresOf(table: PricedTable, writer: NumberWriter): HTMLElement {
  const step = tableStep(table.rows);
  const money = (value: number): string => writer.money(value, step);
  const head = ["Holes", "Total", "Give or take", "Investi\u00adgation", "Founda\u00adtion", "Failure", "Delay", "Chance of damage", "Chance cheapest"];
  const rows = table.rows.map((row) => [
    String(row.count),
    money(row.total),
    money(2 * row.standardError),
    money(row.investigation),
    money(row.foundation),
    money(row.failure),
    money(row.delay),
    writer.percent(row.failureChance),
    writer.percent(row.chanceCheapest),
  ]);
  const strong = table.rows.flatMap((row, k) => (row.count === table.cheapest ? [k] : []));
  return textTable({ head, rows }, `Expected costs by number of holes${table.money === "" ? ", in the currency of the prices" : `, ${shorten(table.money, 12)}`}; give or take is two standard errors`, { strong, scrolls: true });
}
