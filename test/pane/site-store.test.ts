import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import type { RangeText, SheetPlan, Workbook } from "../../src/host/workbook.js";
import { templateRows } from "../../src/inputs/index.js";
import { SiteStore } from "../../src/pane/site-store.js";

class HandWorkbook implements Workbook {
  readonly ranges = new Map<string, RangeText>();
  selection: RangeText | undefined;
  changed: () => void = () => undefined;
  reads = 0;
  async names(): Promise<string[]> {
    return [...this.ranges.keys()];
  }
  async readName(name: string): Promise<RangeText | undefined> {
    this.reads++;
    return this.ranges.get(name);
  }
  async readSelection(): Promise<RangeText | undefined> {
    return this.selection;
  }
  async insertSheet(plan: SheetPlan): Promise<{ sheet: string; names: string[] }> {
    return { sheet: plan.name, names: [] };
  }
  onChanged(handler: () => void): () => void {
    this.changed = handler;
    return () => {
      this.changed = () => undefined;
    };
  }
}

const block = (change: (rows: (string | number)[][]) => void = () => undefined): RangeText => {
  const rows = templateRows().map((row) => [...row]);
  change(rows);
  return { sheet: "Inputs", address: `A1:D${rows.length}`, values: rows };
};

// No outside numbers here: what is checked is which cells are read, when, and what is kept.
describe("the site block as the pane keeps it", () => {
  let workbook: HandWorkbook;
  let store: SiteStore;
  beforeEach(() => {
    vi.useFakeTimers();
    workbook = new HandWorkbook();
    store = new SiteStore(workbook);
  });
  afterEach(() => {
    store.close();
    vi.useRealTimers();
  });

  it("reads the usual name by itself, whatever its case", async () => {
    workbook.ranges.set("SITE", block());
    await store.open();
    expect(store.state.source).toEqual({ kind: "name", name: "SITE" });
    expect(store.state.site?.problem.building.piles.length).toBeGreaterThan(1);
    expect(store.state.refusal).toBeUndefined();
    expect(store.state.place).toEqual({ sheet: "Inputs", address: expect.stringMatching(/^A1:D\d+$/) as string });
  });

  it("waits to be told where that name does not exist", async () => {
    workbook.ranges.set("Bid", block());
    await store.open();
    expect(store.state.source).toBeUndefined();
    expect(store.state.names).toEqual(["Bid"]);
    expect(store.state.refusal).toMatch(/^No site block is chosen yet/);
  });

  it("keeps the reason, and the check rows, of a block that cannot be used", async () => {
    workbook.ranges.set("Site", block((rows) => (rows.find((row) => row[0] === "Stiffness COV")![1] = 0)));
    await store.open();
    expect(store.state.site).toBeUndefined();
    expect(store.state.refusal).toMatch(/Stiffness COV .*blank or zero/);
    expect(store.state.checks.filter((row) => !row.ok).map((row) => row.label)).toEqual(["Stiffness COV"]);
  });

  it("follows changes of a named block after a pause, once for a burst", async () => {
    workbook.ranges.set("Site", block());
    await store.open();
    const before = store.state;
    workbook.ranges.set("Site", block((rows) => (rows.find((row) => row[0] === "Interior load")![1] = 1700)));
    for (let k = 0; k < 5; k++) {
      workbook.changed();
      await vi.advanceTimersByTimeAsync(100);
    }
    expect(store.state).toBe(before);
    await vi.advanceTimersByTimeAsync(300);
    expect(store.state.edition).toBe(before.edition + 1);
    expect(workbook.reads).toBe(2);
  });

  it("does not take a recalculation that changed nothing for new inputs, so that figures stay valid", async () => {
    workbook.ranges.set("Site", block());
    await store.open();
    const { edition, site } = store.state;
    workbook.ranges.set("Site", { ...block(), address: "A3:D74" });
    workbook.changed();
    await vi.advanceTimersByTimeAsync(300);
    expect(store.state.edition).toBe(edition);
    expect(store.state.site).toBe(site);
    expect(store.state.place?.address).toBe("A3:D74");
  });

  it("says so when the name or the selection is gone", async () => {
    workbook.ranges.set("Site", block());
    await store.open();
    workbook.ranges.delete("Site");
    workbook.changed();
    await vi.advanceTimersByTimeAsync(300);
    expect(store.state.site).toBeUndefined();
    expect(store.state.refusal).toBe("The name Site no longer stands for one range of cells.");
    await store.choose({ kind: "selection" });
    expect(store.state.refusal).toMatch(/^No cells are selected/);
  });

  it("reads a selection once and does not follow it", async () => {
    workbook.selection = block();
    await store.open();
    await store.choose({ kind: "selection" });
    const { edition } = store.state;
    workbook.selection = block((rows) => (rows.find((row) => row[0] === "Interior load")![1] = 1700));
    workbook.changed();
    await vi.advanceTimersByTimeAsync(300);
    expect(store.state.edition).toBe(edition);
    await store.read();
    expect(store.state.edition).toBe(edition + 1);
  });

  it("passes the reason on when the workbook cannot be read, and lets no late answer replace a newer one", async () => {
    workbook.readName = () => Promise.reject(new Error("the sheet is protected"));
    await store.choose({ kind: "name", name: "Site" });
    expect(store.state.refusal).toBe("The workbook could not be read: the sheet is protected.");
    let late: (range: RangeText) => void = () => undefined;
    workbook.readName = (name) => (name === "Old" ? new Promise((answer) => (late = answer)) : Promise.resolve(block()));
    const first = store.choose({ kind: "name", name: "Old" });
    await store.choose({ kind: "name", name: "New" });
    const { edition } = store.state;
    late(block((rows) => (rows[1]![1] = 99)));
    await first;
    expect(store.state.edition).toBe(edition);
    expect(store.state.source).toEqual({ kind: "name", name: "New" });
  });
});
