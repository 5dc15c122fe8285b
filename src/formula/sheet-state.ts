import { areaAddress, COLUMNS, ROWS, type Area } from "./addresses.js";
import type { BookCell, BookSheet } from "./book.js";
import type { CellValue } from "./cell-value.js";
import type { Spill } from "./spills.js";

/** What became of one formula. */
export interface Outcome {
  /** the values it gives, row by row; an ordinary formula of a stored workbook gives one */
  readonly values: readonly (readonly CellValue[])[];
  /** why it is an error value, or why the stored value stays, in a sentence */
  readonly reason?: string;
  /** the cell of another formula or value in which the error began, such as "Bid!C7" */
  readonly source?: string;
  /** the formula could not be calculated and the value is the stored one */
  readonly isKept: boolean;
  /** its value changes from one calculation to the next */
  readonly isChanging: boolean;
}

/** A formula on its way. */
export interface FormulaCell {
  readonly cell: BookCell;
  readonly formula: string;
  /** being calculated, or waiting for another cell that is calculated first */
  isOpen: boolean;
  /** open formulas that asked in vain whether its table fills a blank cell */
  wrongGuesses: number;
  outcome: Outcome | undefined;
}

/** The cells of one sheet during a calculation. */
export class SheetState {
  /** formulas whose table may fill other cells and has not been calculated */
  unspilled: FormulaCell[];
  private readonly values = new Map<number, CellValue>();
  private readonly formulas = new Map<number, FormulaCell>();
  private readonly spills: Spill[] = [];
  private rows = 1;
  private columns = 1;

  constructor(sheet: BookSheet) {
    for (const cell of sheet.cells) {
      this.reach(cell.row, cell.column);
      if (cell.formula === undefined) this.values.set(cellKey(cell.row, cell.column), cell.value);
      else this.formulas.set(cellKey(cell.row, cell.column), { cell, formula: cell.formula, isOpen: false, wrongGuesses: 0, outcome: undefined });
    }
    this.unspilled = [...this.formulas.values()].filter(({ cell }) => cell.placement !== undefined && cell.placement.kind !== "single");
  }

  /** Rows and columns from the first on that hold something. */
  get used(): { rows: number; columns: number } {
    return { rows: this.rows, columns: this.columns };
  }

  formulaAt(row: number, column: number): FormulaCell | undefined {
    return this.formulas.get(cellKey(row, column));
  }

  /** The plain value of a cell, or the one that a table fills in; undefined for neither. */
  valueAt(row: number, column: number): CellValue | undefined {
    const value = this.values.get(cellKey(row, column));
    if (value !== undefined || this.spills.length === 0) return value;
    const spill = this.spills.find(({ area }) => contains(area, row, column));
    return spill?.values[row - spill.area.top]?.[column - spill.area.left];
  }

  /** The table whose formula stands in this cell. */
  spillFrom(row: number, column: number): Area | undefined {
    return this.spills.find(({ area }) => area.top === row && area.left === column)?.area;
  }

  addSpill(spill: Spill): void {
    this.spills.push(spill);
    this.reach(spill.area.bottom, spill.area.right);
  }

  /** What is in the way of a table, in words; undefined where it fits. */
  obstacle(area: Area): string | undefined {
    if (area.bottom >= ROWS || area.right >= COLUMNS) return "it would run past the edge of the sheet";
    const other = this.spills.find((spill) => spill.area.top <= area.bottom && area.top <= spill.area.bottom && spill.area.left <= area.right && area.left <= spill.area.right);
    if (other !== undefined) return `it would run into the table in ${areaAddress(other.area)}`;
    for (let row = area.top; row <= area.bottom; row++) {
      for (let column = area.left; column <= area.right; column++) {
        if (row === area.top && column === area.left) continue;
        const value = this.values.get(cellKey(row, column));
        const isTaken = this.formulas.has(cellKey(row, column)) || (value !== undefined && value !== null);
        if (isTaken) return `${areaAddress({ top: row, left: column, bottom: row, right: column })} is not empty`;
      }
    }
    return undefined;
  }

  private reach(row: number, column: number): void {
    this.rows = Math.max(this.rows, row + 1);
    this.columns = Math.max(this.columns, column + 1);
  }
}

function cellKey(row: number, column: number): number {
  return row * COLUMNS + column;
}

function contains(area: Area, row: number, column: number): boolean {
  return row >= area.top && row <= area.bottom && column >= area.left && column <= area.right;
}
