import { stream } from "../../src/engine/random/stream.js";
import { DomainError } from "../../src/engine/index.js";
import type { RowMaker, Trade } from "../../src/jobs/answer-thread.js";
import type { BatchJob, LookAt } from "../../src/jobs/batch.js";
import type { RowKind } from "../../src/jobs/realisations.js";

/** What a thread is to suffer, and how often; the counter is shared by all threads and outlives them. */
export interface Trap {
  readonly of: RowKind | "prepare" | "look";
  readonly index: number;
  readonly does: "throw" | "end" | "hang" | "fill memory" | "refuse" | "no number";
  readonly left: SharedArrayBuffer;
}

/** A small job with a known answer: the mean of exp(z / 2), z standard normal, by a control 1 + z / 2 of known mean. */
export interface DrawsTask {
  readonly seed: string;
  readonly trap?: Trap;
  /** milliseconds that preparing, an element and a form row keep the thread busy */
  readonly busy?: { readonly prepare?: number; readonly elements?: number; readonly form?: number };
}

export interface DrawsTable {
  readonly mean: number;
  readonly error: number;
  readonly elements: number;
  readonly form: number;
}

export function trap(of: Trap["of"], index: number, does: Trap["does"], times = 1): Trap {
  const left = new SharedArrayBuffer(4);
  new Int32Array(left)[0] = times;
  return { of, index, does, left };
}

/** How often the trap was met. */
export function met({ left }: Trap, times = 1): number {
  return times - Math.max(0, new Int32Array(left)[0]);
}

/** One realisation, whatever was drawn before. */
export function draw(seed: string, kind: RowKind, index: number): Float64Array {
  const z = stream(seed, kind === "elements" ? 1 : 2, index).normal();
  const control = Math.fround(1 + z / 2) + z ** 2 / 8;
  return kind === "elements" ? Float64Array.of(Math.exp(z / 2), control) : Float64Array.of(control);
}

function prepareDraws({ seed, trap: set, busy }: DrawsTask): RowMaker {
  keepBusy(busy?.prepare);
  fall(set, "prepare", 0);
  return (kind, index) => {
    keepBusy(busy?.[kind]);
    return fall(set, kind, index) ?? draw(seed, kind, index);
  };
}

function keepBusy(milliseconds = 0): void {
  for (const end = performance.now() + milliseconds; performance.now() < end; );
}

function fall(set: Trap | undefined, of: Trap["of"], index: number): Float64Array | undefined {
  if (set === undefined || set.of !== of || set.index !== index || Atomics.sub(new Int32Array(set.left), 0, 1) <= 0) return undefined;
  switch (set.does) {
    case "throw":
      throw new Error("the matrix is not positive definite");
    case "refuse":
      throw new DomainError("Scale is 0 m; it must be above 0 m.");
    case "end":
      process.exit(7);
      break;
    case "hang":
      for (;;);
    case "fill memory": {
      const kept: number[][] = [];
      for (;;) kept.push(Array.from({ length: 1e5 }, (_, k) => k + 0.5));
    }
    case "no number":
      return Float64Array.of(Number.NaN, 1);
  }
  return undefined;
}

/** The control-variate mean of the rows, each sum in the order of the rows. */
export function meanOf(elements: readonly Float64Array[], form: readonly Float64Array[]): DrawsTable | undefined {
  const n = elements.length;
  if (n < 2 || form.length === 0) return undefined;
  const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);
  const differences = elements.map(([x, c]) => x - c);
  const known = sum(form.map(([c]) => c)) / form.length;
  const difference = sum(differences) / n;
  const variance = sum(differences.map((value) => (value - difference) ** 2)) / (n - 1);
  return { mean: difference + known, error: Math.sqrt(variance / n), elements: n, form: form.length };
}

const FORM_FOR_EACH = 5;

/** Until so many realisations are there, or the standard error is small enough; checkpoints are at 4, 8, 16, ... */
interface DrawsTarget {
  readonly most?: number;
  readonly error?: number;
  /** what a decision does wrong */
  readonly fault?: "goes back" | "throws";
}

export function drawsByNumber(task: DrawsTask, most: number, fault?: DrawsTarget["fault"]): BatchJob {
  return { task, target: { most, fault }, first: 0, most };
}

export function drawsToPrecision(task: DrawsTask, error: number): BatchJob {
  return { task, target: { error }, first: 0, most: Infinity };
}

function lookAtDraws(job: BatchJob): LookAt<DrawsTable> {
  const { most = Infinity, error = 0, fault } = job.target as DrawsTarget;
  const { trap: set } = job.task as DrawsTask;
  return (elements, form, isCheckpoint) => {
    const table = meanOf(elements, form);
    const count = elements.length;
    fall(set, "look", count);
    if (fault === "throws") throw new Error("division by nothing");
    const isEnough = count >= most || (table?.error ?? Infinity) <= error;
    const next = isEnough ? "enough" : totals(fault === "goes back" ? 4 : Math.min(most, Math.max(4, 2 * count)));
    const projected = most < Infinity ? totals(most) : table === undefined || count < 4 ? undefined : totals(Math.ceil(count * Math.max(1, table.error / error) ** 2));
    return { table, next: isCheckpoint ? next : undefined, projected };
  };
}

function totals(elements: number): { elements: number; form: number } {
  return { elements, form: FORM_FOR_EACH * elements };
}

export const drawsTrade: Trade = { prepare: prepareDraws, lookAt: lookAtDraws };
