import type { FunctionParameter } from "../../../src/build/metadata.js";
import { ErrorValue, type CellValue } from "../../../src/formula/cell-value.js";

/** One argument of a formula: rows of cells for a range, a value for a single one, undefined where it was left out. */
export type Given = readonly (readonly CellValue[])[] | CellValue | undefined;

/** How a blank cell reaches a function: 0 on the desktop, null as the web has done. */
export type Blanks = 0 | null;

/** Arguments as they go over the wire. */
export interface Prepared {
  readonly values: unknown[];
  readonly takesErrors: boolean;
}

/**
 * Makes the arguments of a call out of those of a formula, by the function's metadata.
 *
 * @returns  an error value where Excel does not call the function at all; a sentence where this model does not know what
 *           Excel does
 */
export function prepared(parameters: readonly FunctionParameter[], given: readonly Given[], blanks: Blanks, allowsErrors: boolean): Prepared | ErrorValue | string {
  const last = parameters.at(-1);
  const single = last?.repeating === true ? parameters.slice(0, -1) : parameters;
  if (given.length > single.length && last?.repeating !== true) return "too many arguments; Excel does not accept the formula.";
  const values: unknown[] = [];
  for (const [index, parameter] of single.entries()) {
    if (given[index] === undefined && parameter.optional !== true && index >= given.length) return `the argument ${parameter.name} is missing; Excel does not accept the formula.`;
    values.push(one(parameter, given[index], blanks));
  }
  if (last?.repeating === true) {
    const rest = given.slice(single.length);
    // an omitted repeating argument arrives as null like any other
    values.push(rest.length === 0 ? null : rest.map((each) => one({ ...last, dimensionality: last.dimensionality === "matrix" ? "matrix" : "scalar" }, each, blanks)));
  }
  const trouble = values.flat(3).find((each) => each instanceof Lifted);
  if (trouble !== undefined) return "a range stands where one cell is wanted; Excel would call the function for each of its cells.";
  const error = values.flat(3).find((each) => each instanceof ErrorValue);
  if (error instanceof ErrorValue && !(allowsErrors && parameters.every(({ type }) => type === undefined || type === "any"))) return error;
  return { values: values.map(onWire), takesErrors: error !== undefined };
}

/** Stands for a range where one cell is wanted. */
class Lifted {}

function one({ type, dimensionality }: FunctionParameter, given: Given, blanks: Blanks): unknown {
  if (given === undefined) return null;
  if (dimensionality === "matrix") return rowsOf(given).map((row) => row.map((cell) => typed(type, cell, blanks)));
  if (!isRows(given)) return typed(type, given, blanks);
  return given.length === 1 && given[0]?.length === 1 ? typed(type, given[0][0] ?? null, blanks) : new Lifted();
}

function rowsOf(given: NonNullable<Given> | null): readonly (readonly CellValue[])[] {
  return isRows(given) ? given : [[given]];
}

function isRows(given: Given): given is readonly (readonly CellValue[])[] {
  return Array.isArray(given);
}

function typed(type: string | undefined, cell: CellValue, blanks: Blanks): unknown {
  if (cell instanceof ErrorValue) return cell;
  if (cell === null) return type === "string" ? "" : type === "boolean" ? false : type === "number" ? 0 : blanks;
  if (type === undefined || type === "any") return cell;
  if (type === "string") return typeof cell === "boolean" ? String(cell).toUpperCase() : String(cell);
  if (type === "boolean") return typeof cell === "string" ? new ErrorValue("#VALUE!") : Boolean(cell);
  const number = typeof cell === "boolean" ? Number(cell) : typeof cell === "number" ? cell : cell.trim() === "" ? NaN : Number(cell);
  return Number.isFinite(number) ? number : new ErrorValue("#VALUE!");
}

/** The runtime turns these objects into its own error class. */
function onWire(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(onWire);
  return value instanceof ErrorValue ? { type: "CustomFunctionError", code: value.code } : value;
}
