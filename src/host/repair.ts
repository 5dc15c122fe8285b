import { hasCode, inExcel } from "./excel-refusal.js";
import { callsOurs, mendedFormula } from "./mend-formula.js";

/** Errors that stay in a cell after the functions are there again: not answered, not known, not yet fetched. */
const STUCK = new Set(["#BUSY!", "#NAME?", "#GETTING_DATA", "#CONNECT!", "#UNKNOWN!"]);
/** Cells that are read with one request; formulas of some hundred signs stay below what Excel on the web sends. */
const CELLS = 20_000;

/** A sheet with the formulas that were entered again. */
interface MendedSheet {
  readonly sheet: string;
  readonly mended: number;
  /** formulas that Excel did not let us write */
  readonly refused: number;
}

/** What a repair found. */
export interface Repair {
  /** formulas that call one of our functions */
  readonly seen: number;
  readonly sheets: readonly MendedSheet[];
  /** sheets with formulas to mend that could not be written, because they are protected */
  readonly locked: readonly string[];
}

interface Place {
  readonly row: number;
  readonly column: number;
  readonly formula: string;
}

/**
 * Enters formulas of our functions again that are stuck or have lost their way. Everybody else's formulas, and ours that work, are
 * not written.
 *
 * @param namespace  under which the functions stand here
 * @param ids        of our functions, in capitals
 * @throws {WorkbookRefusal} the workbook could not be looked through
 */
export function repairWorkbook(namespace: string, ids: ReadonlySet<string>): Promise<Repair> {
  return inExcel(async (context) => {
    const { worksheets } = context.workbook;
    worksheets.load("items/name");
    await context.sync();
    const sheets = worksheets.items.map((sheet) => ({ sheet, used: sheet.getUsedRangeOrNullObject(false), protection: sheet.protection }));
    for (const { used, protection } of sheets) {
      used.load("rowIndex,columnIndex,rowCount,columnCount");
      protection.load("protected");
    }
    await context.sync();
    let seen = 0;
    const mended: MendedSheet[] = [];
    const locked: string[] = [];
    await inTurn(sheets, async ({ sheet, used, protection }) => {
      if (used.isNullObject) return;
      const found = await lookThrough(context, sheet, used, namespace, ids);
      seen += found.seen;
      if (found.wrong.length === 0) return;
      if (protection.protected) locked.push(sheet.name);
      else mended.push({ sheet: sheet.name, ...(await enterAgain(context, sheet, found.wrong)) });
    });
    return { seen, sheets: mended, locked };
  }, true);
}

/** What a repair did, in one or two sentences. */
export function repairInWords({ seen, sheets, locked }: Repair): string {
  const total = sheets.reduce((sum, { mended }) => sum + mended, 0);
  const refused = sheets.filter((each) => each.refused > 0);
  const where = sheets.filter(({ mended }) => mended > 0).map(({ sheet, mended }) => `${mended} on ${sheet}`);
  const done =
    total > 0
      ? `${total} ${total === 1 ? "formula was" : "formulas were"} entered again: ${where.join(", ")}.`
      : seen === 0
        ? "No formula of this workbook calls a function of Probeworth, so there was nothing to repair."
        : locked.length > 0 || refused.length > 0
          ? "No formula was entered again."
          : `Nothing needed repair: ${seen === 1 ? "the one formula" : `all ${seen} formulas`} of Probeworth ${seen === 1 ? "is" : "are"} in order.`;
  return [
    done,
    ...(locked.length === 0 ? [] : [`Left alone because the sheet is protected: ${locked.join(", ")}. Take the protection away (Review, Unprotect Sheet) and repair again.`]),
    ...(refused.length === 0 ? [] : [`Excel did not accept ${refused.map(({ sheet, refused: number }) => `${number} on ${sheet}`).join(", ")}; they are as they were.`]),
  ].join(" ");
}

async function lookThrough(context: Excel.RequestContext, sheet: Excel.Worksheet, used: Excel.Range, namespace: string, ids: ReadonlySet<string>): Promise<{ seen: number; wrong: Place[] }> {
  const height = Math.max(1, Math.floor(CELLS / used.columnCount));
  const tops = Array.from({ length: Math.ceil(used.rowCount / height) }, (_, k) => k * height);
  let seen = 0;
  const wrong: Place[] = [];
  await inTurn(tops, async (top) => {
    const cells = await readCells(context, sheet, used.rowIndex + top, used.columnIndex, Math.min(height, used.rowCount - top), used.columnCount);
    for (const { row, column, formula, value } of cells) {
      if (!callsOurs(formula, namespace, ids)) continue;
      seen++;
      const right = mendedFormula(formula, namespace, ids);
      if (right !== formula || STUCK.has(String(value))) wrong.push({ row, column, formula: right });
    }
  });
  return { seen, wrong: await withoutSpilled(context, sheet, wrong) };
}

interface Cell extends Place {
  readonly value: unknown;
}

/** The formulas of a block with their values; a block that is too large to be sent is read in halves. */
async function readCells(context: Excel.RequestContext, sheet: Excel.Worksheet, row: number, column: number, rows: number, columns: number): Promise<Cell[]> {
  const block = sheet.getRangeByIndexes(row, column, rows, columns);
  block.load("formulas,values");
  try {
    await context.sync();
  } catch (reason) {
    if (!hasCode(reason, "ResponsePayloadSizeLimitExceeded", "OperationCellsExceedLimit", "RangeExceedsLimit") || rows === 1) throw reason;
    const half = Math.ceil(rows / 2);
    return [...(await readCells(context, sheet, row, column, half, columns)), ...(await readCells(context, sheet, row + half, column, rows - half, columns))];
  }
  const values = block.values as unknown[][];
  return (block.formulas as unknown[][]).flatMap((line, r) => line.flatMap((formula, c): Cell[] => (typeof formula === "string" && formula.startsWith("=") ? [{ row: row + r, column: column + c, formula, value: values[r]![c] }] : [])));
}

/** A cell that another one spills into shows that one's formula, but has none of its own. */
async function withoutSpilled(context: Excel.RequestContext, sheet: Excel.Worksheet, places: Place[]): Promise<Place[]> {
  if (places.length === 0 || !Office.context.requirements.isSetSupported("ExcelApi", "1.12")) return places;
  const parents = places.map(({ row, column }) => {
    const parent = sheet.getCell(row, column).getSpillParentOrNullObject();
    parent.load("rowIndex,columnIndex");
    return parent;
  });
  await context.sync();
  return places.filter(({ row, column }, k) => parents[k]!.isNullObject || (parents[k]!.rowIndex === row && parents[k]!.columnIndex === column));
}

async function enterAgain(context: Excel.RequestContext, sheet: Excel.Worksheet, places: readonly Place[]): Promise<{ mended: number; refused: number }> {
  try {
    for (const { row, column, formula } of places) sheet.getCell(row, column).formulas = [[formula]];
    await context.sync();
    return { mended: places.length, refused: 0 };
  } catch (reason) {
    // Whoever edits a cell or closes the workbook stops everything; one cell that cannot be written, such as part of an array, stops only itself.
    if (!hasCode(reason, "InvalidOperation", "InvalidArgument", "AccessDenied", "GeneralException", "FormulaLengthExceedsLimit", "MergedRangeConflict")) throw reason;
    if (places.length === 1) return { mended: 0, refused: 1 };
    const middle = Math.ceil(places.length / 2);
    const first = await enterAgain(context, sheet, places.slice(0, middle));
    const second = await enterAgain(context, sheet, places.slice(middle));
    return { mended: first.mended + second.mended, refused: first.refused + second.refused };
  }
}

function inTurn<T>(items: readonly T[], work: (item: T) => Promise<void>): Promise<void> {
  return items.reduce((before, item) => before.then(() => work(item)), Promise.resolve());
}
