import { axisX, axisY, gridY, plot, type Markish } from "@observablehq/plot";
import { countTicks, niceTicks } from "../model/ticks.js";

/** Sides that all pictures over the counts share, so that they stand under one another. */
export const SIDES = { marginLeft: 46, marginRight: 10, className: "pane-plot" } as const;
/** gap between two counts as a share of their distance */
export const PADDING = 0.24;

/** The axis of counts, with as many ticks as fit. */
export function axisOfCounts(counts: readonly number[], width: number): ReturnType<typeof axisX> {
  return axisX(countTicks(counts, Math.floor((width - SIDES.marginLeft - SIDES.marginRight) / 20)), { tickSize: 0, color: "var(--pane-soft)", label: "number of holes", labelAnchor: "center", labelArrow: "none" });
}

/** A picture whose words stand beside it. */
export function hidden(picture: Element): Element {
  picture.setAttribute("aria-hidden", "true");
  return picture;
}

/**
 * Draws marks that stand in a band for each count, over lines at the ticks of an axis from one end to the other.
 *
 * @param width  width of the picture, pixels
 * @param ends   lowest and highest value of the axis
 * @param write  writes a value at the axis
 * @param marks  with the counts as their x
 * @returns      an SVG picture, hidden from screen readers
 */
export function drawInBands(counts: readonly number[], width: number, ends: readonly [number, number], write: (value: number) => string, marks: readonly Markish[]): Element {
  const ticks = niceTicks(ends[0], ends[1], 4);
  return hidden(
    plot({
      ...SIDES,
      width,
      height: 150,
      marginTop: 8,
      marginBottom: 32,
      x: { type: "band", domain: [...counts], label: null, padding: PADDING },
      y: { domain: [...ends], label: null },
      marks: [
        gridY(ticks, { stroke: "var(--pane-line)", strokeOpacity: 1 }),
        axisY(ticks, { tickSize: 0, tickFormat: write, color: "var(--pane-soft)" }),
        axisOfCounts(counts, width),
        ...marks,
      ],
    }),
  );
}
