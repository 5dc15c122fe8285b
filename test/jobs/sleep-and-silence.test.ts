import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { threadAnswerer } from "../../src/jobs/answer-thread.js";
import type { BatchEnd, BatchJob, BatchProgress } from "../../src/jobs/batch.js";
import type { RowKind } from "../../src/jobs/realisations.js";
import { runBatches } from "../../src/jobs/run-batches.js";
import type { Threads } from "../../src/jobs/threads.js";
import { drawsByNumber, drawsToPrecision, drawsTrade, type DrawsTable } from "./draws.js";

const SECOND = 1_000;
const NIGHT = 8 * 3600 * SECOND;

// The clock is the test's own: a night passes at once.
beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

/** What befalls the first piece of work that holds this realisation, or that look (index 0: the first): it is never answered, or the machine sleeps in the middle and its clock has gone on. */
interface Spell {
  readonly of: RowKind | "look";
  readonly index: number;
  readonly does: "die" | "sleep";
}

/** Threads of which each realisation takes the same time of the test's clock. */
function timedThreads(size: number, each: number, spell?: Spell): Threads & { readonly started: () => number } {
  let started = 0;
  let left = spell;
  let looks = 0;
  const befalls = (of: RowKind | "look", from: number, count: number): Spell["does"] | undefined => {
    if (left === undefined || left.of !== of || left.index < from || left.index >= from + count) return undefined;
    const { does } = left;
    left = undefined;
    return does;
  };
  return {
    size,
    started: () => started,
    start(listener) {
      started++;
      let hasEnded = false;
      let took = 0;
      const answer = threadAnswerer(drawsTrade, (reply) => listener.reply("milliseconds" in reply ? { ...reply, milliseconds: took } : reply));
      let turn = Promise.resolve();
      return {
        post(request) {
          turn = turn.then(async () => {
            const does = request.kind === "rows" ? befalls(request.of, request.from, request.count) : request.kind === "look" ? befalls("look", looks++, 1) : undefined;
            const work = request.kind === "rows" ? each * request.count : request.kind === "look" ? each : 0;
            if (does === "sleep") sleep();
            await new Promise<void>((resolve) => (does === "die" ? undefined : setTimeout(resolve, work)));
            took = does === "sleep" ? work + NIGHT : work;
            if (!hasEnded) answer(request);
          });
        },
        end: () => (hasEnded = true),
      };
    },
  };
}

interface Going {
  readonly progress: BatchProgress<DrawsTable>[];
  end: BatchEnd<DrawsTable> | undefined;
}

function started(job: BatchJob, threads: Threads): Going {
  const going: Going = { progress: [], end: undefined };
  void runBatches<DrawsTable>(job, {}, threads, (progress) => void going.progress.push(progress)).end.then((end) => (going.end = end));
  return going;
}

const pass = (milliseconds: number): Promise<unknown> => vi.advanceTimersByTimeAsync(milliseconds);
/** The clock goes on for a night in which nothing runs. */
function sleep(): void {
  const now = performance.now.bind(performance);
  vi.spyOn(performance, "now").mockImplementation(() => now() + NIGHT);
}

describe("a machine that sleeps for a night", () => {
  it("loses no thread, ends no run, and tells the time left as before", async () => {
    // one realisation lasts through the night; the run to a precision would be given up at 24 hours
    for (const [of, index] of [["elements", 0], ["elements", 1], ["elements", 6], ["look", 0]] as const) {
      const threads = timedThreads(2, SECOND, { of, index, does: "sleep" });
      const going = started(drawsToPrecision({ seed: "yard 7" }, 0.02), threads);
      await pass(600 * SECOND);
      expect(going.end).toMatchObject({ kind: "done" });
      expect(going.progress.map(({ notice }) => notice).join("")).toBe("");
      expect(threads.started()).toBe(3);
      const left = going.progress.map(({ secondsLeft }) => secondsLeft ?? 0);
      expect(Math.max(...left)).toBeLessThan(600);
      vi.restoreAllMocks();
    }
  });
});

describe("a thread that dies without a word", () => {
  it("is replaced after twenty seconds where its work takes none, and its work is done again", async () => {
    const threads = timedThreads(1, 100, { of: "elements", index: 9, does: "die" });
    const going = started(drawsByNumber({ seed: "yard 7" }, 32), threads);
    await pass(20 * SECOND);
    expect(going.progress.at(-1)!.notice).toBe("");
    await pass(10 * SECOND);
    expect(going.progress.at(-1)!.notice).toMatch(/^A thread was replaced and its work is done again: it has not answered for 20 seconds\.$/);
    await pass(60 * SECOND);
    expect(going.end).toMatchObject({ kind: "done", used: { elements: 32 } });
    // the clerk, the first, and the one in its place
    expect(threads.started()).toBe(3);
  });

  it("is given fifty times what its work takes, and five minutes while nobody knows that", async () => {
    const slow = started(drawsByNumber({ seed: "yard 7" }, 32), timedThreads(1, 2 * SECOND, { of: "elements", index: 9, does: "die" }));
    await pass(900 * SECOND);
    expect(slow.progress.find(({ notice }) => notice !== "")!.notice).toMatch(/it has not answered for 100 seconds/);
    expect(slow.end).toMatchObject({ kind: "done" });
    const first = started(drawsByNumber({ seed: "yard 7" }, 8), timedThreads(1, 100, { of: "form", index: 0, does: "die" }));
    await pass(900 * SECOND);
    expect(first.progress.find(({ notice }) => notice !== "")!.notice).toMatch(/it has not answered for 300 seconds/);
    expect(first.end).toMatchObject({ kind: "done" });
  });

  it("is replaced where it makes the tables, too", async () => {
    const first = timedThreads(1, 100, { of: "look", index: 0, does: "die" });
    const going = started(drawsByNumber({ seed: "yard 7" }, 8), first);
    // nobody knows yet what a look takes, and before the first no realisation is begun
    await pass(290 * SECOND);
    expect(first.started()).toBe(1);
    await pass(110 * SECOND);
    expect(going.end).toMatchObject({ kind: "done", used: { elements: 8 } });
    expect(first.started()).toBe(3);
    const later = timedThreads(1, 100, { of: "look", index: 3, does: "die" });
    const other = started(drawsByNumber({ seed: "yard 7" }, 40), later);
    await pass(60 * SECOND);
    // the one in its place has been given all realisations
    expect(other.end).toMatchObject({ kind: "done", used: { elements: 40 } });
    expect(later.started()).toBe(3);
  });
});
