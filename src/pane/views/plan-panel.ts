import { holePositions, type Point, type Problem } from "../../engine/index.js";
import type { Site } from "../../inputs/index.js";
import { holesInWords, type NumberWriter } from "../model/numbers.js";
import { describePlan } from "../model/plan.js";
import { element, freshId } from "../parts/element.js";
import type { FluentSlider } from "../parts/fluent.js";
import { keySymbol } from "../parts/key-symbols.js";
import type { SiteStore } from "../site-store.js";
import { watchWidth } from "../parts/width.js";

/** Without a hole list the plan offers this many holes; more would hide the piles. */
const MOST_AUTOMATIC = 20;

/**
 * The plan of piles and holes, with a slider for the number of holes.
 *
 * @param store   the site block
 * @param writer  writes the numbers
 */
export function planPanel(store: SiteStore, writer: NumberWriter): HTMLElement {
  const title = freshId("title");
  const typed = freshId("count");
  const words = element("figcaption", { class: "unseen" });
  const picture = element("div", { class: "picture" });
  const number = element("input", { id: typed, class: "field field-count", type: "number", min: 0, step: 1, inputmode: "numeric" });
  const slider = element("fluent-slider", { role: "slider", min: 0, max: MOST_AUTOMATIC, value: "1", "aria-label": "Number of holes shown" }) as FluentSlider;
  slider.valueTextFormatter = (value) => holesInWords(Number(value));
  const panel = element(
    "section",
    { "aria-labelledby": title },
    element("h2", { id: title }, "Plan"),
    element("div", { class: "row count-row" }, element("label", { for: typed, class: "label" }, "Holes shown"), number, slider),
    element("figure", {}, picture, words, key()),
  );
  let site: Site | undefined;
  let count = 4;
  let drawn = "";
  const draw = async (): Promise<void> => {
    // The plotting library is large; loaded apart, it does not hold up the opening of the pane.
    const { drawPlan } = await import("../drawings/plan-drawing.js");
    if (site === undefined) return;
    const width = picture.clientWidth;
    const problem = site.problem;
    const holes = holePositions(problem, count);
    const now = JSON.stringify([problem.building.piles, problem.building.footprint, holes, width]);
    if (width === 0 || now === drawn) return;
    drawn = now;
    const content = { piles: problem.building.piles, holes, footprint: problem.building.footprint, frame: listed(problem) };
    picture.replaceChildren(drawPlan(content, width, (metres) => writer.plain(metres, 3)));
    words.textContent = describePlan(content.piles, holes, problem.investigation.holes === undefined, writer);
  };
  const show = (wanted: number): void => {
    const most = Number(slider.max);
    count = Number.isInteger(wanted) ? Math.min(Math.max(wanted, 0), most) : count;
    if (number !== document.activeElement) number.value = String(count);
    if (slider.value !== String(count)) slider.value = String(count);
    void draw();
  };
  slider.addEventListener("change", () => show(Number(slider.value)));
  number.addEventListener("input", () => show(number.value === "" ? count : Number(number.value)));
  number.addEventListener("blur", () => {
    number.value = String(count);
  });
  store.subscribe((state) => {
    site = state.site;
    panel.hidden = site === undefined;
    if (site === undefined) return;
    const most = site.problem.investigation.holes?.length ?? Math.max(MOST_AUTOMATIC, ...(site.counts ?? []));
    slider.max = String(most);
    number.max = String(most);
    show(count);
  });
  watchWidth(picture, () => void draw());
  return panel;
}

// The frame holds the whole hole list, so that the picture does not jump while the count changes.
function listed(problem: Problem): readonly Point[] {
  return problem.investigation.holes ?? [];
}

function key(): HTMLElement {
  return element(
    "ul",
    { class: "key" },
    element("li", {}, keySymbol("pile"), "pile, larger for more load"),
    element("li", {}, keySymbol("hole"), "hole, numbered as the layout lists it"),
    element("li", {}, keySymbol("footprint"), "footprint"),
  );
}
