import type { RowRun, Totals } from "./realisations.js";

/** What the realisations so far come to. */
export interface Look<Table> {
  /** undefined while there are too few for one */
  readonly table: Table | undefined;
  /** at a checkpoint, where the next one is, counted from index 0: nothing smaller and something larger; "enough"; or "full" where no more may be kept */
  readonly next: Totals | "enough" | "full" | undefined;
  /** where the run is likely to end, counted from index 0; undefined while nobody can tell */
  readonly projected: Totals | undefined;
}

/** What is made of realisations, and at a checkpoint the decision: both depend on them in their order alone, never on the clock. */
export type LookAt<Table> = (elements: readonly Float64Array[], form: readonly Float64Array[], isCheckpoint: boolean) => Look<Table>;

/** A run as plain data, which threads can be handed. */
export interface BatchJob {
  /** what the realisations are made from */
  readonly task: unknown;
  /** what the clerk decides by */
  readonly target: unknown;
  /** index of the first realisation by elements: that of a part of a larger run, otherwise 0 */
  readonly first: number;
  /** no realisation by elements at or beyond this index is begun; Infinity where the precision decides */
  readonly most: number;
}

/** How a run is going. */
export interface BatchProgress<Table> {
  readonly phase: "preparing" | "computing";
  /** realisations that are finished */
  readonly done: Totals;
  /** realisations that the run is likely to need; never below what is done */
  readonly wanted: Totals;
  /** of the work, 0 to 1 */
  readonly share: number;
  readonly secondsLeft: number | undefined;
  /** of the realisations so far, in order */
  readonly table: Table | undefined;
  readonly threads: number;
  /** the latest thing that went wrong and was put right; "" for nothing */
  readonly notice: string;
}

/** The rows of a run as they are kept between runs. */
export interface KeptRows {
  readonly elements: readonly RowRun[];
  readonly form: readonly RowRun[];
}

/** How a run ended. Whatever the end, its rows are kept. */
export interface BatchEnd<Table> {
  readonly kind: "done" | "cancelled" | "too long" | "refused" | "failed";
  /** a sentence; "" for a run that is done or was cancelled */
  readonly message: string;
  /** the last one made; undefined where the realisations were too few */
  readonly table: Table | undefined;
  /** realisations in the table, counted from index 0; the run may hold a few more */
  readonly used: Totals;
}

/** A run that goes on. */
export interface BatchRun<Table> {
  /** settles once and never rejects */
  readonly end: Promise<BatchEnd<Table>>;
  /** ends the run at once and keeps what is finished */
  cancel(): void;
  /** what is finished at this moment, and after the end */
  rows(): KeptRows;
}

/** Settings of a run. */
export interface BatchSettings {
  /** finished rows of an earlier run of the same work */
  readonly kept?: KeptRows;
  /** longest time, in hours, that a run whose end nobody has fixed may be likely to take */
  readonly longestHours?: number;
  /** milliseconds without an answer after which a thread counts as lost, at most */
  readonly longestWait?: number;
}
