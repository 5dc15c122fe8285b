import type { UnitKind } from "../units/unit-table.js";

/** The sections of the site block, in the order of the template. */
export type Section = "Ground" | "Building" | "Piles" | "Investigation" | "Prices" | "Delay" | "Run";

/** What an input is. The first eight are numbers with or without a unit of their kind. */
export type InputKind = UnitKind | "money" | "moneyPerLength" | "choice" | "seed" | "counts" | "list";

/**
 * What blank or 0 means. A blank cell may arrive as 0, so the two cannot be told apart.
 * accepted: zero, which is also the default; none: refused, and a deliberate zero is the word "none"; refused: there is no zero.
 */
export type ZeroRule = "accepted" | "none" | "refused";

/** One word of a choice. */
export interface Choice {
  /** what the program calls it */
  readonly value: string;
  /** what the person reads and writes */
  readonly text: string;
  /** other spellings, in lower case */
  readonly also: readonly string[];
}

/** One column of a list below its label. */
export interface ListColumn {
  readonly name: string;
  /** other headings, in lower case */
  readonly also: readonly string[];
  readonly kind: UnitKind | "distortion" | "name";
  /** unit where the heading states none, and unit of the range */
  readonly unit: string;
  readonly minimum: number;
  readonly maximum: number;
  readonly zero: "accepted" | "refused";
  readonly optional: boolean;
}

/** One input of the site block: everything that anybody needs to know about it stands here and nowhere else. */
export interface InputEntry {
  readonly id: string;
  readonly label: string;
  readonly section: Section;
  readonly kind: InputKind;
  /** unit of the range and the default, and of a value whose unit cell is blank; "" where there is none */
  readonly unit: string;
  /** in `unit`, inclusive; for numbers */
  readonly minimum?: number;
  readonly maximum?: number;
  readonly zero: ZeroRule;
  /** value where the row is absent: in `unit`, or the `value` of a choice. Neither this nor `automatic`: required */
  readonly fallback?: number | string;
  /** how the value is found where the row is absent, in words */
  readonly automatic?: string;
  /** words that ask for the automatic value in the row itself, beside "default" and "automatic" */
  readonly automaticWords?: readonly string[];
  /** id of the list that takes this input's place: it is then not required, and not used */
  readonly insteadOf?: string;
  /** whole numbers only */
  readonly whole?: boolean;
  /** what one price is for, other than a metre: "hole", "pile", "reading", "day" */
  readonly per?: string;
  /** what is usual, for the sentence that refuses an absurd value */
  readonly usual?: string;
  readonly choices?: readonly Choice[];
  readonly columns?: readonly ListColumn[];
  readonly maximumRows?: number;
  /** one or two sentences for the person */
  readonly help: string;
}
