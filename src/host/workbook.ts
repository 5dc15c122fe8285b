/**
 * The workbook as the pane and the demonstration see it. Excel is one form of it, the practice page another; the pane
 * never knows which. Only reading and inserting new sheets: no form may write over a cell that it did not make.
 */
export interface Workbook {
  /**
   * Reads the range behind a defined name, whatever the case of the name.
   *
   * @param name  a name of the workbook, such as "Site"
   * @returns     its place and values; undefined where no such name exists or it does not stand for one range
   */
  readName(name: string): Promise<RangeText | undefined>;
  /**
   * Reads what the person has selected; of several selected areas, the first. A selection that runs past the used
   * part of the sheet (a whole column) is cut to the used part.
   *
   * @returns  undefined where nothing, or nothing but a picture, is selected
   */
  readSelection(): Promise<RangeText | undefined>;
  /** @returns the defined names of the workbook that stand for one range, in the order of the alphabet */
  names(): Promise<string[]>;
  /**
   * Adds one new sheet after the others, fills it and shows it. A taken sheet name becomes "Name (2)", a taken defined
   * name "Name2"; nothing that exists is changed. Formulas of the plan therefore name their own sheet's cells without a
   * sheet name.
   *
   * @returns the names that were free, in the order of the plan
   */
  insertSheet(plan: SheetPlan): Promise<InsertedSheet>;
  /**
   * Calls back after cells, names or sheets have changed and the changes are calculated; several changes at once may
   * give one call. The selection is not a change.
   *
   * @returns a function that ends the calls
   */
  onChanged(handler: () => void): () => void;
}

/** A value of a cell: "" for a blank one, an error value as its text ("#VALUE!"), never undefined. */
export type CellValue = string | number | boolean;

/** A rectangle of cells as read. */
export interface RangeText {
  readonly sheet: string;
  /** such as "A1:D60" or "B4", without sheet name and dollar signs */
  readonly address: string;
  /** row by row, all rows equally long */
  readonly values: (CellValue | null)[][];
}

/** What insertSheet made. */
export interface InsertedSheet {
  readonly sheet: string;
  readonly names: readonly string[];
}

/** What a cell is for (head: over a column of words; numberhead: over a column of numbers); each form of the workbook gives each purpose its own look. */
export type CellStyle = "title" | "section" | "label" | "input" | "result" | "note" | "head" | "numberhead";

/** How a number shows: 1,234 - 0.25 - 12.5 - 8.0 %; plain numbers without a format show as they are. */
export type NumberLook = "money" | "ratio" | "metres" | "percent";

/**
 * One cell of a plan; row and column start at 0. A formula starts with "=" and wins over a value. A cell with neither
 * gives its look to what a formula spills into it.
 */
export interface PlannedCell {
  readonly row: number;
  readonly column: number;
  readonly value?: CellValue;
  readonly formula?: string;
  readonly style?: CellStyle;
  readonly look?: NumberLook;
}

/** A sheet as plain data: what stands where, and what it is for. */
export interface SheetPlan {
  readonly name: string;
  readonly cells: readonly PlannedCell[];
  /** defined names; range without sheet name, such as "A1:D60" */
  readonly names?: readonly { readonly name: string; readonly range: string }[];
  /** pixels, from column A on; absent columns keep the usual width */
  readonly columnWidths?: readonly number[];
  /** the sheet is made to be printed on one page */
  readonly onePage?: boolean;
}
