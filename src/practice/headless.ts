import { LocaleType, LogLevel, Univer, UniverInstanceType, type IWorkbookData } from "@univerjs/core";
import { FUniver } from "@univerjs/core/facade";
import { UniverDocsPlugin } from "@univerjs/docs";
import { UniverFormulaEnginePlugin } from "@univerjs/engine-formula";
import { UniverSheetsPlugin } from "@univerjs/sheets";
import { CalculationMode, UniverSheetsFormulaPlugin } from "@univerjs/sheets-formula";
import "@univerjs/engine-formula/facade";
import "@univerjs/sheets-formula/facade";
import "@univerjs/sheets/facade";
import { CellReasons } from "./cell-reasons.js";
import { gridFunctions } from "./grid-functions.js";

/** A workbook without a page, all of its formulas calculated. */
export interface CalculatedWorkbook {
  readonly grid: FUniver;
  readonly reasons: CellReasons;
  /** ends the grid; nothing can be read afterwards */
  close(): void;
}

/**
 * Calculates every formula of a workbook with the same grid engine and the same functions as the practice page, without a
 * page around them.
 *
 * @throws {Error} the calculation has not ended after two minutes
 */
export async function calculateWorkbook(workbook: IWorkbookData): Promise<CalculatedWorkbook> {
  const reasons = new CellReasons();
  const univer = new Univer({ locale: LocaleType.EN_US, locales: { [LocaleType.EN_US]: {} }, logLevel: LogLevel.ERROR });
  univer.registerPlugins([
    [UniverFormulaEnginePlugin, { function: gridFunctions(reasons) }],
    [UniverDocsPlugin],
    [UniverSheetsPlugin],
    [UniverSheetsFormulaPlugin, { initialFormulaComputing: CalculationMode.NO_CALCULATION }],
  ]);
  univer.createUnit(UniverInstanceType.UNIVER_SHEET, workbook);
  const grid = FUniver.newAPI(univer);
  const formulas = grid.getFormula();
  const applied = formulas.onCalculationResultApplied(120_000);
  formulas.executeCalculation();
  await applied;
  return { grid, reasons, close: () => univer.dispose() };
}
