import type { Area } from "../../../src/formula/addresses.js";
import type { BookCell } from "../../../src/formula/book.js";
import { Calculation } from "../../../src/formula/calculation.js";
import { ErrorValue, type CellValue } from "../../../src/formula/cell-value.js";
import { BUSY, type CustomFunctions } from "./custom-functions.js";
import { isInside } from "./kinds/places.js";
import { asBook } from "./model/as-book.js";
import type { Place } from "./model/chart-model.js";
import { cellKey, placeKey, type SheetModel } from "./model/sheet-model.js";
import type { WorkbookModel } from "./model/workbook-model.js";
import { pageFunctions } from "./page-functions.js";
import { StuckFormulas, type Stuck } from "./stuck-formulas.js";

/** Whether a cell keeps what it shows. */
type Stands = (sheet: SheetModel, row: number, column: number) => boolean;

/** Calculates the formulas with the project's own engine; its cell functions are those of the page. */
export class Calculator {
  private isDirty = false;
  /** entered since the last calculation: Excel calculates these even where it waits for a command */
  private entered: Place[] = [];
  private reasons = new Map<string, string>();
  private spills: { readonly sheet: SheetModel; readonly area: Area }[] = [];
  private readonly stuck: StuckFormulas;

  constructor(
    private readonly book: WorkbookModel,
    private readonly functions: CustomFunctions,
    private readonly namespace: string,
  ) {
    this.stuck = new StuckFormulas(namespace);
    book.listeners.add((event) => {
      if (event.what === "changed") this.entered.push(event);
      if (event.what === "changed" || event.what === "added" || event.what === "deleted" || event.what === "renamed") this.isDirty = true;
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
    const waits = this.book.calculationMode === "Manual" && !evenManual;
    if (!this.isDirty || (waits && this.entered.length === 0)) return;
    const entered = this.entered.splice(0);
    this.isDirty = waits;
    if (!waits) this.functions.startPass();
    this.calculate(waits ? entered : undefined);
    this.functions.endPass();
  }

  /** Something has to be looked at anew. */
  markDirty(): void {
    this.isDirty = true;
  }

  /** A result has come in for a cell, which shows it even where Excel waits for a command. */
  answered(place: string): void {
    const [id, row, column] = place.split(" ");
    const sheet = this.book.sheets.find((each) => each.id === id);
    if (sheet === undefined) return;
    this.entered.push({ sheet, area: { top: Number(row), left: Number(column), bottom: Number(row), right: Number(column) } });
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

  /** @param only  formulas that are calculated; the others keep what they show */
  private calculate(only?: readonly Place[]): void {
    const calculated = new Map<SheetModel, Map<number, CellValue>>(this.book.sheets.map((sheet) => [sheet, new Map<number, CellValue>()]));
    const stands: Stands = (sheet, row, column) => only?.some((place) => isInside(this.ownerOf(sheet, row, column), place)) === false;
    const cells = this.book.sheets.map((sheet) => this.cellsOf(sheet, stands));
    this.reasons = new Map([...this.reasons].filter(([key]) => only?.some((place) => isInside(key, place)) === false));
    this.spills = this.spills.filter(({ sheet, area }) => stands(sheet, area.top, area.left));
    // to start the engine for a workbook without formulas would cost every write its time
    const calculation = cells.flat().some(({ formula }) => formula !== undefined) ? new Calculation(asBook(this.book, cells), pageFunctions(this.book, this.functions, this.namespace)) : undefined;
    this.book.sheets.forEach((sheet, index) => this.fill(sheet, index, cells[index] ?? [], calculation, calculated.get(sheet)!));
    calculation?.dispose();
    for (const [sheet, values] of calculated) {
      const isChanged = !isSame(values, sheet.calculated);
      sheet.calculated = values;
      if (isChanged) this.book.tell({ what: "calculated", sheet });
    }
  }

  /** The cell whose formula gives this one its value: itself, unless a table spills over it. */
  private ownerOf(sheet: SheetModel, row: number, column: number): string {
    const spill = this.spills.find(({ sheet: on, area }) => on === sheet && area.top <= row && area.bottom >= row && area.left <= column && area.right >= column);
    return spill === undefined ? placeKey(sheet, row, column) : placeKey(sheet, spill.area.top, spill.area.left);
  }

  /** The cells for the engine; what stands is a value to it, whatever was entered there. */
  private cellsOf(sheet: SheetModel, stands: Stands): BookCell[] {
    const at = (key: number): { row: number; column: number } => ({ row: Math.floor(key / 16_384), column: key % 16_384 });
    const entered = [...sheet.entries].flatMap(([key, { value, formula }]): BookCell[] => {
      const { row, column } = at(key);
      if (formula === undefined) return [{ row, column, value }];
      if (stands(sheet, row, column)) return [];
      const error = this.stuck.errorOf(sheet, row, column, formula);
      if (error !== undefined) return [{ row, column, value: error }];
      return [{ row, column, value: null, formula: formula.slice(1), placement: { kind: "spilling", area: { top: row, left: column, bottom: row, right: column } } }];
    });
    const standing = [...sheet.calculated].map(([key, value]) => ({ ...at(key), value })).filter(({ row, column }) => stands(sheet, row, column));
    return [...entered, ...standing.map((cell) => ({ ...cell, value: cell.value instanceof ErrorValue && cell.value.code === "#BUSY!" ? new ErrorValue(BUSY) : cell.value }))];
  }

  private fill(sheet: SheetModel, index: number, cells: readonly BookCell[], calculation: Calculation | undefined, into: Map<number, CellValue>): void {
    for (const { row, column, value, formula } of cells) {
      if (formula === undefined) {
        const entry = sheet.entries.get(cellKey(row, column));
        if (entry === undefined || entry.formula !== undefined) into.set(cellKey(row, column), published(value));
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
