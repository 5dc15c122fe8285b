import { lengthTexts } from "../model/lengths.js";
import { holesInWords, type NumberWriter } from "../model/numbers.js";
import { element, freshId } from "../parts/element.js";
import { textTable } from "../parts/text-table.js";
import { resultUnit } from "../../units/result-units.js";
import type { ResultsStore } from "../results-store.js";

/**
 * How long the piles may turn out, for a count of the person's choice.
 *
 * @param store   the figures
 * @param writer  writes the numbers
 */
export function lengthPanel(store: ResultsStore, writer: NumberWriter): HTMLElement {
  const title = freshId("title");
  const id = freshId("count");
  const choice = element("select", { id, class: "field" });
  const table = element("div", { class: "lengths", "aria-live": "polite" });
  const panel = element(
    "section",
    { "aria-labelledby": title },
    element("h2", { id: title }, "Pile lengths"),
    element("div", { class: "row count-row" }, element("label", { for: id, class: "label" }, "Designed from"), choice),
    table,
    element("p", { class: "hint" }, "All lengths move together, because one design value sets them all."),
  );
  choice.addEventListener("change", () => void store.showLengths(Number(choice.value)));
  let offered: unknown;
  let shown: unknown;
  store.subscribe((state) => {
    if (state.table !== undefined && state.table !== offered) {
      offered = state.table;
      choice.replaceChildren(...state.table.rows.map((row) => element("option", { value: row.count }, holesInWords(row.count))));
      choice.value = String(state.table.cheapest);
    }
    if (state.lengths === shown) return;
    shown = state.lengths;
    if (state.lengths === undefined || state.table === undefined) {
      table.replaceChildren();
      return;
    }
    choice.value = String(state.lengths.count);
    const { units } = state.table;
    const caption = `Length in ${resultUnit("length", units)} that is not exceeded with a chance of 5, 50 and 95\u00a0%`;
    table.replaceChildren(textTable(lengthTexts(state.lengths.table, units, writer), caption, { strong: [state.lengths.table.groups.length], scrolls: false }));
  });
  return panel;
}
