import type { Section } from "../../jobs/section.js";
import { describeSection, SLICE_COLOURS, sliceBounds, sliceLegend } from "../model/slice.js";
import type { NumberWriter } from "../model/numbers.js";
import { button } from "../parts/button.js";
import { element, freshId } from "../parts/element.js";
import { keySwatch, keySymbol } from "../parts/key-symbols.js";
import { watchWidth } from "../parts/width.js";
import type { Pricing } from "../pricing.js";
import type { SiteStore } from "../site-store.js";

/** Holes shown at first. */
const USUAL = 4;
const MOST = 20;

/**
 * A vertical section of one ground that the inputs allow, with piles and holes; made in a thread when asked for.
 *
 * @param store    the site block
 * @param pricing  makes the section
 * @param writer   writes the numbers
 */
export function slicePanel(store: SiteStore, pricing: Pick<Pricing, "section">, writer: NumberWriter): HTMLElement {
  const title = freshId("title");
  const words = element("figcaption", { class: "unseen" });
  const picture = element("div", { class: "picture" });
  const key = element("ul", { class: "key" });
  const signs = element(
    "ul",
    { class: "key" },
    element("li", {}, keySymbol("shaft"), "pile, as long as half of all designs"),
    element("li", {}, keySymbol("hole-line"), "hole; dashed: over 1 m before or behind"),
  );
  const said = element("p", { class: "hint", "aria-live": "polite" });
  const number = field("1", "1");
  const count = field(String(USUAL), "0");
  const figure = element("figure", { hidden: true }, picture, element("p", { class: "axis-title" }, "Young\u2019s modulus, MPa"), key, signs, words);
  const draw = button("Draw a ground", () => void make());
  const panel = element(
    "section",
    { "aria-labelledby": title, hidden: true, class: "slice" },
    element("h2", { id: title }, "A ground that the inputs allow"),
    element("p", { class: "hint" }, "One of the many grounds of which a run is made, cut along a row of piles. It is not your site."),
    element("div", { class: "row" }, element("label", { for: number.id, class: "label" }, "Ground no."), number, element("label", { for: count.id, class: "label" }, "Holes"), count, draw),
    said,
    figure,
  );
  let section: Section | undefined;
  let asked = "";
  const show = async (): Promise<void> => {
    const { drawSlice } = await import("../drawings/slice-drawing.js");
    const width = picture.clientWidth;
    if (section === undefined || width === 0) return;
    const bounds = sliceBounds(section.modulus);
    picture.replaceChildren(drawSlice(section, bounds, width, (metres) => writer.plain(metres, 3)));
    key.replaceChildren(...sliceLegend(bounds, writer).map((text, k) => element("li", {}, keySwatch(SLICE_COLOURS[k]!), text)));
    words.textContent = describeSection(section, Number(number.value), writer);
  };
  const make = async (): Promise<void> => {
    const { site } = store.state;
    if (site === undefined) return;
    const index = whole(number, 1) - 1;
    const holes = Math.min(whole(count, 0), site.problem.investigation.holes?.length ?? MOST);
    count.value = String(holes);
    const now = JSON.stringify([store.state.edition, index, holes]);
    if (now === asked) return;
    asked = now;
    said.textContent = "Drawing\u2026";
    const end = await pricing.section(site.problem, holes, index);
    if (asked !== now) return;
    said.textContent = end.kind === "done" || end.kind === "cancelled" ? "" : `No ground could be drawn: ${end.message.replace(/\.$/, "")}.`;
    if (end.kind !== "done") {
      asked = "";
      return;
    }
    section = end.value;
    figure.hidden = false;
    await show();
  };
  for (const each of [number, count]) each.addEventListener("change", () => (section === undefined ? undefined : void make()));
  store.subscribe(({ site }) => {
    panel.hidden = site === undefined;
    // Drawn once, it follows the inputs; before that nobody has asked for it.
    if (site !== undefined && section !== undefined) void make();
  });
  watchWidth(picture, () => void show());
  return panel;
}

function field(value: string, least: string): HTMLInputElement {
  const made = element("input", { id: freshId("slice"), class: "field field-count", type: "number", min: least, step: 1, inputmode: "numeric" });
  made.value = value;
  return made;
}

function whole(input: HTMLInputElement, least: number): number {
  const typed = Math.floor(Number(input.value));
  const usable = input.value !== "" && Number.isFinite(typed) ? Math.min(Math.max(typed, least), 1_000_000) : least;
  input.value = String(usable);
  return usable;
}
