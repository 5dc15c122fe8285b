import { barY, ruleX, tickY } from "@observablehq/plot";
import type { LengthBox } from "../model/length-drawing.js";
import { drawInBands } from "./count-axis.js";

/**
 * Draws how long the piles may turn out, against the count.
 *
 * @param boxes  what lengthBoxes gave, at least one
 * @param width  width of the picture, pixels
 * @param write  writes a length at the axis
 * @returns      an SVG picture, hidden from screen readers
 */
export function drawLengths(boxes: readonly LengthBox[], width: number, write: (value: number) => string): Element {
  const top = Math.max(...boxes.map(({ most }) => most)) * 1.05;
  return drawInBands(boxes.map(({ count }) => count), width, [0, top], write, [
    ruleX(boxes, { x: "count", y1: "least", y2: "most", stroke: "var(--pane-ink)", strokeWidth: 1.5 }),
    barY(boxes, { x: "count", y1: "low", y2: "high", fill: "var(--pane-set)", stroke: "var(--pane-ink)", strokeWidth: 1 }),
    tickY(boxes, { x: "count", y: "middle", stroke: "var(--pane-ink)", strokeWidth: 2.5 }),
  ]);
}
