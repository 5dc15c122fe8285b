import type { SheetPlan } from "../../host/workbook.js";
import { escaped, TagScanner } from "./xml.js";

/** The elements behind which the format wants the list of names, from the last on. */
const BEFORE = ["externalReferences", "functionGroups", "sheets"] as const;

/**
 * Adds the defined names of a plan to a workbook; those that are there stay as they are.
 *
 * @param xml     the workbook's own part, in which the sheet is named already
 * @param sheet   the name under which the plan's sheet stands in it
 * @param tables  names of the workbook's tables, which no other name may have
 * @returns      the part, and the names that were free: "Name", or "Name2" and so on where that is taken
 */
export function withNames(xml: string, { names = [] }: SheetPlan, sheet: string, tables: readonly string[]): { xml: string; names: string[] } {
  if (names.length === 0) return { xml, names: [] };
  const { taken, at, isEmptyTag, prefix } = namesIn(xml);
  for (const table of tables) taken.add(table.toLowerCase());
  const given: string[] = [];
  const written = names.map(({ name, range }) => {
    const free = freeName(name, taken);
    taken.add(free.toLowerCase());
    given.push(free);
    return `<${prefix}definedName name="${escaped(free)}">'${escaped(sheet.replaceAll("'", "''"))}'!${range.replace(/([A-Z]+)([0-9]+)/g, "$$$1$$$2")}</${prefix}definedName>`;
  });
  if (at.inside) return { xml: xml.slice(0, at.start) + written.join("") + xml.slice(at.end), names: given };
  const list = `<${prefix}definedNames>${written.join("")}</${prefix}definedNames>`;
  return { xml: xml.slice(0, at.start) + list + xml.slice(isEmptyTag ? at.end : at.start), names: given };
}

interface Names {
  /** in small letters */
  readonly taken: Set<string>;
  /** where new names go: inside the list, or instead of an empty one, or where the list belongs */
  readonly at: { readonly start: number; readonly end: number; readonly inside: boolean };
  readonly isEmptyTag: boolean;
  readonly prefix: string;
}

function namesIn(xml: string): Names {
  const scan = new TagScanner(xml);
  const taken = new Set<string>();
  const ends = new Map<string, number>();
  let list: Pick<Names, "at" | "isEmptyTag"> | undefined;
  let prefix = "";
  while (scan.next()) {
    if (scan.opens("sheets")) prefix = scan.prefix;
    if (scan.opens("definedName")) taken.add((scan.attributes().get("name") ?? "").toLowerCase());
    if (scan.opens("definedNames") && scan.isEmpty()) list = { at: { start: scan.start, end: scan.end, inside: false }, isEmptyTag: true };
    if (scan.closes("definedNames")) list = { at: { start: scan.start, end: scan.start, inside: true }, isEmptyTag: false };
    for (const name of BEFORE) if (scan.closes(name) || (scan.opens(name) && scan.isEmpty())) ends.set(name, scan.end);
  }
  const end = ends.get(BEFORE.find((name) => ends.has(name)) ?? "sheets") ?? xml.length;
  return { taken, prefix, ...(list ?? { at: { start: end, end, inside: false }, isEmptyTag: false }) };
}

function freeName(wanted: string, taken: ReadonlySet<string>): string {
  for (let number = 1; ; number++) {
    const name = number === 1 ? wanted : `${wanted}${number}`;
    if (!taken.has(name.toLowerCase())) return name;
  }
}
