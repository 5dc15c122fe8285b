import "../../../src/pane/page.css";
import type { CellValue, RangeText, SheetPlan, Workbook } from "../../../src/host/workbook.js";
import { WorkbookRefusal } from "../../../src/host/workbook-refusal.js";
import { templateRows } from "../../../src/inputs/index.js";
import { mountPane } from "../../../src/pane/mount-pane.js";

/** A workbook of one block in memory, which a test changes from outside: the pane must not know the difference. */
class MemoryWorkbook implements Workbook {
  rows: CellValue[][] = templateRows().map((row) => [...row]);
  readonly blocks = new Map<string, () => RangeText>([["Site", () => this.range()]]);
  readonly inserted: SheetPlan[] = [];
  /** why no sheet may be added, as Excel's form of the workbook would say it; "": one may */
  refusal = "";
  private readonly handlers = new Set<() => void>();

  range(): RangeText {
    return { sheet: "Inputs", address: `A1:D${this.rows.length}`, values: this.rows.map((row) => [...row]) };
  }
  /** Writes a value beside a label, as a person would, and says that cells have changed. */
  set(label: string, value: CellValue): void {
    const row = this.rows.find((each) => each[0] === label);
    if (row === undefined) this.rows.push([label, value, "", ""]);
    else row[1] = value;
    for (const handler of this.handlers) handler();
  }
  async names(): Promise<string[]> {
    return [...this.blocks.keys()];
  }
  async readName(name: string): Promise<RangeText | undefined> {
    return this.blocks.get(name)?.();
  }
  async readSelection(): Promise<RangeText | undefined> {
    return undefined;
  }
  async insertSheet(plan: SheetPlan): Promise<{ sheet: string; names: string[] }> {
    if (this.refusal !== "") throw new WorkbookRefusal("structure", this.refusal);
    this.inserted.push(plan);
    const names = (plan.names ?? []).map(({ name }) => (this.blocks.has(name) ? `${name}2` : name));
    for (const name of names) this.blocks.set(name, () => this.range());
    for (const handler of this.handlers) handler();
    return { sheet: plan.name, names };
  }
  onChanged(handler: () => void): () => void {
    this.handlers.add(handler);
    return () => this.handlers.delete(handler);
  }
}

declare global {
  interface Window {
    book: MemoryWorkbook;
  }
}

window.book = new MemoryWorkbook();
if (new URLSearchParams(location.search).has("empty")) window.book.blocks.clear();
const functions = (await (await fetch("functions.json")).json()) as { functions: { id: string; name: string; parameters: { name: string }[] }[] };
mountPane(document.getElementById("pane")!, window.book, { functions, locale: "en-GB", startWorker: () => new Worker("counts-worker.js", { type: "module" }), startSimulationWorker: () => new Worker("simulation-worker.js", { type: "module" }) });
