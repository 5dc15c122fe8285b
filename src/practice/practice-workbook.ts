import { CellValueType, type ICellData, type IRange } from "@univerjs/core";
import type { FUniver } from "@univerjs/core/facade";
import { deserializeRangeWithSheet, serializeRange } from "@univerjs/engine-formula";
import type { FWorkbook, FWorksheet } from "@univerjs/sheets/facade";
import { areaOf } from "../host/addresses.js";
import { freeDefinedName, freeSheetName } from "../host/free-name.js";
import type { CellValue, InsertedSheet, PlannedChart, RangeText, SheetPlan, Workbook } from "../host/workbook.js";
import { WorkbookRefusal } from "../host/workbook-refusal.js";
import { Calculation } from "./calculation.js";
import { reference, sheetData } from "./grid-data.js";
import type { SpilledCells } from "./spilled-cells.js";

/** A sheet and one range of it: cells, whole columns or whole rows. The grid itself reads the first area of several as if it were all. */
const ONE_RANGE = /^(?:'(?:[^']|'')+'|[^'!,()]+)!\$?(?:[A-Z]{1,3}\$?\d+(?::\$?[A-Z]{1,3}\$?\d+)?|[A-Z]{1,3}:\$?[A-Z]{1,3}|\d+:\$?\d+)$/i;

/** A chart of a sheet with its cells within reach. */
export interface SheetChart {
  readonly chart: PlannedChart;
  readonly sheet: string;
  /** the values of a column of its cells as they are now */
  readonly column: (range: string) => CellValue[];
}

/** The practice page's grid as the workbook that the pane knows. */
export class PracticeWorkbook implements Workbook {
  private readonly calculation: Calculation;
  /** by the grid's own key of the sheet, which a new name does not change */
  private readonly planned: Map<string, readonly PlannedChart[]>;

  /**
   * @param grid     with its workbook open
   * @param spilled  what its formulas fill
   * @param plans    of the sheets that stand in it, in order
   */
  constructor(
    private readonly grid: FUniver,
    private readonly spilled: SpilledCells,
    plans: readonly SheetPlan[],
  ) {
    this.calculation = new Calculation(grid);
    const sheets = this.book.getSheets();
    this.planned = new Map(plans.map(({ charts }, k) => [sheets[k]!.getSheetId(), charts ?? []]));
  }

  /** The grid has no charts of its own: whoever shows the sheets asks for those of the plans. */
  charts(): SheetChart[] {
    return this.book.getSheets().flatMap((sheet) => this.chartsOf(sheet));
  }

  chartsInFront(): SheetChart[] {
    return this.chartsOf(this.book.getActiveSheet());
  }

  private chartsOf(sheet: FWorksheet): SheetChart[] {
    const column = (range: string): CellValue[] => {
      const { top, left, bottom } = areaOf(range);
      return this.values(sheet, { startRow: top, endRow: bottom, startColumn: left, endColumn: left }).map(([value]) => value!);
    };
    return (this.planned.get(sheet.getSheetId()) ?? []).map((chart) => ({ chart, sheet: sheet.getSheetName(), column }));
  }

  async readName(name: string): Promise<RangeText | undefined> {
    const place = this.placeOf(name);
    return place === undefined ? undefined : this.read(place.sheet, place.range);
  }

  async readSelection(): Promise<RangeText | undefined> {
    const selected = this.book.getActiveRange();
    return selected === null ? undefined : this.read(this.book.getActiveSheet(), selected.getRange());
  }

  async names(): Promise<string[]> {
    return this.book
      .getDefinedNames()
      .map((name) => name.getName())
      .filter((name) => this.placeOf(name) !== undefined)
      .sort((a, b) => a.localeCompare(b));
  }

  async insertSheet(plan: SheetPlan): Promise<InsertedSheet> {
    const taken = this.book.getDefinedNames().map((name) => name.getName());
    const sheet = freeSheetName(plan.name, this.book.getSheets().map((each) => each.getSheetName()));
    const { id: _fresh, ...data } = sheetData("", { ...plan, name: sheet });
    const made = this.book.insertSheet(sheet, { index: this.book.getNumSheets(), sheet: data });
    this.planned.set(made.getSheetId(), plan.charts ?? []);
    const names = (plan.names ?? []).map(({ name, range }) => {
      const given = freeDefinedName(name, taken);
      taken.push(given);
      this.book.insertDefinedName(given, reference(sheet, range));
      return given;
    });
    return { sheet, names };
  }

  onChanged(handler: () => void): () => void {
    return this.calculation.onSettled(handler);
  }

  private get book(): FWorkbook {
    const book = this.grid.getActiveWorkbook();
    if (book === null) throw new WorkbookRefusal("closed", "The practice page has no workbook open. Load the page again.");
    return book;
  }

  /** Reads a range of a sheet, cut to the used part of the sheet. */
  private read(sheet: FWorksheet, range: IRange): RangeText {
    const startRow = range.startRow || 0;
    const startColumn = range.startColumn || 0;
    const filled = this.spilled.last(this.book.getId(), sheet.getSheetId());
    const lastRow = Math.max(sheet.getLastRow(), filled.row);
    const lastColumn = Math.max(sheet.getLastColumn(), filled.column);
    const endRow = Math.max(startRow, Math.min(Number.isNaN(range.endRow) ? Infinity : range.endRow, lastRow));
    const endColumn = Math.max(startColumn, Math.min(Number.isNaN(range.endColumn) ? Infinity : range.endColumn, lastColumn));
    const cut = { startRow, startColumn, endRow, endColumn };
    return { sheet: sheet.getSheetName(), address: serializeRange(cut), values: this.values(sheet, cut) };
  }

  private values(sheet: FWorksheet, cut: IRange): CellValue[][] {
    const book = this.book.getId();
    return sheet.getRange(cut).getCellDatas().map((row, r) => row.map((cell, c) => valueOf(this.spilled.at(book, sheet.getSheetId(), cut.startRow + r, cut.startColumn + c) ?? cell ?? undefined)));
  }

  private placeOf(name: string): { sheet: FWorksheet; range: IRange } | undefined {
    const wanted = name.trim().toLowerCase();
    const found = this.book.getDefinedNames().find((candidate) => candidate.getName().toLowerCase() === wanted);
    if (found === undefined) return undefined;
    const meaning = found.getFormulaOrRefString().replace(/^=/, "");
    if (!ONE_RANGE.test(meaning)) return undefined;
    const { sheetName, range } = deserializeRangeWithSheet(meaning);
    const sheet = this.book.getSheetByName(sheetName);
    return sheet === null ? undefined : { sheet, range };
  }
}

function valueOf(cell: ICellData | undefined): CellValue {
  const value = cell?.v;
  if (value === null || value === undefined) return "";
  return cell?.t === CellValueType.BOOLEAN ? Boolean(Number(value)) : value;
}
