import type { FormulaCell } from "./sheet-state.js";
import type { Place } from "./table-references.js";

/** A formula that is being calculated. */
export interface Frame {
  readonly place: Place;
  /** undefined for a formula that stands in no cell */
  readonly entry: FormulaCell | undefined;
  /** calculated only because its table might fill a blank cell that was read */
  readonly isGuess: boolean;
  /** of each error value the first that it read: where it began, and why */
  readonly readErrors: Map<string, { readonly source: string; readonly reason: string }>;
  /** it reads its own value in a workbook that iterates */
  iterates: boolean;
  readonly wrongGuesses: FormulaCell[];
  cellsRead: number;
}

/** The cell must be calculated before the formulas that are open, which lie too deep within each other. */
export class CellFirst extends Error {
  constructor(readonly place: Place) {
    super();
  }
}

/** A guess led into a circle, which is none: the table does not reach the cell that was read. */
export class WrongGuess extends Error {}

// one formula within another takes some thirty calls of the ten thousand that the stack holds
const DEEPEST = 60;

/** The formulas that are open: each was asked for by the one before it. */
export class Frames {
  private readonly open: Frame[] = [];

  get top(): Frame | undefined {
    return this.open[this.open.length - 1];
  }

  /** Does the work with one formula more open. */
  within<T>(place: Place, entry: FormulaCell | undefined, isGuess: boolean, work: () => T): T {
    this.open.push({ place, entry, isGuess, readErrors: new Map(), iterates: false, wrongGuesses: [], cellsRead: 0 });
    try {
      return work();
    } finally {
      for (const guess of this.open.pop()?.wrongGuesses ?? []) guess.wrongGuesses--;
    }
  }

  /** @throws where one more formula would lie too deep: a guess is given up, a cell that is needed is calculated first */
  refuseTooDeep(place: Place): void {
    if (this.open.length >= DEEPEST) throw this.open.some(({ isGuess }) => isGuess) ? new WrongGuess() : new CellFirst(place);
  }

  /** The open formulas from this one on; all of them where it waits for a cell that is calculated first. */
  since(entry: FormulaCell): readonly Frame[] {
    const from = this.open.findIndex((frame) => frame.entry === entry);
    return from < 0 ? this.open : this.open.slice(from);
  }
}
