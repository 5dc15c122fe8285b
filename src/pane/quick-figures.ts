import type { CountRow, Problem } from "../engine/index.js";
import { inputsHash } from "../jobs/inputs-hash.js";
import type { Pricing } from "./pricing.js";

/** The quick figures of inputs that need not be the site block's as it stands: priced once, when somebody asks. */
export class QuickFigures {
  private readonly known = new Map<string, readonly CountRow[]>();
  private readonly asked = new Set<string>();
  private readonly listeners = new Set<() => void>();
  private working: Promise<void> = Promise.resolve();
  private mayWork = false;

  /** @param pricing  a thread of its own, so that it takes nothing from the pricing of the block */
  constructor(private readonly pricing: Pick<Pricing, "price" | "close">) {}

  /** Calls back when more figures are known. */
  subscribe(listener: () => void): void {
    this.listeners.add(listener);
  }

  /** Says whether there is time for it: not while a run has the machine. */
  allow(mayWork: boolean): void {
    if (mayWork === this.mayWork) return;
    this.mayWork = mayWork;
    if (mayWork) for (const listener of this.listeners) listener();
  }

  /**
   * The figures of a problem; they are priced where they are not known.
   *
   * @param counts  numbers of holes, rising
   * @returns       undefined until they are known
   */
  of(problem: Problem, counts: readonly number[]): readonly CountRow[] | undefined {
    const key = inputsHash([problem, counts]);
    const known = this.known.get(key);
    if (known !== undefined || this.asked.has(key) || !this.mayWork) return known;
    this.asked.add(key);
    this.working = this.working.then(async () => {
      const end = await this.pricing.price(problem, counts, () => undefined);
      if (end.kind !== "done") return;
      this.known.set(key, end.value);
      for (const listener of this.listeners) listener();
    });
    return undefined;
  }

  /** Ends everything; for the end of the pane. */
  close(): void {
    this.listeners.clear();
    this.pricing.close();
  }
}
