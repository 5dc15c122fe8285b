import { basename, extname } from "node:path";
import type { SimulationTask } from "../../engine/index.js";
import { siteSheet } from "../../host/site-sheet.js";
import type { SheetPlan } from "../../host/workbook.js";
import { usualCounts } from "../../inputs/count.js";
import { InputError, parseSite, requireCount, type Site } from "../../inputs/index.js";
import type { TableLabels } from "../../jobs/simulation-state.js";
import { gridFunctions } from "../../practice/grid-functions.js";
import type { Book } from "../book.js";
import { Calculation } from "../calculation.js";
import { ErrorValue, type CellValue } from "../cell-value.js";
import { readCsv } from "../csv.js";
import { demonstrationBook } from "../demonstration.js";
import { misused, unreadable } from "../failure.js";
import { readNamedFile } from "../files.js";
import { readXlsx, type XlsxBook } from "../xlsx/read-book.js";

/** A workbook with a site block. */
export interface SiteSource {
  readonly site: Site;
  /** the workbook that results are added to; undefined where a new one is made */
  readonly xlsx: XlsxBook | undefined;
  /** the sheets of a new one */
  readonly sheets: readonly SheetPlan[];
  /** where the inputs stand, in words */
  readonly origin: string;
}

/**
 * Reads the site block named Site of a workbook.
 *
 * @param path  an xlsx, xlsm or csv; undefined for the demonstration
 * @throws {FormulaLineError} with the reason in words
 */
export function siteSource(path: string | undefined): SiteSource {
  if (path === undefined) return { site: siteOf(demonstrationBook(), "The demonstration"), xlsx: undefined, sheets: [siteSheet()], origin: "the demonstration" };
  const kind = extname(path).toLowerCase();
  const bytes = readNamedFile(path);
  if (kind === ".csv" || kind === ".tsv" || kind === ".txt") {
    const book = readCsv(bytes, basename(path, extname(path)));
    return { site: siteOf(book, basename(path)), xlsx: undefined, sheets: [planOf(book)], origin: basename(path) };
  }
  if (![".xlsx", ".xlsm", ".xls", ".xlsb", ".ods"].includes(kind)) throw misused(`--book takes an xlsx, xlsm or csv file, and ${basename(path)} is none by its name.`);
  const xlsx = readXlsx(bytes);
  return { site: siteOf(xlsx.book, basename(path)), xlsx, sheets: [], origin: `${basename(path)}, name Site` };
}

/**
 * The task of a site: its own method and design rule, one row a count.
 *
 * @param counts       undefined: those that the block asks for
 * @param interaction  true lets piles settle their neighbours, whatever the block says
 * @throws {FormulaLineError} a count that the site does not allow
 */
export function taskOf(site: Site, counts: readonly number[] | undefined, interaction: boolean): SimulationTask {
  const wanted = inWords(() => counts?.map((count) => requireCount(site, count, "A number of --counts")));
  const { problem: own, method } = site;
  const problem = interaction ? { ...own, piles: { ...own.piles, groupInteraction: true } } : own;
  return { variants: [{ name: method, problem }], counts: wanted ?? site.counts ?? usualCounts(site), seed: problem.seed };
}

/** How the site's tables are labelled. */
export function labelsOf({ units, money }: Site): TableLabels {
  return { units, money };
}

function siteOf(book: Book, name: string): Site {
  if (!book.names.some((entry) => entry.name.toLowerCase() === "site")) throw unreadable(`${name} has no range named Site; name the range of the site block so (labels, values, units and notes).`);
  const calculation = new Calculation(book, gridFunctions);
  try {
    const { values } = calculation.formula("=Site", book.activeSheet);
    return inWords(() => parseSite(values.map((row) => row.map(plain))));
  } finally {
    calculation.dispose();
  }
}

function inWords<T>(work: () => T): T {
  try {
    return work();
  } catch (reason) {
    if (reason instanceof InputError) throw unreadable(reason.message);
    throw reason;
  }
}

function plain(value: CellValue): string | number | boolean | null {
  return value instanceof ErrorValue ? value.code : value;
}

/** The sheet of a csv, for the workbook that its results go into. */
function planOf({ sheets, names }: Book): SheetPlan {
  const [sheet] = sheets;
  const range = names[0]?.meaning.replaceAll("$", "") ?? "A1";
  const cells = (sheet?.cells ?? []).map(({ row, column, value }) => ({ row, column, value: plain(value) ?? "" }));
  return { name: "Site", cells, names: [{ name: "Site", range }], columnWidths: [190, 130, 86, 560] };
}
