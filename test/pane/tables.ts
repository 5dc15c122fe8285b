import type { CountRow } from "../../src/engine/index.js";

/** A row of the table of counts with round figures, for tests of words and pictures only; the engine's own tests price real sites. */
export function countRow(count: number, total: number, change: Partial<CountRow> = {}): CountRow {
  const investigation = 10 * count;
  return {
    count,
    investigation,
    foundation: total - investigation,
    failure: 0,
    delay: 0,
    total,
    standardError: 10,
    failureChance: 0.2,
    carbon: 1000,
    surprises: 0,
    tooShortChance: 0,
    totalMetres: 100,
    chanceCheapest: 0,
    notDistinguishable: false,
    ...change,
  };
}
