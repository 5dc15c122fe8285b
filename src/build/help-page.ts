import { helpEntries, type HelpEntry } from "../pane/model/help-entries.js";
import { IS, IS_NOT, PRIVACY, SMALL_SUMS } from "../results/cautions.js";
import { PRODUCT_VERSION } from "../results/version.js";
import type { FunctionsJson } from "./metadata.js";
import { escaped, paragraphs, textPage } from "./text-page.js";

/** What the page is made from. */
export interface HelpSources {
  readonly json: FunctionsJson;
  /** id -> where its method was published */
  readonly sources: ReadonlyMap<string, string>;
  /** what stands before the functions' names in a cell */
  readonly namespace: string;
}

const PARTS: readonly (readonly [anchor: string, heading: string])[] = [
  ["first-cell", "The first cell"],
  ["pairs", "Pairs: one input changed for one cell"],
  ["errors", "When a cell shows an error"],
  ["repair", "When cells are stuck"],
  ["versions", "Versions"],
  ["cautions", "What the figures are and are not"],
  ["data", "Your data"],
];

/**
 * The page that every function's help address leads to: one anchor a function, named as the function.
 *
 * @throws {Error} a function has no example or no source
 */
export function helpPage({ json, sources, namespace }: HelpSources): string {
  const entries = helpEntries(json.functions, namespace);
  const functions = entries.map(({ id }) => `<li><a href="#${escaped(id)}">${escaped(id)}</a></li>`).join("");
  const parts = PARTS.map(([anchor, heading]) => `<li><a href="#${anchor}">${escaped(heading)}</a></li>`).join("");
  return textPage(
    "Probeworth: help",
    `<p>${escaped(IS_NOT)}</p>
<nav aria-label="Parts of this page"><ul>${parts}</ul></nav>
<nav aria-label="Functions"><h2>Functions</h2><ul>${functions}</ul></nav>
${texts(namespace)}
${entries.map((entry) => section(entry, sources.get(entry.id))).join("\n")}
<p class="quiet">Release ${escaped(PRODUCT_VERSION)}, functions under ${escaped(namespace)}. <a href="privacy.html">Data and privacy</a></p>`,
  );
}

function texts(namespace: string): string {
  const words: Readonly<Record<string, readonly string[]>> = {
    "first-cell": [
      "On Excel's Home tab choose Insert site block; the practice workbook has one on its sheet Site. It holds every input with an invented example, and its cells are named Site. Replace the figures that are yours.",
      `In any cell type =${namespace}.TOTALCOST(Site, 4): what four holes cost in all. Fill the formula down with other numbers to see which number is cheapest, or let =${namespace}.COSTTABLE(Site, 8) spill the whole table.`,
    ],
    pairs: [`After the last argument of a function that prices, a label of the site block and a value replace that input for this one cell: =${namespace}.TOTALCOST(Site, 4, "Stiffness COV", 0.7). The value has the unit of the block's row. A pair that could change nothing is refused.`],
    errors: [
      `#VALUE! and #N/A carry their reason: select the cell and rest on the sign beside it. Where Excel shows no reason, =${namespace}.CHECK(Site) says for each input what was read and what is wrong with it, and so does the pane's Site view.`,
      "A blank price is refused, so that it never counts as nothing: write none where you mean no charge.",
    ],
    repair: [
      `Cells that stay at #BUSY! or #NAME?, or formulas that show [2]!_xldudf_${namespace}_ or a file in front of a function's name: on the Home tab choose Repair cells. They are entered again on all sheets; formulas that work, and formulas of others, are not touched.`,
      "Cells on a protected sheet are named and left alone: take the protection off, repair, and protect the sheet again.",
      "#NAME? in every cell means that the add-in is not there: install it, or open the workbook where it is installed. The values come back then; no formula is lost.",
    ],
    versions: [
      `The pane's Help view shows two versions, and =${namespace}.VERSION() the second of them: the pane's, and the cell functions'. After an update Excel may keep the old functions for up to a day. Until the two agree, figures in cells and in the pane may differ: save, close Excel and start it again, or reload the page in Excel on the web.`,
      "The names of the functions and the order of their arguments never change, so that old workbooks go on working.",
    ],
    cautions: [IS, IS_NOT, SMALL_SUMS],
    data: PRIVACY,
  };
  return PARTS.map(([anchor, heading]) => `<section id="${anchor}"><h2>${escaped(heading)}</h2>\n${paragraphs(words[anchor] ?? [])}</section>`).join("\n");
}

function section(entry: HelpEntry, source: string | undefined): string {
  const example = entry.example("Site");
  if (example === undefined) throw new Error(`${entry.id} has no example: give its arguments a sample value in src/pane/model/help-entries.ts.`);
  if (source === undefined) throw new Error(`${entry.id} has no source: add a line @source to its doc comment.`);
  const list = entry.parameters.map(({ name, description, need }) => `<dt>${escaped(name)}${need === "required" ? "" : ` <span class="quiet">(${escaped(need)})</span>`}</dt><dd>${escaped(description)}</dd>`).join("");
  return `<section id="${escaped(entry.id)}"><h2>${escaped(entry.id)}</h2>
<p>${escaped(entry.description)}</p>
<p><code>=${escaped(entry.call)}</code></p>
${list === "" ? "" : `<dl>${list}</dl>\n`}<p>Example: <code>${escaped(example)}</code></p>
<p class="quiet">Method: ${escaped(source)}</p></section>`;
}
