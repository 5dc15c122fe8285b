import type { Look, LookAt } from "./batch.js";
import { OutcomeRows } from "./outcome-rows.js";
import type { RowKind, RowRun, Totals } from "./realisations.js";

/** The realisations of a run and what they come to. */
export class Ledger<Table> {
  private readonly rows: Readonly<Record<RowKind, OutcomeRows>>;

  /**
   * @param first   index of the first realisation by elements
   * @param lookAt  makes a table of realisations
   */
  constructor(
    private readonly first: number,
    private readonly lookAt: LookAt<Table>,
  ) {
    this.rows = { elements: new OutcomeRows(first), form: new OutcomeRows() };
  }

  add(of: RowKind, run: RowRun): void {
    this.rows[of].add(run);
  }

  /**
   * Looks at the first realisations of each kind.
   *
   * @param totals        counted from index 0; all of them are there
   * @param isCheckpoint  whether it is to be decided how to go on
   */
  look({ elements, form }: Totals, isCheckpoint: boolean): Look<Table> {
    return this.lookAt(this.rows.elements.list(elements - this.first), this.rows.form.list(form), isCheckpoint);
  }
}
