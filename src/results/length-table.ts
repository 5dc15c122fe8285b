import type { LengthTable } from "../engine/index.js";
import { amount } from "../inputs/cells.js";
import { fromInner, readUnit } from "../units/read-unit.js";
import type { Unit } from "../units/unit-table.js";
import { resultIn, resultUnit, type UnitSystem } from "../units/result-units.js";
import type { ResultTable } from "./result-table.js";

/**
 * How long the piles may turn out: one row a percentile, one column a group of equally loaded piles, then the job as a whole.
 *
 * @param table  the engine's percentiles, m
 * @param units  SI: lengths in metres, loads in kN; US: in feet and kip
 * @returns      nothing rounded; mean length times the number of piles is the total at every percentile
 */
export function lengthTable(table: LengthTable, units: UnitSystem): ResultTable {
  const unit = resultUnit("length", units);
  const out = (length: number): number => resultIn(length, "length", units);
  return {
    title: "Pile lengths that the design may ask for",
    columns: [
      { label: "Percentile", unit: "%" },
      ...table.groups.map((group) => ({ label: `${loadText(group.load, units)}, ${group.piles} ${group.piles === 1 ? "pile" : "piles"}`, unit })),
      { label: "Mean length", unit },
      { label: "Total length", unit },
    ],
    rows: table.percentiles.map((percentile, k) => [
      percentile,
      ...table.groups.map((group) => out(group.lengths[k])),
      out(table.meanLength[k]),
      out(table.totalMetres[k]),
    ]),
    notes: ["Mean length times the number of piles is the total at every percentile. Where one design value sets all lengths they move together, and the total is the sum of the columns too."],
  };
}

function loadText(load: number, units: UnitSystem): string {
  const unit = readUnit(units === "US" ? "kip" : "kN", "force") as Unit;
  return `${amount(fromInner(load, unit))} ${unit.symbol}`;
}
