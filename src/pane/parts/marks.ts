import { drawn, element } from "./element.js";

/**
 * The mark of an input: a tick or a cross of different outline, and the word for those who do not see it.
 *
 * @param ok  whether the input can be used
 */
export function verdictMark(ok: boolean): HTMLElement {
  const shape = ok
    ? drawn("path", { d: "M3 8.5 6.5 12 13 4.5", fill: "none", stroke: "currentColor", "stroke-width": 1.8, "stroke-linecap": "round", "stroke-linejoin": "round" })
    : drawn("path", { d: "M8 .8 15.2 8 8 15.2.8 8ZM8 4.4v4.2M8 10.6v1.2", fill: "none", stroke: "currentColor", "stroke-width": 1.6, "stroke-linejoin": "round" });
  const picture = drawn("svg", { viewBox: "0 0 16 16", width: 14, height: 14, "aria-hidden": "true" }, shape);
  return element("span", { class: `mark ${ok ? "mark-ok" : "mark-refused"}` }, picture, element("span", { class: "unseen" }, ok ? "Usable" : "Refused"));
}

/** The sign of the tool: a cored column of ground, two holes of unequal depth beside it. */
export function toolMark(): SVGElement {
  return drawn(
    "svg",
    { viewBox: "0 0 20 20", width: 20, height: 20, class: "tool-mark", "aria-hidden": "true" },
    drawn("rect", { x: 1, y: 1, width: 18, height: 6, rx: 1.5, class: "tool-mark-top" }),
    drawn("rect", { x: 1, y: 8, width: 18, height: 5, class: "tool-mark-middle" }),
    drawn("rect", { x: 1, y: 14, width: 18, height: 5, rx: 1.5, class: "tool-mark-low" }),
    drawn("path", { d: "M6.5 1v9.5M13.5 1v16", class: "tool-mark-holes" }),
  );
}
