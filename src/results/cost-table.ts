import type { CountRow } from "../engine/index.js";
import { resultIn, resultUnit, type UnitSystem } from "../units/result-units.js";
import type { ResultTable } from "./result-table.js";

/**
 * What each number of holes costs: one row a count, parts and total, how sure, and the carbon.
 *
 * @param rows   the counts as the engine priced them, in the order wanted
 * @param units  SI: carbon in kilograms; US: in pounds
 * @param money  whose money, as the person writes it; "" where nobody wrote it
 * @returns      chances from 0 to 1, nothing rounded
 */
export function costTable(rows: readonly CountRow[], units: UnitSystem, money = ""): ResultTable {
  return {
    title: "Cost against number of holes",
    columns: [
      { label: "Count", unit: "holes" },
      { label: "Investigation", unit: money },
      { label: "Foundation", unit: money },
      { label: "Failure", unit: money },
      { label: "Delay", unit: money },
      { label: "Total", unit: money },
      { label: "Standard error", unit: money },
      { label: "Chance cheapest", unit: "0 to 1" },
      { label: "Carbon", unit: `${resultUnit("mass", units)} CO2e` },
    ],
    rows: rows.map((row) => [
      row.count, row.investigation, row.foundation, row.failure, row.delay, row.total, row.standardError, row.chanceCheapest, resultIn(row.carbon, "mass", units),
    ]),
    notes: [MONEY_NOTE, ROUNDING_NOTE],
  };
}

/** Says in which money a table is. */
const MONEY_NOTE = "Money is in the currency of the prices; every figure is an expectation.";

/** Says how far the small figures go, which the fast model has measured. */
const ROUNDING_NOTE = "A failure cost below 1 % of the building value may be off by a fifth: round it to one or two figures.";
