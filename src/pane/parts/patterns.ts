import { drawn } from "./element.js";

/** Hatches of the parts of a cost, one each, drawn in the ink of the contrast theme. */
const HATCHES: Readonly<Record<string, string>> = {
  foundation: "M0 3h6",
  failure: "M-1 1 1-1M0 6 6 0M5 7 7 5",
  delay: "M3 0v6",
  investigation: "M0 0h6v6H0Z",
};

/** Patterns for contrast themes, where four fills of one colour must still be told apart. Put once into the pane. */
export function hatchPatterns(): SVGElement {
  const made = Object.entries(HATCHES).map(([part, path]) =>
    drawn(
      "pattern",
      { id: `probeworth-hatch-${part}`, width: 6, height: 6, patternUnits: "userSpaceOnUse" },
      drawn("rect", { width: 6, height: 6, class: "hatch-paper" }),
      drawn("path", { d: path, class: part === "investigation" ? "hatch-full" : "hatch-ink" }),
    ),
  );
  return drawn("svg", { width: 0, height: 0, class: "patterns", "aria-hidden": "true" }, drawn("defs", {}, ...made));
}
