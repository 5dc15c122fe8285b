import type { Area } from "../../../../src/formula/addresses.js";
import type { SheetModel } from "./sheet-model.js";

/** A table: a range with named columns. */
export interface TableModel {
  readonly id: string;
  name: string;
  readonly sheet: SheetModel;
  readonly area: Area;
  readonly hasHeaders: boolean;
  style: string;
}
