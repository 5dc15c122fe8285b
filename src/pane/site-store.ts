import { checkSite, InputError, parseSite, type CheckRow, type Site } from "../inputs/index.js";
import type { RangeText, Workbook } from "../host/workbook.js";
import { WorkbookRefusal } from "../host/workbook-refusal.js";

/** Where the site block comes from. */
export type Source = { readonly kind: "name"; readonly name: string } | { readonly kind: "selection" };

/** What the pane knows of the site block. */
export interface SiteState {
  /** defined names that may be chosen */
  readonly names: readonly string[];
  readonly source: Source | undefined;
  /** where the cells stand; undefined: nothing was read */
  readonly place: { readonly sheet: string; readonly address: string } | undefined;
  /** the cells as read; empty: nothing was read */
  readonly cells: readonly (readonly unknown[])[];
  readonly checks: readonly CheckRow[];
  /** undefined where the block cannot be used */
  readonly site: Site | undefined;
  /** why nothing can be priced, for the person; undefined where it can */
  readonly refusal: string | undefined;
  /** rises with every change of the inputs, so that figures can be known to be old */
  readonly edition: number;
}

const NOTHING_CHOSEN = "No site block is chosen yet. Choose the cells that hold the inputs, or insert the template.";
/** The name that a site block usually bears; where it exists it is read without being asked. */
const USUAL_NAME = "site";
/** Changes come in bursts while a sheet recalculates. */
const PAUSE = 250;

/** Reads the site block, keeps what was read and tells the views when it changes. */
export class SiteStore {
  private held: SiteState = { names: [], source: undefined, place: undefined, cells: [], checks: [], site: undefined, refusal: NOTHING_CHOSEN, edition: 0 };
  private readonly listeners = new Set<(state: SiteState) => void>();
  private lastValues = "";
  private turn = 0;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private readonly stopListening: () => void;

  constructor(private readonly workbook: Workbook) {
    this.stopListening = workbook.onChanged(() => {
      clearTimeout(this.timer);
      this.timer = setTimeout(() => void this.refresh(), PAUSE);
    });
  }

  /** what is known now */
  get state(): SiteState {
    return this.held;
  }

  /** Calls back at once and after every change. */
  subscribe(listener: (state: SiteState) => void): void {
    this.listeners.add(listener);
    listener(this.held);
  }

  /** Lists the names and reads the block that bears the usual name, if there is one. */
  async open(): Promise<void> {
    const names = await this.workbook.names();
    const usual = names.find((name) => name.toLowerCase() === USUAL_NAME);
    this.publish({ names });
    if (usual !== undefined) await this.choose({ kind: "name", name: usual });
  }

  /** Reads from another place. */
  async choose(source: Source): Promise<void> {
    this.lastValues = "";
    this.publish({ source });
    await this.read();
  }

  /** Reads the same place again. */
  async read(): Promise<void> {
    const source = this.held.source;
    if (source === undefined) return;
    // An older answer that arrives late must not replace a newer one.
    const turn = ++this.turn;
    let range: RangeText | undefined;
    try {
      range = source.kind === "name" ? await this.workbook.readName(source.name) : await this.workbook.readSelection();
    } catch (reason) {
      if (turn === this.turn) this.nothing(reason instanceof WorkbookRefusal ? reason.message : `The workbook could not be read: ${reason instanceof Error ? reason.message : String(reason)}.`);
      return;
    }
    if (turn !== this.turn) return;
    if (range === undefined) {
      this.nothing(source.kind === "name" ? `The name ${source.name} no longer stands for one range of cells.` : "No cells are selected. Select the site block in the sheet, then read it again.");
    } else this.take(range);
  }

  /** Ends the listening. */
  close(): void {
    clearTimeout(this.timer);
    this.stopListening();
    this.listeners.clear();
    this.turn++;
  }

  private async refresh(): Promise<void> {
    const names = await this.workbook.names().catch(() => this.held.names);
    if (names.join("\n") !== this.held.names.join("\n")) this.publish({ names });
    // A selection wanders while people work; only a name is followed.
    if (this.held.source?.kind === "name") await this.read();
  }

  private take(range: RangeText): void {
    const place = { sheet: range.sheet, address: range.address };
    const values = JSON.stringify(range.values);
    if (values === this.lastValues) {
      if (place.sheet !== this.held.place?.sheet || place.address !== this.held.place.address) this.publish({ place });
      return;
    }
    this.lastValues = values;
    const checks = checkSite(range.values);
    const { site, refusal } = parsed(range);
    this.publish({ place, cells: range.values, checks, site, refusal, edition: this.held.edition + 1 });
  }

  private nothing(refusal: string): void {
    this.lastValues = "";
    this.publish({ place: undefined, cells: [], checks: [], site: undefined, refusal, edition: this.held.edition + 1 });
  }

  private publish(change: Partial<SiteState>): void {
    this.held = { ...this.held, ...change };
    for (const listener of this.listeners) listener(this.held);
  }
}

function parsed(range: RangeText): { site: Site | undefined; refusal: string | undefined } {
  try {
    return { site: parseSite(range.values), refusal: undefined };
  } catch (reason) {
    if (reason instanceof InputError) return { site: undefined, refusal: reason.message };
    throw reason;
  }
}

