import { IS, IS_NOT, PRIVACY, SMALL_SUMS } from "../../results/cautions.js";
import { helpEntries, searchHelp, type FunctionMetadata, type HelpEntry } from "../model/help-entries.js";
import { element, freshId } from "../parts/element.js";
import { helpEntry, type ExampleActions } from "./help-entry.js";

/** What the Help view is made from. */
export interface HelpContent {
  /** the list in functions.json; undefined where it could not be read */
  readonly functions: readonly FunctionMetadata[] | undefined;
  readonly namespace: string;
  /** the name under which the examples find the site block */
  readonly siteName: () => string;
  /** each part of the program with its version; they can differ for a day after an update */
  readonly versions: readonly { readonly part: string; readonly version: string }[];
}

/**
 * The Help view: every function, the cautions, what happens to data, and the versions.
 *
 * @param content  what it is made from
 * @param actions  what the buttons of an example do
 */
export function helpView(content: HelpContent, actions: ExampleActions): HTMLElement {
  return element("div", { class: "view" }, functionsPanel(content, actions), textPanel("What the figures are and are not", [IS, IS_NOT, SMALL_SUMS]), textPanel("Your data", PRIVACY), versionsPanel(content));
}

function functionsPanel(content: HelpContent, actions: ExampleActions): HTMLElement {
  const title = freshId("title");
  const id = freshId("search");
  const search = element("input", { id, class: "field", type: "search", autocomplete: "off", spellcheck: "false" });
  const found = element("p", { class: "hint", role: "status" });
  const list = element("div", { class: "groups" });
  const panel = element("section", { "aria-labelledby": title }, element("h2", { id: title }, "Functions"));
  if (content.functions === undefined) {
    panel.append(element("p", { class: "refusal" }, "The list of functions could not be read. Close the pane and open it again; if it stays away, the program is not completely installed."));
    return panel;
  }
  const entries = helpEntries(content.functions, content.namespace);
  const made = new Map<HelpEntry, HTMLElement>(entries.map((entry) => [entry, helpEntry(entry, content.siteName, actions)]));
  const show = (): void => {
    const kept = searchHelp(entries, search.value);
    for (const [entry, node] of made) node.hidden = !kept.includes(entry);
    found.textContent = search.value.trim() === "" ? `${entries.length} functions. Arguments in brackets may be left out.` : `${kept.length} of ${entries.length} functions hold these words.`;
  };
  search.addEventListener("input", show);
  list.append(...made.values());
  panel.append(element("label", { for: id, class: "label" }, "Find a function"), search, found, list);
  show();
  return panel;
}

function textPanel(heading: string, sentences: readonly string[]): HTMLElement {
  const title = freshId("title");
  return element("section", { "aria-labelledby": title, class: "caution" }, element("h2", { id: title }, heading), ...sentences.map((sentence) => element("p", {}, sentence)));
}

function versionsPanel(content: HelpContent): HTMLElement {
  const title = freshId("title");
  const rows = content.versions.flatMap(({ part, version }) => [element("dt", {}, part), element("dd", {}, version)]);
  const differ = new Set(content.versions.map(({ version }) => version)).size > 1;
  return element(
    "section",
    { "aria-labelledby": title },
    element("h2", { id: title }, "Versions"),
    element("dl", { class: "versions" }, ...rows),
    differ ? element("p", { class: "refusal" }, "The versions differ. The cell functions may be kept for up to a day after an update; figures in cells and in this pane may differ until then.") : undefined,
  );
}
