/** A rectangle of cells; rows and columns start at 0, ends included. */
export interface Area {
  readonly top: number;
  readonly left: number;
  readonly bottom: number;
  readonly right: number;
}

/** Letters of a column: 0 is A, 26 is AA. */
export function columnLetters(column: number): string {
  return column < 26 ? String.fromCharCode(65 + column) : `${columnLetters(Math.floor(column / 26) - 1)}${columnLetters(column % 26)}`;
}

/** "A1:D60", or "B4" for one cell. */
export function areaAddress({ top, left, bottom, right }: Area): string {
  const first = `${columnLetters(left)}${top + 1}`;
  return top === bottom && left === right ? first : `${first}:${columnLetters(right)}${bottom + 1}`;
}

/**
 * The rectangle of an address of a plan.
 *
 * @param address  such as "A1:D60" or "B4", without sheet name and dollar signs
 * @throws {Error} anything else: plans are made by the program, so this is a fault of the program
 */
export function areaOf(address: string): Area {
  const match = /^([A-Z]{1,3})(\d{1,7})(?::([A-Z]{1,3})(\d{1,7}))?$/.exec(address);
  if (match === null) throw new Error(`${address} is not an address of a plan`);
  const [, first, top, last = first, bottom = top] = match as unknown as [string, string, string, string?, string?];
  return { top: Number(top) - 1, left: columnIndex(first), bottom: Number(bottom) - 1, right: columnIndex(last) };
}

function columnIndex(word: string): number {
  return [...word].reduce((sum, letter) => 26 * sum + letter.charCodeAt(0) - 64, 0) - 1;
}
