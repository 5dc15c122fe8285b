import type { SimulationRow, SimulationTable } from "../../engine/index.js";
import type { Totals } from "../../jobs/realisations.js";
import type { NumberWriter } from "./numbers.js";

/**
 * Realisations of both kinds in words.
 *
 * @param totals  how many
 * @param writer  writes the numbers
 */
export function groundsInWords({ elements, form }: Totals, writer: NumberWriter): string {
  return `${writer.plain(elements, 0)} ${elements === 1 ? "ground" : "grounds"} by finite elements and ${writer.plain(form, 0)} by the short form`;
}

/** The ways that a table compares, in its order. */
export function waysOf(table: SimulationTable): readonly { readonly variant: number; readonly name: string }[] {
  const seen = new Map<number, string>();
  for (const row of table.rows) seen.set(row.variant, row.name);
  return [...seen].map(([variant, name]) => ({ variant, name }));
}

/**
 * The rows of one way with its own cheapest count.
 *
 * @param table    all rows
 * @param variant  index of the way
 */
export function rowsOfWay(table: SimulationTable, variant: number): { readonly rows: readonly SimulationRow[]; readonly cheapest: number } {
  const rows = table.rows.filter((row) => row.variant === variant);
  return { rows, cheapest: rows.reduce((best, row) => (row.total < best.total ? row : best)).count };
}

/**
 * A bound on a chance, finer than a chance itself would be written.
 *
 * @param share   0 to 1
 * @param writer  writes the number
 */
export function boundInWords(share: number, writer: NumberWriter): string {
  return `${writer.plain(100 * share, share < 0.01 ? 2 : share < 0.1 ? 1 : 0)}\u00a0%`;
}
