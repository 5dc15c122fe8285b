import { decade, powerOfTen } from "./powers-of-ten.js";

/** Thousands with commas whatever the machine's language, so that a run reads the same everywhere. */
export function grouped(value: number): string {
  const [whole = "0", fraction] = String(Math.abs(value)).split(".");
  const digits = whole.replace(/\B(?=(\d{3})+(?!\d))/g, ",");
  return `${value < 0 ? "-" : ""}${digits}${fraction === undefined ? "" : `.${fraction}`}`;
}

/**
 * Rows of words under each other: numbers to the right, the columns of words to the left.
 *
 * @param rows   equally long; the first is the head
 * @param words  which columns hold words
 */
export function aligned(rows: readonly (readonly string[])[], words: readonly number[]): string[] {
  const widths = (rows[0] ?? []).map((_, column) => Math.max(...rows.map((row) => row[column]?.length ?? 0)));
  return rows.map((row) => row.map((cell, column) => (words.includes(column) ? cell.padEnd(widths[column] ?? 0) : cell.padStart(widths[column] ?? 0))).join("  ").trimEnd());
}

/** The power of ten that leaves four figures of the largest sum. */
export function moneyStep(sums: readonly number[]): number {
  const largest = Math.max(1, ...sums);
  return powerOfTen(Math.max(0, decade(largest) - 3));
}

/** "1", "1 and 2", "1, 2 and 3". */
export function joined(names: readonly (string | number)[]): string {
  return names.length < 2 ? names.join("") : `${names.slice(0, -1).join(", ")} and ${String(names.at(-1))}`;
}
