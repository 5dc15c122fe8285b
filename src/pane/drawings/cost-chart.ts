import { axisY, barY, dot, gridY, lineY, plot, ruleX, ruleY, text, areaY } from "@observablehq/plot";
import type { CostDrawing, PartBlock, TotalPoint } from "../model/cost-drawing.js";
import { niceTicks } from "../model/ticks.js";
import { axisOfCounts, drawInBands, hidden, PADDING, SIDES } from "./count-axis.js";

/** Writes an amount of money for an axis, in the unit that the axis states. */
export type AxisWriter = (value: number) => string;

/**
 * Draws the total with its band against the count, on an axis that shows differences rather than zero.
 *
 * @param drawing  what costDrawing gave
 * @param width    width of the picture, pixels
 * @param write    writes an amount at the axis
 * @param alone    whether the axis of counts stands under this picture; otherwise the parts below it bear it
 * @returns        an SVG picture, hidden from screen readers
 */
export function drawTotals(drawing: CostDrawing, width: number, write: AxisWriter, alone = false): Element {
  const { points, counts } = drawing;
  const ticks = niceTicks(drawing.totalAxis[0], drawing.totalAxis[1], 5);
  const set = points.filter((point) => point.inSet);
  // A line along the edge of the axis would look like a cost.
  const within = points.filter((point) => !point.above);
  const best = points.filter((point) => point.cheapest);
  const floor = drawing.totalAxis[0];
  // Neighbouring counts of the set are drawn as one field, so each takes half of the gap on either side.
  const gap = -((width - SIDES.marginLeft - SIDES.marginRight) / (counts.length + PADDING)) * (PADDING / 2) - 0.5;
  return hidden(
    plot({
      ...SIDES,
      width,
      height: alone ? 192 : 168,
      marginTop: 22,
      marginBottom: alone ? 32 : 8,
      x: { type: "band", domain: [...counts], axis: null, padding: PADDING },
      y: { domain: [...drawing.totalAxis], label: null },
      marks: [
        barY(set, { x: "count", y1: () => floor, y2: () => drawing.totalAxis[1], fill: "var(--pane-set)", insetLeft: gap, insetRight: gap }),
        gridY(ticks, { stroke: "var(--pane-line)", strokeOpacity: 1 }),
        axisY(ticks, { tickSize: 0, tickFormat: write, color: "var(--pane-soft)" }),
        ...(alone ? [axisOfCounts(counts, width)] : []),
        areaY(within, { x: "count", y1: "low", y2: "high", fill: "var(--pane-band)" }),
        ruleX(within, { x: "count", y1: "low", y2: "high", stroke: "var(--pane-ink)", strokeWidth: 1.5 }),
        lineY(within, { x: "count", y: "total", stroke: "var(--pane-ink)", strokeWidth: 1.25 }),
        dot(within.filter((point) => !point.inSet), { x: "count", y: "total", r: 3, fill: "var(--pane-surface)", stroke: "var(--pane-ink)", strokeWidth: 1.5 }),
        dot(points.filter((point) => point.above), { x: "count", y: "total", symbol: "triangle", r: 4, fill: "var(--pane-ink)" }),
        dot(set, { x: "count", y: "total", symbol: "diamond", r: 4.5, fill: "var(--pane-ink)", stroke: "var(--pane-surface)", strokeWidth: 1 }),
        dot(best, { x: "count", y: "total", symbol: "diamond", r: 7, fill: "var(--pane-accent)", stroke: "var(--pane-surface)", strokeWidth: 1.5 }),
        text(best, { x: "count", y: "total", text: (point: TotalPoint) => String(point.count), dy: 17, fontWeight: 700, fontSize: 13, fill: "var(--pane-accent)", stroke: "var(--pane-surface)", strokeWidth: 4 }),
      ],
    }),
  );
}

/**
 * Draws the parts of the total stacked from zero, on the same axis of counts.
 *
 * @param drawing  what costDrawing gave
 * @param width    width of the picture, pixels
 * @param write    writes an amount at the axis
 * @param colours  fill of each part, in the order of drawing.parts
 * @returns        an SVG picture, hidden from screen readers
 */
export function drawParts(drawing: CostDrawing, width: number, write: AxisWriter, colours: readonly string[]): Element {
  return drawInBands(drawing.counts, width, drawing.partAxis, write, [
    ...drawing.parts.map((part, k) =>
      barY(drawing.blocks.filter((block) => block.part === part), {
        x: "count",
        y1: (block: PartBlock) => block.from,
        y2: (block: PartBlock) => block.to,
        fill: colours[k] ?? "var(--pane-soft)",
        stroke: "var(--pane-part-edge)",
        strokeWidth: 0.75,
      }),
    ),
    ruleY([0], { stroke: "var(--pane-soft)" }),
  ]);
}
