import { invalidArgument } from "../host-error.js";

/** What a property takes: a kind of value, or one word of a list. */
export type Wanted = "text" | "number" | "boolean" | "colour" | readonly string[];

/**
 * The value as Excel keeps it.
 *
 * @throws {HostError} for a value that the property does not take
 */
export function checked(member: string, wanted: Wanted, value: unknown): unknown {
  if (typeof wanted !== "string") {
    const word = wanted.find((each) => typeof value === "string" && each.toLowerCase() === value.toLowerCase());
    if (word === undefined) throw wrong(member, value);
    return word;
  }
  if (wanted === "colour") {
    if (typeof value !== "string" || !/^#[0-9a-f]{6}$|^[a-z]+$/i.test(value)) throw wrong(member, value);
    return value.startsWith("#") ? value.toUpperCase() : value;
  }
  const type = wanted === "text" ? "string" : wanted;
  if (typeof value !== type || (type === "number" && !Number.isFinite(value))) throw wrong(member, value);
  return value;
}

function wrong(member: string, value: unknown): Error {
  return invalidArgument(`${member} does not take ${JSON.stringify(value)}`);
}
