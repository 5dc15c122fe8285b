import type { Kilopascals, Metres } from "../../units/quantities.js";

/** one: all piles as long as the heaviest needs; load: each as long as its load needs; nearest: by the nearest hole's readings. */
export type LengthRule = "one" | "load" | "nearest";

/** The pile that is priced: a solid floating pile of constant diameter. */
export interface PileSpecification {
  readonly diameter: Metres;
  /** Young's modulus of the pile, kPa */
  readonly modulus: Kilopascals;
  readonly shortest: Metres;
  readonly longest: Metres;
  /** lengths are rounded up to a multiple of this above the shortest; 0: any length */
  readonly lengthStep: Metres;
  readonly lengthRule: LengthRule;
  /** whether a pile also settles by its neighbours' loads; design lengths stay those of single piles */
  readonly groupInteraction: boolean;
}
