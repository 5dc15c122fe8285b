import { BaseFunction, type BaseValueObject } from "@univerjs/engine-formula";
import { cellAddress } from "../../../src/formula/addresses.js";
import type { CellReasons } from "../../../src/practice/cell-reasons.js";
import type { CustomFunctions } from "./custom-functions.js";
import { fromEngine, toEngine } from "./engine-values.js";
import { quotedSheet } from "./kinds/places.js";
import { placeKey } from "./model/sheet-model.js";
import type { WorkbookModel } from "./model/workbook-model.js";

type FunctionClass = new (name: string) => BaseFunction;

/**
 * The page's cell functions as the formula engine takes them.
 *
 * @param namespace  under which they are registered
 */
export function pageFunctions(book: WorkbookModel, functions: CustomFunctions, namespace: string): (reasons: CellReasons) => [FunctionClass, string][] {
  // the engine knows our functions under one namespace, whichever build they came with
  const known = namespace === "PROBEDEV" ? "PROBE" : namespace;
  return (reasons) => (functions.metadata?.functions ?? []).map(({ id, name }) => [functionClass(id, book, functions, reasons), `${known}.${name.toUpperCase()}`]);
}

function functionClass(id: string, book: WorkbookModel, functions: CustomFunctions, reasons: CellReasons): FunctionClass {
  return class extends BaseFunction {
    override calculate(...variants: BaseValueObject[]): BaseValueObject {
      const sheet = book.sheets[Number(this.subUnitId)]!;
      reasons.calculating(this.subUnitId ?? "", this.row, this.column);
      const result = functions.value(id, variants.map(fromEngine), placeKey(sheet, this.row, this.column), `${quotedSheet(sheet.name)}!${cellAddress(this.row, this.column)}`);
      if (result.message !== undefined) reasons.add(this.subUnitId ?? "", this.row, this.column, result.message);
      return toEngine(result.values);
    }
  };
}
