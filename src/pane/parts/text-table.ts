import type { TextTable } from "../model/lengths.js";
import { element, freshId } from "./element.js";

/** How a table is shown. */
export interface TableLook {
  /** rows that stand out, by index */
  readonly strong?: readonly number[];
  /** the table may be wider than the pane; its frame then scrolls and takes the keyboard */
  readonly scrolls: boolean;
}

/**
 * Makes a table of texts.
 *
 * @param table    head and rows; the first column names the row
 * @param caption  what the table is, shown above it
 * @param look     how it is shown
 */
export function textTable(table: TextTable, caption: string, look: TableLook): HTMLElement {
  const id = freshId("caption");
  const head = element("tr", {}, ...table.head.map((text) => element("th", { scope: "col" }, text)));
  const body = table.rows.map((row, k) =>
    element(
      "tr",
      { class: look.strong?.includes(k) ? "strong" : undefined },
      ...row.map((text, column) => (column === 0 ? element("th", { scope: "row" }, text) : element("td", {}, text))),
    ),
  );
  const made = element("table", { class: "figures", "aria-labelledby": id }, element("thead", {}, head), element("tbody", {}, ...body));
  // The caption stands outside the frame: inside it would scroll away with the columns.
  const words = element("p", { id, class: "caption" }, caption);
  const frame = look.scrolls ? element("div", { class: "table-frame", role: "region", "aria-labelledby": id, tabindex: 0 }, made) : made;
  return element("div", {}, words, frame);
}
