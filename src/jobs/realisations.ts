/** The two kinds of realisations: finite elements with the second-order form on the same ground, and the form alone. */
export type RowKind = "elements" | "form";

/** Realisations that follow one another, as they are sent and kept. */
export interface RowRun {
  readonly from: number;
  readonly count: number;
  /** row by row, count times the same number of figures */
  readonly values: Float64Array;
}

/** How many realisations of each kind, counted from index 0. */
export interface Totals {
  readonly elements: number;
  readonly form: number;
}

/** A piece of work: some realisations of one kind. */
export interface Chunk {
  readonly of: RowKind;
  readonly from: number;
  readonly count: number;
}
