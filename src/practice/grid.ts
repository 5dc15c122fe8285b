import "./grid.css";
import { LocaleType, LogLevel, mergeLocales, Univer, UniverInstanceType, type IWorkbookData } from "@univerjs/core";
import { FUniver } from "@univerjs/core/facade";
import designWords from "@univerjs/design/locale/en-US";
import { UniverDocsPlugin } from "@univerjs/docs";
import { UniverDocsUIPlugin } from "@univerjs/docs-ui";
import docsWords from "@univerjs/docs-ui/locale/en-US";
import { FormulaDataModel, UniverFormulaEnginePlugin, type IFunctionInfo } from "@univerjs/engine-formula";
import { UniverRenderEnginePlugin } from "@univerjs/engine-render";
import { UniverSheetsPlugin } from "@univerjs/sheets";
import { CalculationMode, UniverSheetsFormulaPlugin } from "@univerjs/sheets-formula";
import formulaWords from "@univerjs/sheets-formula/locale/en-US";
import { UniverSheetsFormulaUIPlugin } from "@univerjs/sheets-formula-ui";
import formulaUiWords from "@univerjs/sheets-formula-ui/locale/en-US";
import { UniverSheetsNumfmtPlugin } from "@univerjs/sheets-numfmt";
import { UniverSheetsNumfmtUIPlugin } from "@univerjs/sheets-numfmt-ui";
import numberWords from "@univerjs/sheets-numfmt-ui/locale/en-US";
import { UniverSheetsUIPlugin } from "@univerjs/sheets-ui";
import sheetsUiWords from "@univerjs/sheets-ui/locale/en-US";
import sheetsWords from "@univerjs/sheets/locale/en-US";
import { defaultTheme } from "@univerjs/themes";
import { UniverUIPlugin } from "@univerjs/ui";
import uiWords from "@univerjs/ui/locale/en-US";
import "@univerjs/engine-formula/facade";
import "@univerjs/sheets-formula/facade";
import "@univerjs/sheets-ui/facade";
import "@univerjs/sheets/facade";
import "@univerjs/ui/facade";
import type { CellReasons } from "./cell-reasons.js";
import { gridFunctions } from "./grid-functions.js";
import { sayWhyOnHover } from "./hover-reason.js";
import { SpilledCells } from "./spilled-cells.js";

// the page stays awake during a long calculation: after so many formulas keys and pointer have their turn
const FORMULAS_A_TURN = 25;

/** What the grid needs to start. */
export interface GridStart {
  readonly container: HTMLElement;
  readonly workbook: IWorkbookData;
  readonly descriptions: IFunctionInfo[];
  readonly reasons: CellReasons;
  readonly dark: boolean;
}

/**
 * Starts the grid in an element with its workbook, and calculates every formula. Our functions are handed over before the
 * workbook exists, so that no cell is ever calculated without them.
 */
export function startGrid({ container, workbook, descriptions, reasons, dark }: GridStart): { readonly grid: FUniver; readonly spilled: SpilledCells } {
  const univer = new Univer({
    theme: defaultTheme,
    darkMode: dark,
    locale: LocaleType.EN_US,
    locales: {
      [LocaleType.EN_US]: mergeLocales(designWords, uiWords, docsWords, sheetsWords, sheetsUiWords, formulaWords, formulaUiWords, numberWords),
    },
    logLevel: LogLevel.WARN,
  });
  univer.registerPlugins([
    [UniverRenderEnginePlugin],
    [UniverFormulaEnginePlugin, { function: gridFunctions(reasons), intervalCount: FORMULAS_A_TURN }],
    [UniverUIPlugin, { container, header: true, toolbar: false, footer: true, contextMenu: true }],
    [UniverDocsPlugin],
    [UniverDocsUIPlugin],
    [UniverSheetsPlugin],
    [UniverSheetsUIPlugin, { disableForceStringAlert: true, disableForceStringMark: true }],
    [UniverSheetsFormulaPlugin, { description: descriptions, initialFormulaComputing: CalculationMode.FORCED }],
    [UniverSheetsFormulaUIPlugin],
    [UniverSheetsNumfmtPlugin],
    [UniverSheetsNumfmtUIPlugin],
  ]);
  univer.createUnit(UniverInstanceType.UNIVER_SHEET, workbook);
  const grid = FUniver.newAPI(univer);
  grid.getFormula().calculationStart(() => reasons.startRun());
  sayWhyOnHover(univer.__getInjector(), grid, reasons);
  return { grid, spilled: new SpilledCells(univer.__getInjector().get(FormulaDataModel)) };
}
