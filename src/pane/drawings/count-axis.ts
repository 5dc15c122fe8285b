import { axisX } from "@observablehq/plot";
import { countTicks } from "../model/ticks.js";

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
