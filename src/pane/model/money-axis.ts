import type { NumberWriter } from "./numbers.js";

/** How an axis of money is written: in what unit, and each tick. */
export interface MoneyAxis {
  /** "", "thousands" or "millions" */
  readonly unit: string;
  readonly write: (value: number) => string;
}

/**
 * Chooses ones, thousands or millions so that tick labels stay short.
 *
 * @param largest  largest amount on any axis that shares the unit, money, > 0
 * @param writer   writes the numbers
 */
export function moneyAxis(largest: number, writer: NumberWriter): MoneyAxis {
  if (largest >= 2e7) return { unit: "millions", write: (value) => writer.plain(value / 1e6, 3) };
  if (largest >= 2e4) return { unit: "thousands", write: (value) => writer.plain(value / 1e3, 3) };
  return { unit: "", write: (value) => writer.plain(value, 2) };
}
