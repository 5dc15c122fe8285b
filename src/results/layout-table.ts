import type { Point } from "../engine/index.js";
import { resultIn, resultUnit, type UnitSystem } from "../units/result-units.js";
import type { ResultTable } from "./result-table.js";

/**
 * Where the holes stand, one row a hole.
 *
 * @param holes  places in plan, m, in the axes of the pile list
 * @param units  SI: metres; US: feet
 */
export function layoutTable(holes: readonly Point[], units: UnitSystem): ResultTable {
  const unit = resultUnit("length", units);
  return {
    title: "Places of the holes",
    columns: [
      { label: "x", unit },
      { label: "y", unit },
    ],
    rows: holes.map((hole) => [resultIn(hole.x, "length", units), resultIn(hole.y, "length", units)]),
    notes: [],
  };
}
