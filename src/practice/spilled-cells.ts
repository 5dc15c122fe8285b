import type { ICellData, Nullable } from "@univerjs/core";
import type { FormulaDataModel } from "@univerjs/engine-formula";

/** What formulas spill: the grid shows it in cells that hold nothing of their own. */
export class SpilledCells {
  /** @param model  the grid's own record of formulas and their tables */
  constructor(private readonly model: FormulaDataModel) {}

  /** The cell as a formula fills it; undefined where none does. */
  at(book: string, sheet: string, row: number, column: number): ICellData | undefined {
    return this.rows(book, sheet)[row]?.[column] ?? undefined;
  }

  /** The last row and column that a formula fills; -1 where none does. */
  last(book: string, sheet: string): { readonly row: number; readonly column: number } {
    const rows = Object.entries(this.rows(book, sheet));
    return { row: Math.max(-1, ...rows.map(([row]) => Number(row))), column: Math.max(-1, ...rows.flatMap(([, cells]) => Object.keys(cells ?? {}).map(Number))) };
  }

  private rows(book: string, sheet: string): Record<number, Nullable<Record<number, Nullable<ICellData>>>> {
    return (this.model.getArrayFormulaCellData()[book]?.[sheet] ?? {}) as Record<number, Nullable<Record<number, Nullable<ICellData>>>>;
  }
}
