import { drawn } from "./element.js";

/** What a key can show. */
export type KeySymbol = "pile" | "hole" | "footprint" | "total" | "cheapest" | "set" | "above" | "shaft" | "hole-line" | "box" | "range";

/**
 * A small picture of a sign used in a drawing.
 *
 * @param symbol  which sign
 */
export function keySymbol(symbol: KeySymbol): SVGElement {
  return drawn("svg", { viewBox: "0 0 18 14", width: 18, height: 14, "aria-hidden": "true", class: "key-symbol" }, ...SHAPES[symbol]());
}

/**
 * A small square filled as a part of a stack is.
 *
 * @param fill  the part's fill
 */
export function keySwatch(fill: string): SVGElement {
  const square = drawn("rect", { x: 3, y: 1, width: 12, height: 12, class: "swatch" });
  square.style.fill = fill; // the page's policy refuses a style attribute
  return drawn("svg", { viewBox: "0 0 18 14", width: 18, height: 14, "aria-hidden": "true", class: "key-symbol" }, square);
}

const SHAPES: Record<KeySymbol, () => SVGElement[]> = {
  pile: () => [drawn("circle", { cx: 5, cy: 7, r: 2.8, class: "sign-pile" }), drawn("circle", { cx: 13, cy: 7, r: 4.4, class: "sign-pile" })],
  hole: () => [drawn("path", { d: "M9 2.5a4.5 4.5 0 1 0 0 9 4.5 4.5 0 0 0 0-9ZM2.5 7h13M9 .5v13", class: "sign-hole" })],
  footprint: () => [drawn("path", { d: "M2 2h14v10H2Z", class: "sign-dashed" })],
  total: () => [drawn("rect", { x: 1, y: 3, width: 16, height: 8, class: "sign-band" }), drawn("path", { d: "M1 7h16M9 2v10", class: "sign-line" }), drawn("circle", { cx: 9, cy: 7, r: 2.6, class: "sign-point" })],
  cheapest: () => [drawn("path", { d: "M9 .5 15 7 9 13.5 3 7Z", class: "sign-cheapest" })],
  set: () => [drawn("rect", { x: 2, y: 0, width: 14, height: 14, class: "sign-set" }), drawn("path", { d: "M9 2.5 13 7 9 11.5 5 7Z", class: "sign-diamond" })],
  shaft: () => [drawn("rect", { x: 6, y: 1, width: 6, height: 12, class: "sign-shaft" })],
  "hole-line": () => [drawn("path", { d: "M6 0v14", class: "sign-hole-line" }), drawn("path", { d: "M12 0v14", class: "sign-hole-line sign-hole-beside" })],
  box: () => [drawn("rect", { x: 4, y: 1, width: 10, height: 12, class: "sign-box" }), drawn("path", { d: "M4 8h10", class: "sign-middle" })],
  range: () => [drawn("path", { d: "M9 0v14", class: "sign-line" })],
  above: () => [drawn("path", { d: "M9 3 14 11H4Z", class: "sign-diamond" })],
};
