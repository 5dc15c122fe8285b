import { parseSite, templateRows, type Site } from "../../src/inputs/index.js";
import type { SimulationTask } from "../../src/engine/index.js";

/** The template's site block with other values: a row of few piles, so that a realisation takes a fiftieth of a second. */
const CHANGES: Readonly<Record<string, string | number>> = { "Piles along x": 3, "Piles along y": 1, "Shortest length": 6, "Longest length": 16, "Reading spacing": 2, "Counts": "0, 1, 3", "Share found on site": 0.2, Seed: 11 };

/** The cells of the small site. */
export function smallSiteRows(changes: Readonly<Record<string, string | number>> = {}): (string | number)[][] {
  const all = { ...CHANGES, ...changes };
  return templateRows().map(([label, value, ...rest]) => [label!, all[String(label)] ?? value ?? "", ...rest]);
}

/** The small site, read. */
function smallSite(changes: Readonly<Record<string, string | number>> = {}): Site {
  return parseSite(smallSiteRows(changes));
}

/** Its task, as a page and the headless command make it. */
export function smallTask(changes: Readonly<Record<string, string | number>> = {}): SimulationTask {
  const { problem, counts, method } = smallSite(changes);
  return { variants: [{ name: method, problem }], counts: counts!, seed: problem.seed };
}

/** The same as a csv file. */
export function smallSiteCsv(changes: Readonly<Record<string, string | number>> = {}): string {
  return smallSiteRows(changes).map((row) => row.map((cell) => (typeof cell === "number" ? String(cell) : `"${cell.replaceAll('"', '""')}"`)).join(",")).join("\n");
}
