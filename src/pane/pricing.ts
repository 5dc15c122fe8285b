import type { CountRow, LengthTable, Problem } from "../engine/index.js";
import type { CountReply, CountRequest } from "../jobs/count-messages.js";
import type { Section } from "../jobs/section.js";

/** The part of a worker that pricing uses; a test hands in a thread of its own making. */
export interface WorkerLike {
  postMessage(message: unknown): void;
  terminate(): void;
  onmessage: ((event: MessageEvent) => unknown) | null;
  onerror: ((event: ErrorEvent) => unknown) | null;
}

/** How a pricing ended. */
export type PricingEnd<T> = { readonly kind: "done"; readonly value: T } | { readonly kind: "cancelled" } | { readonly kind: "refused" | "failed"; readonly message: string };

interface Running {
  readonly id: number;
  readonly progress: (done: number, of: number) => void;
  readonly settle: (end: PricingEnd<never> | PricingEnd<readonly CountRow[]> | PricingEnd<LengthTable> | PricingEnd<Section>) => void;
}

/** Runs one pricing at a time in a worker that is kept between runs, because it remembers what it has computed. */
export class Pricing {
  private worker: WorkerLike | undefined;
  private running: Running | undefined;
  private lastId = 0;

  /** @param startWorker  starts the thread; called again after a cancelled run */
  constructor(private readonly startWorker: () => WorkerLike) {}

  /**
   * Prices a list of counts; a run still going is cancelled first.
   *
   * @param problem   the site
   * @param counts    numbers of holes, rising
   * @param progress  called after each count with how many are done
   */
  price(problem: Problem, counts: readonly number[], progress: (done: number, of: number) => void): Promise<PricingEnd<readonly CountRow[]>> {
    return this.ask({ id: ++this.lastId, kind: "price", problem, counts }, progress);
  }

  /**
   * The distribution of pile lengths of one count; a run still going is cancelled first.
   *
   * @param percentiles  0 to 100
   */
  lengths(problem: Problem, count: number, percentiles: readonly number[]): Promise<PricingEnd<LengthTable>> {
    return this.ask({ id: ++this.lastId, kind: "lengths", problem, count, percentiles }, () => undefined);
  }

  /**
   * A vertical section of one realised ground; a run still going is cancelled first.
   *
   * @param index  number of the ground, from 0
   */
  section(problem: Problem, count: number, index: number): Promise<PricingEnd<Section>> {
    return this.ask({ id: ++this.lastId, kind: "section", problem, count, index }, () => undefined);
  }

  /** Ends the run at once by ending its thread: the engine cannot be asked to stop half way. */
  cancel(): void {
    const running = this.running;
    if (running === undefined) return;
    this.running = undefined;
    this.worker?.terminate();
    this.worker = undefined;
    running.settle({ kind: "cancelled" });
  }

  /** Ends everything; for the end of the pane. */
  close(): void {
    this.cancel();
    this.worker?.terminate();
    this.worker = undefined;
  }

  private ask<T>(request: CountRequest, progress: (done: number, of: number) => void): Promise<PricingEnd<T>> {
    this.cancel();
    return new Promise((settle) => {
      this.running = { id: request.id, progress, settle: settle as Running["settle"] };
      try {
        this.ready().postMessage(request);
      } catch (reason) {
        this.finish({ kind: "failed", message: reason instanceof Error ? reason.message : String(reason) });
      }
    });
  }

  private ready(): WorkerLike {
    if (this.worker !== undefined) return this.worker;
    const worker = this.startWorker();
    worker.onmessage = (event) => this.hear(event.data as CountReply);
    worker.onerror = (event) => {
      // A thread that could not load never answers: without this the pane would wait for ever.
      this.worker = undefined;
      worker.terminate();
      this.finish({ kind: "failed", message: event.message || "its thread could not be started" });
    };
    this.worker = worker;
    return worker;
  }

  private hear(reply: CountReply): void {
    if (this.running?.id !== reply.id) return;
    if (reply.kind === "priced-one") this.running.progress(reply.done, reply.of);
    else if (reply.kind === "priced") this.finish({ kind: "done", value: reply.rows });
    else if (reply.kind === "lengths") this.finish({ kind: "done", value: reply.table });
    else if (reply.kind === "section") this.finish({ kind: "done", value: reply.section });
    else this.finish({ kind: reply.kind, message: reply.message });
  }

  private finish(end: Parameters<Running["settle"]>[0]): void {
    const running = this.running;
    this.running = undefined;
    running?.settle(end);
  }
}
