import { COLUMNS, type Area } from "../../../../src/formula/addresses.js";
import type { CellValue } from "../../../../src/formula/cell-value.js";
import type { ChartModel } from "./chart-model.js";
import type { NameModel } from "./name-model.js";
import type { TableModel } from "./table-model.js";

/** What was entered into a cell. */
export interface Entry {
  readonly value: CellValue;
  /** with "="; its value stands in the sheet's calculated values */
  readonly formula?: string;
}

/** What somebody may do with a protected sheet. */
export interface SheetProtection {
  readonly allowFormatCells?: boolean;
  readonly allowEditObjects?: boolean;
}

/** A rule for entries, as the page gave it. */
export interface Validation {
  readonly area: Area;
  readonly properties: Record<string, unknown>;
}

/** One sheet: what was entered, how it looks, what stands on it. */
export class SheetModel {
  visibility = "Visible";
  readonly entries = new Map<number, Entry>();
  /** values of formulas and of what they spill */
  calculated = new Map<number, CellValue>();
  /** looks that differ from the usual, by cell and by property such as "font/bold" */
  readonly looks = new Map<number, Record<string, unknown>>();
  readonly columnWidths = new Map<number, number>();
  readonly rowHeights = new Map<number, number>();
  readonly names: NameModel[] = [];
  readonly charts: ChartModel[] = [];
  readonly tables: TableModel[] = [];
  validations: Validation[] = [];
  protection: SheetProtection | undefined;
  frozen: Area | undefined;
  readonly page: Record<string, unknown> = {};
  printArea: Area | undefined;

  constructor(
    readonly id: string,
    public name: string,
  ) {}

  /** What a cell shows; null for a blank one. */
  valueAt(row: number, column: number): CellValue {
    const key = cellKey(row, column);
    const entry = this.entries.get(key);
    if (entry !== undefined && entry.formula === undefined) return entry.value;
    return this.calculated.get(key) ?? (entry === undefined ? null : 0);
  }

  /** What was entered: the formula with "=", else the value. */
  enteredAt(row: number, column: number): CellValue {
    return this.entries.get(cellKey(row, column))?.formula ?? this.valueAt(row, column);
  }

  lookAt(row: number, column: number, property: string): unknown {
    return this.looks.get(cellKey(row, column))?.[property];
  }

  setLook(row: number, column: number, property: string, value: unknown): void {
    const key = cellKey(row, column);
    this.looks.set(key, { ...this.looks.get(key), [property]: value });
  }

  /**
   * The rectangle around everything that is in use.
   *
   * @param valuesOnly  cells that have a look alone do not count
   * @returns           undefined for an empty sheet
   */
  used(valuesOnly: boolean): Area | undefined {
    const keys = [...this.entries.keys(), ...this.calculated.keys(), ...(valuesOnly ? [] : this.looks.keys())];
    if (keys.length === 0) return undefined;
    const area = { top: Infinity, left: Infinity, bottom: 0, right: 0 };
    for (const key of keys) {
      const row = Math.floor(key / COLUMNS);
      const column = key % COLUMNS;
      area.top = Math.min(area.top, row);
      area.bottom = Math.max(area.bottom, row);
      area.left = Math.min(area.left, column);
      area.right = Math.max(area.right, column);
    }
    return area;
  }

  /** True where the sheet's protection keeps this part from being changed. */
  isLocked({ top, left, bottom, right }: Area): boolean {
    if (this.protection === undefined) return false;
    for (let row = top; row <= bottom; row++) for (let column = left; column <= right; column++) if (this.lookAt(row, column, "protection/locked") !== false) return true;
    return false;
  }
}

export function cellKey(row: number, column: number): number {
  return row * COLUMNS + column;
}

/** One cell of the workbook, whatever its sheet is called. */
export function placeKey(sheet: SheetModel, row: number, column: number): string {
  return `${sheet.id} ${row} ${column}`;
}
