import { sha256 } from "./sha-256.js";

const DIGITS = 16;

/**
 * A short name of inputs: equal for equal inputs whatever the order of their properties, another for any other.
 *
 * @param inputs  plain data
 * @returns       16 hexadecimal digits
 */
export function inputsHash(inputs: unknown): string {
  return sha256(new TextEncoder().encode(canonical(inputs))).slice(0, DIGITS);
}

function canonical(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonical).join(",")}]`;
  if (value === null || typeof value !== "object") return JSON.stringify(value) ?? "null";
  const entries = Object.entries(value).filter(([, held]) => held !== undefined);
  return `{${entries.sort(([a], [b]) => (a < b ? -1 : 1)).map(([name, held]) => `${JSON.stringify(name)}:${canonical(held)}`).join(",")}}`;
}
