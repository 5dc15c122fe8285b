import { DomainError } from "../engine/index.js";
import type { BatchJob, LookAt } from "./batch.js";
import { Ledger } from "./ledger.js";
import type { RowKind } from "./realisations.js";
import type { ThreadReply, ThreadRequest } from "./threads.js";
import { wordsOf } from "./words-of-failure.js";

/** Computes one realisation from its index alone, whatever was computed before. */
export type RowMaker = (kind: RowKind, index: number) => Float64Array;

/** What a thread can do. */
export interface Trade {
  /** makes from the task what computes its realisations; the slow part, once a thread */
  prepare(task: never): RowMaker;
  /** makes from the job what looks at realisations */
  lookAt(job: BatchJob): LookAt<unknown>;
}

/**
 * A thread's whole conduct, so that each kind of thread only wires it up. Its one catch: the reason of every failure leaves
 * the thread in words.
 *
 * @param reply  sends an answer; the buffer of rows may be handed over instead of copied
 * @returns      takes each request in turn
 */
export function threadAnswerer(trade: Trade, reply: (reply: ThreadReply) => void): (request: ThreadRequest) => void {
  let make: RowMaker | undefined;
  let ledger: Ledger<unknown> | undefined;
  const carryOut = (request: ThreadRequest): ThreadReply | undefined => {
    const begun = performance.now();
    switch (request.kind) {
      case "prepare":
        make = trade.prepare(request.task as never);
        return { kind: "ready" };
      case "keep":
        ledger = new Ledger(request.job.first, trade.lookAt(request.job));
        return { kind: "ready" };
      case "rows": {
        if (make === undefined) throw new Error("it was asked for realisations before it had a task");
        const { of, from, count } = request;
        const values = rowsOf(make, of, from, count);
        return { kind: "rows", of, from, count, values, milliseconds: performance.now() - begun };
      }
      case "add":
        ledger?.add(request.of, request.run);
        return undefined;
      case "look": {
        if (ledger === undefined) throw new Error("it was asked for a table before it had realisations");
        const look = ledger.look(request.totals, request.isCheckpoint);
        return { kind: "looked", look, milliseconds: performance.now() - begun };
      }
    }
  };
  return (request) => {
    try {
      const answer = carryOut(request);
      if (answer !== undefined) reply(answer);
    } catch (reason) {
      if (reason instanceof DomainError) reply({ kind: "refused", message: reason.message });
      else reply({ kind: "failed", message: wordsOf(reason) });
    }
  };
}

function rowsOf(make: RowMaker, kind: RowKind, from: number, count: number): Float64Array {
  const first = make(kind, from);
  const values = new Float64Array(first.length * count);
  values.set(first);
  for (let k = 1; k < count; k++) values.set(make(kind, from + k), k * first.length);
  return values;
}
