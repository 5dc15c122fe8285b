import { templateRows } from "../../src/inputs/index.js";

/**
 * The demonstration's site block with some cells replaced.
 *
 * @param changes  value cell by label; the label must be there
 */
export function demonstration(changes: Readonly<Record<string, unknown>> = {}): unknown[][] {
  const rows: unknown[][] = templateRows().map((row) => [...row]);
  for (const [label, value] of Object.entries(changes)) rows[rowOf(rows, label) - 1][1] = value;
  return rows;
}

/** The row of a label, 1 for the first of the block; fails when the label is not there. */
export function rowOf(rows: readonly (readonly unknown[])[], label: string): number {
  const index = rows.findIndex((row) => row[0] === label);
  if (index < 0) throw new Error(`no row ${label} in the block`);
  return index + 1;
}

/** The block without the row of a label. */
export function without(rows: readonly unknown[][], label: string): unknown[][] {
  const row = rowOf(rows, label);
  return rows.filter((_, index) => index !== row - 1);
}
