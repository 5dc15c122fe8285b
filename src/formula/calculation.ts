import type { BaseFunction } from "@univerjs/engine-formula";
import { CellReasons } from "../practice/cell-reasons.js";
import { areaAddress, cellAddress, COLUMNS, readReference, ROWS, type Area } from "./addresses.js";
import type { Book } from "./book.js";
import { CIRCULAR, errorInWords, ErrorValue, type CellValue } from "./cell-value.js";
import { FormulaEngine } from "./formula-engine.js";
import { CellFirst, Frames, WrongGuess } from "./frames.js";
import { plainFormula } from "./plain-formula.js";
import { SheetState, type FormulaCell, type Outcome } from "./sheet-state.js";
import { filledInto } from "./spills.js";
import type { Surroundings } from "./surroundings.js";
import type { Place } from "./table-references.js";
import { UnsupportedFormula } from "./unsupported.js";

const MOST_READ = 2_000_000;
/** The error values that our functions give, each with a sentence. */
const OURS: ReadonlySet<string> = new Set(["#VALUE!", "#N/A"]);
/** A formula that stands in no cell counts as standing beyond all of them. */
const NOWHERE = { row: ROWS - 1, column: COLUMNS - 1 };

/** Calculates the formulas of one workbook, each when its value is first asked for. */
export class Calculation {
  private readonly sheets: readonly SheetState[];
  private readonly engine: FormulaEngine;
  private readonly reasons = new CellReasons();
  private readonly around: Surroundings;
  private readonly frames = new Frames();
  private waiting: Place[] = [];

  /**
   * @param book       the workbook
   * @param functions  makes the functions besides the ordinary ones; they leave their reasons where they are told
   */
  constructor(
    private readonly book: Book,
    functions: (reasons: CellReasons) => readonly [new (name: string) => BaseFunction, string][],
  ) {
    this.sheets = book.sheets.map((sheet) => new SheetState(sheet));
    this.engine = new FormulaEngine(book, (sheet, row, column) => this.read({ sheet, row, column }), functions(this.reasons));
    this.around = { book, functions: this.engine.functions, used: () => this.used(), spillOf: (place) => this.spillOf(place) };
  }

  /**
   * Calculates a formula that stands in no cell.
   *
   * @param formula  with or without "="
   * @param sheet    index of the sheet on which it counts as standing
   */
  formula(formula: string, sheet: number): Outcome {
    const place = { sheet, ...NOWHERE };
    this.reasons.startRun();
    return this.inTurn(() => this.frames.within(place, undefined, false, () => this.calculate(formula.replace(/^\s*=/, ""), place, false)));
  }

  /**
   * Calculates the formula of a cell.
   *
   * @returns undefined for a cell without a formula
   */
  cell(place: Place): Outcome | undefined {
    const entry = this.sheets[place.sheet]?.formulaAt(place.row, place.column);
    return entry === undefined ? undefined : this.inTurn(() => entry.outcome ?? this.open(entry, place, false));
  }

  /** Where the table of this cell's formula went; undefined without one. */
  spillOf(place: Place): Area | undefined {
    this.read(place);
    return this.sheets[place.sheet]?.spillFrom(place.row, place.column);
  }

  dispose(): void {
    this.engine.dispose();
  }

  /** Does the work, after the cells that it needs first. */
  private inTurn<T>(work: () => T): T {
    this.waiting = [];
    for (;;) {
      const first = this.waiting[this.waiting.length - 1];
      try {
        if (first === undefined) return work();
        const entry = this.sheets[first.sheet]?.formulaAt(first.row, first.column);
        if (entry !== undefined) entry.isOpen = false;
        if (entry !== undefined && entry.outcome === undefined) this.open(entry, first, false);
        this.waiting.pop();
      } catch (reason) {
        if (!(reason instanceof CellFirst)) throw reason;
        this.waiting.push(reason.place);
        for (const { sheet, row, column } of this.waiting) {
          const entry = this.sheets[sheet]?.formulaAt(row, column);
          if (entry !== undefined) entry.isOpen = true;
        }
      }
    }
  }

  /** The value of a cell for a formula that reads it. */
  private read(place: Place): CellValue {
    const { sheet, row, column } = place;
    const state = this.sheets[sheet];
    const frame = this.frames.top;
    if (frame !== undefined && ++frame.cellsRead > MOST_READ) throw new UnsupportedFormula(`The formula reads more than ${MOST_READ} cells, which the formula line does not do.`, "#NUM!");
    if (state === undefined) return new ErrorValue("#REF!");
    const entry = state.formulaAt(row, column);
    let value = entry === undefined ? state.valueAt(row, column) : this.valueOf(entry, place);
    if (value === undefined && this.guessSpills(state, sheet, row, column)) value = state.valueAt(row, column);
    if (value instanceof ErrorValue && frame?.readErrors.has(value.code) === false) frame.readErrors.set(value.code, this.whyReadError(place, value.code, entry?.outcome));
    return value ?? null;
  }

  private valueOf(entry: FormulaCell, place: Place): CellValue {
    if (entry.isOpen) return this.circle(entry, place);
    return (entry.outcome ?? this.open(entry, place, false)).values[0]?.[0] ?? 0;
  }

  /** Calculates a cell's formula and places its table. */
  private open(entry: FormulaCell, place: Place, isGuess: boolean): Outcome {
    this.frames.refuseTooDeep(place);
    entry.isOpen = true;
    try {
      return this.frames.within(place, entry, isGuess, () => {
        const { placement } = entry.cell;
        const outcome = this.placed(entry, place, this.calculate(entry.formula, place, placement === undefined || placement.kind === "single"));
        entry.outcome = outcome;
        return outcome;
      });
    } finally {
      entry.isOpen = false;
    }
  }

  private calculate(formula: string, place: Place, isSingle: boolean): Outcome {
    const frame = this.frames.top;
    try {
      const { text, isChanging } = plainFormula(formula, place, isSingle, this.around);
      const values = this.engine.calculate(text, place);
      if (values === undefined) throw new UnsupportedFormula("The formula cannot be read.", "#NAME?", false);
      if (frame?.iterates === true) throw new UnsupportedFormula("The formula reads its own value and the workbook iterates, which the formula line does not.", CIRCULAR);
      const isTable = values.length > 1 || (values[0]?.length ?? 0) > 1;
      // a blank cell shows as 0 in a sheet; a printed table keeps it apart from a zero
      const blank = frame?.entry === undefined && isTable ? null : 0;
      const shown = (isSingle ? [[values[0]?.[0] ?? null]] : values).map((row) => row.map((value) => value ?? blank));
      return { values: shown, isKept: false, isChanging, ...this.whyError(shown, place, text) };
    } catch (reason) {
      if (reason instanceof CellFirst || reason instanceof WrongGuess) throw reason;
      // whatever else the engine's five hundred functions throw must not take the other cells with it
      const why = reason instanceof UnsupportedFormula ? reason : new UnsupportedFormula(`The formula engine failed on the formula: ${reason instanceof Error ? reason.message : String(reason)}.`, "#VALUE!");
      const cell = frame?.entry?.cell;
      const stored = cell?.placement !== undefined && cell.placement.kind !== "single" ? cell.placement.stored : cell === undefined || cell.value === null ? undefined : [[cell.value]];
      const isKept = why.keepStored && stored !== undefined;
      return { values: isKept ? stored : [[new ErrorValue(why.code)]], reason: why.message, isKept, isChanging: false };
    }
  }

  private whyError(values: readonly (readonly CellValue[])[], place: Place, plain: string): { reason?: string; source?: string } {
    const error = values.flat().find((value) => value instanceof ErrorValue);
    if (!(error instanceof ErrorValue)) return {};
    const own = OURS.has(error.code) ? this.reasons.at(String(place.sheet), place.row, place.column) : [];
    if (own.length > 0) return { reason: own.join(" ") };
    const read = this.frames.top?.readErrors.get(error.code) ?? this.errorAmong(plain, error.code);
    return read ?? { reason: errorInWords(error.code) };
  }

  /** The engine reads a range only once, so what a second formula has read must be looked up. */
  private errorAmong(plain: string, code: string): { source: string; reason: string } | undefined {
    for (const [, sheet, first, last] of plain.matchAll(/S_(\d+)!(\$[A-Z]+\$\d+)(?::(\$[A-Z]+\$\d+))?/g)) {
      const { top, left, bottom, right } = areaOf(first ?? "", last);
      for (let row = top; row <= bottom; row++) for (let column = left; column <= right; column++) {
        const place = { sheet: Number(sheet), row, column };
        const entry = this.sheets[place.sheet]?.formulaAt(row, column);
        const value = entry === undefined ? this.sheets[place.sheet]?.valueAt(row, column) : entry.outcome?.values[0]?.[0];
        if (value instanceof ErrorValue && value.code === code) return this.whyReadError(place, value.code, entry?.outcome);
      }
    }
    return undefined;
  }

  private placed(entry: FormulaCell, place: Place, outcome: Outcome): Outcome {
    const { placement } = entry.cell;
    const state = this.sheets[place.sheet];
    if (placement === undefined || placement.kind === "single" || state === undefined) return outcome;
    state.unspilled = state.unspilled.filter((other) => other !== entry);
    // what the engine has read of these cells no longer holds
    this.engine.forgetRanges();
    if (placement.kind === "fixed") {
      const values = filledInto(placement.area, outcome.values);
      state.addSpill({ area: placement.area, values });
      return { ...outcome, values };
    }
    const area = { top: place.row, left: place.column, bottom: place.row + outcome.values.length - 1, right: place.column + (outcome.values[0]?.length ?? 1) - 1 };
    if (area.top === area.bottom && area.left === area.right) return outcome;
    const obstacle = state.obstacle(area);
    if (obstacle !== undefined) return { ...outcome, values: [[new ErrorValue("#SPILL!")]], reason: `The formula gives a table over ${areaAddress(area)}, and ${obstacle}.`, isKept: false };
    state.addSpill({ area, values: outcome.values });
    return outcome;
  }

  /** Calculates the formulas whose tables may fill a blank cell. @returns true where one was calculated */
  private guessSpills(state: SheetState, sheet: number, row: number, column: number): boolean {
    const candidates = state.unspilled.filter(({ cell, isOpen, wrongGuesses }) => !isOpen && wrongGuesses === 0 && cell.row <= row && cell.column <= column);
    for (const entry of candidates) {
      try {
        if (entry.outcome === undefined) this.open(entry, { sheet, row: entry.cell.row, column: entry.cell.column }, true);
      } catch (reason) {
        if (!(reason instanceof WrongGuess)) throw reason;
        entry.wrongGuesses++;
        this.frames.top?.wrongGuesses.push(entry);
      }
    }
    return candidates.length > 0;
  }

  private circle(entry: FormulaCell, place: Place): CellValue {
    const round = this.frames.since(entry);
    if (round.some(({ isGuess }) => isGuess)) throw new WrongGuess();
    if (this.book.iterates) {
      for (const frame of round) frame.iterates = true;
      return entry.cell.value;
    }
    const way = [place, ...round.filter((frame) => frame.entry !== entry).map((frame) => frame.place), place].map((step) => this.named(step));
    const shown = way.length <= 8 ? way : [...way.slice(0, 4), "...", ...way.slice(-3)];
    const read = { source: this.named(place), reason: `the cells refer to each other in a circle: ${shown.join(", ")}.` };
    for (const { readErrors } of round) if (!readErrors.has(CIRCULAR)) readErrors.set(CIRCULAR, read);
    return new ErrorValue(CIRCULAR);
  }

  private whyReadError(place: Place, code: string, outcome: Outcome | undefined): { source: string; reason: string } {
    return { source: outcome?.source ?? this.named(place), reason: outcome?.reason ?? `the cell holds the error value ${code}.` };
  }

  private used(): { rows: number; columns: number } {
    this.sheets.forEach((state, sheet) => this.guessSpills(state, sheet, ROWS, COLUMNS));
    return { rows: Math.max(...this.sheets.map(({ used }) => used.rows)), columns: Math.max(...this.sheets.map(({ used }) => used.columns)) };
  }

  private named({ sheet, row, column }: Place): string {
    return row === NOWHERE.row && column === NOWHERE.column ? "the formula" : `${this.book.sheets[sheet]?.name ?? ""}!${cellAddress(row, column)}`;
  }
}

function areaOf(first: string, last: string | undefined): Area {
  const start = readReference(first);
  const end = last === undefined ? start : readReference(last);
  return { top: start?.top ?? 0, left: start?.left ?? 0, bottom: end?.bottom ?? 0, right: end?.right ?? 0 };
}
