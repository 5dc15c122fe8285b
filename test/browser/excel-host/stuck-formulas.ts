import { ErrorValue } from "../../../src/formula/cell-value.js";
import { BUSY } from "./custom-functions.js";
import { cellKey, placeKey, type SheetModel } from "./model/sheet-model.js";

/** A formula that does not calculate until it is put right, as Excel leaves some. */
export interface Stuck {
  readonly shown: "#BUSY!" | "#NAME?";
  /** what puts it right: calculating everything anew, or entering the formula anew */
  readonly cure: "calculate" | "enter";
}

/** Formulas that Excel does not calculate, and the error values that they show instead. */
export class StuckFormulas {
  private readonly stuck = new Map<string, Stuck & { readonly entered: object }>();

  /** @param namespace  under which the cell functions are registered */
  constructor(private readonly namespace: string) {}

  /** Leaves a formula in the state that Excel sometimes leaves one in. */
  add(sheet: SheetModel, row: number, column: number, stuck: Stuck): void {
    const entered = sheet.entries.get(cellKey(row, column));
    if (entered?.formula === undefined) throw new Error("No formula stands there.");
    this.stuck.set(placeKey(sheet, row, column), { ...stuck, entered });
  }

  /** Everything is calculated anew. */
  calculatedAnew(): void {
    for (const [key, { cure }] of this.stuck) if (cure === "calculate") this.stuck.delete(key);
  }

  /** The error value of a formula that Excel does not calculate at all; undefined for any other. */
  errorOf(sheet: SheetModel, row: number, column: number, formula: string): ErrorValue | undefined {
    const key = placeKey(sheet, row, column);
    const stuck = this.stuck.get(key);
    // a formula that was entered anew, even in the same words, is another entry
    if (stuck !== undefined && stuck.entered === sheet.entries.get(cellKey(row, column))) return new ErrorValue(stuck.shown === "#BUSY!" ? BUSY : stuck.shown);
    this.stuck.delete(key);
    const words = formula.replace(/"(?:[^"]|"")*"/g, '""');
    // the stored form of a name means nothing to Excel once it stands in a cell, nor does the other build's namespace
    const foreign = this.namespace === "PROBE" ? "PROBEDEV" : "PROBE";
    return /_xldudf_/i.test(words) || new RegExp(`(?<![\\w.])${foreign}\\.[A-Z]`, "i").test(words) ? new ErrorValue("#NAME?") : undefined;
  }
}
