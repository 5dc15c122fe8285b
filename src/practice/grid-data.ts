import { BooleanNumber, CellValueType, HorizontalAlign, LocaleType, WrapStrategy, type ICellData, type IStyleData, type IWorkbookData, type IWorksheetData } from "@univerjs/core";
import type { CellStyle, NumberLook, PlannedCell, SheetPlan } from "../host/workbook.js";

const GRID_NAMES = "SHEET_DEFINED_NAME_PLUGIN";
const WHOLE_WORKBOOK = "AllDefaultWorkbook";
const TITLE_HEIGHT = 34;

/**
 * Sheet plans as the grid's own form of a workbook.
 *
 * @param id     the grid's key of the workbook
 * @param plans  the sheets in order; their names are taken to be free and different
 */
export function workbookData(id: string, plans: readonly SheetPlan[]): IWorkbookData {
  const names = plans.flatMap((plan) => (plan.names ?? []).map(({ name, range }) => ({ name, reference: reference(plan.name, range) })));
  return {
    id,
    name: "Demonstration bid",
    appVersion: "",
    locale: LocaleType.EN_US,
    styles: {},
    sheetOrder: plans.map((_, index) => `sheet-${index + 1}`),
    sheets: Object.fromEntries(plans.map((plan, index) => [`sheet-${index + 1}`, sheetData(`sheet-${index + 1}`, plan)])),
    resources: [
      {
        name: GRID_NAMES,
        data: JSON.stringify(
          Object.fromEntries(
            names.map(({ name, reference: formulaOrRefString }) => [name, { id: name, name, formulaOrRefString, localSheetId: WHOLE_WORKBOOK }]),
          ),
        ),
      },
    ],
  };
}

/** One sheet of a plan in the grid's form. */
export function sheetData(id: string, plan: SheetPlan): Partial<IWorksheetData> {
  const cellData: Record<number, Record<number, ICellData>> = {};
  let rows = 0;
  let columns = 0;
  for (const cell of plan.cells) {
    (cellData[cell.row] ??= {})[cell.column] = cellOf(cell);
    rows = Math.max(rows, cell.row + 1);
    columns = Math.max(columns, cell.column + 1);
  }
  return {
    id,
    name: plan.name,
    cellData,
    rowCount: Math.max(rows + 40, 100),
    columnCount: Math.max(columns + 6, 16),
    columnData: Object.fromEntries((plan.columnWidths ?? []).map((w, column) => [column, { w }])),
    rowData: Object.fromEntries(plan.cells.filter(({ style }) => style === "title").map(({ row }) => [row, { h: TITLE_HEIGHT }])),
    defaultColumnWidth: 88,
    defaultRowHeight: 22,
    showGridlines: BooleanNumber.TRUE,
  };
}

/** "Site" and "A3:D60" as the grid writes them: 'Cost plan'!$A$3:$D$60. */
export function reference(sheet: string, range: string): string {
  const quoted = /^[A-Za-z_][A-Za-z0-9_]*$/.test(sheet) ? sheet : `'${sheet.replaceAll("'", "''")}'`;
  return `${quoted}!${range.replace(/([A-Z]+)(\d+)/g, "$$$1$$$2")}`;
}

function cellOf(cell: PlannedCell): ICellData {
  const style = { ...(cell.style === undefined ? {} : STYLES[cell.style]), ...(cell.look === undefined ? {} : { n: { pattern: LOOKS[cell.look] } }) };
  const data: ICellData = { s: style };
  if (cell.formula !== undefined) data.f = cell.formula;
  else if (typeof cell.value === "number") Object.assign(data, { v: cell.value, t: CellValueType.NUMBER });
  else if (typeof cell.value === "boolean") Object.assign(data, { v: cell.value ? 1 : 0, t: CellValueType.BOOLEAN });
  else if (cell.value !== undefined && cell.value !== "") Object.assign(data, { v: cell.value, t: CellValueType.STRING });
  return data;
}

const RULE = { s: 1, cl: { rgb: "#c8ccd2" } };

const INDENT = { l: 5 };
const HEAD: IStyleData = { pd: INDENT, bl: BooleanNumber.TRUE, bg: { rgb: "#e2eeec" }, bd: { b: { s: 1, cl: { rgb: "#0b4a53" } } } };

const STYLES: Record<CellStyle, IStyleData> = {
  title: { pd: INDENT, fs: 15, bl: BooleanNumber.TRUE, cl: { rgb: "#0b4a53" } },
  section: { pd: INDENT, bl: BooleanNumber.TRUE, cl: { rgb: "#0b4a53" }, bg: { rgb: "#e2eeec" } },
  label: { pd: INDENT },
  input: { pd: INDENT, cl: { rgb: "#1c3f9e" }, bg: { rgb: "#fff6d6" }, bd: { b: RULE, t: RULE, l: RULE, r: RULE } },
  result: { bg: { rgb: "#f0f5ef" }, bd: { b: RULE, t: RULE, l: RULE, r: RULE } },
  note: { pd: INDENT, cl: { rgb: "#5c6670" }, fs: 10, tb: WrapStrategy.OVERFLOW },
  head: HEAD,
  numberhead: { ...HEAD, ht: HorizontalAlign.RIGHT },
};

const LOOKS: Record<NumberLook, string> = { money: "#,##0", ratio: "0.00", metres: "0.0", percent: "0.0%" };
