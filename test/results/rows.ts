import type { CountRow } from "../../src/engine/index.js";

/** A row of the table of counts with figures of its own; only what a test reads needs stating. */
export function countRow(row: Partial<CountRow> & { count: number }): CountRow {
  return {
    investigation: 0, foundation: 0, failure: 0, delay: 0, total: 0, standardError: 0, failureChance: 0, carbon: 0, surprises: 0, tooShortChance: 0, totalMetres: 0,
    chanceCheapest: 0, notDistinguishable: false, ...row,
  };
}

/** Three counts of an invented job. */
export const ROWS: readonly CountRow[] = [
  countRow({ count: 0, investigation: 0, foundation: 81_234.5, failure: 120_400, delay: 3_210, total: 204_844.5, standardError: 1_049, chanceCheapest: 0, carbon: 34_567.8 }),
  countRow({ count: 1, investigation: 6_400, foundation: 79_011, failure: 61_007.4, delay: 1_877, total: 148_295.4, standardError: 812.3, chanceCheapest: 0.617, carbon: 33_000, notDistinguishable: true }),
  countRow({ count: 2, investigation: 9_800, foundation: 78_400, failure: 58_800, delay: 1_500, total: 148_500, standardError: 790, chanceCheapest: 0.383, carbon: 32_500, notDistinguishable: true }),
];
