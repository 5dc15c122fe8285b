import type { Digits } from "./engine-digits.js";

/** Which entries are not the same to the last digit, and how many numbers of each. */
export function differing(one: Digits["ours"], other: Digits["ours"]): Record<string, number> {
  const counts = Object.entries(one).map(([name, values]) => [name, values.filter((value, k) => !Object.is(value, other[name]?.[k])).length] as const);
  return Object.fromEntries(counts.filter(([, count]) => count > 0));
}
