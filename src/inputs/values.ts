import { entryOf, type InputId } from "./catalogue.js";
import type { Replacement } from "./apply-pairs.js";
import { InputError } from "./input-error.js";
import { pairPlace, rowPlace, type Place } from "./place.js";
import type { Given } from "./read-input.js";
import type { ListReading } from "./read-list.js";
import { readUnitCell, type UnitReading } from "./read-unit-cell.js";
import type { Block } from "./scan-block.js";

/** Where the value in force comes from. */
export type Source = "block" | "formula" | "default" | "refused";

/** An input that others need was itself refused: its own sentence says why, so this one is never shown. */
class Unavailable extends Error {
  override readonly name = "Unavailable";
}

/** The values in force: a pair before the block before the default. */
export class Values {
  /** inputs of the block that are set aside, with the reason */
  readonly setAside = new Map<InputId, string>();

  constructor(readonly block: Block, readonly replacements: ReadonlyMap<InputId, Replacement>, private readonly refused: ReadonlySet<InputId>) {}

  /** The input as given in a pair or in the block; undefined where the default is in force. */
  given(id: InputId): Given | undefined {
    const replacement = this.replacements.get(id);
    if (replacement !== undefined) return replacement.given;
    return this.setAside.has(id) ? undefined : this.block.inputs.get(id)?.given;
  }

  source(id: InputId): Source {
    if (this.refused.has(id)) return "refused";
    if (this.replacements.get(id)?.given !== undefined) return "formula";
    return this.given(id) !== undefined || this.block.lists.has(id) ? "block" : "default";
  }

  /** A number in the inner unit, or the default of the catalogue; undefined where the value is automatic. */
  optional(id: InputId): number | undefined {
    if (this.refused.has(id)) throw new Unavailable();
    const given = this.given(id);
    if (given !== undefined) return given.value as number;
    const entry = entryOf(id);
    if (typeof entry.fallback !== "number") return undefined;
    const unit = catalogueUnit(id);
    return (entry.fallback * unit.multiply) / unit.divide;
  }

  /** A number in the inner unit that must be there; where it is missing, the faults say so already. */
  number(id: InputId): number {
    const value = this.optional(id);
    if (value === undefined) throw new Unavailable();
    return value;
  }

  /** A choice by its inner name, or text. */
  text(id: InputId): string {
    if (this.refused.has(id)) throw new Unavailable();
    return String(this.given(id)?.value ?? entryOf(id).fallback);
  }

  list(id: InputId): ListReading | undefined {
    if (this.refused.has(id)) throw new Unavailable();
    return this.block.lists.get(id);
  }

  /** Whether the block has this list, readable or not. */
  hasList(id: InputId): boolean {
    return this.block.rows.has(id) && !(this.block.inputs.has(id) && !this.block.lists.has(id));
  }

  place(id: InputId): Place {
    const { label } = entryOf(id);
    const replacement = this.replacements.get(id);
    if (replacement !== undefined) return { ...pairPlace(label, replacement.pair), id };
    const row = this.block.rows.get(id);
    const isDefault = row === undefined || (this.given(id) === undefined && !this.block.lists.has(id));
    return { ...(isDefault ? { name: label, words: "its default" } : rowPlace(label, row)), id };
  }

  /** "Longest length (row 33 of the site block)" */
  named(id: InputId): string {
    const { name, words } = this.place(id);
    return `${name} (${words})`;
  }
}

/**
 * Runs a piece of building and passes over it in silence where an input that it needs was refused.
 *
 * @param build  the piece
 * @returns      its result, or undefined
 * @throws {InputError} a refusal of its own
 */
export function whereAvailable<T>(build: () => T): T | undefined {
  try {
    return build();
  } catch (error) {
    if (error instanceof Unavailable && !(error instanceof InputError)) return undefined;
    throw error;
  }
}

const UNITS = new Map<InputId, UnitReading>();

/**
 * The catalogue's unit of an input: that of its range and default.
 *
 * @param id  the input
 * @returns   the unit
 */
export function catalogueUnit(id: InputId): UnitReading {
  let unit = UNITS.get(id);
  if (unit === undefined) {
    const { kind, unit: normal, label, per } = entryOf(id);
    unit = readUnitCell(kind, null, normal, { name: label, words: "catalogue" }, per);
    UNITS.set(id, unit);
  }
  return unit;
}
