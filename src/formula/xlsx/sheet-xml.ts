import type { PlannedCell, SheetPlan } from "../../host/workbook.js";
import { areaAddress, COLUMNS, readReference, type Area } from "../addresses.js";
import type { CellValue } from "../cell-value.js";
import type { CellLook } from "./added-styles.js";
import { writtenCell, type WrittenCell } from "./new-cell.js";
import type { Namespace } from "./stored-formula.js";
import { validationsXml } from "./validation-xml.js";
import { escaped } from "./xml.js";

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const OFFICE = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";
const TITLE_HEIGHT = 25;

/** The table that a formula of a plan gives, at least one cell; undefined for a formula that is left out. */
export type ValuesOf = (row: number, column: number) => readonly (readonly CellValue[])[] | undefined;

/** What a new sheet's part needs besides its plan. */
export interface SheetSurroundings {
  /** of worksheets in this workbook */
  readonly namespace: string;
  /** number of a look by its key; undefined where the workbook's styles could not take it */
  readonly styleOf: ReadonlyMap<string, number>;
  /** absent: formulas are left out */
  readonly valuesOf?: ValuesOf;
  /** of the add-in that calculates our functions */
  readonly functions?: Namespace;
  /** relation of the part that draws the sheet's charts */
  readonly drawing?: string;
  /** the sheet that shows as the workbook opens */
  readonly isShown?: boolean;
  /** what stands below every printed page, besides its number */
  readonly footer?: string;
}

/** The looks that a sheet's cells have, each once. */
export function looksOf(plans: readonly SheetPlan[]): CellLook[] {
  const found = new Map<string, CellLook>();
  for (const { cells } of plans) for (const { style, look } of cells) found.set(lookKey({ style, look }), { style, look });
  return [...found.values()];
}

/** A look as a key. */
export function lookKey({ style, look }: CellLook): string {
  return `${style ?? ""} ${look ?? ""}`;
}

/**
 * A plan as a worksheet part. The format wants its elements in one order, which is that of the lines below.
 *
 * @param plan    the sheet
 * @param around  what the workbook says of it
 */
export function sheetXml(plan: SheetPlan, around: SheetSurroundings): string {
  const cells = writtenCells(plan, around);
  const rows = new Map<number, WrittenCell[]>();
  for (const cell of cells) rows.set(cell.row, [...(rows.get(cell.row) ?? []), cell]);
  const used = { top: 0, left: 0, bottom: Math.max(0, ...cells.map(({ row }) => row)), right: Math.max(0, ...cells.map(({ column }) => column)) };
  const titles = new Set(plan.cells.filter(({ style }) => style === "title").map(({ row }) => row));
  const columns = (plan.columnWidths ?? []).map((pixels, k) => `<col min="${k + 1}" max="${k + 1}" width="${((pixels - 5) / 7).toFixed(2)}" customWidth="1"/>`).join("");
  const data = [...rows].sort(([a], [b]) => a - b).map(([row, own]) => {
    const height = titles.has(row) ? ` ht="${TITLE_HEIGHT}" customHeight="1"` : "";
    return `<row r="${row + 1}"${height}>${[...own].sort((a, b) => a.column - b.column).map((cell) => writtenCell(cell, around.functions ?? "PROBE")).join("")}</row>`;
  });
  return [
    `${HEAD}<worksheet xmlns="${around.namespace}"${around.drawing === undefined ? "" : ` xmlns:r="${OFFICE}"`}>`,
    '<sheetPr><pageSetUpPr fitToPage="1"/></sheetPr>',
    `<dimension ref="${areaAddress(used)}"/>`,
    viewXml(plan, around.isShown === true),
    columns === "" ? "" : `<cols>${columns}</cols>`,
    `<sheetData>${data.join("")}</sheetData>`,
    validationsXml(plan.cells),
    '<pageMargins left="0.5" right="0.5" top="0.6" bottom="0.7" header="0.3" footer="0.3"/>',
    `<pageSetup orientation="landscape" fitToHeight="${plan.onePage === true ? 1 : 0}"/>`,
    around.footer === undefined ? "" : `<headerFooter><oddFooter>&amp;L&amp;A&amp;C${escaped(around.footer.replaceAll("&", "&&"))}&amp;RPage &amp;P of &amp;N</oddFooter></headerFooter>`,
    around.drawing === undefined ? "" : `<drawing r:id="${around.drawing}"/>`,
    "</worksheet>",
  ].join("");
}

/**
 * Every cell of a plan as it is written: its values and formulas, what the formulas spill, and blank cells that have a look.
 */
export function writtenCells({ cells }: SheetPlan, { styleOf, valuesOf }: Pick<SheetSurroundings, "styleOf" | "valuesOf">): WrittenCell[] {
  const found = new Map<number, WrittenCell>();
  const styled = (cell: PlannedCell): number | undefined => styleOf.get(lookKey({ style: cell.style, look: cell.look }));
  const put = (cell: WrittenCell): void => void found.set(cell.row * COLUMNS + cell.column, cell);
  for (const cell of cells) {
    const { row, column } = cell;
    const style = styled(cell);
    const table = cell.formula === undefined ? undefined : valuesOf?.(row, column);
    const value = cell.formula !== undefined || cell.value === undefined || cell.value === "" ? null : cell.value;
    if (table === undefined && value === null && style === undefined) continue;
    if (cell.formula === undefined || table === undefined) {
      if (!found.has(row * COLUMNS + column)) put({ row, column, value, style });
      continue;
    }
    const area: Area = { top: row, left: column, bottom: row + table.length - 1, right: column + (table[0]?.length ?? 1) - 1 };
    put({ row, column, value: table[0]?.[0] ?? null, formula: cell.formula, area, style });
    const lookAt = new Map(cells.filter((other) => other.row >= row && other.row <= area.bottom).map((other) => [other.row * COLUMNS + other.column, styled(other)]));
    table.forEach((line, r) => line.forEach((spilled, c) => {
      if (r > 0 || c > 0) put({ row: row + r, column: column + c, value: spilled, style: lookAt.get((row + r) * COLUMNS + column + c) });
    }));
  }
  return [...found.values()];
}

function viewXml({ frozenRows = 0 }: SheetPlan, isShown: boolean): string {
  const selected = isShown ? ' tabSelected="1"' : "";
  if (frozenRows === 0) return isShown ? `<sheetViews><sheetView${selected} workbookViewId="0"/></sheetViews>` : "";
  return `<sheetViews><sheetView${selected} workbookViewId="0"><pane ySplit="${frozenRows}" topLeftCell="A${frozenRows + 1}" activePane="bottomLeft" state="frozen"/><selection pane="bottomLeft" activeCell="A${frozenRows + 1}" sqref="A${frozenRows + 1}"/></sheetView></sheetViews>`;
}

/** Cells of one column of a plan, such as "F5:F17", from the first to the last. */
export function columnCells(range: string): { row: number; column: number }[] {
  const area = readReference(range.replaceAll("$", ""));
  if (area === undefined) throw new Error(`${range} is no range of a sheet`);
  return Array.from({ length: area.bottom - area.top + 1 }, (_, k) => ({ row: area.top + k, column: area.left }));
}
