import type { BatchJob, Look } from "./batch.js";
import type { RowKind, RowRun, Totals } from "./realisations.js";

/**
 * What a thread is asked. One that computes gets "prepare" once and then "rows", each after the answer to the one before. One
 * that keeps the books (the clerk) gets "keep" once, then realisations as they finish and now and then a "look".
 */
export type ThreadRequest =
  | { readonly kind: "prepare"; readonly task: unknown }
  | { readonly kind: "rows"; readonly of: RowKind; readonly from: number; readonly count: number }
  | { readonly kind: "keep"; readonly job: BatchJob }
  | { readonly kind: "add"; readonly of: RowKind; readonly run: RowRun }
  | { readonly kind: "look"; readonly totals: Totals; readonly isCheckpoint: boolean };

/**
 * What a thread answers. "refused" is for the person and ends the run; "failed" is a fault of ours, met again by another
 * try. Times are what the thread itself was busy for.
 */
export type ThreadReply =
  | { readonly kind: "ready" }
  | { readonly kind: "rows"; readonly of: RowKind; readonly from: number; readonly count: number; /** row by row */ readonly values: Float64Array; readonly milliseconds: number }
  | { readonly kind: "looked"; readonly look: Look<unknown>; readonly milliseconds: number }
  | { readonly kind: "refused"; readonly message: string }
  | { readonly kind: "failed"; readonly message: string };

/** A thread that runs. */
export interface Thread {
  post(request: ThreadRequest): void;
  /** ends it at once, in the middle of its work; nothing is heard of it afterwards */
  end(): void;
}

/** Who listens to a thread. */
export interface ThreadListener {
  reply(reply: ThreadReply): void;
  /** the thread is gone and will not answer; the reason in words */
  lost(reason: string): void;
}

/** A kind of thread: web workers in a page, worker threads in Node, scripted ones in a test. */
export interface Threads {
  /** how many work at once */
  readonly size: number;
  start(listener: ThreadListener): Thread;
}
