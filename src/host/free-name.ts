/** The longest name of a sheet. */
const LONGEST_SHEET_NAME = 31;

/**
 * A name for a new sheet: the wanted one, or "Name (2)", "Name (3)" ... where that is taken in any case.
 *
 * @param wanted  a name that a sheet may bear
 * @param taken   names of all sheets, hidden ones too
 */
export function freeSheetName(wanted: string, taken: readonly string[]): string {
  return free(wanted, taken, (n) => {
    const ending = ` (${n})`;
    return `${wanted.slice(0, LONGEST_SHEET_NAME - ending.length).trimEnd()}${ending}`;
  });
}

/** A defined name: the wanted one, or "Name2", "Name3" ... where that is taken in any case. */
export function freeDefinedName(wanted: string, taken: readonly string[]): string {
  return free(wanted, taken, (n) => `${wanted}${n}`);
}

function free(wanted: string, taken: readonly string[], next: (n: number) => string): string {
  const known = new Set(taken.map((name) => name.toLowerCase()));
  let candidate = wanted;
  for (let n = 2; known.has(candidate.toLowerCase()); n++) candidate = next(n);
  return candidate;
}
