import type { CatalogueEntry } from "./catalogue.js";
import { amount, found, isBlankOrZero, isError, looksLikeNumber, type Cell } from "./cells.js";
import { LARGEST_COUNT } from "./limits.js";
import { nearestWord, normaliseLabel } from "./labels.js";
import { inWords, refusal, type Place } from "./place.js";
import { readNumber } from "./read-number.js";
import { readUnitCell, type UnitReading } from "./read-unit-cell.js";

/** One input as it was given, in a row of the block or in a pair of the formula. */
export interface Given {
  /** number in the inner unit; `value` of a choice; text of a seed; counts */
  readonly value: number | string | readonly number[];
  /** as the person reads it */
  readonly shown: number | string;
  readonly unit: UnitReading;
}

/** The row is there and asks for the default or the automatic value. */
export const ASKS_FOR_DEFAULT = "asks for default";

const SPELLINGS = new WeakMap<CatalogueEntry, ReadonlyMap<string, string>>();

/**
 * Reads one input that is not a list.
 *
 * @param entry  the catalogue's entry
 * @param cell   the value cell, plain
 * @param unit   the unit beside it
 * @param place  where it stands
 * @returns      the input, or the wish for its default
 * @throws {InputError} the cell cannot be used
 */
export function readInput(entry: CatalogueEntry, cell: Cell, unit: UnitReading, place: Place): Given | typeof ASKS_FOR_DEFAULT {
  if (typeof cell === "string" && asksForDefault(entry, cell)) return ASKS_FOR_DEFAULT;
  switch (entry.kind) {
    case "choice":
      return readChoice(entry, cell, unit, place);
    case "seed":
      return readSeed(cell, unit, place);
    case "counts": {
      const value = readCounts(cell, place);
      return { value, shown: typeof cell === "number" ? cell : (cell as string).trim(), unit };
    }
    case "list":
      throw refusal(place, "is a list, and a list is not one value");
    default: {
      const rule = {
        kind: entry.kind, unit: entry.unit, minimum: entry.minimum!, maximum: entry.maximum!, zero: entry.zero,
        whole: entry.whole, usual: entry.usual, fallbackWords: defaultInWords(entry),
      };
      const range = readUnitCell(entry.kind, null, entry.unit, place, entry.per);
      const value = readNumber(rule, cell, unit, place, range);
      return { value, shown: typeof cell === "number" ? cell : value === 0 ? "none" : value, unit };
    }
  }
}

/**
 * The default of an input in words.
 *
 * @param entry  the catalogue's entry
 * @returns      such as "30 GPa" or "the spacing along x"; undefined for a required input
 */
export function defaultInWords(entry: CatalogueEntry): string | undefined {
  if (entry.automatic !== undefined) return entry.automatic;
  if (entry.fallback === undefined) return undefined;
  if (typeof entry.fallback === "string") return choiceText(entry, entry.fallback);
  if (entry.fallback === 0) return "none";
  return `${amount(entry.fallback)}${entry.unit === "ratio" || entry.unit === "" ? "" : ` ${entry.unit}`}`;
}

/**
 * How a choice is written for people.
 *
 * @param entry  the catalogue's entry
 * @param value  what the program calls it
 * @returns      such as "separable Markov"
 */
export function choiceText(entry: CatalogueEntry, value: string): string {
  return entry.choices?.find((choice) => choice.value === value)?.text ?? value;
}

/**
 * Reads numbers of holes: the largest one, a range, or all of them.
 *
 * @param cell   12, "0 to 12", "0-12" or "0, 1, 2, 4, 8"
 * @param place  where it stands
 * @returns      whole numbers from 0 to the largest that can be priced, growing
 * @throws {InputError} anything else
 */
function readCounts(cell: Cell, place: Place): readonly number[] {
  const accepted = `write the largest number of holes (12), from and to (0 to 12) or all numbers (0, 1, 2, 4, 8), none above ${LARGEST_COUNT}`;
  if (isBlankOrZero(cell)) throw refusal(place, `is blank or zero; ${accepted}`);
  if (typeof cell === "number") {
    if (Number.isInteger(cell) && cell >= 1 && cell <= LARGEST_COUNT) return upTo(0, cell);
    const date = cell > 30000 ? "; the sheet may have made a date of what was typed" : "";
    throw refusal(place, `is ${amount(cell)}${date}; ${accepted}`);
  }
  if (typeof cell !== "string" || isError(cell) || cell.length > 400) throw refusal(place, `is ${found(cell)}; ${accepted}`);
  if (looksLikeNumber(cell) && !/[,;]/.test(cell)) throw refusal(place, `is ${found(cell)}, a number stored as text; ${accepted}`);
  const range = /^\s*(\d{1,3})\s*(?:to|-|\u2013|\.\.)\s*(\d{1,3})\s*$/i.exec(cell);
  const counts = range === null ? cell.split(/[,;]/).map((part) => (/^\s*\d{1,3}\s*$/.test(part) ? Number(part) : NaN)) : upTo(Number(range[1]), Number(range[2]));
  const sorted = [...new Set(counts)].sort((a, b) => a - b);
  if (sorted.length === 0 || !sorted.every((count) => count <= LARGEST_COUNT)) throw refusal(place, `is ${found(cell)}; ${accepted}`);
  return sorted;
}

function asksForDefault(entry: CatalogueEntry, cell: string): boolean {
  if (entry.fallback === undefined && entry.automatic === undefined) return false;
  const word = normaliseLabel(cell);
  return word === "default" || word === "automatic" || word === "auto" || (entry.automaticWords ?? []).includes(word);
}

function readChoice(entry: CatalogueEntry, cell: Cell, unit: UnitReading, place: Place): Given {
  const choices = entry.choices!;
  const accepted = `accepted: ${inWords(choices.map(({ text }) => text))}`;
  if (isBlankOrZero(cell)) {
    const fallback = defaultInWords(entry);
    throw refusal(place, `is blank or zero; ${accepted}${fallback === undefined ? "" : `; or take the row out for the default (${fallback})`}`);
  }
  const word = typeof cell === "boolean" ? String(cell) : cell;
  const value = typeof word === "string" && !isError(word) ? spellings(entry).get(normaliseLabel(word)) : undefined;
  if (value === undefined) {
    const nearest = typeof word === "string" ? nearestWord(word, choices.map(({ text }) => text)) : undefined;
    throw refusal(place, `is ${found(cell)}${nearest === undefined ? "" : `; is ${nearest} meant?`}${nearest === undefined ? ";" : ""} ${capital(accepted, nearest !== undefined)}`);
  }
  return { value, shown: choiceText(entry, value), unit };
}

function readSeed(cell: Cell, unit: UnitReading, place: Place): Given {
  if (isBlankOrZero(cell)) throw refusal(place, "is blank or zero; write a number or a word, or take the row out for the default (1)");
  if (typeof cell === "boolean" || isError(cell)) throw refusal(place, `is ${found(cell)}; a number or a word is needed`);
  const value = String(cell).trim();
  if (value.length > 40) throw refusal(place, `is ${found(value)}, of ${value.length} letters; at most 40 are accepted`);
  return { value, shown: typeof cell === "number" ? cell : value, unit };
}

function spellings(entry: CatalogueEntry): ReadonlyMap<string, string> {
  const known = SPELLINGS.get(entry);
  if (known !== undefined) return known;
  const map = new Map(entry.choices!.flatMap(({ value, text, also }) => [value, text, ...also].map((word) => [normaliseLabel(word), value] as const)));
  SPELLINGS.set(entry, map);
  return map;
}

function upTo(from: number, to: number): number[] {
  return Array.from({ length: Math.max(0, to - from + 1) }, (_, index) => from + index);
}

function capital(text: string, wanted: boolean): string {
  return wanted ? text.charAt(0).toUpperCase() + text.slice(1) : text;
}
