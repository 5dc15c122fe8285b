import type { Chunk, RowKind, RowRun } from "./realisations.js";
import type { Thread, ThreadReply, Threads } from "./threads.js";

/** Whom the crew works for. */
export interface Office {
  /** the next piece of work; undefined while there is none */
  take(): Chunk | undefined;
  /** @throws {Error} rows that cannot be used; the work is then done again */
  deliver(of: RowKind, run: RowRun, milliseconds: number): void;
  /** the work cannot go on; a sentence */
  giveUp(kind: "refused" | "failed", sentence: string): void;
  /** something went wrong and was put right; a sentence */
  notice(sentence: string): void;
  /** milliseconds without an answer after which a thread counts as lost; undefined: it prepares */
  patience(work: Chunk | undefined): number;
}

interface Member {
  thread: Thread | undefined;
  chunk: Chunk | undefined;
  /** preparing or computing: something is waited for */
  isBusy: boolean;
  isReady: boolean;
  /** losses since it last delivered */
  losses: number;
  /** lost too often: nobody takes its place any more */
  isOut: boolean;
  waited: number;
}

const MOST_TRIES = 3;
/** A browser may end a thread without a word. So long is waited while nobody knows what the work takes. */
export const LONGEST_WAIT = 300_000;
/** So long at least where it is known: a machine that is short of memory or very busy is slow, not dead. */
export const SHORTEST_WAIT = 20_000;
/** So many times the known time of the work. */
export const WAIT_TIMES = 50;
/** A tick that comes later than this is a laptop that slept, not a thread that hangs. */
export const LONGEST_TICK = 1_000;

/** Keeps threads at work: hands out one piece each, replaces a thread that is lost and has its piece done again. */
export class ThreadCrew {
  private readonly members: Member[];
  private readonly returned: Chunk[] = [];
  private readonly tries = new Map<string, number>();
  private hasEnded = false;

  constructor(
    private readonly threads: Threads,
    private readonly task: unknown,
    private readonly office: Office,
  ) {
    this.members = Array.from({ length: Math.max(1, threads.size) }, () => ({ thread: undefined, chunk: undefined, isBusy: false, isReady: false, losses: 0, isOut: false, waited: 0 }));
  }

  /** How many threads are still there to work. */
  get working(): number {
    return this.members.filter(({ isOut }) => !isOut).length;
  }

  /** Whether a thread has its task ready. */
  get isReady(): boolean {
    return this.members.some((member) => member.isReady);
  }

  start(): void {
    for (const member of this.members) this.begin(member);
  }

  /** Hands work to every thread that has none. */
  wake(): void {
    for (const member of this.members) {
      if (this.hasEnded || member.isBusy || !member.isReady) continue;
      const chunk = this.returned.shift() ?? this.office.take();
      if (chunk === undefined) return;
      member.chunk = chunk;
      this.post(member, { kind: "rows", ...chunk });
    }
  }

  /**
   * Watches for threads that no longer answer.
   *
   * @param milliseconds  since the last call
   */
  tick(milliseconds: number): void {
    for (const member of this.members) {
      if (!member.isBusy) continue;
      member.waited += Math.min(milliseconds, LONGEST_TICK);
      if (member.waited > this.office.patience(member.chunk)) this.lose(member, `it has not answered for ${Math.round(member.waited / 1000)} seconds`);
    }
  }

  /** Ends all threads at once. */
  end(): void {
    this.hasEnded = true;
    for (const member of this.members) {
      member.thread?.end();
      member.thread = undefined;
    }
  }

  private begin(member: Member): void {
    if (this.hasEnded) return;
    member.isReady = false;
    try {
      // a thread that was replaced may still be heard of
      const thread: Thread = this.threads.start({
        reply: (reply) => {
          if (member.thread === thread) this.hear(member, reply);
        },
        lost: (reason) => {
          if (member.thread === thread) this.lose(member, reason);
        },
      });
      member.thread = thread;
      this.post(member, { kind: "prepare", task: this.task });
    } catch (reason) {
      this.lose(member, reason instanceof Error ? reason.message : String(reason));
    }
  }

  private post(member: Member, request: Parameters<Thread["post"]>[0]): void {
    member.isBusy = true;
    member.waited = 0;
    member.thread?.post(request);
  }

  private hear(member: Member, reply: ThreadReply): void {
    if (this.hasEnded) return;
    member.isBusy = false;
    if (reply.kind === "refused") return this.office.giveUp("refused", reply.message);
    if (reply.kind === "failed") return this.fail(member, reply.message);
    if (reply.kind === "ready") member.isReady = true;
    if (reply.kind === "rows") {
      try {
        this.office.deliver(reply.of, reply, reply.milliseconds);
      } catch (reason) {
        return this.fail(member, reason instanceof Error ? reason.message : String(reason));
      }
      member.chunk = undefined;
      member.losses = 0;
    }
    this.wake();
  }

  /** The thread lives and its work failed. */
  private fail(member: Member, reason: string): void {
    if (!member.isReady) return this.lose(member, reason);
    if (this.giveBack(member, reason)) this.wake();
  }

  /** The thread is gone: another takes its place, as long as that helps. */
  private lose(member: Member, reason: string): void {
    if (this.hasEnded) return;
    member.thread?.end();
    member.thread = undefined;
    member.isBusy = false;
    member.isReady = false;
    member.losses++;
    if (!this.giveBack(member, reason)) return;
    if (member.losses < MOST_TRIES) {
      this.office.notice(`A thread was replaced and its work is done again: ${reason}.`);
      return this.begin(member);
    }
    member.isOut = true;
    if (this.working > 0) this.office.notice(`The run goes on with ${this.working === 1 ? "one thread" : `${this.working} threads`}: another was lost ${member.losses} times, the last time because ${reason}.`);
    else this.office.giveUp("failed", `No thread can be kept at work: ${reason}.`);
    this.wake();
  }

  /** @returns false when this piece of work has been tried often enough and the run was given up */
  private giveBack(member: Member, reason: string): boolean {
    const { chunk } = member;
    member.chunk = undefined;
    if (chunk === undefined) return true;
    const key = `${chunk.of} ${chunk.from}`;
    const tries = (this.tries.get(key) ?? 0) + 1;
    this.tries.set(key, tries);
    if (tries >= MOST_TRIES) {
      const which = chunk.count === 1 ? `Realisation ${chunk.from + 1}` : `Realisations ${chunk.from + 1} to ${chunk.from + chunk.count}`;
      this.office.giveUp("failed", `${which} could not be computed in ${tries} tries: ${reason}.`);
      return false;
    }
    this.returned.push(chunk);
    return true;
  }
}
