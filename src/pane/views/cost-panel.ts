import { tableStep } from "../model/conclusion.js";
import { shorten, type NumberWriter } from "../model/numbers.js";
import { element, freshId } from "../parts/element.js";
import { textTable } from "../parts/text-table.js";
import type { PricedTable, ResultsStore } from "../results-store.js";
import { costFigure } from "./cost-figure.js";

/**
 * Cost against count as a picture, and the figures as a table.
 *
 * @param store   the figures
 * @param writer  writes the numbers
 */
export function costPanel(store: ResultsStore, writer: NumberWriter): HTMLElement {
  const title = freshId("title");
  const picture = costFigure(writer, true);
  const table = element("div");
  const folded = element("details", { class: "group" }, element("summary", {}, element("span", { class: "group-name" }, "All figures as a table")), table);
  const panel = element(
    "section",
    { "aria-labelledby": title },
    element("h2", { id: title }, "Cost against number of holes"),
    picture.figure,
    element("p", { class: "hint" }, "Most of the error is common to all counts, so the differences between them are surer than the band."),
    folded,
  );
  let shown: PricedTable | undefined;
  store.subscribe((state) => {
    if (state.table === undefined || state.table === shown) return;
    shown = state.table;
    picture.show(shown.rows, shown.cheapest, shown.money);
    table.replaceChildren(figuresOf(shown, writer));
  });
  return panel;
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
