import { numberWriter } from "../model/numbers.js";
import type { Pricing } from "../pricing.js";
import type { SiteStore } from "../site-store.js";
import { element } from "../parts/element.js";
import { checksPanel } from "./checks-panel.js";
import { planPanel } from "./plan-panel.js";
import { slicePanel } from "./slice-panel.js";
import { sourcePanel, type SourceActions } from "./source-panel.js";

/**
 * The Site view: where the inputs are, whether they can be used, and what the plan looks like.
 *
 * @param store    the site block
 * @param actions  what the buttons do
 * @param pricing  makes the slice of a ground
 * @param locale   language of the numbers
 */
export function siteView(store: SiteStore, actions: SourceActions, pricing: Pick<Pricing, "section">, locale: string | undefined): HTMLElement {
  const writer = numberWriter(locale);
  return element("div", { class: "view" }, sourcePanel(store, actions), checksPanel(store, writer), planPanel(store, writer), slicePanel(store, pricing, writer));
}
