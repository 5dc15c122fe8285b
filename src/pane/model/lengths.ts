import type { LengthTable } from "../../engine/index.js";
import { lengthTable } from "../../results/length-table.js";
import type { UnitSystem } from "../../units/result-units.js";
import type { NumberWriter } from "./numbers.js";

/** A small table of texts: a head and rows of equal width; the first column names the row. */
export interface TextTable {
  readonly head: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

/** Which lengths people plan with: a short, a middle and a long outcome. */
export const SHOWN_PERCENTILES: readonly number[] = [5, 50, 95];

/**
 * Lays out the distribution of pile lengths as texts, turned on its side: a pane is narrow and the groups are few.
 *
 * @param table   lengths, m
 * @param units   SI: metres and kN; US: feet and kip
 * @param writer  writes the numbers
 * @returns       one row a group of piles, then the length of all piles together
 */
export function lengthTexts(table: LengthTable, units: UnitSystem, writer: NumberWriter): TextTable {
  const { columns, rows } = lengthTable(table, units);
  const head = ["Piles", ...table.percentiles.map((percentile) => `${writer.plain(percentile, 1)}\u00a0%`)];
  const line = (name: string, column: number, decimals: number): string[] => [name, ...rows.map((row) => writer.plain(Number(row[column]), decimals))];
  const groups = table.groups.map((_group, k) => line(columns[k + 1]!.label, k + 1, 1));
  return { head, rows: [...groups, line("All piles together", columns.length - 1, 0)] };
}
