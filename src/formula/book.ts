import type { Area } from "./addresses.js";
import type { CellValue } from "./cell-value.js";

/** How the result of a cell's formula is placed. */
export type Placement =
  /** an ordinary formula: one value, of a table its first */
  | { readonly kind: "single" }
  /** an array formula entered over a fixed rectangle */
  | { readonly kind: "fixed"; readonly area: Area; readonly stored?: StoredTable }
  /** a formula whose table spills as far as it needs; area is how far it went when the file was saved */
  | { readonly kind: "spilling"; readonly area: Area; readonly stored?: StoredTable };

/** The values that a file holds in the area of an array formula, row by row. */
export type StoredTable = readonly (readonly CellValue[])[];

/** A cell that holds something. */
export interface BookCell {
  readonly row: number;
  readonly column: number;
  /** the value as stored; for a formula what the last program made of it */
  readonly value: CellValue;
  /** without "="; absent for a plain value */
  readonly formula?: string;
  readonly placement?: Placement;
}

/** A sheet of a workbook. */
export interface BookSheet {
  readonly name: string;
  readonly cells: readonly BookCell[];
  /** rows that do not show, starting at 0; absent: none */
  readonly hiddenRows?: ReadonlySet<number>;
  /** those of them that a filter took away */
  readonly filteredRows?: ReadonlySet<number>;
}

/** A defined name. */
export interface BookName {
  readonly name: string;
  /** index of the only sheet on which it is known; undefined for the whole workbook */
  readonly sheet: number | undefined;
  /** what it stands for, without "=", written as seen from cell A1 */
  readonly meaning: string;
}

/** A table of a sheet, such as the format calls it: a range with named columns. */
export interface BookTable {
  readonly name: string;
  readonly sheet: number;
  readonly area: Area;
  readonly headerRows: number;
  readonly totalsRows: number;
  readonly columns: readonly string[];
}

/** A workbook as the formula line sees it. */
export interface Book {
  readonly sheets: readonly BookSheet[];
  readonly names: readonly BookName[];
  readonly tables: readonly BookTable[];
  /** index of the sheet on which a formula without a sheet stands */
  readonly activeSheet: number;
  /** dates count from 1904 instead of 1900 */
  readonly dates1904: boolean;
  /** the workbook lets circles of cells iterate */
  readonly iterates: boolean;
}
