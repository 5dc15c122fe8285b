import { GROUND_KINDS, type TypicalRange } from "../inputs/index.js";
import type { ResultColumn, ResultTable } from "./result-table.js";

/** What kinds of ground usually show: for each property the value to start from between a low and a high one. */
export function groundKindTable(): ResultTable {
  return {
    title: "Typical ground",
    columns: [
      { label: "Ground", unit: "" },
      ...threeColumns("Mean stiffness", "MPa"),
      ...threeColumns("Stiffness COV", "ratio"),
      ...threeColumns("Vertical scale", "m"),
      ...threeColumns("Horizontal scale", "m"),
      { label: "Source", unit: "" },
    ],
    rows: GROUND_KINDS.map((kind) => [
      kind.name,
      ...threeValues(kind.stiffness), ...threeValues(kind.cov), ...threeValues(kind.verticalScale), ...threeValues(kind.horizontalScale),
      kind.source,
    ]),
    notes: ["A start without data, to be replaced by measurements of the site."],
  };
}

function threeColumns(label: string, unit: string): ResultColumn[] {
  return [{ label, unit }, { label: `${label}, low`, unit }, { label: `${label}, high`, unit }];
}

function threeValues(range: TypicalRange): number[] {
  return [range.typical, range.low, range.high];
}
