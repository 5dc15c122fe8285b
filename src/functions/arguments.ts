import { amount, found, isEmpty, isError, looksLikeNumber, plainCell, type Cell } from "../inputs/cells.js";
import { InputError } from "../inputs/index.js";

/** What a numeric argument accepts. */
export interface Accepted {
  /** in words, complete after "it must be": "a length above 0 m" */
  readonly words: string;
  readonly holds: (value: number) => boolean;
}

/**
 * One value out of an argument that may arrive bare, as [[v]] from a single cell, or omitted.
 *
 * @param value  the argument as the host hands it over
 * @param name   the argument in the person's words
 * @returns      the value; null for an omitted argument or a blank cell (as far as the host lets us tell: desktop Excel sends 0)
 * @throws {InputError} for a range of several cells or an error value
 */
export function oneCell(value: unknown, name: string): Cell {
  let inner = value;
  while (Array.isArray(inner)) {
    if (inner.length > 1) throw new InputError(`${name} is a range of several cells; one cell or one value is accepted.`);
    inner = inner[0];
  }
  const cell = plainCell(inner);
  if (isError(cell)) throw new InputError(`${name} holds the error ${String(cell).trim()}; clear that error first.`);
  return isEmpty(cell) ? null : cell;
}

/**
 * A number out of an argument.
 *
 * @param value     the argument as the host hands it over
 * @param name      the argument in the person's words
 * @param accepted  its range
 * @throws {InputError} for a blank, a text, a truth value, an error or a number out of range
 */
export function numberFrom(value: unknown, name: string, accepted: Accepted): number {
  const number = optionalNumberFrom(value, name, accepted);
  if (number === undefined) throw new InputError(`${name} is blank; it must be ${accepted.words}.`);
  return number;
}

/** As numberFrom, with undefined for an omitted argument or a blank cell. */
export function optionalNumberFrom(value: unknown, name: string, accepted: Accepted): number | undefined {
  const cell = oneCell(value, name);
  if (cell === null) return undefined;
  if (typeof cell === "string") {
    throw new InputError(`${name} is ${found(cell)}, which is ${looksLikeNumber(cell) ? "a number stored as text" : "text"}; it must be ${accepted.words}.`);
  }
  if (typeof cell === "boolean") throw new InputError(`${name} is ${found(cell)}; it must be ${accepted.words}.`);
  if (!accepted.holds(cell)) throw new InputError(`${name} is ${amount(cell)}; it must be ${accepted.words}.`);
  return cell;
}

/** A number above 0 of the given kind and unit. */
export function above0(kind: string, unit: string): Accepted {
  return { words: `a ${kind} above 0 ${unit}`, holds: (value) => value > 0 };
}

/** A percentile, 0 and 100 excluded because a lognormal ground has no smallest or largest value. */
export const PERCENTILE: Accepted = { words: "a percentile above 0 and below 100", holds: (value) => value > 0 && value < 100 };
