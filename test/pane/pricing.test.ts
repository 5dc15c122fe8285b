import { describe, expect, it } from "vitest";
import type { Problem } from "../../src/engine/index.js";
import type { CountReply, CountRequest } from "../../src/jobs/count-messages.js";
import { Pricing, type WorkerLike } from "../../src/pane/pricing.js";
import { countRow } from "./tables.js";

class HandWorker implements WorkerLike {
  onmessage: ((event: MessageEvent) => unknown) | null = null;
  onerror: ((event: ErrorEvent) => unknown) | null = null;
  ended = false;
  readonly asked: CountRequest[] = [];
  postMessage(message: unknown): void {
    this.asked.push(message as CountRequest);
  }
  terminate(): void {
    this.ended = true;
  }
  say(reply: CountReply): void {
    this.onmessage?.({ data: reply } as MessageEvent);
  }
}

function bench(): { pricing: Pricing; workers: HandWorker[] } {
  const workers: HandWorker[] = [];
  const pricing = new Pricing(() => {
    const worker = new HandWorker();
    workers.push(worker);
    return worker;
  });
  return { pricing, workers };
}

const problem = {} as Problem;
const rows = [countRow(0, 10)];

describe("pricing in a worker", () => {
  it("passes progress on, ends with the rows, and keeps the worker for the next run", async () => {
    const { pricing, workers } = bench();
    const steps: string[] = [];
    const end = pricing.price(problem, [0, 1], (done, of) => steps.push(`${done}/${of}`));
    const id = workers[0]!.asked[0]!.id;
    workers[0]!.say({ id, kind: "priced-one", row: rows[0]!, done: 1, of: 2 });
    workers[0]!.say({ id, kind: "priced", rows });
    expect(await end).toEqual({ kind: "done", value: rows });
    expect(steps).toEqual(["1/2"]);
    void pricing.lengths(problem, 0, [50]);
    expect(workers.length).toBe(1);
    expect(workers[0]!.asked[1]).toMatchObject({ kind: "lengths", count: 0, percentiles: [50] });
  });

  it("cancels by ending the thread, at once, and starts a new one for the next run", async () => {
    const { pricing, workers } = bench();
    const end = pricing.price(problem, [0], () => undefined);
    pricing.cancel();
    expect(await end).toEqual({ kind: "cancelled" });
    expect(workers[0]!.ended).toBe(true);
    void pricing.price(problem, [0], () => undefined);
    expect(workers.length).toBe(2);
  });

  it("a second run ends the first", async () => {
    const { pricing, workers } = bench();
    const first = pricing.price(problem, [0], () => undefined);
    const second = pricing.price(problem, [1], () => undefined);
    expect(await first).toEqual({ kind: "cancelled" });
    workers[1]!.say({ id: workers[1]!.asked[0]!.id, kind: "priced", rows });
    expect((await second).kind).toBe("done");
  });

  it("does not take an answer to an earlier question for its own", async () => {
    const { pricing, workers } = bench();
    const end = pricing.price(problem, [0], () => undefined);
    const id = workers[0]!.asked[0]!.id;
    workers[0]!.say({ id: id - 1, kind: "refused", message: "old" });
    workers[0]!.say({ id, kind: "priced", rows });
    expect((await end).kind).toBe("done");
  });

  it("tells a refusal from a fault and passes the reason on", async () => {
    const { pricing, workers } = bench();
    const end = pricing.price(problem, [0], () => undefined);
    workers[0]!.say({ id: workers[0]!.asked[0]!.id, kind: "refused", message: "Because." });
    expect(await end).toEqual({ kind: "refused", message: "Because." });
  });

  it("a thread that cannot be loaded is a fault in words and not a wait for ever", async () => {
    const { pricing, workers } = bench();
    const end = pricing.price(problem, [0], () => undefined);
    workers[0]!.onerror?.({ message: "" } as ErrorEvent);
    expect(await end).toEqual({ kind: "failed", message: "its thread could not be started" });
    expect(workers[0]!.ended).toBe(true);
    const none = new Pricing(() => {
      throw new Error("no threads here");
    });
    expect(await none.price(problem, [0], () => undefined)).toEqual({ kind: "failed", message: "no threads here" });
  });
});
