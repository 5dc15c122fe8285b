import type { Area } from "./addresses.js";
import { ErrorValue, type CellValue } from "./cell-value.js";

/** A table that a formula has filled into the cells below and beside its own. */
export interface Spill {
  readonly area: Area;
  readonly values: readonly (readonly CellValue[])[];
}

/**
 * What an array formula over a fixed rectangle shows there: a single value, row or column repeats, anything else beyond the
 * table is #N/A.
 */
export function filledInto(area: Area, values: readonly (readonly CellValue[])[]): CellValue[][] {
  const rows = values.length;
  const columns = values[0]?.length ?? 0;
  return Array.from({ length: area.bottom - area.top + 1 }, (_, row) =>
    Array.from({ length: area.right - area.left + 1 }, (__, column) => {
      const value = values[rows === 1 ? 0 : row]?.[columns === 1 ? 0 : column];
      return value === undefined ? new ErrorValue("#N/A") : value;
    }),
  );
}
