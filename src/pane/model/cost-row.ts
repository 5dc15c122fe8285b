import type { CountRow } from "../../engine/index.js";

/** What pictures and words need of a row of either table, the quick or the simulated. */
export type CostRow = Pick<CountRow, "count" | "investigation" | "foundation" | "failure" | "delay" | "total" | "standardError" | "notDistinguishable">;
