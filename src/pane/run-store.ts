import type { SimulationTable } from "../engine/index.js";
import type { BatchEnd, BatchProgress, BatchRun, BatchSettings, KeptRows } from "../jobs/batch.js";
import { Clerk } from "../jobs/clerk.js";
import { inputsHash } from "../jobs/inputs-hash.js";
import type { Totals } from "../jobs/realisations.js";
import { runSimulation } from "../jobs/run-simulation.js";
import type { Threads } from "../jobs/threads.js";
import { wordsOf } from "../jobs/words-of-failure.js";
import { RunKeeping, soundRows, unbroken } from "./run-keeping.js";
import type { RunOrder, RunTarget } from "./run-order.js";
import type { RunShelf } from "./run-shelf.js";
import type { SiteState } from "./site-store.js";

/** Starts the realisations of an order; the jobs' own unless a test hands in another. */
export type Runner = (task: RunOrder["task"], target: RunTarget, settings: BatchSettings, threads: Threads, on: (progress: BatchProgress<SimulationTable>) => void) => BatchRun<SimulationTable>;

/** What the Run view shows. */
export interface RunState {
  readonly phase: "none" | "starting" | "running" | "stopping" | "ended";
  readonly order: RunOrder | undefined;
  /** short name of the run's inputs */
  readonly inputs: string;
  readonly progress: BatchProgress<SimulationTable> | undefined;
  /** how the last run ended; "kept": it was found on this machine when the pane opened */
  readonly end: BatchEnd<SimulationTable>["kind"] | "kept" | undefined;
  /** why it ended, for the person; "" where nothing need be said */
  readonly message: string;
  readonly table: SimulationTable | undefined;
  readonly used: Totals;
  /** realisations that were there when it began */
  readonly before: Totals;
  /** what else the person must know; "" for nothing */
  readonly note: string;
  /** whether what is finished stays on this machine */
  readonly isKept: boolean;
  /** the site block has changed since the run was ordered */
  readonly changed: boolean;
}

const NOTHING: Totals = { elements: 0, form: 0 };
/** A pane that closes loses no more than this, milliseconds. */
const SAVE_EVERY = 2_000;

/** Leads one run at a time and keeps what it finishes. */
export class RunStore {
  private held: RunState = { phase: "none", order: undefined, inputs: "", progress: undefined, end: undefined, message: "", table: undefined, used: NOTHING, before: NOTHING, note: "", isKept: true, changed: false };
  private readonly listeners = new Set<(state: RunState) => void>();
  private run: BatchRun<SimulationTable> | undefined;
  private keep: (() => void) | undefined;
  private turn = 0;
  private block: string | undefined;

  /**
   * @param threads  the kind of threads, made anew for each run
   * @param shelf    where runs are kept
   * @param tell     says a sentence aloud
   */
  constructor(
    private readonly threads: () => Threads,
    private readonly shelf: RunShelf,
    private readonly tell: (sentence: string) => void,
    private readonly runner: Runner = runSimulation,
  ) {}

  /** what is known now */
  get state(): RunState {
    return this.held;
  }

  /** Calls back at once and after every change. */
  subscribe(listener: (state: RunState) => void): void {
    this.listeners.add(listener);
    listener(this.held);
  }

  /** Takes the inputs as they are now; a run that goes on keeps its own. */
  take(site: SiteState): void {
    this.block = site.site === undefined ? undefined : inputsHash(site.site.problem);
    this.publish({});
  }

  /** Looks for a run that was left on this machine, and shows what it came to. */
  async open(): Promise<void> {
    const turn = ++this.turn;
    try {
      const last = await this.shelf.latest();
      if (last === undefined) return;
      const rows = soundRows(await this.shelf.rows(last.inputs));
      const used = { elements: unbroken(rows.elements), form: unbroken(rows.form) };
      if (turn !== this.turn || used.elements + used.form === 0) return;
      this.publish({ phase: "ended", end: "kept", order: last.order, inputs: last.inputs, used, message: "" });
      const table = await this.lookAt(last.order, rows, used);
      if (turn === this.turn) this.publish({ table });
    } catch {
      // a storage that cannot be read is as good as an empty one; keeping the next run will say why
    }
  }

  /** Starts a run; realisations of the same inputs that are kept on this machine are not made again. */
  async start(order: RunOrder): Promise<void> {
    if (this.run !== undefined || this.held.phase === "starting") return;
    const turn = ++this.turn;
    const inputs = inputsHash(order.task);
    const same = inputs === this.held.inputs;
    this.publish({ phase: "starting", order, inputs, progress: undefined, end: undefined, message: "", note: "", isKept: true, before: NOTHING, ...(same ? {} : { table: undefined, used: NOTHING }) });
    const kept = await this.keptRows(inputs, order);
    if (turn !== this.turn) return;
    this.publish({ phase: "running", before: { elements: unbroken(kept.elements), form: unbroken(kept.form) } });
    this.tell("The run has started.");
    try {
      await this.lead(order, inputs, kept);
    } catch (reason) {
      this.publish({ phase: "ended", end: "failed", message: `The run could not be started: ${wordsOf(reason)}.` });
    }
  }

  /** Ends the run at once; what is finished is kept. */
  cancel(): void {
    if (this.held.phase === "starting") {
      this.turn++;
      this.publish({ phase: "ended", end: "cancelled" });
    }
    if (this.run === undefined) return;
    this.publish({ phase: "stopping" });
    this.run.cancel();
  }

  /** Keeps what is finished now; for a page that is about to go. */
  save(): void {
    this.keep?.();
  }

  /** Lets go of all runs that are kept on this machine. */
  async forget(): Promise<void> {
    if (this.run !== undefined) return;
    this.turn++;
    try {
      await this.shelf.clear();
      this.publish({ phase: "none", order: undefined, inputs: "", progress: undefined, end: undefined, message: "", table: undefined, used: NOTHING, note: "" });
      this.tell("No run is kept on this machine any more.");
    } catch (reason) {
      this.publish({ note: `The kept runs could not be deleted: ${wordsOf(reason)}.` });
    }
  }

  /** Ends everything; for the end of the pane. */
  close(): void {
    this.save();
    this.turn++;
    this.run?.cancel();
    this.listeners.clear();
  }

  private async lead(order: RunOrder, inputs: string, kept: KeptRows): Promise<void> {
    const keeping = new RunKeeping(this.shelf, inputs, kept, (reason, hasKept) => this.sayUnkept(reason, hasKept));
    const run = this.runner(order.task, order.target, { kept }, this.threads(), (progress) => {
      if (this.run === run) this.publish({ progress, ...(progress.table === undefined ? {} : { table: progress.table, used: { elements: progress.table.elements, form: progress.table.form } }) });
    });
    this.run = run;
    this.keep = () => void keeping.save(run.rows());
    const timer = setInterval(() => this.keep?.(), SAVE_EVERY);
    const end = await run.end;
    clearInterval(timer);
    this.run = undefined;
    this.keep = undefined;
    const rows = run.rows();
    // The last table may rest on fewer than are there by now.
    const used = { elements: unbroken(rows.elements), form: unbroken(rows.form) };
    this.publish({ phase: "ended", end: end.kind, message: end.message, used: end.kind === "done" ? end.used : used, ...(end.table === undefined ? {} : { table: end.table }) });
    this.tell(end.kind === "done" ? "The run is finished." : end.kind === "cancelled" ? "The run is cancelled; what is done is kept." : "The run has ended early.");
    await keeping.save(rows);
  }

  private async keptRows(inputs: string, order: RunOrder): Promise<KeptRows> {
    let kept: KeptRows = { elements: [], form: [] };
    try {
      kept = soundRows(await this.shelf.rows(inputs));
      await this.shelf.put(inputs, order);
    } catch (reason) {
      this.sayUnkept(reason, kept.elements.length + kept.form.length > 0);
    }
    return kept;
  }

  /** One look at kept realisations, in a thread: it takes longer than a page may be held up. */
  private lookAt(order: RunOrder, rows: KeptRows, used: Totals): Promise<SimulationTable | undefined> {
    return new Promise((resolve) => {
      const done = (table: SimulationTable | undefined): void => {
        clerk.end();
        resolve(table);
      };
      const clerk = new Clerk<SimulationTable>(this.threads(), { task: order.task, target: order.target, first: 0, most: Infinity }, {
        books: () => rows,
        looked: (_totals, look) => done(look.table),
        giveUp: () => done(undefined),
      });
      clerk.start();
      clerk.ask({ totals: used, isCheckpoint: false });
    });
  }

  private sayUnkept(reason: unknown, hasKept = false): void {
    const what = hasKept ? "The rest of this run" : "This run";
    this.publish({ isKept: false, note: `${what} cannot be kept for later, because the storage of this machine refused it (${wordsOf(reason)}). It is lost when the pane closes; write the tables before that.` });
  }

  private publish(change: Partial<RunState>): void {
    const next = { ...this.held, ...change };
    this.held = { ...next, changed: next.order !== undefined && next.order.block !== this.block };
    for (const listener of this.listeners) listener(this.held);
  }
}
