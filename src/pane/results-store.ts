import { cheapestCount, type CountRow, type LengthTable, type Problem } from "../engine/index.js";
import { usualCounts } from "../inputs/count.js";
import type { Site } from "../inputs/index.js";
import { SHOWN_PERCENTILES } from "./model/lengths.js";
import type { Pricing } from "./pricing.js";
import type { SiteState } from "./site-store.js";

/** Figures for one edition of the inputs. */
export interface PricedTable {
  readonly edition: number;
  readonly rows: readonly CountRow[];
  readonly cheapest: number;
  readonly problem: Problem;
  readonly units: Site["units"];
  /** whose money, as the person wrote it; "" where nobody did */
  readonly money: string;
}

/** What the Results view shows. */
export interface ResultsState {
  readonly phase: "idle" | "running" | "cancelled" | "refused" | "failed";
  readonly done: number;
  readonly of: number;
  /** why there are no figures, for the person; "" where there are */
  readonly message: string;
  /** the last figures, kept in sight while newer ones are on their way */
  readonly table: PricedTable | undefined;
  /** figures belong to inputs that have changed since */
  readonly old: boolean;
  readonly lengths: { readonly count: number; readonly table: LengthTable } | undefined;
}

/** Prices the site block when somebody looks at the results, and keeps the figures. */
export class ResultsStore {
  private held: ResultsState = { phase: "idle", done: 0, of: 0, message: "", table: undefined, old: false, lengths: undefined };
  private readonly listeners = new Set<(state: ResultsState) => void>();
  private site: SiteState | undefined;
  private looking = false;
  /** the edition that was last tried, so that a cancelled or refused one is not tried again unasked */
  private tried = -1;
  private lengthsWanted: number | undefined;

  /**
   * @param pricing  the worker
   * @param tell     says a sentence aloud
   */
  constructor(
    private readonly pricing: Pick<Pricing, "price" | "lengths" | "cancel">,
    private readonly tell: (sentence: string) => void,
  ) {}

  /** what is known now */
  get state(): ResultsState {
    return this.held;
  }

  /** Calls back at once and after every change. */
  subscribe(listener: (state: ResultsState) => void): void {
    this.listeners.add(listener);
    listener(this.held);
  }

  /** Takes the inputs as they are now. */
  take(site: SiteState): void {
    const changed = site.edition !== this.site?.edition;
    this.site = site;
    if (!changed) return;
    // A run for inputs that no longer stand would only delay the one that counts.
    if (this.held.phase === "running") this.pricing.cancel();
    this.publish({ old: this.held.table !== undefined && this.held.table.edition !== site.edition });
    this.runIfDue();
  }

  /** Says whether the results are in sight; nothing is computed for nobody. */
  look(looking: boolean): void {
    this.looking = looking;
    this.runIfDue();
  }

  /** Prices now, whatever was tried before. */
  async run(): Promise<void> {
    const state = this.site;
    if (state === undefined) return;
    this.tried = state.edition;
    if (state.site === undefined) {
      this.publish({ phase: "refused", message: state.refusal ?? "" });
      return;
    }
    const { problem, units, money } = state.site;
    const counts = state.site.counts ?? usualCounts(state.site);
    this.publish({ phase: "running", done: 0, of: counts.length, message: "" });
    this.tell(`Pricing ${counts.length} counts.`);
    const end = await this.pricing.price(problem, counts, (done, of) => this.publish({ done, of }));
    if (state.edition !== this.site?.edition) return;
    if (end.kind === "done") {
      const table = { edition: state.edition, rows: end.value, cheapest: cheapestCount(end.value), problem, units, money };
      this.lengthsWanted = undefined;
      this.publish({ phase: "idle", table, old: false, lengths: undefined });
      this.tell(`Priced. The cheapest count is ${table.cheapest}.`);
      await this.showLengths(table.cheapest);
    } else if (end.kind === "cancelled") {
      this.publish({ phase: "cancelled" });
      this.tell("Cancelled.");
    } else this.publish({ phase: end.kind, message: end.message });
  }

  /** Ends the run. */
  cancel(): void {
    this.pricing.cancel();
  }

  /** Fetches the pile lengths of one count of the table. */
  async showLengths(count: number): Promise<void> {
    const table = this.held.table;
    if (table === undefined || this.held.phase === "running") return;
    this.lengthsWanted = count;
    const end = await this.pricing.lengths(table.problem, count, SHOWN_PERCENTILES);
    if (this.lengthsWanted !== count || this.held.table !== table) return;
    if (end.kind === "done") this.publish({ lengths: { count, table: end.value } });
    else if (end.kind !== "cancelled") this.publish({ lengths: undefined, message: end.message });
  }

  private runIfDue(): void {
    const edition = this.site?.edition;
    if (this.looking && edition !== undefined && edition !== this.tried) void this.run();
  }

  private publish(change: Partial<ResultsState>): void {
    this.held = { ...this.held, ...change };
    for (const listener of this.listeners) listener(this.held);
  }
}
