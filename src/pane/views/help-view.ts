import { IS, IS_NOT, PRIVACY, SMALL_SUMS } from "../../results/cautions.js";
import { helpEntries, searchHelp, type FunctionMetadata, type HelpEntry } from "../model/help-entries.js";
import { button } from "../parts/button.js";
import { element, freshId } from "../parts/element.js";
import { helpEntry, type ExampleActions } from "./help-entry.js";

/** What the Help view is made from. */
export interface HelpContent {
  /** the list in functions.json; undefined where it could not be read */
  readonly functions: readonly FunctionMetadata[] | undefined;
  readonly namespace: string;
  /** the name under which the examples find the site block */
  readonly siteName: () => string;
  readonly versions: Versions;
  /** why nothing but the help is here; undefined where the pane is whole */
  readonly notice: string | undefined;
}

/** The parts of the program that are loaded at different times. */
export interface Versions {
  readonly pane: string;
  /** as the cell functions themselves state it */
  readonly functions: string;
}

/** What the buttons of the Help view do. */
export interface HelpActions extends ExampleActions {
  /** enters stuck formulas again; undefined where formulas cannot get stuck */
  readonly repair?: () => void;
}

/**
 * The Help view: every function, repair, the cautions, what happens to data, and the versions.
 *
 * @param content  what it is made from
 * @param actions  what the buttons do
 */
export function helpView(content: HelpContent, actions: HelpActions): HTMLElement {
  const notice = content.notice === undefined ? undefined : element("p", { class: "refusal notice" }, content.notice);
  return element("div", { class: "view" }, notice, functionsPanel(content, actions), repairPanel(content, actions), textPanel("What the figures are and are not", [IS, IS_NOT, SMALL_SUMS]), textPanel("Your data", PRIVACY, pageLink("privacy.html", "Data and privacy in full")), versionsPanel(content));
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
  panel.append(pageLink("help.html", "All functions on one page, with the source of each method"));
  panel.append(element("label", { for: id, class: "label" }, "Find a function"), search, found, list);
  show();
  return panel;
}

function textPanel(heading: string, sentences: readonly string[], ...more: readonly HTMLElement[]): HTMLElement {
  const title = freshId("title");
  return element("section", { "aria-labelledby": title, class: "caution" }, element("h2", { id: title }, heading), ...sentences.map((sentence) => element("p", {}, sentence)), ...more);
}

/** A page of the build beside this one; Excel opens it in the browser. */
function pageLink(page: string, words: string): HTMLElement {
  return element("p", {}, element("a", { href: page, target: "_blank", rel: "noopener" }, words));
}

function repairPanel({ namespace }: HelpContent, { repair }: HelpActions): HTMLElement | undefined {
  if (repair === undefined) return undefined;
  const title = freshId("title");
  return element(
    "section",
    { "aria-labelledby": title, class: "repair" },
    element("h2", { id: title }, "Cells that are stuck"),
    element("p", {}, `Cells that stay at #BUSY! or #NAME?, and formulas that show [2]!_xldudf_${namespace}_ or a file in front of a function's name, are entered again on all sheets. Formulas that work and formulas of others are not touched.`),
    element("div", { class: "row" }, button("Repair formulas", repair)),
  );
}

function versionsPanel({ versions: { pane, functions } }: HelpContent): HTMLElement {
  const title = freshId("title");
  return element(
    "section",
    { "aria-labelledby": title },
    element("h2", { id: title }, "Versions"),
    element("dl", { class: "versions" }, element("dt", {}, "Pane"), element("dd", {}, pane), element("dt", {}, "Cell functions"), element("dd", {}, functions)),
    pane === functions
      ? undefined
      : element(
          "p",
          { class: "refusal" },
          `The cell functions are of version ${functions}, this pane of version ${pane}. After an update Excel may keep the old functions for up to 24 hours, and until then figures in cells and in this pane may differ. Save your work, close Excel and start it again; in Excel on the web, reload the page. If they still differ a day later, tell whoever installed the program.`,
        ),
  );
}
