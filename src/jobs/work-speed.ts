import type { RowKind } from "./realisations.js";

const REMEMBERED = 24;
/** One alone may be the one during which the machine slept. */
const FEWEST = 2;

/**
 * How long realisations take: the median of the last ones, because a machine's speed changes while people work on it, and the
 * first of a thread, or one during which the machine slept, says nothing of the others.
 */
export class WorkSpeed {
  private readonly recent: Readonly<Record<RowKind, number[]>> = { elements: [], form: [] };

  /**
   * Takes what a piece of work took.
   *
   * @param milliseconds  in its thread
   * @param count         realisations done in that time
   */
  add(kind: RowKind, milliseconds: number, count: number): void {
    const times = this.recent[kind];
    times.push(milliseconds / count);
    if (times.length > REMEMBERED) times.shift();
  }

  /** How many pieces of work the speed of a kind rests on. */
  known(kind: RowKind): number {
    return this.recent[kind].length;
  }

  /** Milliseconds that one realisation takes in its thread; undefined before the second piece of work. */
  of(kind: RowKind): number | undefined {
    const times = this.recent[kind];
    return times.length < FEWEST ? undefined : [...times].sort((a, b) => a - b)[Math.floor((times.length - 1) / 2)];
  }

  /**
   * How long work will take.
   *
   * @param elements  realisations by finite elements
   * @param form      realisations by the second-order form
   * @param threads   that share it, at least 1
   * @returns         seconds; undefined while the speed of a kind that is needed is not known
   */
  seconds(elements: number, form: number, threads: number): number | undefined {
    const perElements = elements > 0 ? this.of("elements") : 0;
    const perForm = form > 0 ? this.of("form") : 0;
    if (perElements === undefined || perForm === undefined) return undefined;
    return (elements * perElements + form * perForm) / 1000 / Math.max(1, threads);
  }
}
