import type { LengthTable } from "../../engine/index.js";
import { resultIn, type UnitSystem } from "../../units/result-units.js";
import type { NumberWriter } from "./numbers.js";

/** A small table of texts: a head and rows of equal width; the first column names the row. */
export interface TextTable {
  readonly head: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

/** Which lengths people plan with: a short, a middle and a long outcome. */
export const SHOWN_PERCENTILES: readonly number[] = [5, 50, 95];

/**
 * Lays out the distribution of pile lengths as texts.
 *
 * @param table   lengths, m
 * @param units   SI: metres; US: feet
 * @param writer  writes the numbers
 * @returns       one row a group of piles, then the metres of all piles together
 */
export function lengthTexts(table: LengthTable, units: UnitSystem, writer: NumberWriter): TextTable {
  const head = ["Piles", ...table.percentiles.map((percentile) => `${writer.plain(percentile, 1)}\u00a0%`)];
  const write = (length: number, decimals: number): string => writer.plain(resultIn(length, "length", units), decimals);
  const rows = table.groups.map((group) => [`${group.label} (${group.piles}\u00a0\u00d7)`, ...group.lengths.map((length) => write(length, 1))]);
  return { head, rows: [...rows, ["All piles together", ...table.totalMetres.map((length) => write(length, 0))]] };
}
