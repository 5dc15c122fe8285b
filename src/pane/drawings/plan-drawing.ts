import { axisX, axisY, dot, gridX, gridY, link, plot, rect, text } from "@observablehq/plot";
import type { PilePoint, Point } from "../../engine/index.js";
import { footprintCorners, pileRadius, planFrame, PLAN_MARGIN } from "../model/plan.js";
import { niceTicks, scaleBarLength } from "../model/ticks.js";

/** What stands on the plan. */
export interface PlanContent {
  readonly piles: readonly PilePoint[];
  readonly holes: readonly Point[];
  readonly footprint: { readonly length: number; readonly width: number };
  /** further points that the frame must hold, so that it stays still while the count changes */
  readonly frame: readonly Point[];
}

/**
 * Draws piles and holes to scale.
 *
 * @param content  piles (at least one), holes and footprint, m
 * @param width    width of the picture, pixels
 * @param write    writes a number of metres
 * @returns        an SVG picture; it is hidden from screen readers, which get the sentence beside it
 */
export function drawPlan(content: PlanContent, width: number, write: (metres: number) => string): Element {
  const { piles, holes } = content;
  const corners = footprintCorners(piles, content.footprint);
  const frame = planFrame([...piles, ...holes, ...content.frame, ...corners], width, 330);
  const largest = Math.max(...piles.map((pile) => pile.load as number));
  const bar = scaleBarLength(frame.x[1] - frame.x[0]);
  const barStart = frame.x[1] - bar - (frame.x[1] - frame.x[0]) * 0.03;
  const barHeight = frame.y[0] + (frame.y[1] - frame.y[0]) * 0.05;
  const xTicks = niceTicks(frame.x[0], frame.x[1], 5);
  const yTicks = niceTicks(frame.y[0], frame.y[1], 5);
  const [lower, upper] = corners;
  const picture = plot({
    width: frame.width,
    height: frame.height,
    marginLeft: PLAN_MARGIN.left,
    marginRight: PLAN_MARGIN.right,
    marginTop: PLAN_MARGIN.top,
    marginBottom: PLAN_MARGIN.bottom,
    x: { domain: [...frame.x], label: null },
    y: { domain: [...frame.y], label: null },
    r: { type: "identity" },
    className: "pane-plot",
    marks: [
      gridX(xTicks, { stroke: "var(--pane-line)", strokeOpacity: 1 }),
      gridY(yTicks, { stroke: "var(--pane-line)", strokeOpacity: 1 }),
      axisX(xTicks, { tickSize: 3, tickFormat: write, color: "var(--pane-soft)", label: "x, m", labelArrow: "none" }),
      axisY(yTicks, { tickSize: 3, tickFormat: write, color: "var(--pane-soft)", label: "y, m", labelArrow: "none" }),
      rect([0], { x1: lower.x, x2: upper.x, y1: lower.y, y2: upper.y, fill: "none", stroke: "var(--pane-soft)", strokeDasharray: "5 3" }),
      dot(piles, { x: "x", y: "y", r: (pile: PilePoint) => pileRadius(pile.load, largest), fill: "var(--pane-pile)", stroke: "var(--pane-surface)", strokeWidth: 0.75 }),
      dot(holes, { x: "x", y: "y", r: 7, symbol: BORING, fill: "none", stroke: "var(--pane-surface)", strokeWidth: 3.5 }),
      dot(holes, { x: "x", y: "y", r: 7, symbol: BORING, fill: "none", stroke: "var(--pane-hole)", strokeWidth: 1.75 }),
      text(holes, { x: "x", y: "y", text: (_hole: Point, k: number) => String(k + 1), dx: 9, dy: -9, textAnchor: "start", fontWeight: 600, fill: "var(--pane-hole)", stroke: "var(--pane-surface)", strokeWidth: 3 }),
      link([0], { x1: barStart, x2: barStart + bar, y1: barHeight, y2: barHeight, stroke: "var(--pane-ink)", strokeWidth: 3, strokeLinecap: "butt" }),
      text([`${write(bar)} m`], { x: () => barStart + bar / 2, y: () => barHeight, dy: -8, fill: "var(--pane-ink)", stroke: "var(--pane-surface)", strokeWidth: 3 }),
    ],
  });
  picture.setAttribute("aria-hidden", "true");
  return picture;
}

/** A hole in plan: a ring with a cross through it. */
const BORING = {
  draw(context: CanvasPath, size: number): void {
    const radius = Math.sqrt(size / Math.PI);
    const arm = radius * 1.45;
    context.moveTo(radius, 0);
    context.arc(0, 0, radius, 0, 2 * Math.PI);
    context.moveTo(-arm, 0);
    context.lineTo(arm, 0);
    context.moveTo(0, -arm);
    context.lineTo(0, arm);
  },
};
