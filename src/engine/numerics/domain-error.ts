/** A formula's argument is out of its range. Anything else that the engine throws is a bug. */
export class DomainError extends Error {
  override readonly name = "DomainError";
}

/**
 * Refuses an argument out of range at the door of an exported function.
 *
 * @param holds  whether the argument is in range
 * @param name   the argument, in the trade's words
 * @param value  what was found
 * @param accepted  what is accepted, in words ("above 0 m"), optional
 * @throws {DomainError} when it does not hold
 */
export function requireDomain(holds: boolean, name: string, value: unknown, accepted?: string): asserts holds {
  if (!holds) throw new DomainError(`${name} is ${String(value)}${accepted === undefined ? ", which is out of range" : `; it must be ${accepted}`}.`);
}
