import { axisY, barY, gridY, plot, ruleX, tickY } from "@observablehq/plot";
import type { LengthBox } from "../model/length-drawing.js";
import { niceTicks } from "../model/ticks.js";
import { axisOfCounts, hidden, PADDING, SIDES } from "./count-axis.js";

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
  const ticks = niceTicks(0, top, 4);
  const counts = boxes.map(({ count }) => count);
  return hidden(
    plot({
      ...SIDES,
      width,
      height: 150,
      marginTop: 8,
      marginBottom: 32,
      x: { type: "band", domain: counts, label: null, padding: PADDING },
      y: { domain: [0, top], label: null },
      marks: [
        gridY(ticks, { stroke: "var(--pane-line)", strokeOpacity: 1 }),
        axisY(ticks, { tickSize: 0, tickFormat: write, color: "var(--pane-soft)" }),
        axisOfCounts(counts, width),
        ruleX(boxes, { x: "count", y1: "least", y2: "most", stroke: "var(--pane-ink)", strokeWidth: 1.5 }),
        barY(boxes, { x: "count", y1: "low", y2: "high", fill: "var(--pane-set)", stroke: "var(--pane-ink)", strokeWidth: 1 }),
        tickY(boxes, { x: "count", y: "middle", stroke: "var(--pane-ink)", strokeWidth: 2.5 }),
      ],
    }),
  );
}
