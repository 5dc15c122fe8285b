import type { Book } from "../../../src/formula/book.js";
import type { ExcelHost } from "./excel-host.js";
import { readReference } from "../../../src/formula/addresses.js";
import { cellKey } from "./model/sheet-model.js";

/**
 * Opens a workbook in place of the empty one: sheets, values, formulas and names.
 *
 * @param book       as read from a file or made from a plan
 * @param namespace  under which the formulas call the cell functions here
 */
export function loadBook(host: ExcelHost, book: Book, namespace = "PROBEDEV"): void {
  const empty = host.book.active;
  const sheets = book.sheets.map(({ name, cells }) => {
    const sheet = host.book.sheets.length === 1 && host.book.findSheet(name) === empty ? empty : host.book.addSheet(name);
    for (const { row, column, value, formula } of cells) {
      sheet.entries.set(cellKey(row, column), formula === undefined ? { value } : { value: null, formula: `=${formula.replace(/(?<![\w.])PROBE\./g, `${namespace}.`)}` });
    }
    return sheet;
  });
  for (const { name, sheet, meaning } of book.names) {
    const match = /^(?:'((?:[^']|'')+)'|([^'!]+))!(.+)$/.exec(meaning);
    const on = sheets.find((each) => each.name === (match?.[1] ?? match?.[2])?.replaceAll("''", "'"));
    const area = readReference(match?.[3] ?? "");
    host.book.addName(name, on === undefined || area === undefined ? undefined : { sheet: on, area }, `=${meaning}`, sheet === undefined ? undefined : sheets[sheet]);
  }
  if (!sheets.includes(empty)) host.book.deleteSheet(empty);
  host.book.activate(sheets[book.activeSheet] ?? sheets[0]!);
  host.calculator.markDirty();
}
