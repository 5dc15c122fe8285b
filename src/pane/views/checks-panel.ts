import { CATALOGUE } from "../../inputs/index.js";
import { groupChecks, summariseChecks, UNPLACED, type CheckGroup, type CheckLine } from "../model/checks.js";
import type { NumberWriter } from "../model/numbers.js";
import { element, freshId } from "../parts/element.js";
import { verdictMark } from "../parts/marks.js";
import type { SiteState, SiteStore } from "../site-store.js";

const SECTIONS = new Map(CATALOGUE.map((entry) => [plain(entry.label), entry.section]));

/**
 * Every input in words: what cannot be used stands at the top with its reason, everything is folded by section below.
 *
 * @param store   the site block
 * @param writer  writes the numbers
 */
export function checksPanel(store: SiteStore, writer: NumberWriter): HTMLElement {
  const title = freshId("title");
  const summary = element("div", { class: "summary" });
  const refused = element("ul", { class: "checks refused", "aria-label": "Inputs that cannot be used" });
  const list = element("div", { class: "groups" });
  const panel = element("section", { "aria-labelledby": title }, element("h2", { id: title }, "Inputs"), summary, refused, list);
  const unfolded = new Set<string>();
  let shown: unknown;
  store.subscribe((state) => {
    if (state.checks === shown && state.refusal === panel.dataset["refusal"]) return;
    shown = state.checks;
    panel.dataset["refusal"] = state.refusal ?? "";
    summary.replaceChildren(...summaryOf(state));
    const focused = document.activeElement instanceof HTMLElement && list.contains(document.activeElement) ? document.activeElement.dataset["section"] : undefined;
    const groups = groupChecks(state.checks, (label) => SECTIONS.get(plain(label)), (value) => writer.plain(value, 6));
    const wrong = groups.flatMap((group) => group.lines.filter((line) => !line.ok));
    refused.replaceChildren(...wrong.map(lineOf));
    refused.hidden = wrong.length === 0;
    list.replaceChildren(...groups.filter((group) => group.section !== UNPLACED).map((group) => groupOf(group, unfolded)));
    if (focused !== undefined) [...list.querySelectorAll("summary")].find((each) => each.dataset["section"] === focused)?.focus();
  });
  return panel;
}

function summaryOf(state: SiteState): HTMLElement[] {
  const words = state.checks.length === 0 ? (state.refusal ?? "") : summariseChecks(state.checks);
  const lines = [element("p", { class: state.site === undefined && state.checks.length > 0 ? "verdict verdict-refused" : "verdict" }, words)];
  // Rows may be fine one by one and still not fit together; then the sentence of the whole block is the only reason there is.
  const together = state.checks.length > 0 && state.site === undefined && state.checks.every((row) => row.ok);
  if (together) lines.push(element("p", { class: "refusal" }, state.refusal ?? ""));
  return lines;
}

function groupOf(group: CheckGroup, unfolded: Set<string>): HTMLElement {
  const count = group.lines.length;
  const words = group.refused === 0 ? `${count}` : `${group.refused} of ${count} refused`;
  const head = element(
    "summary",
    { "data-section": group.section },
    verdictMark(group.refused === 0),
    element("span", { class: "group-name" }, group.section),
    element("span", { class: "group-count" }, words, element("span", { class: "unseen" }, group.refused === 0 ? " inputs, all usable" : " inputs")),
  );
  const made = element("details", { class: "group", open: unfolded.has(group.section) }, head, element("ul", { class: "checks" }, ...group.lines.map(lineOf)));
  made.addEventListener("toggle", () => {
    if (made.open) unfolded.add(group.section);
    else unfolded.delete(group.section);
  });
  return made;
}

function lineOf(line: CheckLine): HTMLElement {
  if (!line.ok) return element("li", { class: "check check-refused" }, verdictMark(false), element("span", { class: "check-sentence" }, ...sentenceOf(line)));
  return element(
    "li",
    { class: "check" },
    verdictMark(true),
    element("span", { class: "check-label" }, line.label),
    element("span", { class: "check-value" }, line.value),
    line.verdict === "" ? undefined : element("span", { class: "check-verdict" }, line.verdict),
  );
}

/** The sentence with its label made to stand out; most sentences begin with it. */
function sentenceOf(line: CheckLine): (Node | string)[] {
  if (line.verdict.startsWith('"')) return [line.verdict]; // a label that nobody knows, already quoted
  const label = element("strong", {}, line.label);
  return line.verdict.startsWith(line.label) ? [label, line.verdict.slice(line.label.length)] : [label, `: ${line.verdict}`];
}

function plain(label: string): string {
  return label.toLowerCase().replace(/\s+/g, "");
}
