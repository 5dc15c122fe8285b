import { lengthPercentiles, type SimulationRow, type SimulationTable } from "../../src/engine/index.js";
import { parseSite, templateRows } from "../../src/inputs/index.js";
import type { RunOrder } from "../../src/pane/run-order.js";

/** A simulated row with round figures, for tests of words, tables and pictures only; the engine's own tests simulate. */
export function simulatedRow(count: number, total: number, change: Partial<SimulationRow> = {}): SimulationRow {
  return {
    variant: 0, name: "Cone", count, investigation: 10 * count, foundation: total - 10 * count, failure: 0, delay: 0, total,
    errors: { foundation: 1, failure: 1, delay: 1 }, standardError: 10, failureChance: 0.2, failureChanceError: 0.01, damageSeen: { elements: 3, form: 40 },
    failureChanceAtMost: undefined, carbon: 1000, surprises: 1.25, overDesign: 12, totalMetres: 100, tooShortChance: 0,
    meanLengths: lengthPercentiles.map((percentile) => 5 + percentile / 10), chanceCheapest: 0, chanceWithin: 0, notDistinguishable: false, regret: 0,
    correlation: 0.99, varianceCut: 100, ...change,
  };
}

/** A table of rows; the cheapest is the first of the smallest total. */
export function simulatedTable(rows: readonly SimulationRow[], change: Partial<SimulationTable> = {}): SimulationTable {
  const cheapest = rows.reduce((best, row, k) => (row.total < rows[best]!.total ? k : best), 0);
  return { rows, cheapest, expectedRegret: 120, elements: 24, form: 600, ...change };
}

/** An order for the demonstration. */
export function orderOfDemonstration(change: Partial<RunOrder> = {}): RunOrder {
  const { problem } = parseSite(templateRows());
  return {
    task: { variants: [{ name: "Cone", problem }], counts: [0, 2, 4], seed: "7" }, target: { realisations: 9 },
    units: "SI", money: "EUR", block: "block", place: "Site!A1:D60", at: 0, ...change,
  };
}
