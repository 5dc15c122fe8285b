import type { BatchJob, Look } from "./batch.js";
import type { RowKind, RowRun, Totals } from "./realisations.js";
import { LONGEST_TICK, LONGEST_WAIT, SHORTEST_WAIT, WAIT_TIMES } from "./thread-crew.js";
import type { Thread, ThreadReply, Threads } from "./threads.js";

/** Whom the clerk answers. */
export interface Desk<Table> {
  /** all finished realisations, for a clerk that begins anew */
  books(): { readonly elements: readonly RowRun[]; readonly form: readonly RowRun[] };
  looked(question: Question, look: Look<Table>, milliseconds: number): void;
  giveUp(kind: "refused" | "failed", sentence: string): void;
}

/** What the clerk is asked: the table of the first realisations of each kind, counted from index 0, and at a checkpoint how to go on. */
export interface Question {
  readonly totals: Totals;
  readonly isCheckpoint: boolean;
}

const MOST_TRIES = 3;

/**
 * Makes the tables in a thread of its own: one of ten thousand realisations takes longer than a page may be held up. A
 * thread that is lost is replaced and asked again.
 */
export class Clerk<Table> {
  private thread: Thread | undefined;
  private asked: Question | undefined;
  private losses = 0;
  private waited = 0;
  /** milliseconds of the last look; undefined before */
  private took: number | undefined;
  private hasEnded = false;

  constructor(
    private readonly threads: Threads,
    private readonly job: BatchJob,
    private readonly desk: Desk<Table>,
    private readonly longestWait = LONGEST_WAIT,
  ) {}

  /** Whether a question is not answered yet; there is one at a time. */
  get isBusy(): boolean {
    return this.asked !== undefined;
  }

  start(): void {
    this.begin();
  }

  /** Enters finished realisations. */
  enter(of: RowKind, run: RowRun): void {
    this.thread?.post({ kind: "add", of, run });
  }

  /** Asks for a look; the desk hears the answer. */
  ask(question: Question): void {
    this.asked = question;
    this.waited = 0;
    this.thread?.post({ kind: "look", ...question });
  }

  /**
   * Watches for a thread that no longer answers.
   *
   * @param milliseconds  since the last call
   */
  tick(milliseconds: number): void {
    if (this.asked === undefined) return;
    this.waited += Math.min(milliseconds, LONGEST_TICK);
    const patience = this.took === undefined ? this.longestWait : Math.min(this.longestWait, Math.max(SHORTEST_WAIT, WAIT_TIMES * this.took));
    if (this.waited > patience) this.lose(`it has not answered for ${Math.round(this.waited / 1000)} seconds`);
  }

  end(): void {
    this.hasEnded = true;
    this.thread?.end();
    this.thread = undefined;
  }

  private begin(): void {
    if (this.hasEnded) return;
    try {
      const thread: Thread = this.threads.start({
        reply: (reply) => {
          if (this.thread === thread) this.hear(reply);
        },
        lost: (reason) => {
          if (this.thread === thread) this.lose(reason);
        },
      });
      this.thread = thread;
      thread.post({ kind: "keep", job: this.job });
      const books = this.desk.books();
      for (const of of ["elements", "form"] as const) for (const run of books[of]) thread.post({ kind: "add", of, run });
      if (this.asked !== undefined) thread.post({ kind: "look", ...this.asked });
    } catch (reason) {
      this.lose(reason instanceof Error ? reason.message : String(reason));
    }
  }

  private hear(reply: ThreadReply): void {
    if (this.hasEnded) return;
    if (reply.kind === "refused") this.desk.giveUp("refused", reply.message);
    else if (reply.kind === "failed") this.lose(reply.message);
    else if (reply.kind === "looked" && this.asked !== undefined) {
      const question = this.asked;
      this.asked = undefined;
      this.losses = 0;
      this.took = reply.milliseconds;
      this.desk.looked(question, reply.look as Look<Table>, reply.milliseconds);
    }
  }

  private lose(reason: string): void {
    if (this.hasEnded) return;
    this.thread?.end();
    this.thread = undefined;
    this.waited = 0;
    if (++this.losses < MOST_TRIES) this.begin();
    else this.desk.giveUp("failed", `The thread that makes the tables cannot be kept at work: ${reason}.`);
  }
}
