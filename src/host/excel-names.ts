import { hasCode } from "./excel-refusal.js";
import { isOnePlace } from "./one-place.js";

/** A defined name that may stand for one range. */
interface Candidate {
  readonly name: string;
  readonly item: Excel.NamedItem;
}

/**
 * The name's range: that of the workbook before that of the sheet in front before those of the other sheets.
 *
 * @param name  in any case
 * @returns     undefined where no such name stands for one range
 */
export async function rangeOfName(context: Excel.RequestContext, name: string): Promise<Excel.Range | undefined> {
  const wanted = name.trim().toLowerCase();
  // A name of the workbook, the usual case, is found without the lists of all sheets; Excel knows names in any case.
  const item = context.workbook.names.getItemOrNullObject(name.trim());
  item.load("name,type,formula");
  await context.sync();
  if (!item.isNullObject && isRange(item)) {
    const own = await withRange(context, [{ name: item.name, item }]);
    if (own[0] !== undefined) return own[0].range;
  }
  const found = (await candidates(context)).filter((candidate) => candidate.name.toLowerCase() === wanted);
  return (await withRange(context, found))[0]?.range;
}

/** The names that stand for one range, each once, in the order of the alphabet. */
export async function namesOfRanges(context: Excel.RequestContext): Promise<string[]> {
  const found = await withRange(context, await candidates(context));
  const names = new Map(found.map(({ name }): [string, string] => [name.toLowerCase(), name]).reverse());
  return [...names.values()].sort((a, b) => a.localeCompare(b));
}

/** Every defined name and the names of all tables, which share one list with them. */
export async function takenNames(context: Excel.RequestContext): Promise<string[]> {
  const { tables } = context.workbook;
  tables.load("items/name");
  const lists = await allNames(context);
  return [...lists.flatMap(({ items }) => items.map(({ name }) => name)), ...tables.items.map(({ name }) => name)];
}

async function candidates(context: Excel.RequestContext): Promise<Candidate[]> {
  const lists = await allNames(context);
  return lists.flatMap(({ items }) => items.filter((item) => item.visible && isRange(item)).map((item) => ({ name: item.name, item })));
}

/** The lists of the workbook, of the sheet in front and of all sheets, in this order. */
async function allNames(context: Excel.RequestContext): Promise<Excel.NamedItemCollection[]> {
  const { worksheets, names } = context.workbook;
  const front = worksheets.getActiveWorksheet();
  worksheets.load("items/id");
  front.load("id");
  names.load("items/name,items/visible,items/type,items/formula");
  await context.sync();
  const sheets = [...worksheets.items].sort((a, b) => Number(b.id === front.id) - Number(a.id === front.id));
  const own = sheets.map((sheet) => sheet.names);
  for (const list of own) list.load("items/name,items/visible,items/type,items/formula");
  await context.sync();
  return [names, ...own];
}

function isRange({ type, formula }: Excel.NamedItem): boolean {
  return type === "Range" && isOnePlace(String(formula));
}

interface Found extends Candidate {
  readonly range: Excel.Range;
}

async function withRange(context: Excel.RequestContext, found: readonly Candidate[]): Promise<Found[]> {
  const ranges = found.map(({ name, item }) => ({ name, item, range: item.getRangeOrNullObject() }));
  for (const { range } of ranges) range.load("address");
  try {
    await context.sync();
  } catch (reason) {
    // One name that Excel cannot resolve fails the whole request: the halves tell which it is.
    if (!hasCode(reason, "InvalidReference", "InvalidArgument", "GeneralException", "ItemNotFound", "InvalidOperation") || found.length === 0) throw reason;
    if (found.length === 1) return [];
    const middle = Math.ceil(found.length / 2);
    return [...(await withRange(context, found.slice(0, middle))), ...(await withRange(context, found.slice(middle)))];
  }
  return ranges.filter(({ range }) => !range.isNullObject);
}
