import { numberWriter } from "../model/numbers.js";
import { button } from "../parts/button.js";
import { element, freshId } from "../parts/element.js";
import type { QuickFigures } from "../quick-figures.js";
import type { RunStore } from "../run-store.js";
import type { ResultsState, ResultsStore } from "../results-store.js";
import { IS, IS_NOT, SMALL_SUMS } from "../../results/cautions.js";
import { answerPanel } from "./answer-panel.js";
import { costPanel } from "./cost-panel.js";
import { lengthPanel } from "./length-panel.js";
import { simulatedPanel, type SimulatedActions } from "./simulated-panel.js";

/** Where the simulated figures come from, and what may be done with them. */
export interface SimulatedSource {
  readonly store: RunStore;
  readonly quick: QuickFigures;
  readonly actions: SimulatedActions;
}

/**
 * The Results view: the answer in a sentence, the picture behind it, the pile lengths, and what the figures are not.
 *
 * @param store      the quick figures
 * @param simulated  what a run came to
 * @param locale     language of the numbers
 */
export function resultsView(store: ResultsStore, simulated: SimulatedSource, locale: string | undefined): HTMLElement {
  const writer = numberWriter(locale);
  const figures = element("div", { class: "figures-of-results" }, answerPanel(store, writer), costPanel(store, writer), lengthPanel(store, writer));
  store.subscribe((state) => {
    figures.hidden = state.table === undefined;
    figures.classList.toggle("old", state.old);
  });
  const place = element("div", { class: "simulated-place" });
  simulated.store.subscribe(({ table }) => {
    if (table !== undefined && place.childElementCount === 0) place.append(simulatedPanel(simulated.store, simulated.quick, simulated.actions, writer));
  });
  return element("div", { class: "view" }, place, runPanel(store), figures, cautionPanel());
}

function runPanel(store: ResultsStore): HTMLElement {
  const run = button("Price now", () => (store.state.phase === "running" ? store.cancel() : void store.run()));
  const words = element("p", { class: "run-words" });
  const bar = element("fluent-progress-bar", { "aria-label": "Counts priced", min: 0, max: 1, value: 0 });
  const title = freshId("title");
  const panel = element("section", { class: "run", "aria-labelledby": title }, element("h2", { id: title }, "Quick figures, as the cells show them"), element("div", { class: "row" }, words, run), bar);
  store.subscribe((state) => {
    const running = state.phase === "running";
    // One button with two names: it keeps the keyboard's place when the run ends by itself.
    run.textContent = running ? "Cancel" : state.table === undefined ? "Price now" : "Price again";
    bar.hidden = !running;
    bar.setAttribute("max", String(Math.max(1, state.of)));
    bar.setAttribute("value", String(state.done));
    words.textContent = runWords(state);
    words.classList.toggle("refusal", state.phase === "refused" || state.phase === "failed");
  });
  return panel;
}

function runWords(state: ResultsState): string {
  const earlier = state.old ? " The figures below are for the inputs as they were before." : "";
  switch (state.phase) {
    case "running":
      return `${state.done} of ${state.of} counts priced.${earlier}`;
    case "cancelled":
      return `Cancelled.${earlier}`;
    case "refused":
      return `${state.message}${earlier}`;
    case "failed":
      return `The calculation stopped: ${state.message.replace(/\.$/, "")}. Price again; if it stops again, please report it with the site block.${earlier}`;
    case "idle":
      if (state.table === undefined) return "Choose a site block in the Site view first.";
      return state.message !== "" ? state.message : `Priced ${state.table.rows.length} counts for the inputs as they are now.`;
  }
}

function cautionPanel(): HTMLElement {
  const title = freshId("title");
  const heading = element("h2", { id: title }, "What this is and is not");
  return element("section", { class: "caution", "aria-labelledby": title }, heading, element("p", {}, IS), element("p", {}, IS_NOT), element("p", {}, SMALL_SUMS));
}
