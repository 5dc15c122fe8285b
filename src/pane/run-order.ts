import type { SimulationTask } from "../engine/index.js";

/** When a run has enough: the expected regret of its cheapest count lies below a sum, or so many grounds are analysed by finite elements. */
export type RunTarget = { readonly regret: number } | { readonly realisations: number };

/** A run as it was ordered: plain data that is kept with its realisations. */
export interface RunOrder {
  readonly task: SimulationTask;
  readonly target: RunTarget;
  readonly units: "SI" | "US";
  /** whose money; "" where nobody wrote it */
  readonly money: string;
  /** short name of the site block's inputs as they stood */
  readonly block: string;
  /** where the site block stood */
  readonly place: string;
  /** when it was ordered, milliseconds since 1970 */
  readonly at: number;
}
