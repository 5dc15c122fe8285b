import { element, freshId } from "./element.js";
import type { FluentTablist } from "./fluent.js";

/** One view behind a tab. */
export interface TabView {
  readonly name: string;
  /** makes the inside when the view is first seen, so that opening the pane stays quick */
  readonly content: () => HTMLElement;
  /** told when the view comes into sight or leaves it */
  readonly seen?: (visible: boolean) => void;
}

/**
 * A row of tabs with their panels; arrows move between tabs, Tab goes into the panel.
 *
 * @param views  at least one; the first is shown
 * @returns      the tabs, the panels, and what brings a view into sight by its name
 */
export function tabs(views: readonly TabView[]): { readonly list: HTMLElement; readonly panels: readonly HTMLElement[]; readonly show: (name: string) => void } {
  const ids = views.map(() => ({ tab: freshId("tab"), panel: freshId("panel") }));
  const list = element("fluent-tablist", { class: "tabs", size: "small", "aria-label": "Views", activeid: ids[0]!.tab }) as FluentTablist;
  list.append(...views.map((view, k) => element("fluent-tab", { id: ids[k]!.tab, "aria-controls": ids[k]!.panel }, view.name)));
  const panels = views.map((_view, k) => element("div", { id: ids[k]!.panel, class: "panel", role: "tabpanel", "aria-labelledby": ids[k]!.tab, hidden: k > 0 }));
  const fill = (k: number): void => {
    if (panels[k]!.childElementCount === 0) panels[k]!.append(views[k]!.content());
  };
  fill(0);
  let shown = 0;
  list.addEventListener("change", (event) => {
    // Fields inside a tab would send their own change events through here.
    if (event.target !== list) return;
    const next = ids.findIndex((id) => id.tab === list.activeid);
    if (next < 0 || next === shown) return;
    panels.forEach((panel, k) => {
      panel.hidden = k !== next;
    });
    views[shown]!.seen?.(false);
    shown = next;
    fill(next);
    views[shown]!.seen?.(true);
  });
  const show = (name: string): void => {
    const k = views.findIndex((view) => view.name === name);
    if (k >= 0) list.activeid = ids[k]!.tab;
  };
  return { list, panels, show };
}
