/**
 * The workbook as the pane and the demonstration see it. Excel is one form of it, the practice page another; the pane
 * never knows which. Only reading and inserting new sheets: no form may write over a cell that it did not make. Whatever
 * the workbook does not allow at the moment is a WorkbookRefusal, whose message is a whole sentence for the person.
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
   * Adds one new sheet after the others, fills it, draws its charts and shows it. A taken sheet name becomes "Name (2)", a taken defined
   * name "Name2"; nothing that exists is changed. Formulas of the plan therefore name their own sheet's cells without a
   * sheet name.
   *
   * @returns the names that were free, in the order of the plan
   * @throws {WorkbookRefusal} with what was left half-made, if anything was
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

/** What may be written into a cell; every form that has such rules refuses the rest at once, with these words. */
export type CellValidation =
  /** one of these words, which the form offers as a list */
  | { readonly kind: "choice"; readonly choices: readonly string[]; readonly words: string }
  /** a number of the range (ends included; absent: no end on that side), or one of these words in any case */
  | { readonly kind: "number"; readonly least?: number; readonly most?: number; readonly whole?: boolean; readonly orWords?: readonly string[]; readonly words: string };

/**
 * One cell of a plan; row and column start at 0. A formula starts with "=" and wins over a value. A cell with neither
 * gives its look to what a formula spills into it. Functions of ours are written as PROBE.NAME; a form whose functions
 * stand under another namespace puts that in its place.
 */
export interface PlannedCell {
  readonly row: number;
  readonly column: number;
  readonly value?: CellValue;
  readonly formula?: string;
  readonly style?: CellStyle;
  readonly look?: NumberLook;
  readonly validation?: CellValidation;
}

/**
 * What a series of a chart is.
 * part: a column, stacked on the parts before it; line: a line with a point at each category; bound: a thin broken line, one
 * edge of an error band; mark: a ring at each category whose cell holds a number, and none where it is empty.
 */
export type SeriesKind = "part" | "line" | "bound" | "mark";

/** One series of a chart. */
export interface PlannedSeries {
  readonly kind: SeriesKind;
  readonly name: string;
  /** cells of the plan's own sheet, one column, such as "F5:F17" */
  readonly values: string;
  /** the legend leaves it out: the series before it says what it is */
  readonly hiddenInLegend?: boolean;
}

/** A chart of cells of its own sheet. */
export interface PlannedChart {
  readonly title: string;
  /** the picture in words, for who cannot see it */
  readonly words: string;
  /** cells that the chart covers, such as "H3:P24" */
  readonly place: string;
  /** one column of cells with the words or numbers along the bottom */
  readonly categories: string;
  readonly categoryTitle: string;
  readonly valueTitle: string;
  /** how the numbers of the value axis show */
  readonly valueLook: NumberLook;
  /** in the order in which they are drawn and stacked */
  readonly series: readonly PlannedSeries[];
}

/** A sheet as plain data: what stands where, and what it is for. */
export interface SheetPlan {
  readonly name: string;
  readonly cells: readonly PlannedCell[];
  /** defined names; range without sheet name, such as "A1:D60" */
  readonly names?: readonly { readonly name: string; readonly range: string }[];
  /** pixels, from column A on; absent columns keep the usual width */
  readonly columnWidths?: readonly number[];
  /** rows at the top that stay in view */
  readonly frozenRows?: number;
  readonly charts?: readonly PlannedChart[];
  /** the sheet is made to be printed on one page: lying, or standing where it is high rather than wide */
  readonly onePage?: boolean;
  readonly standing?: boolean;
  /** the cells that are printed; absent: all that the plan fills and draws */
  readonly printed?: string;
}
