import type { FUniver } from "@univerjs/core/facade";
import { SetSelectionsOperation, SetWorksheetActiveOperation } from "@univerjs/sheets";
import type { CellReasons } from "./cell-reasons.js";
import { cellName } from "./cell-name.js";
import { errorSource, isErrorText } from "./error-trace.js";

/**
 * Keeps the line under the grid true to the selected cell: its place, its value as shown, and for an error the reason in
 * words. The grid is a picture to a screen reader; this line is text.
 *
 * @param line  holds #cell-place, #cell-value and #cell-reason
 * @returns     brings the line up to date at once
 */
export function cellLine(grid: FUniver, reasons: CellReasons, line: HTMLElement): () => void {
  const place = part(line, "#cell-place");
  const value = part(line, "#cell-value");
  const reason = part(line, "#cell-reason");
  const refresh = () => {
    const book = grid.getActiveWorkbook();
    const cell = book?.getActiveCell();
    if (book === null || cell === null || cell === undefined) return;
    const sheet = book.getActiveSheet();
    const failed = isErrorText(cell.getValue());
    place.textContent = `${sheet.getSheetName()}!${cellName(cell.getRow(), cell.getColumn())}`;
    value.textContent = cell.getDisplayValue();
    line.classList.toggle("wrong", failed);
    if (!failed) {
      reason.textContent = "";
      return;
    }
    const source = errorSource(grid, reasons, sheet, cell.getRow(), cell.getColumn());
    const own = source.place === cellName(cell.getRow(), cell.getColumn());
    reason.textContent = `${own ? "" : `From ${source.place}: `}${source.sentences.join(" ")}`;
  };
  // the grid tells of a change of sheet before it has a selected cell there
  grid.onCommandExecuted((command) => {
    if (command.id === SetSelectionsOperation.id || command.id === SetWorksheetActiveOperation.id) setTimeout(refresh);
  });
  return refresh;
}

function part(line: HTMLElement, selector: string): HTMLElement {
  const found = line.querySelector<HTMLElement>(selector);
  if (found === null) throw new Error(`The page has no ${selector}.`);
  return found;
}
