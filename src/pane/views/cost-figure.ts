import { costDrawing, describeCosts, type CostDrawing } from "../model/cost-drawing.js";
import type { CostRow } from "../model/cost-row.js";
import { moneyAxis } from "../model/money-axis.js";
import { shorten, type NumberWriter } from "../model/numbers.js";
import { element } from "../parts/element.js";
import { keySwatch, keySymbol } from "../parts/key-symbols.js";
import { watchWidth } from "../parts/width.js";

/** A picture of cost against count that can be shown anew. */
export interface CostFigure {
  readonly figure: HTMLElement;
  /**
   * @param rows      one row a count, rising, at least one
   * @param cheapest  count of the smallest total
   * @param money     whose money; "" where nobody said
   */
  show(rows: readonly CostRow[], cheapest: number, money: string): void;
}

/**
 * Cost against count: the total with its band on an axis of its own, and below it its parts from zero.
 *
 * @param writer     writes the numbers
 * @param withParts  false leaves the parts out, for a picture that changes while people look
 */
export function costFigure(writer: NumberWriter, withParts: boolean): CostFigure {
  const words = element("figcaption", { class: "unseen" });
  const totalTitle = element("p", { class: "axis-title" });
  const partTitle = element("p", { class: "axis-title" });
  const totals = element("div", { class: "picture picture-of-totals" });
  const parts = element("div", { class: "picture picture-of-parts" });
  const totalKey = element("ul", { class: "key" });
  const partKey = element("ul", { class: "key" });
  let drawing: CostDrawing | undefined;
  let money = "";
  const draw = async (): Promise<void> => {
    const { drawParts, drawTotals } = await import("../drawings/cost-chart.js");
    const width = totals.clientWidth;
    if (drawing === undefined || width === 0) return;
    const axis = moneyAxis(drawing.partAxis[1], writer);
    const unit = [axis.unit, shorten(money, 12)].filter((word) => word !== "").join(" ");
    const inUnit = unit === "" ? "" : `, ${unit}`;
    totalTitle.textContent = `Total${inUnit}; axis not from zero`;
    totals.replaceChildren(drawTotals(drawing, width, axis.write, !withParts));
    if (!withParts) return;
    partTitle.textContent = `Its parts${inUnit}; from zero`;
    parts.replaceChildren(drawParts(drawing, width, axis.write, drawing.parts.map(fillOf)));
  };
  const figure = element("figure", {}, totalTitle, totals, totalKey, ...(withParts ? [partTitle, parts, partKey] : []), words);
  watchWidth(totals, () => void draw());
  return {
    figure,
    show: (rows, cheapest, whose) => {
      money = whose;
      drawing = costDrawing(rows, cheapest);
      words.textContent = describeCosts(rows, cheapest, writer);
      totalKey.replaceChildren(...keyOfTotals(drawing));
      partKey.replaceChildren(...[...drawing.parts].reverse().map((part) => element("li", {}, keySwatch(fillOf(part)), part)));
      void draw();
    },
  };
}

function fillOf(part: string): string {
  return `var(--pane-part-${part.toLowerCase()})`;
}

function keyOfTotals(drawing: CostDrawing): HTMLElement[] {
  const made = [
    element("li", {}, keySymbol("cheapest"), "cheapest"),
    element("li", {}, keySymbol("total"), "total, two standard errors either way"),
  ];
  if (drawing.points.filter((point) => point.inSet).length > 1) made.splice(1, 0, element("li", {}, keySymbol("set"), "cannot be told from it"));
  if (drawing.points.some((point) => point.above)) made.push(element("li", {}, keySymbol("above"), "above the axis"));
  return made;
}
