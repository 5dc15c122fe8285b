import { BaseFunction, type BaseValueObject } from "@univerjs/engine-formula";
import { cellAddress, type Area } from "../../../src/formula/addresses.js";
import type { Book, BookCell } from "../../../src/formula/book.js";
import { Calculation } from "../../../src/formula/calculation.js";
import { ErrorValue, type CellValue } from "../../../src/formula/cell-value.js";
import type { CellReasons } from "../../../src/practice/cell-reasons.js";
import { BUSY, type CustomFunctions } from "./custom-functions.js";
import { fromEngine, toEngine } from "./engine-values.js";
import { fixedFormula, isInside, quotedSheet } from "./kinds/places.js";
import type { Place } from "./model/chart-model.js";
import { cellKey, placeKey, type SheetModel } from "./model/sheet-model.js";
import type { WorkbookModel } from "./model/workbook-model.js";
import { StuckFormulas, type Stuck } from "./stuck-formulas.js";

type FunctionClass = new (name: string) => BaseFunction;

/** Calculates the formulas with the project's own engine; its cell functions are those of the page. */
export class Calculator {
  private isDirty = false;
  private reasons = new Map<string, string>();
  private spills: { readonly sheet: SheetModel; readonly area: Area }[] = [];
  private readonly stuck: StuckFormulas;

  constructor(
    private readonly book: WorkbookModel,
    private readonly functions: CustomFunctions,
    private readonly namespace: string,
  ) {
    this.stuck = new StuckFormulas(namespace);
    book.listeners.add(({ what }) => {
      if (what === "changed" || what === "added" || what === "deleted" || what === "renamed") this.isDirty = true;
    });
    book.quiet.add(() => {
      this.isDirty = true;
    });
  }

  get state(): string {
    return this.functions.waiting > 0 ? "Pending" : "Done";
  }

  /** @param evenManual  also where the workbook waits for a command */
  bringUpToDate(evenManual = false): void {
    if (!this.isDirty || (this.book.calculationMode === "Manual" && !evenManual)) return;
    this.isDirty = false;
    this.functions.startPass();
    this.calculate();
    this.functions.endPass();
  }

  /** A result has come in, or something has to be looked at anew. */
  markDirty(): void {
    this.isDirty = true;
  }

  again(place: Place): void {
    this.functions.forget((key) => isInside(key, place));
    this.isDirty = true;
    this.bringUpToDate(true);
  }

  againOn(sheet: SheetModel, all: boolean): void {
    if (all) this.functions.forget((key) => key.startsWith(`${sheet.id} `));
    this.isDirty = true;
    this.bringUpToDate(true);
  }

  everythingAgain(): void {
    this.functions.forget(() => true);
    this.stuck.calculatedAnew();
    this.isDirty = true;
    this.bringUpToDate(true);
  }

  /** Leaves a formula in the state that Excel sometimes leaves one in. */
  stick(sheet: SheetModel, row: number, column: number, stuck: Stuck): void {
    this.stuck.add(sheet, row, column, stuck);
    this.isDirty = true;
  }

  /** Why a cell shows an error, in the words that came with it. */
  reasonAt(sheet: SheetModel, row: number, column: number): string | undefined {
    return this.reasons.get(placeKey(sheet, row, column));
  }

  /** How many cells of a range belong to a table that a formula spills. */
  spillsIn({ sheet, area }: Place): number {
    this.bringUpToDate();
    let cells = 0;
    for (let row = area.top; row <= area.bottom; row++) for (let column = area.left; column <= area.right; column++) if (this.spillParent({ sheet, area: { top: row, bottom: row, left: column, right: column } }) !== undefined) cells++;
    return cells;
  }

  /** The cell whose formula fills this one. */
  spillParent({ sheet, area }: Place): { row: number; column: number } | undefined {
    this.bringUpToDate();
    const spill = this.spills.find((each) => each.sheet === sheet && each.area.top <= area.top && each.area.bottom >= area.top && each.area.left <= area.left && each.area.right >= area.left);
    return spill === undefined ? undefined : { row: spill.area.top, column: spill.area.left };
  }

  private calculate(): void {
    const calculated = new Map<SheetModel, Map<number, CellValue>>(this.book.sheets.map((sheet) => [sheet, new Map<number, CellValue>()]));
    this.reasons = new Map();
    this.spills = [];
    const cells = this.book.sheets.map((sheet) => this.cellsOf(sheet));
    // to start the engine for a workbook without formulas would cost every write its time
    const calculation = cells.flat().some(({ formula }) => formula !== undefined) ? new Calculation(this.asBook(cells), (reasons) => this.pageFunctions(reasons)) : undefined;
    this.book.sheets.forEach((sheet, index) => this.fill(sheet, index, cells[index] ?? [], calculation, calculated.get(sheet)!));
    calculation?.dispose();
    for (const [sheet, values] of calculated) {
      const isChanged = !isSame(values, sheet.calculated);
      sheet.calculated = values;
      if (isChanged) this.book.tell({ what: "calculated", sheet });
    }
  }

  private cellsOf(sheet: SheetModel): BookCell[] {
    return [...sheet.entries].map(([key, { value, formula }]) => {
      const [row, column] = [Math.floor(key / 16_384), key % 16_384];
      if (formula === undefined) return { row, column, value };
      const error = this.stuck.errorOf(sheet, row, column, formula);
      if (error !== undefined) return { row, column, value: error };
      return { row, column, value: null, formula: formula.slice(1), placement: { kind: "spilling", area: { top: row, left: column, bottom: row, right: column } } };
    });
  }

  private asBook(cells: readonly BookCell[][]): Book {
    const { sheets, names } = this.book;
    const named = [...names, ...sheets.flatMap((sheet) => sheet.names)];
    return {
      sheets: sheets.map(({ name }, index) => ({ name, cells: cells[index] ?? [] })),
      names: named.map(({ name, sheet, range, formula }) => ({
        name,
        sheet: sheet === undefined ? undefined : sheets.indexOf(sheet),
        meaning: (range === undefined ? formula : fixedFormula(range)).slice(1),
      })),
      tables: [],
      activeSheet: 0,
      dates1904: false,
      iterates: false,
    };
  }

  private fill(sheet: SheetModel, index: number, cells: readonly BookCell[], calculation: Calculation | undefined, into: Map<number, CellValue>): void {
    for (const { row, column, value, formula } of cells) {
      if (formula === undefined) {
        if (sheet.entries.get(cellKey(row, column))?.formula !== undefined) into.set(cellKey(row, column), published(value));
        continue;
      }
      const outcome = calculation?.cell({ sheet: index, row, column });
      if (outcome?.reason !== undefined) this.reasons.set(placeKey(sheet, row, column), outcome.reason);
      const values = outcome?.values ?? [[null]];
      const area = { top: row, left: column, bottom: row + values.length - 1, right: column + (values[0]?.length ?? 1) - 1 };
      if (area.bottom > area.top || area.right > area.left) this.spills.push({ sheet, area });
      values.forEach((line, down) => line.forEach((each, right) => into.set(cellKey(row + down, column + right), published(each ?? 0))));
    }
  }

  private pageFunctions(reasons: CellReasons): [FunctionClass, string][] {
    // the engine knows the functions under one namespace, whichever build they came with
    const known = this.namespace === "PROBEDEV" ? "PROBE" : this.namespace;
    return (this.functions.metadata?.functions ?? []).map(({ id, name }) => [this.functionClass(id, reasons), `${known}.${name.toUpperCase()}`]);
  }

  private functionClass(id: string, reasons: CellReasons): FunctionClass {
    const { book, functions } = this;
    return class extends BaseFunction {
      override calculate(...variants: BaseValueObject[]): BaseValueObject {
        const sheet = book.sheets[Number(this.subUnitId)]!;
        reasons.calculating(this.subUnitId ?? "", this.row, this.column);
        const result = functions.value(id, variants.map(fromEngine), placeKey(sheet, this.row, this.column), `${quotedSheet(sheet.name)}!${cellAddress(this.row, this.column)}`);
        if (result.message !== undefined) reasons.add(this.subUnitId ?? "", this.row, this.column, result.message);
        return toEngine(result.values);
      }
    };
  }
}

function published(value: CellValue): CellValue {
  return value instanceof ErrorValue && value.code === BUSY ? new ErrorValue("#BUSY!") : value;
}

function isSame(a: ReadonlyMap<number, CellValue>, b: ReadonlyMap<number, CellValue>): boolean {
  if (a.size !== b.size) return false;
  for (const [key, value] of a) {
    const other = b.get(key);
    if (value instanceof ErrorValue ? !(other instanceof ErrorValue && other.code === value.code) : other !== value) return false;
  }
  return true;
}
