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
 * Realisations sorted by rows and columns.
 *
 * @param elements  outcomes by elements, then by the form, each rows x columns
 * @param form      outcomes by the form, rows x columns
 * @param rows      number of variants times number of counts
 */
export function rowSamples(elements: readonly Float64Array[], form: readonly Float64Array[], rows: number): RowSamples[] {
  const width = outcomeColumns.length;
  const samples = Array.from({ length: rows }, (): RowSamples => {
    const room = (n: number): Float64Array[] => outcomeColumns.map(() => new Float64Array(n));
    return { elements: room(elements.length), beside: room(elements.length), alone: room(form.length) };
  });
  const sort = (outcomes: readonly Float64Array[], offset: number, into: (sample: RowSamples) => readonly Float64Array[]): void => {
    const columns = samples.flatMap((sample) => into(sample));
    outcomes.forEach((outcome, i) => {
      for (let c = 0; c < columns.length; c++) columns[c][i] = outcome[offset + c];
    });
  };
  sort(elements, 0, (s) => s.elements);
  sort(elements, rows * width, (s) => s.beside);
  sort(form, 0, (s) => s.alone);
  return samples;
}
