import { fewGrounds } from "../../results/index.js";
import { numberWriter, shorten, type NumberWriter } from "../model/numbers.js";
import { orderInWords } from "../model/run-choices.js";
import { bestInWords, progressInWords, standingInWords, surenessInWords } from "../model/run-words.js";
import { rowsOfWay, waysOf } from "../model/ways.js";
import { button } from "../parts/button.js";
import { element, freshId } from "../parts/element.js";
import type { RunState, RunStore } from "../run-store.js";
import type { SiteStore } from "../site-store.js";
import { costFigure } from "./cost-figure.js";
import { orderPanel } from "./order-panel.js";
import { wayChoice } from "./way-choice.js";
import { waysTable } from "./ways-table.js";

/**
 * The Run view: what to run, how far it is, and the answer as it grows surer.
 *
 * @param store   the run
 * @param site    the site block
 * @param locale  language of the numbers
 */
export function runView(store: RunStore, site: SiteStore, locale: string | undefined): HTMLElement {
  const writer = numberWriter(locale);
  const about = element(
    "p",
    { class: "hint view-hint" },
    "A run draws many grounds that your inputs allow, drills and reads the holes in each, designs the piles from the readings, and analyses every pile by finite elements. A short form of the same analysis on many more grounds narrows the error.",
  );
  const order = orderPanel(site);
  return element("div", { class: "view" }, about, order.panel, controlPanel(store, order.order, writer), livePanel(store, writer), keepingPanel(store));
}

function controlPanel(store: RunStore, read: () => ReturnType<ReturnType<typeof orderPanel>["order"]>, writer: NumberWriter): HTMLElement {
  const begin = (): void => {
    const { phase } = store.state;
    if (phase === "none" || phase === "ended") {
      const order = read();
      if (order !== undefined) void store.start(order);
    } else store.cancel();
  };
  const start = button("Start the run", begin, { appearance: "primary" });
  const goOn = button("Go on", () => {
    const { order } = store.state;
    if (order !== undefined) void store.start({ ...order, at: Date.now() });
  });
  const words = element("p", { class: "run-words" });
  const which = element("p", { class: "hint" });
  const changed = element("p", { class: "hint run-changed" });
  const note = element("p", { class: "hint", "aria-live": "polite" });
  const bar = element("fluent-progress-bar", { "aria-label": "Work done", min: 0, max: 1, value: 0 });
  store.subscribe((state) => {
    const goes = state.phase === "starting" || state.phase === "running" || state.phase === "stopping";
    // One button with two names: it keeps the keyboard's place when the run ends by itself.
    start.textContent = state.phase === "stopping" ? "Cancelling\u2026" : goes ? "Cancel" : "Start the run";
    start.setAttribute("appearance", goes ? "outline" : "primary");
    goOn.hidden = goes || state.order === undefined || state.end === "done" || state.end === "refused";
    bar.hidden = !goes;
    bar.setAttribute("value", String(state.progress?.share ?? 0));
    words.textContent = wordsOf(state, writer);
    words.hidden = words.textContent === "";
    words.classList.toggle("refusal", state.end === "failed" || state.end === "refused" || state.end === "too long");
    which.textContent = state.order === undefined ? "" : `This run: ${orderInWords(state.order)}.`;
    which.hidden = state.order === undefined;
    changed.hidden = !state.changed;
    changed.textContent =
      state.end === "kept"
        ? "It was ordered for other inputs than the site block has now, perhaps in another workbook. It keeps its own, and its tables say so."
        : "The site block has changed since this run was ordered. The run keeps its inputs, and its tables say so.";
    note.textContent = [state.note, goes ? (state.progress?.notice ?? "") : ""].filter((sentence) => sentence !== "").join(" ");
    note.hidden = note.textContent === "";
  });
  return element("section", { class: "run control", "aria-label": "Run" }, element("div", { class: "row" }, start, goOn), bar, words, which, changed, note);
}

function wordsOf(state: RunState, writer: NumberWriter): string {
  if (state.phase === "starting") return "Looking for what is kept of this run\u2026";
  if (state.phase === "stopping") return "The threads are ended.";
  if (state.phase === "ended") return standingInWords(state, writer);
  if (state.progress === undefined) return state.phase === "running" ? "Starting the threads\u2026" : "";
  const had = state.before.elements + state.before.form;
  return `${progressInWords(state.progress, writer)}${had > 0 ? ` ${writer.plain(had, 0)} of them were kept from before.` : ""}`;
}

function livePanel(store: RunStore, writer: NumberWriter): HTMLElement {
  const title = freshId("title");
  const best = element("p", { class: "answer" });
  const sure = element("p", { class: "comparison" });
  const few = element("p", { class: "hint" });
  const picture = costFigure(writer, false);
  const ways = element("div");
  const choice = wayChoice("Way shown", () => show());
  const panel = element("section", { "aria-labelledby": title, hidden: true }, element("h2", { id: title }, "Estimate so far"), best, sure, few, choice.row, picture.figure, ways);
  let shown = "";
  const show = (): void => {
    const { table, order } = store.state;
    panel.hidden = table === undefined;
    if (table === undefined || order === undefined) return;
    choice.offer(waysOf(table), table.rows[table.cheapest]!.variant);
    // Progress comes five times a second, a new table less often.
    const key = JSON.stringify([store.state.inputs, table.elements, table.form, table.expectedRegret, choice.chosen()]);
    if (key === shown) return;
    shown = key;
    const money = shorten(order.money, 12);
    best.textContent = bestInWords(table, money, writer);
    sure.textContent = surenessInWords(table, money, writer);
    few.textContent = fewGrounds(table).join("");
    few.hidden = few.textContent === "";
    const { rows, cheapest } = rowsOfWay(table, choice.chosen());
    picture.show(rows, cheapest, money);
    ways.replaceChildren(...(waysOf(table).length > 1 ? [waysTable(table, money, writer)] : []));
  };
  store.subscribe(show);
  return panel;
}

function keepingPanel(store: RunStore): HTMLElement {
  const title = freshId("title");
  const forget = button("Delete the kept runs", () => void store.forget());
  store.subscribe(({ phase, order }) => forget.toggleAttribute("disabled", order === undefined || phase === "starting" || phase === "running" || phase === "stopping"));
  return element(
    "section",
    { "aria-labelledby": title },
    element("h2", { id: title }, "What is kept"),
    element("p", { class: "hint" }, "Finished grounds and the inputs of your last four runs are kept in this program\u2019s own storage and stay on this machine. If the pane or the workbook closes during a run, at most the last few seconds are lost; open the pane again and go on."),
    element("div", { class: "row" }, forget),
  );
}
