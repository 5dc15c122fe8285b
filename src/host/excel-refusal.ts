import { WorkbookRefusal, type RefusalKind } from "./workbook-refusal.js";

/** Every code that Excel documents, and those that the library behind it makes itself. */
export type ExcelErrorCode =
  | `${Excel.ErrorCodes}`
  | "ActivityLimitReached"
  | "ApiNotAvailable"
  | "ConnectionFailure"
  | "ContentLengthRequired"
  | "InvalidObjectPath"
  | "InvalidOrTimedOutSession"
  | "InvalidRequest"
  | "InvalidRequestContext"
  | "MemoryLimitReached"
  | "PropertyNotLoaded"
  | "RequestPayloadSizeLimitExceeded"
  | "ServiceNotAvailable"
  | "Timeout"
  | "Unauthenticated"
  | "ValueNotLoaded"
  | "WriteNotSupportedWhenModalDialogOpen";

const DENIED = "Excel does not allow it: the workbook or the sheet is protected, or it was opened for reading only. Take the protection away (Review tab) or save a copy of your own, then try again.";
const CLOSED = "The workbook is no longer open beside this pane. Open it, then open the pane from its ribbon.";
const LARGE = "That is more than Excel takes at once. Select fewer cells, or only the site block.";
const MISSING = "This version of Excel cannot do that. It needs Excel 2021 or later, Microsoft 365, or Excel on the web.";
const BUSY = "Excel is busy or cannot be reached. Wait a moment, then try again.";
const DIALOG = "A window of Excel is open and waits for an answer. Close it, then try again.";
const SHEET_KIND = "A sheet of this kind, such as a chart sheet, holds no cells that can be used here.";

const SENTENCES: Readonly<Record<ExcelErrorCode, readonly [RefusalKind, string]>> = {
  AccessDenied: ["sheet", DENIED],
  ActivityLimitReached: ["failed", BUSY],
  ApiNotAvailable: ["missing", MISSING],
  ApiNotFound: ["missing", MISSING],
  Conflict: ["failed", "Somebody else changed the same cells at the same moment. Try again."],
  ConnectionFailure: ["closed", CLOSED],
  ContentLengthRequired: ["failed", BUSY],
  DirtySupportingFormula: ["failed", BUSY],
  EmptyChartSeries: ["failed", "A chart has nothing to draw, because its cells are empty."],
  FilteredRangeConflict: ["sheet", "A filter in the sheet stands in the way. Clear the filter, then try again."],
  FormulaLengthExceedsLimit: ["large", "A formula is longer than Excel allows (8,192 characters)."],
  GeneralException: ["failed", "Excel could not do it and gave no reason. Try again; if it stays, save the workbook and start Excel again."],
  InactiveWorkbook: ["closed", CLOSED],
  InsertDeleteConflict: ["sheet", "Excel cannot move the cells that stand in the way."],
  InvalidArgument: ["failed", "Excel did not accept what was to be written."],
  InvalidBinding: ["failed", "The cells meant here are no longer there. Choose the site block again."],
  InvalidObjectPath: ["failed", "The cells or the sheet meant here are no longer there. Read again, then try again."],
  InvalidOperation: ["failed", "Excel does not allow that here."],
  InvalidOperationInCellEditMode: ["editing", "A cell is being edited. Press Enter or Esc in the sheet, then try again."],
  InvalidOrTimedOutSession: ["closed", CLOSED],
  InvalidReference: ["failed", "A name or a formula refers to cells that are no longer there (#REF!)."],
  InvalidRequest: ["failed", "Excel did not understand what it was asked for."],
  InvalidRequestContext: ["closed", CLOSED],
  InvalidSelection: ["failed", "No cells are selected. Select cells in the sheet, then try again."],
  ItemAlreadyExists: ["failed", "Something in the workbook took the same name at the same moment. Try again."],
  ItemNotFound: ["failed", "A sheet, name or cell meant here is no longer there. Read again, then try again."],
  MemoryLimitReached: ["large", "Excel is out of memory. Close other workbooks, then try again."],
  MergedRangeConflict: ["sheet", "Merged cells stand in the way. Take the merging away, then try again."],
  NonBlankCellOffSheet: ["sheet", "Excel cannot move cells off the end of the sheet."],
  NotImplemented: ["missing", MISSING],
  OpenWorkbookLinksBlocked: ["failed", "Excel has blocked links to other workbooks."],
  OperationCellsExceedLimit: ["large", LARGE],
  PivotTableRangeConflict: ["sheet", "A pivot table stands in the way."],
  PowerQueryRefreshResourceChallenge: ["failed", "A query of the workbook waits for a sign-in. Refresh it, then try again."],
  PropertyNotLoaded: ["failed", "The program asked Excel the wrong way. Please report this."],
  RangeExceedsLimit: ["large", LARGE],
  RangeImageExceedsLimit: ["large", LARGE],
  RefreshWorkbookLinksBlocked: ["failed", "Excel has blocked links to other workbooks."],
  RequestAborted: ["failed", "Excel stopped half-way. Try again."],
  RequestPayloadSizeLimitExceeded: ["large", LARGE],
  ResponsePayloadSizeLimitExceeded: ["large", LARGE],
  ServiceNotAvailable: ["failed", BUSY],
  Timeout: ["failed", BUSY],
  Unauthenticated: ["sheet", "Excel asks for a sign-in before it allows that. Sign in (File, Account), then try again."],
  UnsupportedFeature: ["missing", MISSING],
  UnsupportedFillType: ["missing", MISSING],
  UnsupportedOperation: ["missing", MISSING],
  UnsupportedSheet: ["sheet", SHEET_KIND],
  ValueNotLoaded: ["failed", "The program asked Excel the wrong way. Please report this."],
  WriteNotSupportedWhenModalDialogOpen: ["editing", DIALOG],
};

/** Whether a program's error is the library's own, with a code of Excel's. */
export function hasCode(reason: unknown, ...codes: readonly ExcelErrorCode[]): boolean {
  return reason instanceof OfficeExtension.Error && (codes as readonly string[]).includes(reason.code);
}

/**
 * Excel's error as a refusal in words.
 *
 * @param reason  whatever was thrown
 * @returns       the refusal; anything that is not Excel's own error comes back as it is, for it is a fault of ours
 */
export function asRefusal(reason: unknown): unknown {
  if (!(reason instanceof OfficeExtension.Error)) return reason;
  const known = Object.hasOwn(SENTENCES, reason.code) ? SENTENCES[reason.code as ExcelErrorCode] : undefined;
  const [kind, sentence] = known ?? ["failed", `Excel could not do it (${reason.code}). Try again; if it stays, save the workbook and start Excel again.`];
  return new WorkbookRefusal(kind, sentence);
}

/**
 * Runs requests against the workbook, after the person has finished editing a cell.
 *
 * @param batch     the requests
 * @param isOneUndo whether all of them are taken back with one undo, where Excel can do that
 * @throws {WorkbookRefusal} Excel refuses
 */
export async function inExcel<T>(batch: (context: Excel.RequestContext) => Promise<T>, isOneUndo = false): Promise<T> {
  const options: Excel.RunOptions = { delayForCellEdit: true };
  if (isOneUndo && Office.context.requirements.isSetSupported("ExcelApi", "1.20")) options.mergeUndoGroup = true;
  try {
    return await Excel.run(options, batch);
  } catch (reason) {
    throw asRefusal(reason);
  }
}
