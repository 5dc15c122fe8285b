import { CellValueType, LocaleType, LogLevel, ObjectMatrix, Univer, UniverInstanceType, type ICellData, type IObjectArrayPrimitiveType, type IRowData } from "@univerjs/core";
import {
  AstTreeBuilder, BaseFunction, CELL_INVERTED_INDEX_CACHE, FORMULA_REF_TO_ARRAY_CACHE, IDefinedNamesService, IFormulaCurrentConfigService, IFormulaRuntimeService, IFunctionService, Interpreter, ISheetRowFilteredService, Lexer, LexerNode, NumberValueObject,
  UniverFormulaEnginePlugin, type ArrayValueObject, type BaseReferenceObject, type BaseValueObject, type FunctionVariantType, type ISheetData,
} from "@univerjs/engine-formula";
import { COLUMNS, ROWS } from "./addresses.js";
import type { Book, BookSheet } from "./book.js";
import { ErrorValue, type CellValue } from "./cell-value.js";
import { sheetAlias } from "./reference-writer.js";
import type { Place } from "./table-references.js";

/** Gives the value of a cell, calculating it first if need be; null for a blank one. */
export type ReadCell = (sheet: number, row: number, column: number) => CellValue;

// the engine keeps what it has read by the name of the workbook
let made = 0;
const MOST_CELLS = 4_000_000;

/** The grid's formula engine without a grid: it reads plain formulas and asks for cells as it needs them. */
export class FormulaEngine {
  /** every function that it calculates, in capitals */
  readonly functions: ReadonlySet<string>;
  private readonly unit = `book-${++made}`;
  private readonly univer: Univer;
  private readonly lexer: Lexer;
  private readonly trees: AstTreeBuilder;
  private readonly interpreter: Interpreter;
  private readonly runtime: IFormulaRuntimeService;

  /**
   * @param book       sheets and names; its cells are asked for through read
   * @param functions  functions besides the ordinary ones, as class and name
   */
  constructor(book: Book, read: ReadCell, functions: readonly [new (name: string) => BaseFunction, string][]) {
    this.univer = new Univer({ locale: LocaleType.EN_US, logLevel: LogLevel.SILENT });
    this.univer.registerPlugin(UniverFormulaEnginePlugin);
    const injector = this.univer.__getInjector();
    this.univer.createUnit(UniverInstanceType.UNIVER_SHEET, snapshot(book, this.unit));
    const known = injector.get(IFunctionService);
    known.registerExecutors(new RowsOf("ROWS"), new ColumnsOf("COLUMNS"), ...functions.map(([Made, name]) => new Made(name)));
    this.functions = new Set([...known.getExecutors().keys()].map((name) => String(name).toUpperCase()));
    this.lexer = injector.get(Lexer);
    this.trees = injector.get(AstTreeBuilder);
    this.interpreter = injector.get(Interpreter);
    this.runtime = injector.get(IFormulaRuntimeService);
    injector.get(ISheetRowFilteredService).register((_unit, sheet, row) => book.sheets[Number(sheet)]?.filteredRows?.has(row) ?? false);
    injector.get(IDefinedNamesService).registerDefinedNames(this.unit, namesForIndirect(book));
    const current = injector.get(IFormulaCurrentConfigService);
    current.load({
      allUnitData: { [this.unit]: sheetData(book, read) }, unitSheetNameMap: { [this.unit]: sheetNames(book) }, unitStylesData: {}, formulaData: {}, arrayFormulaCellData: {}, arrayFormulaRange: {},
      forceCalculate: false, dirtyRanges: [], dirtyNameMap: {}, dirtyDefinedNameMap: {}, dirtyUnitFeatureMap: {}, dirtyUnitOtherFormulaMap: {}, clearDependencyTreeCache: {},
    });
    current.setExecuteUnitId(this.unit);
  }

  /**
   * Calculates a formula.
   *
   * @param plain  in the form of plainFormula, without "="
   * @returns      its values row by row, at least one; undefined where the engine cannot read it
   */
  calculate(plain: string, place: Place): CellValue[][] | undefined {
    // a tree of its own for each call: a formula that asks for a cell of the same wording would overwrite its own values
    const words = this.lexer.treeBuilder(`=${plain}`);
    const tree = words instanceof LexerNode ? this.trees.parse(words) : undefined;
    if (tree === null || tree === undefined) return undefined;
    this.runtime.setCurrent(place.row, place.column, ROWS, COLUMNS, String(place.sheet), this.unit);
    const result = this.interpreter.execute({ node: tree, refOffsetX: 0, refOffsetY: 0 });
    return result.isReferenceObject() ? fromReference(result as BaseReferenceObject) : fromValue(result as BaseValueObject);
  }

  /** Lets go of ranges that were read, so that cells which have been filled since are read anew. */
  forgetRanges(): void {
    FORMULA_REF_TO_ARRAY_CACHE.clear();
    CELL_INVERTED_INDEX_CACHE.clear();
  }

  dispose(): void {
    this.univer.dispose();
  }
}

/** The engine's own ROWS reads every cell of its range, which for a whole column takes seconds. */
class RowsOf extends BaseFunction {
  override needsReferenceObject = true;
  override minParams = 1;
  override maxParams = 1;

  override calculate(range: FunctionVariantType): FunctionVariantType {
    if (range.isError()) return range;
    return NumberValueObject.create(this.lengthOf(range));
  }

  protected lengthOf(range: FunctionVariantType): number {
    if (range.isReferenceObject()) return (range as BaseReferenceObject).getRowCount();
    return range.isArray() ? (range as ArrayValueObject).getRowCount() : 1;
  }
}

class ColumnsOf extends RowsOf {
  protected override lengthOf(range: FunctionVariantType): number {
    if (range.isReferenceObject()) return (range as BaseReferenceObject).getColumnCount();
    return range.isArray() ? (range as ArrayValueObject).getColumnCount() : 1;
  }
}

/** Asks for a cell whenever a formula reads one. */
class AskedCells extends ObjectMatrix<ICellData> {
  private readonly subtotals: ReadonlySet<number>;

  constructor(
    private readonly sheet: number,
    { cells }: BookSheet,
    private readonly read: ReadCell,
  ) {
    super({});
    this.subtotals = new Set(cells.filter(({ formula }) => formula !== undefined && /\b(?:SUBTOTAL|AGGREGATE)\(/i.test(formula)).map(({ row, column }) => row * COLUMNS + column));
  }

  override getValue(row: number, column: number): ICellData {
    const cell = engineCell(this.read(this.sheet, row, column));
    // by the formula the engine knows the subtotals that another subtotal leaves out
    if (cell !== undefined && this.subtotals.has(row * COLUMNS + column)) cell.f = "=SUBTOTAL()";
    return cell as ICellData;
  }
}

function engineCell(value: CellValue): ICellData | undefined {
  if (value === null) return undefined;
  if (value instanceof ErrorValue) return { v: value.code, t: CellValueType.STRING };
  if (typeof value === "number") return { v: value, t: CellValueType.NUMBER };
  if (typeof value === "boolean") return { v: value ? 1 : 0, t: CellValueType.BOOLEAN };
  return { v: value, t: CellValueType.FORCE_STRING };
}

function fromReference(reference: BaseReferenceObject): CellValue[][] {
  if (reference.getRowCount() * reference.getColumnCount() > MOST_CELLS) return [[new ErrorValue("#NUM!")]];
  return fromValue(reference.toArrayValueObject(false));
}

function fromValue(value: BaseValueObject): CellValue[][] {
  if (!value.isArray()) return [[cellValue(value)]];
  const rows = value.getArrayValue();
  return rows.length === 0 || rows[0]?.length === 0 ? [[new ErrorValue("#CALC!")]] : rows.map((row) => Array.from(row, cellValue));
}

function cellValue(value: BaseValueObject | null | undefined | void): CellValue {
  if (value === null || value === undefined || value.isNull()) return null;
  if (value.isError()) return new ErrorValue(String(value.getValue()) === "#ERROR!" ? "#VALUE!" : String(value.getValue()));
  if (value.isLambda()) return new ErrorValue("#CALC!");
  if (value.isArray()) return cellValue(value.getArrayValue()[0]?.[0]);
  const bare = value.getValue();
  return typeof bare === "number" && !Number.isFinite(bare) ? new ErrorValue("#NUM!") : bare;
}

function sheetData(book: Book, read: ReadCell): ISheetData {
  return Object.fromEntries(book.sheets.map((sheet, index) => {
    const hidden: IObjectArrayPrimitiveType<Partial<IRowData>> = Object.fromEntries([...(sheet.hiddenRows ?? [])].map((row) => [row, { hd: 1 }]));
    return [String(index), { cellData: new AskedCells(index, sheet, read), rowCount: ROWS, columnCount: COLUMNS, rowData: hidden, columnData: {} }];
  }));
}

function sheetNames(book: Book): Record<string, string> {
  const aliases = book.sheets.map((_, index) => [sheetAlias(index), String(index)] as const);
  // the last entry of a sheet is the name that functions show
  return Object.fromEntries([...aliases, ...book.sheets.map(({ name }, index) => [name, String(index)] as const)]);
}

/** The sizes of the sheets, which some functions look up in the workbook itself. */
function snapshot(book: Book, unit: string): object {
  const sheets = book.sheets.map(({ name }, index) => [String(index), { id: String(index), name, rowCount: ROWS, columnCount: COLUMNS, cellData: {} }]);
  return { id: unit, name: unit, appVersion: "", locale: LocaleType.EN_US, styles: {}, sheetOrder: book.sheets.map((_, index) => String(index)), sheets: Object.fromEntries(sheets) };
}

function namesForIndirect(book: Book): Record<string, { id: string; name: string; formulaOrRefString: string }> {
  const global = book.names.filter(({ sheet }) => sheet === undefined);
  return Object.fromEntries(global.map(({ name, meaning }) => [name, { id: name, name, formulaOrRefString: meaning }]));
}
