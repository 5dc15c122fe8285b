import type { SimulationRow } from "../../engine/index.js";
import { resultUnit, type UnitSystem } from "../../units/result-units.js";
import { lengthBoxes, lengthsInWords, type LengthBox } from "../model/length-drawing.js";
import type { NumberWriter } from "../model/numbers.js";
import { element } from "../parts/element.js";
import { keySymbol } from "../parts/key-symbols.js";
import { watchWidth } from "../parts/width.js";

/** A picture of pile lengths against count, with what they mean in words. */
export interface LengthFigure {
  readonly figure: HTMLElement;
  /**
   * @param rows   rows of one way, counts rising, at least one
   * @param count  that the words tell of, one of the rows
   * @param piles  number of piles
   * @param units  SI: metres; US: feet
   */
  show(rows: readonly SimulationRow[], count: number, piles: number, units: UnitSystem): void;
}

/** Makes the picture. */
export function lengthFigure(writer: NumberWriter): LengthFigure {
  const title = element("p", { class: "axis-title" });
  const picture = element("div", { class: "picture picture-of-lengths" });
  const key = element("ul", { class: "key" }, element("li", {}, keySymbol("box"), "half of all outcomes, with their middle"), element("li", {}, keySymbol("range"), "nine of ten"));
  const words = element("figcaption", { class: "comparison" });
  let boxes: readonly LengthBox[] = [];
  const draw = async (): Promise<void> => {
    const { drawLengths } = await import("../drawings/length-chart.js");
    const width = picture.clientWidth;
    if (boxes.length > 0 && width > 0) picture.replaceChildren(drawLengths(boxes, width, (value) => writer.plain(value, 1)));
  };
  watchWidth(picture, () => void draw());
  return {
    figure: element("figure", { class: "lengths-figure" }, title, picture, key, words),
    show: (rows, count, piles, units) => {
      boxes = lengthBoxes(rows, units);
      title.textContent = `Mean pile length, ${resultUnit("length", units)}; from zero`;
      words.textContent = lengthsInWords(rows.find((row) => row.count === count) ?? rows[0]!, piles, units, writer);
      void draw();
    },
  };
}
