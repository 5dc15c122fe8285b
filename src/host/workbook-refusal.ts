/**
 * Why a workbook does not do what it was asked.
 * structure: no sheet may be added; sheet: a sheet's cells may not be written; editing: a cell is being edited; closed: the
 * workbook is gone; large: more than it takes at once; missing: this version or kind of Excel has not got it; failed: anything else.
 */
export type RefusalKind = "structure" | "sheet" | "editing" | "closed" | "large" | "missing" | "failed";

/** The workbook does not allow something; the message is a whole sentence for the person, with its full stop. */
export class WorkbookRefusal extends Error {
  override readonly name = "WorkbookRefusal";

  /**
   * @param kind     why
   * @param message  one or more sentences that say what happened, what was left and what can be done
   */
  constructor(
    readonly kind: RefusalKind,
    message: string,
  ) {
    super(message);
  }
}
