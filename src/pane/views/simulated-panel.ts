import { lengthPercentiles, type CountRow, type SimulationTable } from "../../engine/index.js";
import { fewGrounds } from "../../results/index.js";
import { resultIn, resultUnit } from "../../units/result-units.js";
import { agreementInWords } from "../model/agreement.js";
import { conclude, tableStep } from "../model/conclusion.js";
import { SHOWN_PERCENTILES, type TextTable } from "../model/lengths.js";
import { shorten, type NumberWriter } from "../model/numbers.js";
import { surenessInWords } from "../model/run-words.js";
import { boundInWords, groundsInWords, rowsOfWay, waysOf } from "../model/ways.js";
import { button } from "../parts/button.js";
import { element, freshId } from "../parts/element.js";
import { textTable } from "../parts/text-table.js";
import type { QuickFigures } from "../quick-figures.js";
import type { RunOrder } from "../run-order.js";
import type { RunState, RunStore } from "../run-store.js";
import { costFigure } from "./cost-figure.js";
import { lengthFigure } from "./length-figure.js";
import { wayChoice } from "./way-choice.js";

/** What the buttons of the panel do. What is to be said about it is said while it goes on; true: it is written. */
export interface SimulatedActions {
  readonly writeTables: (say: (sentence: string) => void) => Promise<boolean>;
  /** client: undefined where the client has no count in mind */
  readonly writeBrief: (client: number | undefined, variant: number, say: (sentence: string) => void) => Promise<boolean>;
}

/**
 * What a run came to, beside the quick figures of the cells.
 *
 * @param store    the run
 * @param quick    the quick figures of the same inputs
 * @param actions  what the buttons do
 * @param writer   writes the numbers
 */
export function simulatedPanel(store: RunStore, quick: QuickFigures, actions: SimulatedActions, writer: NumberWriter): HTMLElement {
  const title = freshId("title");
  const id = freshId("client");
  const source = element("p", { class: "hint" });
  const numeral = element("span", { class: "numeral", "aria-hidden": "true" });
  const answer = element("p", { class: "answer" });
  const sure = element("p", { class: "comparison" });
  const comparison = element("p", { class: "comparison", "aria-live": "polite" });
  const remarks = element("ul", { class: "remarks" });
  const agreement = element("p", { class: "hint agreement" });
  const client = element("input", { id, class: "field field-count", type: "number", min: 0, step: 1, inputmode: "numeric" });
  const picture = costFigure(writer, true);
  const lengths = lengthFigure(writer);
  const table = element("div");
  const choice = wayChoice("Way shown", () => show(true));
  const written = element("p", { class: "hint written", hidden: true });
  let isWriting = false;
  const proposed = (): number | undefined => (client.value !== "" && Number.isInteger(Number(client.value)) && Number(client.value) >= 0 ? Number(client.value) : undefined);
  const panel = element(
    "section",
    { "aria-labelledby": title, hidden: true, class: "simulated" },
    element("h2", { id: title }, "By simulation"),
    source,
    choice.row,
    element("div", { class: "answer-head" }, numeral, answer),
    sure,
    element("div", { class: "row count-row" }, element("label", { for: id, class: "label" }, "Holes your client proposes"), client),
    comparison,
    remarks,
    picture.figure,
    agreement,
    lengths.figure,
    element("details", { class: "group" }, element("summary", {}, element("span", { class: "group-name" }, "All simulated figures as a table")), table),
    element("div", { class: "row writes" }, button("Write the tables", () => write(actions.writeTables), { appearance: "primary" }), button("Write the client brief", () => write((say) => actions.writeBrief(proposed(), choice.chosen(), say)))),
    written,
    element("p", { class: "hint" }, "Each goes on a new sheet, with version, seed, numbers of grounds and a hash of the inputs; nothing in your workbook is changed."),
  );
  const write = (work: (say: (sentence: string) => void) => Promise<boolean>): void => {
    if (isWriting) return;
    isWriting = true;
    // The line at the foot of the pane says it aloud; here it stays in sight beside the button that is pressed again.
    const say = (sentence: string): void => {
      written.textContent = sentence;
      written.hidden = sentence === "";
    };
    say("");
    written.classList.remove("refusal");
    void work(say)
      .then((isWritten) => written.classList.toggle("refusal", !isWritten))
      .finally(() => (isWriting = false));
  };
  let shown = "";
  const show = (always = false): void => {
    const state = store.state;
    panel.hidden = state.table === undefined;
    if (state.table === undefined || state.order === undefined) return;
    choice.offer(waysOf(state.table), state.table.rows[state.table.cheapest]!.variant);
    source.textContent = sourceInWords(state, state.table, writer);
    const key = JSON.stringify([state.inputs, state.table.elements, state.table.form]);
    if (!always && key === shown) return;
    shown = key;
    const { rows, cheapest } = rowsOfWay(state.table, choice.chosen());
    const money = shorten(state.order.money, 12);
    const words = conclude(rows, cheapest, proposed(), money, writer);
    numeral.textContent = String(cheapest);
    answer.textContent = words.answer;
    comparison.textContent = client.value !== "" && proposed() === undefined ? "The proposed count must be a whole number, 0 or more." : words.comparison;
    sure.textContent = surenessInWords(state.table, money, writer);
    const all = [...fewGrounds(state.table), ...words.remarks];
    remarks.replaceChildren(...all.map((remark) => element("li", {}, remark)));
    remarks.hidden = all.length === 0;
    picture.show(rows, cheapest, money);
    lengths.show(rows, cheapest, state.order.task.variants[0]!.problem.building.piles.length, state.order.units);
    compare(state.order, state.table);
  };
  const compare = (order: RunOrder, simulated: SimulationTable): void => {
    const { rows, cheapest } = rowsOfWay(simulated, choice.chosen());
    const problem = order.task.variants[choice.chosen()]?.problem;
    const same = problem === undefined ? undefined : quick.of(problem, order.task.counts);
    agreement.textContent = same === undefined ? "The quick figures of this way are being priced for comparison." : agreementInWords(same, rows, cheapest, writer);
    const caption = `Simulated figures by number of holes${order.money === "" ? "" : `, ${shorten(order.money, 12)}`}; give or take is two standard errors; lengths and metres in ${resultUnit("length", order.units)}`;
    const strong = rows.flatMap((row, k) => (row.count === cheapest ? [k] : []));
    table.replaceChildren(textTable(figuresOf(simulated, choice.chosen(), same, order, writer), caption, { strong, scrolls: true }));
  };
  client.addEventListener("input", () => show(true));
  store.subscribe(() => show());
  quick.subscribe(() => {
    const { table: simulated, order } = store.state;
    if (simulated !== undefined && order !== undefined) compare(order, simulated);
  });
  return panel;
}

function sourceInWords(state: RunState, table: SimulationTable, writer: NumberWriter): string {
  const grounds = groundsInWords({ elements: table.elements, form: table.form }, writer);
  const standing = state.end === "done" ? "the finished run" : state.phase === "ended" ? "an unfinished run" : "the run that goes on";
  const changed = state.changed ? " The site block has changed since: these figures are for the inputs as they were." : "";
  return `From ${standing}: ${grounds}, each with its holes, readings, design and every pile. The quick figures, which the cells show, follow below.${changed}`;
}

function figuresOf(table: SimulationTable, variant: number, quick: readonly CountRow[] | undefined, order: RunOrder, writer: NumberWriter): TextTable {
  const { rows } = rowsOfWay(table, variant);
  const step = tableStep(rows);
  const money = (value: number): string => writer.money(value, step);
  const metres = (value: number, decimals: number): string => writer.plain(resultIn(value, "length", order.units), decimals);
  const lengths = SHOWN_PERCENTILES.map((percentile) => ({ percentile, at: lengthPercentiles.indexOf(percentile) })).filter(({ at }) => at >= 0);
  const head = [
    "Holes", "Total", "Give or take", "Quick total", "Chance cheapest", "Investi\u00adgation", "Founda\u00adtion", "Failure", "Delay", "Chance of damage", "Surprises", "Metres beyond need",
    ...lengths.map(({ percentile }) => `Mean length, ${percentile}\u00a0%`),
  ];
  const lines = rows.map((row) => {
    const same = quick?.find(({ count }) => count === row.count);
    const chance = row.failureChanceAtMost === undefined ? writer.percent(row.failureChance) : `none seen, under ${boundInWords(row.failureChanceAtMost, writer)}`;
    return [
      String(row.count), money(row.total), money(2 * row.standardError), same === undefined ? "\u2013" : money(same.total), writer.percent(row.chanceWithin),
      money(row.investigation), money(row.foundation), money(row.failure), money(row.delay), chance,
      writer.plain(row.surprises, 2), metres(row.overDesign, 1), ...lengths.map(({ at }) => metres(row.meanLengths[at]!, 1)),
    ];
  });
  return { head, rows: lines };
}
