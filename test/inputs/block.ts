import { expect } from "vitest";
import { checkSite, InputError, parseSite } from "../../src/inputs/index.js";

export type Row = readonly (string | number | boolean | null | object)[];

/**
 * A small site block of our own, with only what is required, the grid of which is worked out by hand in the tests.
 * 2 x 3 piles at 5 m and 4 m.
 */
export const SMALL: readonly Row[] = [
  ["Ground", "", "", ""], // 1
  ["Mean stiffness", 8, "MPa", "drained"],
  ["Stiffness COV", 0.6, "", ""],
  ["Horizontal scale", 20, "m", ""],
  ["Vertical scale", 2, "m", ""], // 5
  ["", "", "", ""],
  ["Building", "", "", ""],
  ["Piles along x", 2, "", ""],
  ["Piles along y", 3, "", ""],
  ["Spacing along x", 5, "m", ""], // 10
  ["Spacing along y", 4, "m", ""],
  ["Interior load", 1000, "kN", ""],
  ["Building value", 2000000, "EUR", ""],
  ["Allowable settlement", 25, "mm", ""],
  ["Piles", "", "", ""], // 15
  ["Pile diameter", 0.5, "m", ""],
  ["Shortest length", 3, "m", ""],
  ["Longest length", 25, "m", ""],
  ["Investigation", "", "", ""],
  ["Hole depth", 15.5, "m", ""], // 20
  ["Prices", "", "", ""],
  ["Price per hole", 1500, "EUR", ""],
  ["Price per metre of hole", 120, "EUR/m", ""],
  ["Price per metre of pile", 300, "EUR/m", ""], // 24
];

/** The block with other cells in one row, from the label on: `put(SMALL, "Stiffness COV", -1, "%")`. */
export function put(rows: readonly Row[], label: string, ...cells: Row): Row[] {
  expect(rows.some(([first]) => first === label)).toBe(true);
  return rows.map((row) => (row[0] === label ? [label, ...cells, ...row.slice(1 + cells.length)] : row));
}

/** The block without the rows of these labels. */
export function without(rows: readonly Row[], ...labels: string[]): Row[] {
  for (const label of labels) expect(rows.some(([first]) => first === label)).toBe(true);
  return rows.filter(([first]) => !labels.includes(String(first)));
}

/** The block with rows added below it, each filled up to four cells. */
export function add(rows: readonly Row[], ...more: Row[]): Row[] {
  return [...rows, ...more.map((row) => [...row, "", "", "", ""].slice(0, 4))];
}

/** The grid of the small block taken out, so that a pile list can take its place. */
export function withoutGrid(rows: readonly Row[]): Row[] {
  return without(rows, "Piles along x", "Piles along y", "Spacing along x", "Spacing along y", "Interior load");
}

/** The sentence with which a block is refused; the check rows must say the very same. */
export function refusalOf(rows: unknown, pairs?: readonly unknown[]): string {
  let sentence: string | undefined;
  try {
    parseSite(rows as Row[], pairs);
  } catch (error) {
    expect(error).toBeInstanceOf(InputError);
    sentence = (error as InputError).message;
  }
  expect(sentence, "the block was not refused").toBeDefined();
  const check = checkSite(rows as Row[], pairs);
  expect(check.filter(({ ok }) => !ok).map(({ verdict }) => verdict)).toContain(`refused: ${sentence}`);
  expect(check.every(({ ok, verdict }) => ok === !verdict.startsWith("refused: "))).toBe(true);
  return sentence!;
}

/** The check row of an input. */
export function checkOf(rows: readonly Row[], label: string, pairs?: readonly unknown[]) {
  return checkSite(rows, pairs).find((row) => row.label === label)!;
}
