import { BUILDING } from "./catalogue-building.js";
import { GROUND } from "./catalogue-ground.js";
import { INVESTIGATION } from "./catalogue-investigation.js";
import { DELAY, PRICES, RUN } from "./catalogue-money.js";
import { PILES } from "./catalogue-piles.js";
import type { InputEntry, Section } from "./entry.js";

const ALL = [...GROUND, ...BUILDING, ...PILES, ...INVESTIGATION, ...PRICES, ...DELAY, ...RUN] as const;

/** What the program calls an input. */
export type InputId = (typeof ALL)[number]["id"];

/** An input with the name that the program knows it by. */
export type CatalogueEntry = InputEntry & { readonly id: InputId };

/** Every input of the site block, once, in the order of the template. Check rows, pane, template and documentation are made from it. */
export const CATALOGUE: readonly CatalogueEntry[] = ALL;

/** The section titles of the site block, in order. */
export const SECTIONS: readonly Section[] = ["Ground", "Building", "Piles", "Investigation", "Prices", "Delay", "Run"];

const BY_ID = new Map<string, CatalogueEntry>(CATALOGUE.map((entry) => [entry.id, entry]));

/**
 * The catalogue's entry of an input.
 *
 * @param id  what the program calls it
 * @returns   its entry
 */
export function entryOf(id: InputId): CatalogueEntry {
  return BY_ID.get(id)!;
}

/**
 * Whether a row with this input must be there (unless the list that takes its place is).
 *
 * @param entry  an entry of the catalogue
 * @returns      true where it has neither a default nor an automatic value
 */
export function isRequired(entry: InputEntry): boolean {
  return entry.fallback === undefined && entry.automatic === undefined;
}
