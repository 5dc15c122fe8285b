import { describe, expect, it, vi } from "vitest";
import type { SimulationTable } from "../../src/engine/index.js";
import type { BatchEnd, BatchProgress, BatchSettings, KeptRows } from "../../src/jobs/batch.js";
import { inputsHash } from "../../src/jobs/inputs-hash.js";
import type { RowKind, RowRun } from "../../src/jobs/realisations.js";
import type { Thread, ThreadListener, ThreadRequest, Threads } from "../../src/jobs/threads.js";
import { parseSite, templateRows } from "../../src/inputs/index.js";
import type { RunOrder } from "../../src/pane/run-order.js";
import type { RunShelf } from "../../src/pane/run-shelf.js";
import { RunStore, type Runner } from "../../src/pane/run-store.js";
import type { SiteState } from "../../src/pane/site-store.js";
import { orderOfDemonstration, simulatedRow, simulatedTable } from "./simulated-rows.js";

/** A shelf in memory that a test can break. */
class MemoryShelf implements RunShelf {
  readonly orders = new Map<string, RunOrder>();
  readonly kept: { inputs: string; kind: RowKind; run: RowRun }[] = [];
  broken: string | undefined;
  private check(): void {
    if (this.broken !== undefined) throw new Error(this.broken);
  }
  async put(inputs: string, order: RunOrder): Promise<void> {
    this.check();
    this.orders.set(inputs, order);
  }
  async add(inputs: string, kind: RowKind, runs: readonly RowRun[]): Promise<void> {
    this.check();
    for (const run of runs) this.kept.push({ inputs, kind, run });
  }
  async rows(inputs: string): Promise<KeptRows> {
    this.check();
    const of = (kind: RowKind): RowRun[] => this.kept.filter((each) => each.inputs === inputs && each.kind === kind).map(({ run }) => run);
    return { elements: of("elements"), form: of("form") };
  }
  async latest(): Promise<{ inputs: string; order: RunOrder } | undefined> {
    this.check();
    const [last] = [...this.orders].reverse();
    return last === undefined ? undefined : { inputs: last[0], order: last[1] };
  }
  async clear(): Promise<void> {
    this.orders.clear();
    this.kept.length = 0;
  }
}

const run = (from: number, count: number): RowRun => ({ from, count, values: Float64Array.from({ length: 2 * count }, (_, k) => from + k) });
const table = simulatedTable([simulatedRow(0, 5000), simulatedRow(2, 4000)]);
const progress = (change: Partial<BatchProgress<SimulationTable>> = {}): BatchProgress<SimulationTable> => ({
  phase: "computing", done: { elements: 2, form: 3 }, wanted: { elements: 9, form: 9 }, share: 0.2, secondsLeft: 5, table: undefined, threads: 1, notice: "", ...change,
});

function bench(shelf = new MemoryShelf(), threads: Threads = { size: 1, start: () => ({ post: () => undefined, end: () => undefined }) }) {
  const said: string[] = [];
  const started: { settings: BatchSettings; say: (progress: BatchProgress<SimulationTable>) => void; end: (end: Partial<BatchEnd<SimulationTable>>) => void }[] = [];
  let rows: KeptRows = { elements: [], form: [] };
  const runner: Runner = (_task, _target, settings, _threads, say) => {
    let settle: (end: BatchEnd<SimulationTable>) => void = () => undefined;
    const end = new Promise<BatchEnd<SimulationTable>>((resolve) => (settle = resolve));
    const ending = (change: Partial<BatchEnd<SimulationTable>>): void => settle({ kind: "done", message: "", table, used: { elements: 2, form: 3 }, ...change });
    started.push({ settings, say, end: ending });
    return { end, cancel: () => ending({ kind: "cancelled" }), rows: () => rows };
  };
  const store = new RunStore(() => threads, shelf, (sentence) => said.push(sentence), runner);
  return { shelf, said, started, store, finish: (next: KeptRows) => (rows = next) };
}

const order = orderOfDemonstration();
const inputs = inputsHash(order.task);
const settled = (): Promise<void> => new Promise((resolve) => setTimeout(resolve, 0));

describe("a run in the pane", () => {
  it("starts once, passes progress on, and keeps every finished realisation once", async () => {
    vi.useFakeTimers({ toFake: ["setInterval", "clearInterval"] });
    const { store, started, shelf, finish, said } = bench();
    const whole = store.start(order);
    void store.start(order);
    await settled();
    expect(started.length).toBe(1);
    expect(store.state).toMatchObject({ phase: "running", inputs });
    started[0]!.say(progress({ table }));
    expect(store.state.table).toBe(table);
    finish({ elements: [run(0, 2)], form: [run(0, 1)] });
    vi.advanceTimersByTime(2000);
    finish({ elements: [run(0, 3)], form: [run(0, 1), run(4, 2)] });
    vi.advanceTimersByTime(2000);
    started[0]!.end({});
    await whole;
    vi.useRealTimers();
    expect(store.state).toMatchObject({ phase: "ended", end: "done", used: { elements: 2, form: 3 } });
    const indexes = (kind: RowKind): number[] => shelf.kept.filter((each) => each.kind === kind).flatMap(({ run: { from, count } }) => Array.from({ length: count }, (_, k) => from + k));
    expect(indexes("elements")).toEqual([0, 1, 2]);
    expect(indexes("form")).toEqual([0, 4, 5]);
    // the values travel with their index
    expect(shelf.kept.map(({ run: { values } }) => [...values])).toEqual([[0, 1, 2, 3], [0, 1], [4, 5], [4, 5, 6, 7]]);
    expect(said).toEqual(["The run has started.", "The run is finished."]);
  });

  it("goes on with what is kept of the same inputs, and with nothing of others", async () => {
    const shelf = new MemoryShelf();
    await shelf.add(inputs, "elements", [run(0, 2)]);
    await shelf.add("other", "elements", [run(0, 9)]);
    await shelf.add(inputs, "form", [{ from: 0, count: 1, values: Float64Array.of(NaN, 1) }]);
    const { store, started } = bench(shelf);
    void store.start(order);
    await settled();
    expect(started[0]!.settings.kept).toEqual({ elements: [run(0, 2)], form: [] });
    expect(store.state.before).toEqual({ elements: 2, form: 0 });
    started[0]!.end({ kind: "cancelled" });
  });

  it("cancels while it runs, and while the storage is still asked", async () => {
    const { store, started, finish } = bench();
    void store.start(order);
    store.cancel();
    await settled();
    expect(started.length).toBe(0);
    expect(store.state).toMatchObject({ phase: "ended", end: "cancelled" });
    void store.start(order);
    await settled();
    finish({ elements: [run(0, 4)], form: [] });
    store.cancel();
    expect(store.state.phase).toBe("stopping");
    await settled();
    // the table may rest on fewer than are there
    expect(store.state).toMatchObject({ phase: "ended", end: "cancelled", used: { elements: 4, form: 0 } });
  });

  it("runs on without a storage and says so", async () => {
    const shelf = new MemoryShelf();
    shelf.broken = "quota exceeded";
    const { store, started } = bench(shelf);
    void store.start(order);
    await settled();
    expect(started.length).toBe(1);
    expect(store.state).toMatchObject({ isKept: false, note: "This run cannot be kept for later, because the storage of this machine refused it (quota exceeded). It is lost when the pane closes; write the tables before that." });
    await bench(shelf).store.open();
    started[0]!.end({});
    // the next one is tried anew
    shelf.broken = undefined;
    await settled();
    void store.start(order);
    await settled();
    expect(store.state).toMatchObject({ isKept: true, note: "" });
    started[1]!.end({});
  });

  it("tries a storage again that failed for a moment, and says so once where it stays full", async () => {
    vi.useFakeTimers({ toFake: ["setInterval", "clearInterval"] });
    const { store, started, shelf, finish } = bench();
    const whole = store.start(order);
    await settled();
    const saving = async (broken: string | undefined, elements: number): Promise<void> => {
      shelf.broken = broken;
      finish({ elements: [run(0, elements)], form: [] });
      vi.advanceTimersByTime(2000);
      await settled();
    };
    const indexes = (): number[] => shelf.kept.flatMap(({ run: { from, count } }) => Array.from({ length: count }, (_, k) => from + k));
    await saving(undefined, 1);
    await saving("it is closing", 2);
    await saving("it is closing", 3);
    expect(indexes()).toEqual([0]);
    await saving(undefined, 4);
    expect(indexes()).toEqual([0, 1, 2, 3]);
    expect(store.state).toMatchObject({ isKept: true, note: "" });
    for (const elements of [5, 6]) await saving("its room is used up", elements);
    expect(store.state.isKept).toBe(true);
    await saving("its room is used up", 7);
    expect(store.state).toMatchObject({ isKept: false, note: expect.stringMatching(/^The rest of this run cannot be kept for later, .* \(its room is used up\)\./) });
    started[0]!.end({});
    await whole;
    vi.useRealTimers();
  });

  it("goes on from what is kept though nothing more can be kept", async () => {
    const shelf = new MemoryShelf();
    await shelf.add(inputs, "elements", [run(0, 2)]);
    shelf.put = () => Promise.reject(new Error("read only"));
    const { store, started } = bench(shelf);
    void store.start(order);
    await settled();
    expect(started[0]!.settings.kept).toEqual({ elements: [run(0, 2)], form: [] });
    expect(store.state.note).toMatch(/^The rest of this run cannot be kept .* \(read only\)/);
    started[0]!.end({});
  });

  it("says when the block has changed since, and keeps the order", async () => {
    const { store, started } = bench();
    const { problem } = parseSite(templateRows());
    const site = (price: number): SiteState => ({ names: [], source: undefined, place: undefined, cells: [], checks: [], refusal: undefined, edition: price, site: { ...parseSite(templateRows()), problem: { ...problem, prices: { ...problem.prices, perHole: price } } } });
    store.take(site(100));
    void store.start({ ...order, block: inputsHash(site(100).site!.problem) });
    await settled();
    expect(store.state.changed).toBe(false);
    store.take(site(200));
    expect(store.state.changed).toBe(true);
    expect(store.state.order!.task).toBe(order.task);
    store.take(site(100));
    expect(store.state.changed).toBe(false);
    started[0]!.end({});
  });

  it("shows a run that was left on this machine, its table made in a thread", async () => {
    const shelf = new MemoryShelf();
    await shelf.put(inputs, order);
    await shelf.add(inputs, "elements", [run(0, 2), run(3, 1)]);
    const heard: ThreadRequest[] = [];
    let ended = 0;
    const threads: Threads = {
      size: 1,
      start: (listener: ThreadListener): Thread => ({
        post: (request) => {
          heard.push(request);
          if (request.kind === "look") queueMicrotask(() => listener.reply({ kind: "looked", look: { table, next: undefined, projected: undefined }, milliseconds: 1 }));
        },
        end: () => ended++,
      }),
    };
    const { store, started } = bench(shelf, threads);
    await store.open();
    expect(store.state).toMatchObject({ phase: "ended", end: "kept", order, used: { elements: 2, form: 0 }, table });
    expect(heard.find(({ kind }) => kind === "look")).toMatchObject({ totals: { elements: 2, form: 0 }, isCheckpoint: false });
    expect(ended).toBe(1);
    expect(started.length).toBe(0);
  });

  it("lets go of what is kept when asked", async () => {
    const { store, shelf, started } = bench();
    void store.start(order);
    await settled();
    await store.forget();
    expect(shelf.orders.size).toBe(1);
    started[0]!.end({});
    await settled();
    await store.forget();
    expect(shelf.orders.size).toBe(0);
    expect(store.state).toMatchObject({ phase: "none", table: undefined, order: undefined });
  });
});
