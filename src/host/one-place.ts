/**
 * Whether a name's meaning is one place. Several areas are joined by commas; those in brackets, as of OFFSET, and in the name of a
 * sheet join nothing.
 *
 * @param formula  what the name stands for, with its "="
 */
export function isOnePlace(formula: string): boolean {
  const bare = formula.replace(/'(?:[^']|'')*'|"(?:[^"]|"")*"/g, "");
  let depth = 0;
  for (const sign of bare) {
    if (sign === "(") depth++;
    else if (sign === ")") depth--;
    else if (sign === "," && depth === 0) return false;
  }
  return !bare.includes("#REF!");
}
