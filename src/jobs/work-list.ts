import type { OutcomeRows } from "./outcome-rows.js";
import type { Chunk, RowKind, Totals } from "./realisations.js";
import type { WorkSpeed } from "./work-speed.js";

/** A piece of cheap realisations takes about this long: short enough for cancelling, long enough for the messages not to matter. */
const CHUNK_MILLISECONDS = 80;
const FIRST_CHUNK = 4;
const FIRST_CHUNKS = 3;
const LARGEST_CHUNK = 256;

/** Hands out the realisations that are still missing, each once, in the order of their index. */
export class WorkList {
  private readonly next: Record<RowKind, number>;
  private recheck: Chunk | undefined;

  constructor(
    private readonly rows: Readonly<Record<RowKind, OutcomeRows>>,
    private readonly speed: WorkSpeed,
  ) {
    this.next = { elements: rows.elements.first, form: rows.form.first };
    // kept realisations are only as good as the arithmetic of the machine that goes on with them
    if (rows.form.has(0)) this.recheck = { of: "form", from: 0, count: 1 };
  }

  /**
   * The next piece of work.
   *
   * @param wanted  totals of the present checkpoint
   * @param ahead   elements that may be begun beyond it, so that no thread waits for another
   */
  take(wanted: Totals, ahead: number): Chunk | undefined {
    const again = this.recheck;
    this.recheck = undefined;
    if (again !== undefined) return again;
    // a few cheap ones first, because the time left cannot be told without them
    const first = this.speed.known("form") < FIRST_CHUNKS ? this.missing("form", Math.min(wanted.form, FIRST_CHUNKS * FIRST_CHUNK), FIRST_CHUNK) : undefined;
    return first ?? this.missing("elements", wanted.elements, 1) ?? this.missing("form", wanted.form, this.chunkOfForm()) ?? this.missing("elements", wanted.elements + ahead, 1);
  }

  private missing(of: RowKind, below: number, most: number): Chunk | undefined {
    const rows = this.rows[of];
    while (this.next[of] < below && rows.has(this.next[of])) this.next[of]++;
    const from = this.next[of];
    let end = from;
    while (end < below && end - from < most && !rows.has(end)) end++;
    if (end === from) return undefined;
    this.next[of] = end;
    return { of, from, count: end - from };
  }

  private chunkOfForm(): number {
    const each = this.speed.of("form");
    return each === undefined ? FIRST_CHUNK : Math.min(LARGEST_CHUNK, Math.max(1, Math.round(CHUNK_MILLISECONDS / Math.max(each, 1e-3))));
  }
}
