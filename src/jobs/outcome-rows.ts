import type { RowRun } from "./realisations.js";

/** The realisations of one kind by their index, in whatever order they finish. */
export class OutcomeRows {
  private readonly rows: (Float64Array | undefined)[] = [];
  private width: number | undefined;
  private held = 0;
  private unbroken = 0;

  /** @param first  index of the first realisation; that of a part of a larger run is not 0 */
  constructor(readonly first = 0) {}

  /** How many there are. */
  get size(): number {
    return this.held;
  }

  /** How many there are from the first on without a gap. */
  get prefix(): number {
    return this.unbroken;
  }

  has(index: number): boolean {
    return this.rows[index - this.first] !== undefined;
  }

  /** Whether those of the realisations that are there already came out the same, to the last bit. */
  agrees({ from, count, values }: RowRun): boolean {
    const width = values.length / count;
    for (let k = 0; k < count; k++) {
      const known = this.rows[from + k - this.first];
      if (known !== undefined && !(known.length === width && known.every((value, at) => value === values[k * width + at]))) return false;
    }
    return true;
  }

  /**
   * Takes finished realisations; those that are there already stay.
   *
   * @throws {Error} rows of another width, before the first index, or with a value that is no finite number
   */
  add({ from, count, values }: RowRun): void {
    const width = values.length / count;
    this.width ??= width;
    if (!(count > 0) || width !== this.width || width === 0) throw new Error(`realisation ${from + 1} came with ${width} figures instead of ${this.width}`);
    if (from < this.first) throw new Error(`realisation ${from + 1} lies before the first of this part, ${this.first + 1}`);
    const bad = values.findIndex((value) => !Number.isFinite(value));
    if (bad >= 0) throw new Error(`realisation ${from + Math.floor(bad / width) + 1} gave a figure that is no number`);
    for (let k = 0; k < count; k++) {
      const place = from + k - this.first;
      if (this.rows[place] !== undefined) continue;
      // holes of a sparse array would be skipped by slice and forEach
      while (this.rows.length < place) this.rows.push(undefined);
      this.rows[place] = values.subarray(k * width, (k + 1) * width);
      this.held++;
    }
    while (this.rows[this.unbroken] !== undefined) this.unbroken++;
  }

  /**
   * The first realisations in order.
   *
   * @param count  at most as many as there are without a gap
   */
  list(count: number): readonly Float64Array[] {
    if (count > this.unbroken) throw new Error(`${count} realisations were asked for and ${this.unbroken} are there in order`);
    return this.rows.slice(0, count) as Float64Array[];
  }

  /** All of them as unbroken runs, in order, in memory of their own. */
  runs(): RowRun[] {
    const found: RowRun[] = [];
    for (let place = 0; place < this.rows.length; place++) {
      if (this.rows[place] === undefined) continue;
      let end = place;
      while (this.rows[end] !== undefined) end++;
      const width = this.width as number;
      const values = new Float64Array((end - place) * width);
      for (let k = place; k < end; k++) values.set(this.rows[k] as Float64Array, (k - place) * width);
      found.push({ from: this.first + place, count: end - place, values });
      place = end;
    }
    return found;
  }
}
