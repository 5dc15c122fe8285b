import { describe, expect, it } from "vitest";
import type { CountRow, LengthTable, Problem } from "../../src/engine/index.js";
import type { Site } from "../../src/inputs/index.js";
import type { Pricing, PricingEnd } from "../../src/pane/pricing.js";
import { ResultsStore } from "../../src/pane/results-store.js";
import type { SiteState } from "../../src/pane/site-store.js";
import { countRow } from "./tables.js";

interface Run {
  readonly counts: readonly number[];
  readonly progress: (done: number, of: number) => void;
  readonly end: (end: PricingEnd<readonly CountRow[]>) => void;
}

function bench() {
  const runs: Run[] = [];
  const lengths: { count: number; end: (end: PricingEnd<LengthTable>) => void }[] = [];
  const said: string[] = [];
  let cancels = 0;
  const pricing: Pick<Pricing, "price" | "lengths" | "cancel" | "close"> = {
    price: (_problem, counts, progress) => new Promise((end) => runs.push({ counts, progress, end })),
    lengths: (_problem, count) => new Promise((end) => lengths.push({ count, end })),
    cancel: () => {
      cancels++;
      runs.at(-1)?.end({ kind: "cancelled" });
    },
    close: () => undefined,
  };
  const store = new ResultsStore(pricing, (sentence) => said.push(sentence));
  return { store, runs, lengths, said, cancels: () => cancels };
}

const state = (edition: number, site: Partial<Site> | undefined, refusal?: string): SiteState => ({
  names: [],
  source: undefined,
  place: undefined,
  cells: [],
  checks: [],
  site: site === undefined ? undefined : ({ problem: { investigation: { holes: undefined } } as unknown as Problem, units: "SI", counts: [0, 1], money: "EUR", method: "", rows: [], ...site } as Site),
  refusal,
  edition,
});
const rows = [countRow(0, 900), countRow(1, 500)];
const settled = (): Promise<void> => new Promise((done) => setTimeout(done, 0));

// No outside numbers here: what is checked is when something is priced and what is shown meanwhile.
describe("results as the pane keeps them", () => {
  it("prices nothing until somebody looks, and once for each edition of the inputs", async () => {
    const { store, runs } = bench();
    store.take(state(1, {}));
    expect(runs.length).toBe(0);
    store.look(true);
    expect(runs.map((run) => run.counts)).toEqual([[0, 1]]);
    runs[0]!.end({ kind: "done", value: rows });
    await settled();
    store.look(false);
    store.look(true);
    store.take(state(1, {}));
    expect(runs.length).toBe(1);
  });

  it("prices 0 to 12, or as many as the hole list has, where the block names no counts", () => {
    const { store, runs } = bench();
    store.take(state(1, { counts: undefined }));
    store.look(true);
    expect(runs[0]!.counts).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12]);
    const listed = bench();
    listed.store.take(state(1, { counts: undefined, problem: { investigation: { holes: [1, 2] } } as unknown as Problem }));
    listed.store.look(true);
    expect(listed.runs[0]!.counts).toEqual([0, 1, 2]);
  });

  it("shows progress, then the table with its cheapest count and that count's lengths", async () => {
    const { store, runs, lengths, said } = bench();
    store.take(state(1, {}));
    store.look(true);
    runs[0]!.progress(1, 2);
    expect(store.state).toMatchObject({ phase: "running", done: 1, of: 2 });
    runs[0]!.end({ kind: "done", value: rows });
    await settled();
    expect(store.state).toMatchObject({ phase: "idle", old: false, table: { cheapest: 1, money: "EUR", units: "SI" } });
    expect(lengths.map((ask) => ask.count)).toEqual([1]);
    const table = { percentiles: [5], groups: [], meanLength: [1], totalMetres: [1] };
    lengths[0]!.end({ kind: "done", value: table });
    await settled();
    expect(store.state.lengths).toEqual({ count: 1, table });
    expect(said).toEqual(["Pricing 2 counts.", "Priced. The cheapest count is 1."]);
  });

  it("keeps old figures in sight as old while new ones are made, and drops a run that is overtaken", async () => {
    const { store, runs } = bench();
    store.take(state(1, {}));
    store.look(true);
    runs[0]!.end({ kind: "done", value: rows });
    await settled();
    store.take(state(2, {}));
    expect(store.state).toMatchObject({ phase: "running", old: true, table: { edition: 1 } });
    store.take(state(3, {}));
    await settled();
    expect(runs.length).toBe(3);
    expect(store.state.phase).toBe("running");
    runs[2]!.end({ kind: "done", value: rows });
    await settled();
    expect(store.state).toMatchObject({ phase: "idle", old: false, table: { edition: 3 } });
  });

  it("ends a run for inputs that no longer stand although nobody is looking any more", () => {
    const { store, cancels } = bench();
    store.take(state(1, {}));
    store.look(true);
    store.look(false);
    store.take(state(2, {}));
    expect(cancels()).toBe(1);
  });

  it("does not start again by itself what was cancelled, until the inputs change or somebody asks", async () => {
    const { store, runs } = bench();
    store.take(state(1, {}));
    store.look(true);
    store.cancel();
    await settled();
    expect(store.state.phase).toBe("cancelled");
    store.look(false);
    store.look(true);
    expect(runs.length).toBe(1);
    void store.run();
    expect(runs.length).toBe(2);
    store.take(state(2, {}));
    expect(runs.length).toBe(3);
  });

  it("passes on why a block cannot be priced, whether the inputs or the engine say so", async () => {
    const { store, runs } = bench();
    store.take(state(1, undefined, "Price per hole is blank."));
    store.look(true);
    expect(store.state).toMatchObject({ phase: "refused", message: "Price per hole is blank." });
    expect(runs.length).toBe(0);
    store.take(state(2, {}));
    runs[0]!.end({ kind: "refused", message: "Too deep." });
    await settled();
    expect(store.state).toMatchObject({ phase: "refused", message: "Too deep.", table: undefined });
    void store.run();
    runs[1]!.end({ kind: "failed", message: "broken" });
    await settled();
    expect(store.state).toMatchObject({ phase: "failed", message: "broken" });
  });

  it("shows the lengths that were asked for last", async () => {
    const { store, runs, lengths } = bench();
    store.take(state(1, {}));
    store.look(true);
    runs[0]!.end({ kind: "done", value: rows });
    await settled();
    void store.showLengths(0);
    const table = (metres: number): LengthTable => ({ percentiles: [5], groups: [], meanLength: [metres], totalMetres: [metres] });
    lengths[1]!.end({ kind: "done", value: table(2) });
    lengths[0]!.end({ kind: "done", value: table(1) });
    await settled();
    expect(store.state.lengths).toEqual({ count: 0, table: table(2) });
  });
});
