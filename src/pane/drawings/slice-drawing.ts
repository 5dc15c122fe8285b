import { axisX, axisY, plot, raster, rect, ruleX, text } from "@observablehq/plot";
import type { Section } from "../../jobs/section.js";
import { isInSection, SLICE_COLOURS } from "../model/slice.js";
import { niceTicks } from "../model/ticks.js";

// The ground keeps its colours in every theme, and so must what is drawn upon it.
const ON_GROUND = { ink: "#101314", paper: "#ffffff", hole: "#00567a" };
const LEAST_PILE = 4;

/**
 * Draws a section with its piles and holes; depth and width have scales of their own.
 *
 * @param section  what to draw
 * @param bounds   between the classes of colour, MPa
 * @param width    width of the picture, pixels
 * @param write    writes a number of metres
 * @returns        an SVG picture, hidden from screen readers
 */
export function drawSlice(section: Section, bounds: readonly number[], width: number, write: (metres: number) => string): Element {
  const { from, to, depth, columns, rows, modulus } = section;
  const xTicks = niceTicks(from, to, 5);
  const yTicks = niceTicks(0, depth, 6);
  const metresAPixel = (to - from) / (width - 44);
  const half = Math.max(section.diameter, LEAST_PILE * metresAPixel) / 2;
  const { holes } = section;
  const [within, beside] = [holes.filter(({ off }) => isInSection(off)), holes.filter(({ off }) => !isInSection(off))];
  const rule = (list: Section["holes"][number][], look: Record<string, unknown>): unknown[] => [
    ruleX(list, { x: "x", y1: 0, y2: "depth", stroke: ON_GROUND.paper, strokeWidth: 4, strokeOpacity: 0.85 }),
    ruleX(list, { x: "x", y1: 0, y2: "depth", stroke: ON_GROUND.hole, strokeWidth: 1.75, ...look }),
  ];
  const picture = plot({
    width,
    height: Math.round(Math.min(300, Math.max(190, ((width - 44) * depth) / (to - from) + 56))),
    marginLeft: 34,
    marginRight: 10,
    marginTop: 22,
    marginBottom: 32,
    x: { domain: [from, to], label: null },
    y: { domain: [depth, 0], label: null },
    color: { type: "threshold", domain: [...bounds], range: SLICE_COLOURS.slice(0, bounds.length + 1) },
    className: "pane-plot",
    marks: [
      raster(Float64Array.from(modulus, (value) => value / 1000), { width: columns, height: rows, x1: from, x2: to, y1: 0, y2: depth }),
      axisX(xTicks, { tickSize: 3, tickFormat: write, color: "var(--pane-soft)", label: "x, m", labelArrow: "none" }),
      axisY(yTicks, { tickSize: 3, tickFormat: write, color: "var(--pane-soft)", label: "depth, m", labelArrow: "none" }),
      rect(section.piles, { x1: (pile: { x: number }) => pile.x - half, x2: (pile: { x: number }) => pile.x + half, y1: 0, y2: "length", fill: ON_GROUND.paper, stroke: ON_GROUND.ink, strokeWidth: 1.25 }),
      ...(rule(beside, { strokeDasharray: "3 3" }) as []),
      ...(rule(within, {}) as []),
      text(named(section), { x: "x", y: 0, text: "name", dy: -9, fontWeight: 600, fill: "var(--pane-hole)" }),
    ],
  });
  picture.setAttribute("aria-hidden", "true");
  return picture;
}

/** Numbers of the holes, those behind one another together. */
function named({ holes }: Section): { x: number; name: string }[] {
  const names = new Map<number, string[]>();
  holes.forEach(({ x }, k) => {
    const key = Math.round(x * 100) / 100;
    names.set(key, [...(names.get(key) ?? []), String(k + 1)]);
  });
  return [...names].map(([x, list]) => ({ x, name: list.join(", ") }));
}
