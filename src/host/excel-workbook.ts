import { watchWorkbook } from "./excel-events.js";
import { fillSheet } from "./excel-fill.js";
import { namesOfRanges, rangeOfName, takenNames } from "./excel-names.js";
import { readRange, readSelected } from "./excel-read.js";
import { asRefusal, hasCode, inExcel } from "./excel-refusal.js";
import { freeDefinedName, freeSheetName } from "./free-name.js";
import type { InsertedSheet, RangeText, SheetPlan, Workbook } from "./workbook.js";
import { WorkbookRefusal } from "./workbook-refusal.js";

/** How often a name that somebody takes between our look and our write is chosen anew. */
const TRIES = 5;

/** The workbook that Excel has open beside the pane. */
export class ExcelWorkbook implements Workbook {
  /** @param namespace  under which the functions of this build stand */
  constructor(private readonly namespace: string) {}

  async readName(name: string): Promise<RangeText | undefined> {
    return inExcel(async (context) => {
      const range = await rangeOfName(context, name);
      return range === undefined ? undefined : readRange(context, range);
    });
  }

  async readSelection(): Promise<RangeText | undefined> {
    return inExcel(readSelected);
  }

  async names(): Promise<string[]> {
    return inExcel(namesOfRanges);
  }

  async insertSheet(plan: SheetPlan): Promise<InsertedSheet> {
    return inExcel(async (context) => {
      await requireStructure(context);
      const sheet = await addedSheet(context, plan.name, TRIES);
      try {
        await fillSheet(context, sheet, plan, this.namespace);
        const names = await addedNames(context, sheet, plan.names ?? []);
        sheet.activate();
        await context.sync();
        return { sheet: sheet.name, names };
      } catch (reason) {
        throw halfMade(sheet.name, reason);
      }
    }, true);
  }

  onChanged(handler: () => void): () => void {
    return watchWorkbook(handler);
  }
}

async function requireStructure(context: Excel.RequestContext): Promise<void> {
  const { protection } = context.workbook;
  protection.load("protected");
  await context.sync();
  if (protection.protected) throw new WorkbookRefusal("structure", "The structure of this workbook is protected, so no sheet can be added, and nothing was written. Take the protection away (Review, Protect Workbook), then try again.");
}

/** A sheet is named as it is added: a name given afterwards would empty the list of what can be undone. */
async function addedSheet(context: Excel.RequestContext, wanted: string, tries: number): Promise<Excel.Worksheet> {
  const { worksheets } = context.workbook;
  worksheets.load("items/name");
  await context.sync();
  const sheet = worksheets.add(freeSheetName(wanted, worksheets.items.map(({ name }) => name)));
  sheet.load("name");
  try {
    await context.sync();
  } catch (reason) {
    if (hasCode(reason, "ItemAlreadyExists") && tries > 1) return addedSheet(context, wanted, tries - 1);
    if (hasCode(reason, "AccessDenied")) throw new WorkbookRefusal("structure", "Excel does not let a sheet be added: the workbook is protected or was opened for reading only. Nothing was written.");
    throw reason;
  }
  return sheet;
}

/** Gives the names one after the other: a request that is refused has then given none. */
async function addedNames(context: Excel.RequestContext, sheet: Excel.Worksheet, wanted: NonNullable<SheetPlan["names"]>): Promise<string[]> {
  if (wanted.length === 0) return [];
  const taken = await takenNames(context);
  return wanted.reduce<Promise<string[]>>(async (before, { name, range }) => {
    const given = await before;
    return [...given, await addedName(context, name, sheet.getRange(range), [...taken, ...given], TRIES)];
  }, Promise.resolve([]));
}

async function addedName(context: Excel.RequestContext, wanted: string, range: Excel.Range, taken: readonly string[], tries: number): Promise<string> {
  const free = freeDefinedName(wanted, taken);
  context.workbook.names.add(free, range);
  try {
    await context.sync();
  } catch (reason) {
    if (hasCode(reason, "ItemAlreadyExists") && tries > 1) return addedName(context, wanted, range, [...taken, free], tries - 1);
    throw reason;
  }
  return free;
}

/** What the person is told when a sheet that we have added could not be filled to the end: it is not deleted, because a deletion cannot be undone. */
function halfMade(sheet: string, reason: unknown): unknown {
  const refusal = asRefusal(reason);
  if (!(refusal instanceof WorkbookRefusal)) return refusal;
  return new WorkbookRefusal(refusal.kind, `The new sheet ${sheet} was added but could not be filled to the end. ${refusal.message} What stands on ${sheet} is not complete; delete that sheet. Nothing else was changed.`);
}
