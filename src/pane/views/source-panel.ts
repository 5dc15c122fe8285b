import { button } from "../parts/button.js";
import { element, freshId } from "../parts/element.js";
import type { SiteState, SiteStore, Source } from "../site-store.js";

/** What the buttons of the panel do. */
export interface SourceActions {
  readonly choose: (source: Source) => void;
  readonly readAgain: () => void;
  readonly insertTemplate: () => void;
}

const SELECTION = "selection";
const NAME = "name:";

/**
 * Where the inputs are: a defined name or the selected cells, and the template for those who have none yet.
 *
 * @param store    the site block
 * @param actions  what the buttons do
 */
export function sourcePanel(store: SiteStore, actions: SourceActions): HTMLElement {
  const id = freshId("source");
  const choice = element("select", { id, class: "field" });
  const place = element("p", { class: "place" });
  const again = button("Read again", actions.readAgain);
  const insert = button("Insert the template", actions.insertTemplate);
  choice.addEventListener("change", () => {
    if (choice.value === SELECTION) actions.choose({ kind: "selection" });
    else if (choice.value.startsWith(NAME)) actions.choose({ kind: "name", name: choice.value.slice(NAME.length) });
  });
  let offered: string | undefined;
  store.subscribe((state) => {
    const now = JSON.stringify([state.names, state.source === undefined]);
    if (now !== offered) {
      offered = now;
      choice.replaceChildren(...options(state));
    }
    choice.value = state.source === undefined ? "" : state.source.kind === "selection" ? SELECTION : `${NAME}${state.source.name}`;
    place.textContent = whereFrom(state);
    again.toggleAttribute("disabled", state.source === undefined);
    insert.setAttribute("appearance", state.site === undefined && state.checks.length === 0 ? "primary" : "outline");
  });
  const title = freshId("title");
  return element(
    "section",
    { "aria-labelledby": title },
    element("h2", { id: title }, "Site block"),
    element("label", { for: id, class: "label" }, "Cells that hold the inputs"),
    choice,
    place,
    element("div", { class: "row" }, again, insert),
    element("p", { class: "hint" }, "The template goes on a new sheet; nothing in your workbook is changed."),
  );
}

function options(state: SiteState): HTMLElement[] {
  const names = state.names.map((name) => element("option", { value: NAME + name }, name));
  const made: HTMLElement[] = [element("option", { value: SELECTION }, "The cells selected now")];
  if (names.length > 0) made.unshift(element("optgroup", { label: "Defined names" }, ...names));
  if (state.source === undefined) made.unshift(element("option", { value: "" }, "Choose\u2026"));
  return made;
}

function whereFrom(state: SiteState): string {
  if (state.place === undefined) return "";
  const where = `Read from sheet ${state.place.sheet}, ${state.place.address.replace(":", " to ")}`;
  return state.source?.kind === "selection" ? `${where}. Later changes there are not followed.` : `${where}. Changes there are followed.`;
}
