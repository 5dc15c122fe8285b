import type { Injector } from "@univerjs/core";
import type { FUniver } from "@univerjs/core/facade";
import { CellAlertManagerService, type ICellAlert } from "@univerjs/sheets-ui";
import type { CellReasons } from "./cell-reasons.js";
import { errorSource } from "./error-trace.js";
import { cellName } from "./cell-name.js";

/**
 * Lets the note that the grid shows while the pointer rests on an error say our reason instead of its own few words.
 *
 * @param injector  the grid's own, whose notes are changed
 */
export function sayWhyOnHover(injector: Injector, grid: FUniver, reasons: CellReasons): void {
  const notes = injector.get(CellAlertManagerService);
  const show = notes.showAlert.bind(notes);
  notes.showAlert = (note: ICellAlert) => {
    const { row, col, subUnitId } = note.location;
    const sheet = grid.getActiveWorkbook()?.getSheetBySheetId(subUnitId);
    if (sheet === null || sheet === undefined) return show(note);
    const { place, sentences } = errorSource(grid, reasons, sheet, row, col);
    const own = place === cellName(row, col);
    show({ ...note, title: own ? place : `${cellName(row, col)}, from ${place}`, message: sentences.join(" ") });
  };
}
