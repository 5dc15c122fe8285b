import type { BatchEnd, BatchJob, BatchProgress, BatchRun, BatchSettings, KeptRows, Look } from "./batch.js";
import { Clerk, type Desk, type Question } from "./clerk.js";
import { OutcomeRows } from "./outcome-rows.js";
import type { Chunk, RowKind, RowRun, Totals } from "./realisations.js";
import { LONGEST_WAIT, SHORTEST_WAIT, ThreadCrew, WAIT_TIMES, type Office } from "./thread-crew.js";
import type { Threads } from "./threads.js";
import { timeInWords } from "./time-in-words.js";
import { WorkList } from "./work-list.js";
import { WorkSpeed } from "./work-speed.js";

const TICK = 200;
const LOOK_EVERY = 500;
/** Share of the time that looks may take beside the computing; a checkpoint is looked at whatever it costs. */
const LOOK_SHARE = 0.1;
const LONGEST_HOURS = 24;
const FULL = "This run has as many grounds as fit into its memory, and a wrong choice may still cost more than the sum that was asked for. Accept a larger sum, or name fewer counts or ways: each takes its share of the memory.";
const OTHER_ARITHMETIC = "The realisations that were kept come out otherwise here: they were made by another version of the program, or on a machine whose arithmetic differs in the last digit. Go on where they were made, or start anew.";

/**
 * Runs realisations on threads until there are enough. The table depends on the realisations in their order alone: not on how
 * many threads there were, which finished first, which were lost, or how often the run was interrupted. One thread more
 * makes the tables.
 *
 * @param on  hears of the progress five times a second
 */
export function runBatches<Table>(job: BatchJob, settings: BatchSettings, threads: Threads, on: (progress: BatchProgress<Table>) => void): BatchRun<Table> {
  return new Run(job, settings, threads, on);
}

class Run<Table> implements BatchRun<Table>, Office, Desk<Table> {
  readonly end: Promise<BatchEnd<Table>>;
  private readonly finished: Readonly<Record<RowKind, OutcomeRows>>;
  private readonly speed = new WorkSpeed();
  private list: WorkList | undefined;
  private readonly crew: ThreadCrew;
  private readonly clerk: Clerk<Table>;
  private settle: (end: BatchEnd<Table>) => void = () => undefined;
  private timer: ReturnType<typeof setInterval> | undefined;
  private lastTick = performance.now();
  /** counted from index 0 */
  private checkpoint: Totals;
  private hasStarted = false;
  private hasEnded = false;
  private said = "";
  private latest: { readonly totals: Totals; readonly look: Look<Table> } | undefined;
  private lookAgainAt = 0;

  constructor(
    private readonly job: BatchJob,
    private readonly settings: BatchSettings,
    private readonly threads: Threads,
    private readonly on: (progress: BatchProgress<Table>) => void,
  ) {
    this.end = new Promise((resolve) => (this.settle = resolve));
    this.finished = { elements: new OutcomeRows(job.first), form: new OutcomeRows() };
    this.checkpoint = { elements: job.first, form: 0 };
    this.crew = new ThreadCrew(threads, job.task, this);
    this.clerk = new Clerk(threads, job, this, settings.longestWait);
    this.attempt(() => {
      for (const kind of ["elements", "form"] as const) for (const run of settings.kept?.[kind] ?? []) this.finished[kind].add(run);
      this.list = new WorkList(this.finished, this.speed);
      this.timer = setInterval(() => this.tick(), TICK);
      this.clerk.start();
      this.lookAtCheckpoint();
    });
  }

  cancel(): void {
    this.finish("cancelled", "");
  }

  rows(): KeptRows {
    return { elements: this.finished.elements.runs(), form: this.finished.form.runs() };
  }

  books(): KeptRows {
    return this.rows();
  }

  take(): Chunk | undefined {
    const ahead = Math.max(0, Math.min(this.threads.size, this.job.most - this.checkpoint.elements));
    return this.list?.take(this.checkpoint, ahead);
  }

  deliver(of: RowKind, run: RowRun, milliseconds: number): void {
    if (!this.finished[of].agrees(run)) return this.finish("refused", OTHER_ARITHMETIC);
    this.finished[of].add(run);
    this.clerk.enter(of, run);
    this.speed.add(of, milliseconds, run.count);
    this.lookAtCheckpoint();
  }

  looked({ totals, isCheckpoint }: Question, look: Look<Table>, milliseconds: number): void {
    if (this.hasEnded) return;
    this.latest = { totals, look };
    this.lookAgainAt = performance.now() + Math.max(LOOK_EVERY, milliseconds / LOOK_SHARE);
    if (isCheckpoint) this.attempt(() => this.goOn(look.next));
    else this.lookAtCheckpoint();
  }

  giveUp(kind: "refused" | "failed", sentence: string): void {
    this.finish(kind, sentence);
  }

  notice(sentence: string): void {
    this.said = sentence;
  }

  patience(work: Chunk | undefined): number {
    const longest = this.settings.longestWait ?? LONGEST_WAIT;
    const each = work === undefined ? undefined : this.speed.of(work.of);
    return work === undefined || each === undefined ? longest : Math.min(longest, Math.max(SHORTEST_WAIT, WAIT_TIMES * each * work.count));
  }

  private lookAtCheckpoint(): void {
    const { elements, form } = this.unbroken();
    if (!this.hasEnded && !this.clerk.isBusy && elements >= this.checkpoint.elements && form >= this.checkpoint.form) this.clerk.ask({ totals: this.checkpoint, isCheckpoint: true });
  }

  private goOn(next: Look<Table>["next"]): void {
    if (next === undefined) throw new Error("nothing was decided at a checkpoint");
    if (next === "enough") return this.finish("done", "");
    if (next === "full") return this.finish("too long", FULL);
    const { elements, form } = this.checkpoint;
    if (next.elements < elements || next.form < form || same(next, this.checkpoint)) {
      throw new Error(`after ${elements} and ${form} realisations ${next.elements} and ${next.form} were asked for`);
    }
    this.checkpoint = next;
    this.lookAtCheckpoint();
    if (this.clerk.isBusy) return;
    // not sooner: a resumed run may be complete already, and a thread takes seconds to prepare
    if (!this.hasStarted) this.crew.start();
    this.hasStarted = true;
    this.crew.wake();
  }

  private unbroken(): Totals {
    return { elements: this.job.first + this.finished.elements.prefix, form: this.finished.form.prefix };
  }

  private tick(): void {
    const now = performance.now();
    this.crew.tick(now - this.lastTick);
    this.clerk.tick(now - this.lastTick);
    this.lastTick = now;
    if (this.hasEnded) return;
    this.attempt(() => {
      const totals = this.unbroken();
      if (now >= this.lookAgainAt && !this.clerk.isBusy && !(this.latest !== undefined && same(totals, this.latest.totals))) this.clerk.ask({ totals, isCheckpoint: false });
      const progress = this.progress();
      if (this.isTooLong(progress)) this.finish("too long", `To the wanted precision this run would take about ${timeInWords(progress.secondsLeft ?? 0)} on this machine; accept a larger sum, or stop after a number of grounds.`);
      else this.on(progress);
    });
  }

  private progress(): BatchProgress<Table> {
    const { first, most } = this.job;
    const projected = this.latest?.look.projected;
    const done = { elements: this.finished.elements.size, form: this.finished.form.size };
    const wanted = {
      elements: Math.max(done.elements, Math.min(most, Math.max(this.checkpoint.elements, projected?.elements ?? 0)) - first),
      form: Math.max(done.form, this.checkpoint.form, projected?.form ?? 0),
    };
    const threads = this.crew.working;
    const secondsLeft = this.speed.seconds(wanted.elements - done.elements, wanted.form - done.form, threads);
    const whole = this.speed.seconds(wanted.elements, wanted.form, threads);
    const share = secondsLeft === undefined || whole === undefined || whole === 0 ? 0 : 1 - secondsLeft / whole;
    return { phase: this.crew.isReady ? "computing" : "preparing", done, wanted, share, secondsLeft, table: this.latest?.look.table, threads, notice: this.said };
  }

  private isTooLong({ secondsLeft }: BatchProgress<Table>): boolean {
    return this.job.most === Infinity && (secondsLeft ?? 0) > (this.settings.longestHours ?? LONGEST_HOURS) * 3600;
  }

  /** Whatever is thrown here is a fault of ours, and still the run ends in words with its realisations kept. */
  private attempt(work: () => void): void {
    try {
      work();
    } catch (reason) {
      this.finish("failed", `The run cannot go on: ${(reason instanceof Error ? reason.message : String(reason)).replace(/\.$/, "")}.`);
    }
  }

  private finish(kind: BatchEnd<Table>["kind"], message: string): void {
    if (this.hasEnded) return;
    this.hasEnded = true;
    clearInterval(this.timer);
    this.crew.end();
    this.clerk.end();
    this.settle({ kind, message, table: this.latest?.look.table, used: this.latest?.totals ?? { elements: this.job.first, form: 0 } });
  }
}

function same(a: Totals, b: Totals): boolean {
  return a.elements === b.elements && a.form === b.form;
}
