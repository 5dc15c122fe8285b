import type { Assessment, CountRow, LengthTable, Problem } from "../engine/index.js";
import type { Section } from "./section.js";

/** What the page asks of the worker. A number ties the replies to the request. */
export type CountRequest =
  | { readonly id: number; readonly kind: "price"; readonly problem: Problem; readonly counts: readonly number[] }
  | { readonly id: number; readonly kind: "lengths"; readonly problem: Problem; readonly count: number; readonly percentiles: readonly number[] }
  | { readonly id: number; readonly kind: "section"; readonly problem: Problem; readonly count: number; /** number of the realised ground, from 0 */ readonly index: number };

/** What the worker answers. "refused" is for the person; "failed" is a fault of ours. */
export type CountReply =
  | { readonly id: number; readonly kind: "priced-one"; readonly row: Assessment; readonly done: number; readonly of: number }
  | { readonly id: number; readonly kind: "priced"; readonly rows: readonly CountRow[] }
  | { readonly id: number; readonly kind: "lengths"; readonly count: number; readonly table: LengthTable }
  | { readonly id: number; readonly kind: "section"; readonly section: Section }
  | { readonly id: number; readonly kind: "refused"; readonly message: string }
  | { readonly id: number; readonly kind: "failed"; readonly message: string };
