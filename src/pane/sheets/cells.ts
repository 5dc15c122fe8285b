import type { PlannedCell } from "../../host/workbook.js";

/** Contents of a cell without its place. */
export type Content = Omit<PlannedCell, "row" | "column">;

/** Puts contents side by side into a row; undefined leaves a cell alone. */
export function rowOf(row: number, contents: readonly (Content | undefined)[]): PlannedCell[] {
  return contents.flatMap((content, column) => (content === undefined ? [] : [{ row, column, ...content }]));
}

/**
 * Breaks a paragraph into lines that stand in cells one under the other: a sheet that is printed must not depend on how each
 * program wraps a cell.
 *
 * @param text  words
 * @param most  characters in a line, > 0
 */
export function inLines(text: string, most: number): string[] {
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(" ")) {
    if (line !== "" && line.length + 1 + word.length > most) {
      lines.push(line);
      line = word;
    } else line = line === "" ? word : `${line} ${word}`;
  }
  return line === "" ? lines : [...lines, line];
}
