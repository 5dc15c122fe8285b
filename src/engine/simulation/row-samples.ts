import { outcomeColumns } from "./outcome.js";

/** Samples of one variant and count, one array a column. */
export interface RowSamples {
  readonly elements: readonly Float64Array[];
  /** by the form in the same realisations */
  readonly beside: readonly Float64Array[];
  /** by the form in realisations of its own */
  readonly alone: readonly Float64Array[];
}

/**
 * The samples of one row, sorted by columns. One row at a time: all of them would be a second copy of a long run.
 *
 * @param elements  outcomes by elements, then by the form, each rows x columns
 * @param form      outcomes by the form, rows x columns
 * @param row       which of the rows
 * @param rows      number of variants times number of counts
 */
export function rowSamples(elements: readonly Float64Array[], form: readonly Float64Array[], row: number, rows: number): RowSamples {
  const width = outcomeColumns.length;
  const sorted = (outcomes: readonly Float64Array[], offset: number): Float64Array[] => {
    const columns = outcomeColumns.map(() => new Float64Array(outcomes.length));
    for (let i = 0; i < outcomes.length; i++) for (let c = 0; c < width; c++) columns[c][i] = outcomes[i][offset + c];
    return columns;
  };
  return { elements: sorted(elements, row * width), beside: sorted(elements, (rows + row) * width), alone: sorted(form, row * width) };
}
