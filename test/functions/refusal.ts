import { SheetError } from "../../src/functions/sheet-error.js";

/** The error value and the sentence that a cell gets instead of an answer; fails when it gets an answer. */
export function refusal(call: () => unknown): [code: string, sentence: string] {
  try {
    const value = call();
    throw new Error(`answered ${JSON.stringify(value)}`);
  } catch (reason) {
    if (reason instanceof SheetError) return [reason.code, reason.message];
    throw reason;
  }
}

/** A body that fails with the given reason. */
export function failing(reason: unknown): () => number {
  return () => {
    throw reason;
  };
}
