import {
  ArrayValueObject, BaseFunction, BooleanValueObject, ErrorType, ErrorValueObject, FunctionType, NumberValueObject, StringValueObject,
  type BaseValueObject, type IFunctionInfo,
} from "@univerjs/engine-formula";
import { callFunction, FUNCTIONS } from "../functions/registry.js";
import { SheetError } from "../functions/sheet-error.js";
import type { CellReasons } from "./cell-reasons.js";

/** What the metadata file says of a function; the part of it that the grid shows. */
export interface FunctionMetadata {
  readonly id: string;
  readonly description?: string;
  readonly parameters: readonly { readonly name: string; readonly description?: string; readonly optional?: boolean; readonly repeating?: boolean }[];
}

type FunctionClass = new (name: string) => BaseFunction;

/**
 * The cell functions as the grid's formula engine takes them at its start: the same bodies that Excel calls, each with its
 * failures turned into an error value and a kept sentence.
 *
 * @param reasons  where the sentences go
 * @returns        class and name, "PROBE.TOTALCOST", for each function
 */
export function gridFunctions(reasons: CellReasons): [FunctionClass, string][] {
  return [...FUNCTIONS.keys()].map((id) => [functionClass(id, reasons), `PROBE.${id}`]);
}

/** What the grid says of each function while a formula is typed, out of the metadata that Excel gets. */
export function functionDescriptions(metadata: readonly FunctionMetadata[]): IFunctionInfo[] {
  return metadata.map(({ id, description, parameters }) => ({
    functionName: `PROBE.${id}`,
    functionType: FunctionType.User,
    description: description ?? "",
    abstract: description ?? "",
    functionParameter: parameters.map((parameter) => ({
      name: parameter.name,
      detail: parameter.description ?? "",
      example: "",
      require: parameter.optional === true ? 0 : 1,
      repeat: parameter.repeating === true ? 1 : 0,
    })),
  }));
}

function functionClass(id: string, reasons: CellReasons): FunctionClass {
  return class extends BaseFunction {
    override calculate(...variants: BaseValueObject[]): BaseValueObject {
      const { subUnitId, row, column } = this;
      reasons.calculating(subUnitId ?? "", row, column);
      try {
        return toGrid(callFunction(id, variants.map(fromGrid)));
      } catch (failure) {
        // a throw would leave every cell of the workbook empty
        reasons.add(subUnitId ?? "", row, column, failure instanceof Error ? failure.message : String(failure));
        return ErrorValueObject.create(failure instanceof SheetError && failure.code === "#N/A" ? ErrorType.NA : ErrorType.VALUE);
      }
    }
  };
}

// the engine hands the same range object to every formula of one calculation, so 500 cells read the site block once
const rowsOfRange = new WeakMap<ArrayValueObject, unknown[][]>();

function fromGrid(variant: BaseValueObject): unknown {
  if (!variant.isArray()) return scalar(variant);
  const range = variant as ArrayValueObject;
  let rows = rowsOfRange.get(range);
  if (rows === undefined) {
    rows = range.getArrayValue().map((row) => row.map((value) => scalar(value)));
    rowsOfRange.set(range, rows);
  }
  return rows;
}

function scalar(value: BaseValueObject | null | undefined | void): unknown {
  return value === null || value === undefined || value.isNull() ? null : value.getValue();
}

function toGrid(result: unknown): BaseValueObject {
  if (!Array.isArray(result)) return valueObject(result);
  const rows = result as unknown[][];
  return ArrayValueObject.create({
    calculateValueList: rows.map((row) => row.map(valueObject)),
    rowCount: rows.length,
    columnCount: rows[0]?.length ?? 0,
    unitId: "",
    sheetId: "",
    row: -1,
    column: -1,
  });
}

function valueObject(value: unknown): BaseValueObject {
  if (typeof value === "number") return NumberValueObject.create(value);
  if (typeof value === "boolean") return BooleanValueObject.create(value);
  return StringValueObject.create(String(value ?? ""));
}
