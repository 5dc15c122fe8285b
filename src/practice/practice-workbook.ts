import { CellValueType, type ICellData, type IRange } from "@univerjs/core";
import type { FUniver } from "@univerjs/core/facade";
import { deserializeRangeWithSheet, serializeRange } from "@univerjs/engine-formula";
import type { FWorkbook, FWorksheet } from "@univerjs/sheets/facade";
import type { CellValue, InsertedSheet, RangeText, SheetPlan, Workbook } from "../host/workbook.js";
import { Calculation } from "./calculation.js";
import { reference, sheetData } from "./grid-data.js";

/** The practice page's grid as the workbook that the pane knows. */
export class PracticeWorkbook implements Workbook {
  private readonly calculation: Calculation;

  constructor(private readonly grid: FUniver) {
    this.calculation = new Calculation(grid);
  }

  async readName(name: string): Promise<RangeText | undefined> {
    const place = this.placeOf(name);
    return place === undefined ? undefined : read(place.sheet, place.range);
  }

  async readSelection(): Promise<RangeText | undefined> {
    const selected = this.book.getActiveRange();
    return selected === null ? undefined : read(this.book.getActiveSheet(), selected.getRange());
  }

  async names(): Promise<string[]> {
    return this.book
      .getDefinedNames()
      .map((name) => name.getName())
      .filter((name) => this.placeOf(name) !== undefined)
      .sort((a, b) => a.localeCompare(b));
  }

  async insertSheet(plan: SheetPlan): Promise<InsertedSheet> {
    const sheets = new Set(this.book.getSheets().map((sheet) => sheet.getSheetName().toLowerCase()));
    const taken = new Set(this.book.getDefinedNames().map((name) => name.getName().toLowerCase()));
    const sheet = free(plan.name, sheets, (n) => `${plan.name} (${n})`);
    const { id: _fresh, ...data } = sheetData("", { ...plan, name: sheet });
    this.book.insertSheet(sheet, { index: this.book.getNumSheets(), sheet: data });
    const names = (plan.names ?? []).map(({ name, range }) => {
      const given = free(name, taken, (n) => `${name}${n}`);
      taken.add(given.toLowerCase());
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
    if (book === null) throw new Error("The practice page has no workbook open.");
    return book;
  }

  private placeOf(name: string): { sheet: FWorksheet; range: IRange } | undefined {
    const wanted = name.trim().toLowerCase();
    const found = this.book.getDefinedNames().find((candidate) => candidate.getName().toLowerCase() === wanted);
    if (found === undefined) return undefined;
    const { sheetName, range } = deserializeRangeWithSheet(found.getFormulaOrRefString().replace(/^=/, ""));
    const sheet = this.book.getSheetByName(sheetName);
    return sheet === null || Number.isNaN(range.startRow) || Number.isNaN(range.startColumn) ? undefined : { sheet, range };
  }
}

/** Reads a range of a sheet, cut to the used part of the sheet. */
function read(sheet: FWorksheet, range: IRange): RangeText {
  const startRow = range.startRow || 0;
  const startColumn = range.startColumn || 0;
  const endRow = Math.max(startRow, Math.min(Number.isNaN(range.endRow) ? Infinity : range.endRow, sheet.getLastRow()));
  const endColumn = Math.max(startColumn, Math.min(Number.isNaN(range.endColumn) ? Infinity : range.endColumn, sheet.getLastColumn()));
  const cut = { startRow, startColumn, endRow, endColumn };
  return {
    sheet: sheet.getSheetName(),
    address: serializeRange(cut),
    values: sheet.getRange(cut).getCellDatas().map((row) => row.map((cell) => valueOf(cell ?? undefined))),
  };
}

function valueOf(cell: ICellData | undefined): CellValue {
  const value = cell?.v;
  if (value === null || value === undefined) return "";
  return cell?.t === CellValueType.BOOLEAN ? Boolean(Number(value)) : value;
}

function free(name: string, taken: ReadonlySet<string>, next: (n: number) => string): string {
  let candidate = name;
  for (let n = 2; taken.has(candidate.toLowerCase()); n++) candidate = next(n);
  return candidate;
}
