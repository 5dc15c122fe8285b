import type { KeptRows } from "../jobs/batch.js";
import { OutcomeRows } from "../jobs/outcome-rows.js";
import type { RowKind, RowRun } from "../jobs/realisations.js";
import type { RunShelf } from "./run-shelf.js";

const KINDS = ["elements", "form"] as const;
/** A storage that was closed or busy for a moment is tried again with the next saving. */
const MOST_TRIES = 3;

/** Keeps the realisations of one run as they come, each once. */
export class RunKeeping {
  private readonly saved: Readonly<Record<RowKind, Set<number>>>;
  private working: Promise<void> = Promise.resolve();
  private failures = 0;
  private hasKept: boolean;

  /**
   * @param shelf   where they are kept
   * @param inputs  hash of the run's inputs
   * @param kept    what is there already
   * @param failed  hears once why nothing more can be kept, and whether something is kept already
   */
  constructor(
    private readonly shelf: RunShelf,
    private readonly inputs: string,
    kept: KeptRows,
    private readonly failed: (reason: unknown, hasKept: boolean) => void,
  ) {
    this.saved = { elements: indexes(kept.elements), form: indexes(kept.form) };
    this.hasKept = this.saved.elements.size + this.saved.form.size > 0;
  }

  /**
   * Keeps what is new.
   *
   * @param rows  all finished realisations
   * @returns     settles when it is written; never rejects
   */
  save(rows: KeptRows): Promise<void> {
    for (const kind of KINDS) {
      const fresh = rows[kind].flatMap((run) => unsaved(run, this.saved[kind]));
      if (fresh.length === 0 || this.failures >= MOST_TRIES) continue;
      for (const { from, count } of fresh) for (let k = from; k < from + count; k++) this.saved[kind].add(k);
      this.working = this.working.then(() => this.write(kind, fresh));
    }
    return this.working;
  }

  private async write(kind: RowKind, runs: readonly RowRun[]): Promise<void> {
    try {
      await this.shelf.add(this.inputs, kind, runs);
      this.failures = 0;
      this.hasKept = true;
    } catch (reason) {
      for (const { from, count } of runs) for (let k = from; k < from + count; k++) this.saved[kind].delete(k);
      if (++this.failures === MOST_TRIES) this.failed(reason, this.hasKept);
    }
  }
}

/**
 * Whatever was found in the storage, as far as it can be used: runs of whole rows of finite figures, all of one width.
 *
 * @param rows  as read
 */
export function soundRows(rows: KeptRows): KeptRows {
  const sound = (runs: readonly RowRun[]): RowRun[] => {
    const good = runs.filter(({ from, count, values }) => Number.isInteger(from) && from >= 0 && count > 0 && values instanceof Float64Array && values.length > 0 && values.length % count === 0 && values.every(Number.isFinite));
    const width = good.length === 0 ? 0 : good[0]!.values.length / good[0]!.count;
    return good.filter((run) => run.values.length / run.count === width);
  };
  return { elements: sound(rows.elements), form: sound(rows.form) };
}

/** How many there are of a kind without a gap. */
export function unbroken(runs: readonly RowRun[]): number {
  const rows = new OutcomeRows();
  for (const run of runs) rows.add(run);
  return rows.prefix;
}

function indexes(runs: readonly RowRun[]): Set<number> {
  return new Set(runs.flatMap(({ from, count }) => Array.from({ length: count }, (_, k) => from + k)));
}

/** The parts of a run of realisations that are not saved yet, in memory of their own. */
function unsaved({ from, count, values }: RowRun, saved: ReadonlySet<number>): RowRun[] {
  const width = values.length / count;
  const parts: RowRun[] = [];
  for (let k = 0; k < count; k++) {
    if (saved.has(from + k)) continue;
    let end = k;
    while (end < count && !saved.has(from + end)) end++;
    parts.push({ from: from + k, count: end - k, values: values.slice(k * width, end * width) });
    k = end;
  }
  return parts;
}
