import { joinWords, sentenceCase, shorten } from "./numbers.js";

/** The part of a check row that the pane needs. */
export interface CheckLike {
  readonly label: string;
  readonly value: string | number;
  readonly unit: string;
  readonly verdict: string;
  readonly ok: boolean;
}

/** One line of a group of checks, ready to be shown. */
export interface CheckLine {
  readonly label: string;
  /** value and unit as one text; "" where there is none */
  readonly value: string;
  /** why it is refused (a sentence that may begin with the label), or how an accepted value came about; "" where it is simply used */
  readonly verdict: string;
  readonly ok: boolean;
}

/** The checks of one section of the site block. */
export interface CheckGroup {
  readonly section: string;
  readonly lines: readonly CheckLine[];
  readonly refused: number;
}

/** Name of the group for rows whose label the catalogue does not know. */
export const UNPLACED = "Not recognised";

/**
 * Sorts the check rows into the sections of the catalogue.
 *
 * @param rows       the check rows
 * @param sectionOf  section of a label, undefined for a label that the catalogue does not know
 * @param write      writes a number
 * @returns          sections in the order of their first row, unplaced rows first, refused lines first in each
 */
export function groupChecks(rows: readonly CheckLike[], sectionOf: (label: string) => string | undefined, write: (value: number) => string): CheckGroup[] {
  const groups = new Map<string, CheckLine[]>();
  for (const row of rows) {
    const section = sectionOf(row.label) ?? UNPLACED;
    const value = typeof row.value === "number" ? write(row.value) : shorten(row.value, 60);
    const line = { label: shorten(row.label, 60), value: [value, unitOf(row)].filter((text) => text !== "").join("\u00a0"), verdict: reason(row), ok: row.ok };
    const lines = groups.get(section);
    if (lines === undefined) groups.set(section, [line]);
    else lines.push(line);
  }
  const sorted = [...groups].map(([section, lines]) => ({
    section,
    lines: [...lines.filter((line) => !line.ok), ...lines.filter((line) => line.ok)],
    refused: lines.filter((line) => !line.ok).length,
  }));
  return [...sorted.filter((group) => group.section === UNPLACED), ...sorted.filter((group) => group.section !== UNPLACED)];
}

/**
 * The state of the whole block in one sentence.
 *
 * @param rows  the check rows
 * @returns     the sentence
 */
export function summariseChecks(rows: readonly CheckLike[]): string {
  const refused = rows.filter((row) => !row.ok);
  if (rows.length === 0) return "These cells hold no inputs that can be read.";
  if (refused.length === 0) return rows.length === 1 ? "The one input can be used." : `All ${rows.length} inputs can be used.`;
  if (refused.length === 1) return `One of ${rows.length} inputs cannot be used: ${shorten(refused[0]!.label, 60)}.`;
  const named = refused.slice(0, 3).map((row) => shorten(row.label, 40));
  const rest = refused.length - named.length;
  return `${refused.length} of ${rows.length} inputs cannot be used: ${joinWords(rest > 0 ? [...named, `${rest} more`] : named)}.`;
}

/** A word such as "none" or "automatic" has no unit, whatever stands in the unit column. */
function unitOf(row: CheckLike): string {
  return typeof row.value === "string" && !/\d/.test(row.value) ? "" : row.unit;
}

/** The mark beside the line already says refused or used, so the words need not. */
function reason(row: CheckLike): string {
  const words = shorten(row.verdict, 400);
  if (row.ok) return words === "used" ? "" : words;
  return sentenceCase(words.replace(/^refused: */, ""));
}
