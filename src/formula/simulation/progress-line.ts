import type { SimulationTable } from "../../engine/index.js";
import type { BatchProgress } from "../../jobs/batch.js";
import { timeInWords } from "../../jobs/time-in-words.js";
import { grouped } from "../../results/index.js";
import type { Terminal } from "./terminal.js";

/** A file or a pipe gets a line now and then, a terminal one that replaces the last. */
const LINE_EVERY = 10_000;

/** Says how a run is going. */
export class ProgressLine {
  private last = -Infinity;
  private notice = "";
  private width = 0;

  constructor(private readonly terminal: Terminal) {}

  show(progress: BatchProgress<SimulationTable>): void {
    if (progress.notice !== this.notice) {
      this.notice = progress.notice;
      this.clear();
      this.terminal.err(`${progress.notice}\n`);
    }
    const text = progressText(progress);
    if (this.terminal.isLive) {
      this.terminal.err(`\r${text.padEnd(this.width)}`);
      this.width = text.length;
    } else if (performance.now() - this.last >= LINE_EVERY) {
      this.last = performance.now();
      this.terminal.err(`${text}\n`);
    }
  }

  /** Takes the line away before something else is said. */
  clear(): void {
    if (this.width > 0) this.terminal.err(`\r${" ".repeat(this.width)}\r`);
    this.width = 0;
  }
}

/** A run's progress in one line. */
export function progressText({ phase, done, wanted, secondsLeft, share, table }: BatchProgress<SimulationTable>): string {
  if (phase === "preparing") return "Preparing the piles and the ground ...";
  const counts = `${grouped(done.elements)} of ${grouped(wanted.elements)} realisations by finite elements, ${grouped(done.form)} of ${grouped(wanted.form)} by the form`;
  const left = secondsLeft === undefined ? "" : `, ${timeInWords(secondsLeft)} left`;
  const best = table?.rows[table.cheapest];
  const sofar = best === undefined ? "" : `; so far ${best.count} ${best.count === 1 ? "hole" : "holes"}, ${grouped(Number(best.total.toPrecision(4)))} +/- ${grouped(Number(best.standardError.toPrecision(2)))}`;
  return `${String(Math.floor(100 * share)).padStart(3)} %: ${counts}${left}${sofar}`;
}
