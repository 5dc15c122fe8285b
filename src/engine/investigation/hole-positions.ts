import type { Metres } from "../../units/quantities.js";

/** A place in plan, m. */
export interface Point {
  readonly x: Metres;
  readonly y: Metres;
}
