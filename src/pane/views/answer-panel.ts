import { conclude } from "../model/conclusion.js";
import type { NumberWriter } from "../model/numbers.js";
import { element, freshId } from "../parts/element.js";
import type { ResultsStore } from "../results-store.js";

/**
 * The cheapest count, large, with one sentence about it and one against the client's count.
 *
 * @param store   the figures
 * @param writer  writes the numbers
 */
export function answerPanel(store: ResultsStore, writer: NumberWriter): HTMLElement {
  const title = freshId("title");
  const id = freshId("client");
  const numeral = element("span", { class: "numeral", "aria-hidden": "true" });
  const answer = element("p", { class: "answer" });
  const comparison = element("p", { class: "comparison", "aria-live": "polite" });
  const remarks = element("ul", { class: "remarks" });
  const client = element("input", { id, class: "field field-count", type: "number", min: 0, step: 1, inputmode: "numeric" });
  const panel = element(
    "section",
    { "aria-labelledby": title, class: "answer-panel" },
    element("h2", { id: title }, "Cheapest count"),
    element("div", { class: "answer-head" }, numeral, answer),
    element("div", { class: "row count-row" }, element("label", { for: id, class: "label" }, "Holes your client proposes"), client),
    comparison,
    remarks,
  );
  const show = (): void => {
    const table = store.state.table;
    if (table === undefined) return;
    const proposed = client.value === "" ? undefined : Number(client.value);
    const usable = proposed !== undefined && Number.isInteger(proposed) && proposed >= 0;
    const words = conclude(table.rows, table.cheapest, usable ? proposed : undefined, table.money, writer);
    numeral.textContent = String(words.count);
    answer.textContent = words.answer;
    comparison.textContent = proposed !== undefined && !usable ? "The proposed count must be a whole number, 0 or more." : words.comparison;
    remarks.replaceChildren(...words.remarks.map((remark) => element("li", {}, remark)));
    remarks.hidden = words.remarks.length === 0;
  };
  client.addEventListener("input", show);
  let shown: unknown;
  store.subscribe((state) => {
    if (state.table === shown) return;
    shown = state.table;
    show();
  });
  return panel;
}
