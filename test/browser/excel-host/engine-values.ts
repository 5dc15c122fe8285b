import {
  ArrayValueObject, BooleanValueObject, ErrorType, ErrorValueObject, NumberValueObject, StringValueObject, type BaseValueObject,
} from "@univerjs/engine-formula";
import { ErrorValue, type CellValue } from "../../../src/formula/cell-value.js";
import type { Given } from "./function-arguments.js";

/** An argument as the formula engine hands it over: a range as rows, an omitted one as undefined. */
export function fromEngine(variant: BaseValueObject | null | undefined): Given {
  if (variant === null || variant === undefined || (!variant.isArray() && variant.isNull())) return undefined;
  if (!variant.isArray()) return cellFrom(variant);
  return (variant as ArrayValueObject).getArrayValue().map((row) => row.map(cellFrom));
}

/** The result of a function for the formula engine. */
export function toEngine(values: readonly (readonly CellValue[])[]): BaseValueObject {
  const first = values[0]?.[0];
  if (values.length === 1 && values[0]?.length === 1) return cellTo(first ?? null);
  return ArrayValueObject.create({
    calculateValueList: values.map((row) => row.map(cellTo)),
    rowCount: values.length,
    columnCount: values[0]?.length ?? 0,
    unitId: "",
    sheetId: "",
    row: -1,
    column: -1,
  });
}

function cellFrom(value: BaseValueObject | null | undefined | void): CellValue {
  if (value === null || value === undefined || value.isNull()) return null;
  return value.isError() ? new ErrorValue(String(value.getValue())) : value.getValue();
}

function cellTo(value: CellValue): BaseValueObject {
  if (value instanceof ErrorValue) return ErrorValueObject.create(Object.values(ErrorType).find((each) => each === value.code) ?? ErrorType.VALUE);
  if (typeof value === "number") return NumberValueObject.create(value);
  if (typeof value === "boolean") return BooleanValueObject.create(value);
  return StringValueObject.create(value ?? "");
}
