/**
 * Why a cell shows an error, in the sentences that its functions gave. The grid's own error values carry no text, so the
 * sentences are kept beside it, cell by cell.
 */
export class CellReasons {
  private run = 0;
  private readonly kept = new Map<string, { run: number; sentences: string[] }>();

  /** Says that a new calculation begins: what a cell said in an earlier one is dropped when the cell is calculated again. */
  startRun(): void {
    this.run++;
  }

  /** Says that a function in this cell is being calculated; a cell may hold several functions. */
  calculating(sheet: string, row: number, column: number): void {
    const key = cellKey(sheet, row, column);
    const entry = this.kept.get(key);
    if (entry !== undefined && entry.run !== this.run) this.kept.delete(key);
  }

  /** Keeps a sentence for this cell. */
  add(sheet: string, row: number, column: number, sentence: string): void {
    const key = cellKey(sheet, row, column);
    const entry = this.kept.get(key);
    if (entry === undefined) this.kept.set(key, { run: this.run, sentences: [sentence] });
    else if (!entry.sentences.includes(sentence)) entry.sentences.push(sentence);
  }

  /** @returns the sentences of this cell, in the order of its functions; empty where no function of it failed */
  at(sheet: string, row: number, column: number): readonly string[] {
    return this.kept.get(cellKey(sheet, row, column))?.sentences ?? [];
  }
}

function cellKey(sheet: string, row: number, column: number): string {
  return `${sheet}:${row}:${column}`;
}
